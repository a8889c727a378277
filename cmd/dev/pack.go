package main

import (
	"archive/tar"
	"archive/zip"
	"bytes"
	"compress/gzip"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"time"

	"anodewright/assets/icon"
)

// packed is one file of a package.
type packed struct {
	name string // with slashes
	mode os.FileMode
	data []byte
}

const desktopEntry = `[Desktop Entry]
Type=Application
Name=Anodewright
GenericName=Anode renewal planner
Comment=Plan the renewal of anodes on ships and offshore steel
Exec=anodewright
Icon=anodewright
Terminal=false
Categories=Science;Engineering;
StartupWMClass=Anodewright
`

const installScript = `#!/bin/sh
# Installs Anodewright for this user, or below the folder in PREFIX.
set -eu
prefix=${PREFIX:-$HOME/.local}
cd "$(dirname "$0")"
mkdir -p "$prefix"
cp -R bin share "$prefix/"
entry=$prefix/share/applications/anodewright.desktop
sed "s|^Exec=.*|Exec=\"$prefix/bin/anodewright\"|" share/applications/anodewright.desktop > "$entry"
echo "Anodewright is in $prefix: start $prefix/bin/anodewright"
`

// pack writes the tarball, the exe and the zip.
func (b bundle) pack() error {
	at, err := stamp(b.root)
	if err != nil {
		return err
	}
	common, err := b.common()
	if err != nil {
		return err
	}
	read := func(name string) []byte {
		data, e := os.ReadFile(b.built(name))
		if e != nil {
			err = e
		}
		return data
	}
	linux := append(slices.Clone(common),
		packed{"bin/anodewright", 0o755, read("anodewright")},
		packed{"bin/anodewright-schedule", 0o755, read("anodewright-schedule")},
		packed{"share/applications/anodewright.desktop", 0o644, []byte(desktopEntry)},
		packed{"share/icons/hicolor/scalable/apps/anodewright.svg", 0o644, icon.SVG()},
		packed{"install.sh", 0o755, []byte(installScript)})
	for _, s := range icon.Sizes {
		linux = append(linux, packed{fmt.Sprintf("share/icons/hicolor/%dx%[1]d/apps/anodewright.png", s), 0o644, icon.PNG(s)})
	}
	exe := read("anodewright.exe")
	if err != nil {
		return err
	}
	windows := append(slices.Clone(common), packed{"anodewright.exe", 0o755, exe})
	folder := "anodewright-" + b.version + "/"
	for name, data := range map[string]func() ([]byte, error){
		b.tarball(): func() ([]byte, error) { return tarGz(folder, linux, at) },
		b.zip():     func() ([]byte, error) { return zipped(folder, windows, at) },
		b.exe():     func() ([]byte, error) { return exe, nil },
	} {
		text, err := data()
		if err != nil {
			return err
		}
		if err := os.WriteFile(b.out(name), text, 0o644); err != nil {
			return err
		}
		fmt.Printf("  %s, %.1f MB\n", filepath.Join("dist", name), float64(len(text))/1e6)
	}
	return nil
}

// common are the files of every package: the notes, the demo fleet and the
// licences of what the programs are made of.
func (b bundle) common() (all []packed, err error) {
	add := func(name, path string) error {
		data, err := os.ReadFile(path)
		all = append(all, packed{name, 0o644, data})
		return err
	}
	if err := add("README.md", filepath.Join(b.root, "README.md")); err != nil {
		return nil, err
	}
	if err := add("assets/screenshot.png", filepath.Join(b.root, "assets", "screenshot.png")); err != nil {
		return nil, err // README.md shows it
	}
	demo, err := filepath.Glob(filepath.Join(b.root, "assets", "demo", "*.json"))
	if err != nil || len(demo) == 0 {
		return nil, fmt.Errorf("no demo fleet in %s", filepath.Join(b.root, "assets", "demo"))
	}
	for _, path := range demo {
		if err := add("demo/"+filepath.Base(path), path); err != nil {
			return nil, err
		}
	}
	licences, err := b.licences()
	return append(all, licences...), err
}

// stamp is the time that packed files carry: that of the last commit, so that
// equal sources give equal packages.
func stamp(root string) (time.Time, error) {
	text := os.Getenv("SOURCE_DATE_EPOCH")
	if text == "" {
		cmd := exec.Command("git", "-c", "safe.directory=*", "log", "-1", "--format=%ct")
		cmd.Dir = root
		out, err := cmd.Output()
		if err != nil {
			return time.Unix(1_000_000_000, 0).UTC(), nil // no git: any time, always the same
		}
		text = strings.TrimSpace(string(out))
	}
	seconds, err := strconv.ParseInt(text, 10, 64)
	if err != nil {
		return time.Time{}, fmt.Errorf("the time of the sources: %w", err)
	}
	return time.Unix(seconds, 0).UTC(), nil
}

// ordered sorts the files by name.
func ordered(files []packed) []packed {
	files = slices.Clone(files)
	slices.SortFunc(files, func(a, b packed) int { return strings.Compare(a.name, b.name) })
	return files
}

func tarGz(folder string, files []packed, at time.Time) ([]byte, error) {
	var b bytes.Buffer
	z := gzip.NewWriter(&b)
	t := tar.NewWriter(z)
	for _, f := range ordered(files) {
		if err := t.WriteHeader(&tar.Header{Name: folder + f.name, Mode: int64(f.mode), Size: int64(len(f.data)), ModTime: at, Format: tar.FormatPAX}); err != nil {
			return nil, err
		}
		if _, err := t.Write(f.data); err != nil {
			return nil, err
		}
	}
	if err := t.Close(); err != nil {
		return nil, err
	}
	err := z.Close()
	return b.Bytes(), err
}

func zipped(folder string, files []packed, at time.Time) ([]byte, error) {
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for _, f := range ordered(files) {
		h := &zip.FileHeader{Name: folder + f.name, Method: zip.Deflate, Modified: at}
		h.SetMode(f.mode)
		w, err := z.CreateHeader(h)
		if err != nil {
			return nil, err
		}
		if _, err := w.Write(f.data); err != nil {
			return nil, err
		}
	}
	err := z.Close()
	return b.Bytes(), err
}
