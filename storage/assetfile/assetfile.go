// Package assetfile reads and writes the asset file: one JSON file that holds
// one asset, with SI units in its field names.
//
// It is strict both ways. What it does not know is refused with the path of
// the field, never dropped, and what it reads it writes back. Files of
// version 1 will open in every later version of the program.
package assetfile

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"reflect"
	"runtime"
	"slices"
	"strconv"
	"strings"
	"syscall"

	"anodewright/hull"
)

// Format, Version and Minor head every asset file.
const (
	Format  = "anodewright-asset"
	Version = 1
	Minor   = 0
)

// MaxSize is the largest asset file that is read, in bytes. An asset of 2000
// zones takes about 2 MB.
const MaxSize = 32 << 20

// head is the start of the file, before the asset's own fields.
type head struct {
	Format  string `json:"format" need:"yes"`
	Version int    `json:"version" need:"yes"`
	Minor   int    `json:"minor"`
}

// Decode reads an asset. The error is of type hull.Faults when the text is
// JSON but not a valid asset; the asset is returned with them as far as it
// could be read, so that an editor can show what is there.
func Decode(text []byte) (*hull.Asset, error) {
	if len(text) > MaxSize {
		return nil, tooLarge(int64(len(text)))
	}
	tree, err := parse(text)
	if err != nil {
		return nil, err
	}
	object, ok := tree.(*object)
	if !ok {
		return nil, hull.Faults{{Want: "an asset file: one JSON object", Got: describe(tree)}}
	}
	var faults hull.Faults
	headFields, rest := object.split("format", "version", "minor")
	var h head
	if f, ok := headFields.get("format"); !ok || f != Format {
		return nil, hull.Faults{{Path: "format", Want: strconv.Quote(Format), Got: describeField(headFields, "format")}}
	}
	decodeStruct(headFields, reflect.ValueOf(&h).Elem(), "", &faults)
	if h.Version != Version {
		return nil, hull.Faults{{Path: "version", Want: fmt.Sprintf("%d, the version that this program reads", Version), Got: describeField(headFields, "version")}}
	}
	a := new(hull.Asset)
	decodeStruct(rest, reflect.ValueOf(a).Elem(), "", &faults)
	switch {
	case h.Minor > Minor:
		faults = append(hull.Faults{{
			Path: "minor",
			Want: fmt.Sprintf("at most %d: the file comes from a newer version of the program", Minor),
			Got:  strconv.Itoa(h.Minor),
		}}, faults...)
	case h.Minor < 0:
		faults = append(faults, hull.Fault{Path: "minor", Want: "a whole number from 0 on", Got: strconv.Itoa(h.Minor)})
	}
	return a, merge(faults, hull.Check(a)).Err()
}

// merge adds to the faults of reading those of checking, but for fields in or
// above which reading already found one.
func merge(read, checked hull.Faults) hull.Faults {
	n := len(read)
	for _, c := range checked {
		known := slices.ContainsFunc(read[:n], func(r hull.Fault) bool {
			return strings.HasPrefix(c.Path, r.Path) || strings.HasPrefix(r.Path, c.Path)
		})
		if !known {
			read = append(read, c)
		}
	}
	return read
}

// Encode writes an asset. What equals the meaning of an absent field is left
// out.
func Encode(a *hull.Asset) []byte {
	var b bytes.Buffer
	fmt.Fprintf(&b, "{\n  \"format\": %q, \"version\": %d, \"minor\": %d", Format, Version, Minor)
	encodeFields(&b, reflect.ValueOf(a).Elem(), 1, true)
	b.WriteString("\n}\n")
	return b.Bytes()
}

// Clone returns a copy of the asset that shares nothing with it. The asset
// need not be valid.
func Clone(a *hull.Asset) *hull.Asset {
	return deepCopy(reflect.ValueOf(a)).Interface().(*hull.Asset)
}

// Read reads the asset file at path.
func Read(path string) (*hull.Asset, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, sentence(err, "cannot be opened")
	}
	defer f.Close()
	if info, err := f.Stat(); err == nil && info.IsDir() {
		return nil, fmt.Errorf("%s is a folder, not an asset file", path)
	} else if err == nil && info.Size() > MaxSize {
		return nil, tooLarge(info.Size())
	}
	text, err := io.ReadAll(io.LimitReader(f, MaxSize+1))
	if err != nil {
		return nil, sentence(err, "cannot be read")
	}
	return Decode(text)
}

// Write writes the asset file at path: beside it first, then renamed, so that
// the old file stays whole until the new one is.
func Write(path string, a *hull.Asset) error { return WriteFile(path, Encode(a)) }

// WriteFile puts content at path in one step: it writes a file beside it,
// syncs it and renames it, so that path holds either the old content or all
// of the new. A link is followed, so that it stays one. What is no ordinary
// file, such as a folder or a device, is left alone.
func WriteFile(path string, content []byte) error {
	target := path
	if linked, err := filepath.EvalSymlinks(path); err == nil {
		target = linked
	}
	mode := os.FileMode(0o644)
	if info, err := os.Stat(target); err == nil {
		if !info.Mode().IsRegular() {
			return fmt.Errorf("%s cannot be written: it is no ordinary file", path)
		}
		mode = info.Mode().Perm()
	}
	if err := replace(target, content, mode); err != nil {
		// The system's error names the file beside, of which nobody knows.
		var onFile *os.PathError
		var onTwo *os.LinkError
		switch {
		case errors.As(err, &onFile):
			err = onFile.Err
		case errors.As(err, &onTwo):
			err = onTwo.Err
			if heldOpen(runtime.GOOS, err) {
				return fmt.Errorf("%s cannot be written: it is open in another program, or write-protected; close it there or choose another name", path)
			}
		}
		return fmt.Errorf("%s cannot be written: %w", path, err)
	}
	return nil
}

func replace(path string, content []byte, mode os.FileMode) error {
	f, err := os.CreateTemp(filepath.Dir(path), "."+filepath.Base(path)+".*")
	if err != nil {
		return err
	}
	defer os.Remove(f.Name()) // no longer there after the rename
	_, err = f.Write(content)
	if err == nil {
		err = f.Sync()
	}
	if cerr := f.Close(); err == nil {
		err = cerr
	}
	if err == nil {
		err = os.Chmod(f.Name(), mode)
	}
	if err == nil {
		err = os.Rename(f.Name(), path)
	}
	return err
}

// heldOpen reports whether a file could not be replaced because, most likely,
// another program has it open. Only Windows keeps one from that.
func heldOpen(system string, err error) bool {
	const accessDenied, sharingViolation, lockViolation = syscall.Errno(5), syscall.Errno(32), syscall.Errno(33)
	var code syscall.Errno
	return system == "windows" && errors.As(err, &code) && (code == accessDenied || code == sharingViolation || code == lockViolation)
}

// sentence turns the system's error about a file into one for people.
func sentence(err error, what string) error {
	if err == nil {
		return nil
	}
	var pe *os.PathError
	if errors.As(err, &pe) {
		return fmt.Errorf("%s %s: %w", pe.Path, what, pe.Err)
	}
	return fmt.Errorf("file %s: %w", what, err)
}

func tooLarge(size int64) error {
	return fmt.Errorf("the file has %d MB; an asset file has at most %d MB", size>>20, MaxSize>>20)
}
