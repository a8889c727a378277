package main

import (
	"bytes"
	"fmt"
	"go/format"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
)

// checkFormat returns an error that names the Go files under root which gofmt
// would change. It looks at the files git tracks, or without git at all files
// outside folders that begin with a dot.
func checkFormat(root string) error {
	files, err := trackedGoFiles(root)
	if err != nil {
		files, err = walkGoFiles(root)
	}
	if err != nil {
		return err
	}
	var bad []string
	for _, file := range files {
		text, err := os.ReadFile(filepath.Join(root, file))
		if os.IsNotExist(err) {
			continue // deleted, but still tracked
		}
		if err != nil {
			return err
		}
		if tidy, err := format.Source(text); err != nil || !bytes.Equal(text, tidy) {
			bad = append(bad, file)
		}
	}
	if len(bad) > 0 {
		return fmt.Errorf("run gofmt -w %s", strings.Join(bad, " "))
	}
	return nil
}

// trackedGoFiles returns the Go files git tracks, relative to root.
func trackedGoFiles(root string) ([]string, error) {
	// The checkout may belong to another user, as in a container.
	cmd := exec.Command("git", "-c", "safe.directory=*", "ls-files", "-z", "*.go")
	cmd.Dir = root
	out, err := cmd.Output()
	if err != nil {
		return nil, err
	}
	return strings.FieldsFunc(string(out), func(r rune) bool { return r == 0 }), nil
}

// walkGoFiles returns all Go files under root, relative to it, leaving out
// folders that begin with a dot.
func walkGoFiles(root string) ([]string, error) {
	var files []string
	err := fs.WalkDir(os.DirFS(root), ".", func(path string, d fs.DirEntry, err error) error {
		switch {
		case err != nil:
			return err
		case d.IsDir() && path != "." && strings.HasPrefix(d.Name(), "."):
			return fs.SkipDir
		case !d.IsDir() && strings.HasSuffix(path, ".go"):
			files = append(files, path)
		}
		return nil
	})
	return files, err
}
