package main

import (
	"archive/tar"
	"archive/zip"
	"bytes"
	"compress/gzip"
	"encoding/binary"
	"image/png"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"anodewright/assets"
	"anodewright/assets/icon"
)

func TestPackagePlan(t *testing.T) {
	p, err := planPackage(fake(), nil)
	if err != nil {
		t.Fatal(err)
	}
	want := []string{
		"go build -v -buildvcs=false -tags migrated_fynedo -trimpath -ldflags=-s -w -o /src/dist/build/anodewright ./cmd/anodewright",
		"go build -buildvcs=false -trimpath -ldflags=-s -w -o /src/dist/build/anodewright-schedule ./cmd/schedule",
		"",
		"x86_64-w64-mingw32-windres --include-dir /src/dist/build -i /src/dist/build/resource.rc -o /src/dist/build/resource.o",
		"go build -v -buildvcs=false -tags migrated_fynedo -trimpath -ldflags=-s -w -H windowsgui -extld=x86_64-w64-mingw32-gcc '-extldflags=/src/dist/build/resource.o' -o /src/dist/build/anodewright.exe ./cmd/anodewright",
		"",
	}
	if got := argvs(p.first); !slices.Equal(got, want) {
		t.Errorf("first\n%s\nwant\n%s", strings.Join(got, "\n"), strings.Join(want, "\n"))
	}
	for i, env := range map[int][]string{0: {"CGO_ENABLED=1", "CC=clang"}, 1: {"CGO_ENABLED=0"}, 4: {"GOOS=windows", "CC=clang --target=x86_64-w64-mingw32"}} {
		for _, v := range env {
			if !slices.Contains(p.first[i].env, v) {
				t.Errorf("%s: built with %q, want %s", p.first[i].name, p.first[i].env, v)
			}
		}
	}
	b := bundle{root: "/src", version: "1.2.3", arch: "amd64"}
	if got, want := b.tarball()+" "+b.exe(), "anodewright-1.2.3-linux-amd64.tar.gz anodewright-1.2.3-windows-amd64.exe"; got != want {
		t.Errorf("the packages are called %s, want %s", got, want)
	}
}

func TestPackageInstallsTheCrossCompiler(t *testing.T) {
	p, err := planPackage(fake("x86_64-w64-mingw32-windres"), nil)
	if err != nil {
		t.Fatal(err)
	}
	if first := argvs(p.first)[0]; !strings.HasSuffix(first, "--no-remove gcc-mingw-w64-x86-64") {
		t.Errorf("first %q, want the installation of the cross-compiler", first)
	}
	if len(p.notes) != 1 || !strings.Contains(p.notes[0], "gcc-mingw-w64-x86-64 to link the Windows app") {
		t.Errorf("it says %q", p.notes)
	}
	// Without clang and without a way to install it, gcc does all.
	p, err = planPackage(fake("clang", "apt-get"), nil)
	if err != nil {
		t.Fatal(err)
	}
	if exe := p.first[4]; !slices.Contains(exe.env, "CC=x86_64-w64-mingw32-gcc") || strings.Contains(strings.Join(exe.argv, " "), "extld=") {
		t.Errorf("built with %q by %q", exe.env, exe.argv)
	}
}

func TestPackageRefusals(t *testing.T) {
	other := fake()
	other.goos = "windows"
	if _, err := planPackage(other, nil); err == nil || !strings.Contains(err.Error(), "made on Linux") {
		t.Errorf("on Windows: %v", err)
	}
	if _, err := planPackage(fake(), []string{"x"}); err == nil {
		t.Error("an argument is taken")
	}
}

func TestVersionIsThreeNumbers(t *testing.T) {
	parts := strings.Split(assets.Version, ".")
	if len(parts) != 3 || strings.Trim(assets.Version, "0123456789.") != "" {
		t.Errorf("the version %q is not three numbers, as Windows wants it", assets.Version)
	}
	script := resourceScript("1.22.3")
	for _, want := range []string{"FILEVERSION 1,22,3,0\n", `VALUE "ProductVersion", "1.22.3"`, `1 ICON "icon.ico"`} {
		if !strings.Contains(script, want) {
			t.Errorf("the resource script lacks %s", want)
		}
	}
}

func TestIcoHoldsEverySize(t *testing.T) {
	b := ico(icoSizes, icon.PNG)
	if n := binary.LittleEndian.Uint16(b[4:]); int(n) != len(icoSizes) {
		t.Fatalf("%d pictures, want %d", n, len(icoSizes))
	}
	for i, size := range icoSizes {
		entry := b[6+16*i:]
		from, n := binary.LittleEndian.Uint32(entry[12:]), binary.LittleEndian.Uint32(entry[8:])
		img, err := png.Decode(bytes.NewReader(b[from : from+n]))
		if err != nil {
			t.Fatal(err)
		}
		if img.Bounds().Dx() != size || int(entry[0]) != size%256 {
			t.Errorf("picture %d is %v, its entry says %d, want %d", i, img.Bounds(), entry[0], size)
		}
	}
}

// Every module has its licence text in the packages, and Go and the font too.
func TestEveryModuleHasItsLicence(t *testing.T) {
	root, err := moduleRoot()
	if err != nil {
		t.Fatal(err)
	}
	texts, err := bundle{root: root}.licences()
	if err != nil {
		t.Fatal(err)
	}
	for _, part := range []string{"licences/go/LICENSE", "licences/font/", "licences/fyne.io_fyne_v2@", "licences/github.com_xuri_excelize_v2@", "licences/modernc.org_sqlite@", "licences/github.com_go-gl_glfw_"} {
		if !slices.ContainsFunc(texts, func(f packed) bool { return strings.HasPrefix(f.name, part) && len(f.data) > 200 }) {
			t.Errorf("no text in %s", part)
		}
	}
	if _, err := licenceTexts("bare", t.TempDir()); err == nil {
		t.Error("a module without a licence is packed")
	}
}

// sample is a bundle of small files in place of programs.
func sample(t *testing.T) bundle {
	t.Helper()
	real, err := moduleRoot()
	if err != nil {
		t.Fatal(err)
	}
	root := t.TempDir()
	for _, name := range []string{"README.md", "assets", "go.mod", "go.sum", "cmd", "app", "hull", "anodes", "storage"} {
		if err := os.Symlink(filepath.Join(real, name), filepath.Join(root, name)); err != nil {
			t.Fatal(err)
		}
	}
	b := bundle{root: root, version: "1.2.3", arch: "amd64"}
	if err := os.MkdirAll(b.built("."), 0o755); err != nil {
		t.Fatal(err)
	}
	for _, name := range []string{"anodewright", "anodewright-schedule", "anodewright.exe"} {
		if err := os.WriteFile(b.built(name), []byte("#!/bin/sh\necho "+name+"\n"), 0o755); err != nil {
			t.Fatal(err)
		}
	}
	return b
}

func TestPackagesHoldWhatIsHandedOut(t *testing.T) {
	t.Setenv("SOURCE_DATE_EPOCH", "1700000000")
	b := sample(t)
	if err := b.pack(); err != nil {
		t.Fatal(err)
	}
	first, err := os.ReadFile(b.out(b.tarball()))
	if err != nil {
		t.Fatal(err)
	}
	z, err := gzip.NewReader(bytes.NewReader(first))
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for r := tar.NewReader(z); ; {
		h, err := r.Next()
		if err == io.EOF {
			break
		}
		if err != nil {
			t.Fatal(err)
		}
		name, inside := strings.CutPrefix(h.Name, "anodewright-1.2.3/")
		if !inside || !h.ModTime.Equal(time.Unix(1_700_000_000, 0)) {
			t.Errorf("%s of %s", h.Name, h.ModTime)
		}
		if program := strings.HasPrefix(name, "bin/") || name == "install.sh"; program != (h.Mode&0o111 != 0) {
			t.Errorf("%s has the mode %o", name, h.Mode)
		}
		names = append(names, name)
	}
	for _, want := range []string{
		"README.md", "bin/anodewright", "bin/anodewright-schedule", "demo/1-tern-passage.json", "install.sh", "licences/go/LICENSE",
		"share/applications/anodewright.desktop", "share/icons/hicolor/48x48/apps/anodewright.png", "share/icons/hicolor/scalable/apps/anodewright.svg",
	} {
		if !slices.Contains(names, want) {
			t.Errorf("the tarball lacks %s", want)
		}
	}
	w, err := zip.OpenReader(b.out(b.zip()))
	if err != nil {
		t.Fatal(err)
	}
	defer w.Close()
	if _, err := w.Open("anodewright-1.2.3/anodewright.exe"); err != nil {
		t.Error(err)
	}
	if err := b.pack(); err != nil {
		t.Fatal(err)
	}
	if again, _ := os.ReadFile(b.out(b.tarball())); !bytes.Equal(first, again) {
		t.Error("equal sources give unequal tarballs")
	}
}

// The tarball is unpacked and installed: the program runs from where it is.
func TestTheTarballInstalls(t *testing.T) {
	if _, err := exec.LookPath("tar"); err != nil {
		t.Skip("tar is not on the PATH")
	}
	b := sample(t)
	if err := b.pack(); err != nil {
		t.Fatal(err)
	}
	dir, prefix := t.TempDir(), filepath.Join(t.TempDir(), "a folder")
	if out, err := exec.Command("tar", "-xzf", b.out(b.tarball()), "-C", dir).CombinedOutput(); err != nil {
		t.Fatalf("tar: %v\n%s", err, out)
	}
	install := exec.Command(filepath.Join(dir, "anodewright-1.2.3", "install.sh"))
	install.Env = append(os.Environ(), "PREFIX="+prefix)
	if out, err := install.CombinedOutput(); err != nil {
		t.Fatalf("install.sh: %v\n%s", err, out)
	}
	entry, err := os.ReadFile(filepath.Join(prefix, "share", "applications", "anodewright.desktop"))
	if err != nil || !strings.Contains(string(entry), "\nExec=\""+prefix+"/bin/anodewright\"\n") || !strings.Contains(string(entry), "\nIcon=anodewright\n") {
		t.Errorf("the desktop entry is %q, %v", entry, err)
	}
	if out, err := exec.Command(filepath.Join(prefix, "bin", "anodewright")).Output(); err != nil || string(out) != "anodewright\n" {
		t.Errorf("the program says %q, %v", out, err)
	}
}
