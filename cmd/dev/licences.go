package main

import (
	"fmt"
	"io/fs"
	"maps"
	"os"
	"os/exec"
	"path"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
)

// licenceFile are the names that licence texts and notices go by.
var licenceFile = regexp.MustCompile(`(?i)^(licen[cs]es?|copying|copyright|notice|unlicense|ofl)([-._].*)?$`)

// licences returns the licence texts of Go, of the font and of every module
// that the programs are made of, on Linux and on Windows.
func (b bundle) licences() ([]packed, error) {
	modules := map[string]string{} // folder by path and version
	for _, goos := range []string{"linux", "windows"} {
		found, err := modulesOf(b.root, goos)
		if err != nil {
			return nil, err
		}
		maps.Copy(modules, found)
	}
	goroot, err := exec.Command("go", "env", "GOROOT").Output()
	if err != nil {
		return nil, fmt.Errorf("asking go where it is: %w", err)
	}
	modules["go"] = strings.TrimSpace(string(goroot))
	modules["font"] = filepath.Join(b.root, "assets", "font")
	var all []packed
	for _, name := range slices.Sorted(maps.Keys(modules)) {
		texts, err := licenceTexts(name, modules[name])
		if err != nil {
			return nil, err
		}
		all = append(all, texts...)
	}
	return all, nil
}

// modulesOf returns the folder of every module that the programs use.
func modulesOf(root, goos string) (map[string]string, error) {
	cmd := exec.Command("go", "list", "-deps", "-tags", "migrated_fynedo",
		"-f", "{{with .Module}}{{if not .Main}}{{.Path}}@{{.Version}}\t{{.Dir}}{{end}}{{end}}", appPackage, "./cmd/schedule")
	cmd.Dir = root
	// With C, whose bindings are modules too, though nothing is compiled.
	cmd.Env = append(os.Environ(), "GOOS="+goos, "GOARCH=amd64", "CGO_ENABLED=1")
	out, err := cmd.Output()
	if err != nil {
		return nil, fmt.Errorf("asking go for the modules used: %w", err)
	}
	modules := map[string]string{}
	for _, line := range strings.Split(string(out), "\n") {
		if name, dir, ok := strings.Cut(line, "\t"); ok {
			modules[name] = dir
		}
	}
	return modules, nil
}

// licenceTexts returns the licence files of a module: those of what it is
// made of too, but not those of its tests.
func licenceTexts(module, dir string) (all []packed, err error) {
	err = fs.WalkDir(os.DirFS(dir), ".", func(name string, d fs.DirEntry, err error) error {
		switch {
		case err != nil:
			return err
		case d.IsDir():
			base := d.Name()
			if name != "." && (base == "testdata" || base == "test" || base == "cmd" || strings.HasPrefix(base, ".")) || module == "go" && name != "." {
				return fs.SkipDir
			}
		case licenceFile.MatchString(d.Name()) && !strings.HasSuffix(d.Name(), ".go"):
			text, err := os.ReadFile(filepath.Join(dir, filepath.FromSlash(name)))
			all = append(all, packed{path.Join("licences", strings.ReplaceAll(module, "/", "_"), name), 0o644, text})
			return err
		}
		return nil
	})
	if err == nil && len(all) == 0 {
		err = fmt.Errorf("%s has no licence file", module)
	}
	return all, err
}
