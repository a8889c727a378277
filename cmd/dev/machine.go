package main

import (
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
)

// machine is what planning has to know about the computer it plans for.
type machine struct {
	root     string // the module's folder
	goos     string // as runtime.GOOS
	goarch   string // as runtime.GOARCH
	admin    bool   // runs as root
	aptLists bool   // apt-get has package lists to install from

	hasTool func(name string) bool    // a program is in PATH
	hasFile func(pattern string) bool // a file matches the glob pattern
}

// thisMachine describes the computer the program runs on.
func thisMachine(root string) machine {
	hasFile := func(pattern string) bool {
		found, err := filepath.Glob(pattern)
		return err == nil && len(found) > 0
	}
	return machine{
		root:     root,
		goos:     runtime.GOOS,
		goarch:   runtime.GOARCH,
		admin:    os.Geteuid() == 0,
		aptLists: hasFile("/var/lib/apt/lists/*_Packages*"),
		hasTool: func(name string) bool {
			_, err := exec.LookPath(name)
			return err == nil
		},
		hasFile: hasFile,
	}
}

// meets reports whether everything the need names is there.
func (m machine) meets(n need) bool {
	for _, tool := range n.tools {
		if !m.hasTool(tool) {
			return false
		}
	}
	for _, file := range n.files {
		if !m.hasFile(file) {
			return false
		}
	}
	return true
}

// binary returns the full path of a program built into bin.
func (m machine) binary(name string) string {
	if m.goos == "windows" {
		name += ".exe"
	}
	return filepath.Join(m.root, "bin", name)
}
