package main

import (
	"errors"
	"path/filepath"

	"anodewright/assets"
)

// packageNeeds are what packaging calls for beyond buildNeeds.
var packageNeeds = []need{
	{
		pkg: "gcc-mingw-w64-x86-64", why: "link the Windows app",
		tools: []string{mingw + "-gcc", mingw + "-windres"},
	},
}

// mingw is how the tools that make Windows programs are called.
const mingw = "x86_64-w64-mingw32"

// planPackage plans to make what is handed out: a tarball for Linux, and an
// exe for Windows with a zip of it, all in the folder dist.
func planPackage(m machine, args []string) (plan, error) {
	if len(args) > 0 {
		return plan{}, errors.New("package takes no arguments")
	}
	if m.goos != "linux" {
		return plan{}, errors.New("packages are made on Linux, also the one for Windows")
	}
	p, err := planSetUp(m, append(append([]need{}, buildNeeds...), packageNeeds...))
	if err != nil {
		return p, err
	}
	b := bundle{root: m.root, version: assets.Version, arch: m.goarch}
	const release = "-trimpath"
	windows := []string{"CGO_ENABLED=1", "GOOS=windows", "GOARCH=amd64", "CC=" + mingw + "-gcc"}
	link := "-ldflags=-s -w -H windowsgui"
	if m.hasTool("clang") || m.hasTool("apt-get") {
		// clang compiles much faster than gcc, but cannot link for Windows.
		windows[3] = "CC=clang --target=" + mingw
		link += " -extld=" + mingw + "-gcc"
	}
	link += " '-extldflags=" + b.built("resource.o") + "'"
	p.first = append(p.first,
		step{kind: stepBuild, name: "Linux app", env: windowEnv(m),
			argv: goBuild(b.built("anodewright"), "-tags", "migrated_fynedo", release, "-ldflags=-s -w")},
		step{kind: stepRun, name: "Linux command", env: []string{"CGO_ENABLED=0"},
			argv: []string{"go", "build", "-buildvcs=false", release, "-ldflags=-s -w", "-o", b.built("anodewright-schedule"), "./cmd/schedule"}},
		step{kind: stepDo, name: "icon and version for Windows", do: b.resource},
		step{kind: stepRun, name: "windres",
			argv: []string{mingw + "-windres", "--include-dir", b.built("."), "-i", b.built("resource.rc"), "-o", b.built("resource.o")}},
		step{kind: stepBuild, name: "Windows app", env: windows,
			argv: goBuild(b.built("anodewright.exe"), "-tags", "migrated_fynedo", release, link)},
		step{kind: stepDo, name: "packages", do: b.pack},
	)
	p.summary = true
	return p, nil
}

// bundle is what is handed out of one version.
type bundle struct{ root, version, arch string }

// built returns the path of a file that packaging makes on its way.
func (b bundle) built(name string) string { return filepath.Join(b.root, "dist", "build", name) }

// out returns the path of a file that is handed out.
func (b bundle) out(name string) string { return filepath.Join(b.root, "dist", name) }

// tarball, exe and zip are the names of the packages.
func (b bundle) tarball() string { return "anodewright-" + b.version + "-linux-" + b.arch + ".tar.gz" }
func (b bundle) exe() string     { return "anodewright-" + b.version + "-windows-amd64.exe" }
func (b bundle) zip() string     { return "anodewright-" + b.version + "-windows-amd64.zip" }
