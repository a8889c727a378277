package assetfile

import (
	"archive/zip"
	"bytes"
	"compress/flate"
	"encoding/binary"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"unicode/utf8"

	"anodewright/hull"
)

// The limits of a fleet file, held before anything is unpacked and again while
// it is.
const (
	MaxFleet         = 2000      // asset files in a fleet file
	MaxFleetSize     = 64 << 20  // bytes of a fleet file
	MaxFleetUnpacked = 512 << 20 // bytes of all its asset files together
)

// WriteFleet writes a fleet as one zip of asset files, in order and named
// after the assets. Equal fleets make equal bytes.
func WriteFleet(w io.Writer, fleet []*hull.Asset) error {
	if len(fleet) > MaxFleet {
		return fmt.Errorf("a fleet file holds at most %d assets, not %d", MaxFleet, len(fleet))
	}
	z := zip.NewWriter(w)
	for i, a := range fleet {
		name := fleetName(i, a.Name)
		f, err := z.CreateHeader(&zip.FileHeader{Name: name, Method: zip.Deflate})
		if err == nil {
			_, err = f.Write(Encode(a))
		}
		if err != nil {
			return fmt.Errorf("%s cannot be put into the fleet file: %w", name, err)
		}
	}
	return z.Close()
}

// fleetName names the i-th file of a fleet so that the names sort in the
// fleet's order.
func fleetName(i int, name string) string {
	plain := FileName(name)
	return fmt.Sprintf("%04d %s.json", i+1, plain)
}

// WriteFleetFile writes a fleet file at path in one step, as WriteFile does.
func WriteFleetFile(path string, fleet []*hull.Asset) error {
	var b bytes.Buffer
	if err := WriteFleet(&b, fleet); err != nil {
		return err
	}
	return WriteFile(path, b.Bytes())
}

// UnpackFleet writes a fleet into a folder, made when there is none, as asset
// files named as in a fleet file, and returns their paths. It writes over
// nothing, and leaves no file behind when one cannot be written.
func UnpackFleet(folder string, fleet []*hull.Asset) (paths []string, err error) {
	for i, a := range fleet {
		path := filepath.Join(folder, fleetName(i, a.Name))
		if _, err := os.Lstat(path); !errors.Is(err, fs.ErrNotExist) {
			return nil, fmt.Errorf("%s is there already and was left as it is; nothing was written", path)
		}
		paths = append(paths, path)
	}
	if err := os.MkdirAll(folder, 0o755); err != nil {
		return nil, sentence(err, "cannot be made")
	}
	for i, a := range fleet {
		if err := Write(paths[i], a); err != nil {
			for _, path := range paths[:i] {
				os.Remove(path)
			}
			return nil, err
		}
	}
	return paths, nil
}

// ReadFleetFile reads the fleet file at path.
func ReadFleetFile(path string) ([]*hull.Asset, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, sentence(err, "cannot be opened")
	}
	defer f.Close()
	info, err := f.Stat()
	switch {
	case err != nil:
		return nil, sentence(err, "cannot be read")
	case !info.Mode().IsRegular():
		return nil, fmt.Errorf("%s is no ordinary file, so no fleet file", path)
	}
	return ReadFleet(f, info.Size())
}

// ReadFleet reads the zip of asset files in the first size bytes of r, in the
// zip's order. It takes all of them or none: the error names the file in the
// zip that is at fault. Nothing is ever written to a path of the zip.
func ReadFleet(r io.ReaderAt, size int64) ([]*hull.Asset, error) {
	if size > MaxFleetSize {
		return nil, fmt.Errorf("the fleet file has %d MB; one has at most %d MB", size>>20, MaxFleetSize>>20)
	}
	// Reading the directory takes memory for each entry, so their number is
	// looked at first.
	if n, ok := entries(r, size); ok && n > MaxFleet {
		return nil, tooMany(n)
	}
	z, err := zip.NewReader(r, size)
	if err != nil {
		return nil, notFleet(r, err)
	}
	files, err := fleetFiles(z)
	if err != nil {
		return nil, err
	}
	// The sizes in the directory need not be true, so each file is cut off at
	// its limit as it is unpacked.
	var fleet []*hull.Asset
	var total int64
	for _, f := range files {
		text, err := unpack(f)
		if err != nil {
			return nil, fmt.Errorf("%s in the fleet file: %w", shown(f.Name), err)
		}
		if total += int64(len(text)); total > MaxFleetUnpacked {
			return nil, tooMuch()
		}
		a, err := Decode(text)
		if err != nil {
			return nil, fmt.Errorf("%s in the fleet file: %w", shown(f.Name), err)
		}
		fleet = append(fleet, a)
	}
	return fleet, nil
}

// fleetFiles checks what a zip says that it holds and returns its asset files.
func fleetFiles(z *zip.Reader) ([]*zip.File, error) {
	var files []*zip.File
	var total uint64
	seen := map[string]bool{}
	for _, f := range z.File {
		name := f.Name
		switch {
		case f.Flags&1 != 0:
			return nil, fmt.Errorf("%s in the fleet file is encrypted", shown(name))
		case strings.ContainsAny(name, `/\:`) || name == ".." || name == ".":
			return nil, fmt.Errorf("%s in the fleet file lies in a folder; a fleet file holds asset files side by side", shown(name))
		case !utf8.ValidString(name) || strings.ContainsFunc(name, func(r rune) bool { return r < ' ' }):
			return nil, fmt.Errorf("%s in the fleet file has a name that is no text", shown(name))
		case !f.Mode().IsRegular():
			return nil, fmt.Errorf("%s in the fleet file is no ordinary file", shown(name))
		case !strings.HasSuffix(strings.ToLower(name), ".json"):
			return nil, fmt.Errorf("%s in the fleet file is no asset file: want names that end in .json, and no zip in the zip", shown(name))
		case seen[strings.ToLower(name)]:
			return nil, fmt.Errorf("%s is in the fleet file twice", shown(name))
		case f.UncompressedSize64 > MaxSize:
			return nil, fmt.Errorf("%s in the fleet file: %w", shown(name), tooLarge(int64(min(f.UncompressedSize64, 1<<62))))
		}
		if total += f.UncompressedSize64; total > MaxFleetUnpacked {
			return nil, tooMuch()
		}
		seen[strings.ToLower(name)] = true
		files = append(files, f)
	}
	switch n := len(files); {
	case n == 0:
		return nil, errors.New("the fleet file holds no asset file")
	case n > MaxFleet:
		return nil, tooMany(n)
	}
	return files, nil
}

// unpack returns the content of a file in a zip.
func unpack(f *zip.File) ([]byte, error) {
	r, err := f.Open()
	if errors.Is(err, zip.ErrAlgorithm) {
		return nil, errors.New("it is packed in a way that this program does not know")
	}
	if err != nil {
		return nil, errors.New("it cannot be unpacked: the fleet file is damaged")
	}
	defer r.Close()
	text, err := io.ReadAll(io.LimitReader(r, MaxSize+1))
	var corrupt flate.CorruptInputError
	switch {
	case len(text) > MaxSize:
		return nil, tooLarge(int64(len(text)))
	case errors.Is(err, zip.ErrChecksum), errors.Is(err, zip.ErrFormat), errors.Is(err, io.ErrUnexpectedEOF), errors.As(err, &corrupt):
		return nil, errors.New("it cannot be unpacked: the fleet file is damaged")
	case err != nil:
		return nil, err
	}
	return text, nil
}

// entries reads how many entries a zip says that it has, from the record at
// its end; ok is false when there is none, which the zip package will tell.
func entries(r io.ReaderAt, size int64) (n int, ok bool) {
	const record, comment = 22, 1<<16 - 1
	tail := make([]byte, min(size, record+comment))
	if _, err := r.ReadAt(tail, size-int64(len(tail))); err != nil && err != io.EOF {
		return 0, false
	}
	i := bytes.LastIndex(tail, []byte("PK\x05\x06"))
	if i < 0 || len(tail)-i < record {
		return 0, false
	}
	// 65535 stands for more, told elsewhere; that is too many in any case.
	return int(binary.LittleEndian.Uint16(tail[i+10:])), true
}

// notFleet says what a file is that is no zip.
func notFleet(r io.ReaderAt, err error) error {
	head := make([]byte, 4)
	if n, _ := r.ReadAt(head, 0); n == 4 && string(head) == "PK\x03\x04" {
		return errors.New("the fleet file is damaged or cut off")
	}
	if errors.Is(err, zip.ErrFormat) {
		return errors.New("not a fleet file: it is no zip")
	}
	return fmt.Errorf("the fleet file cannot be read: %w", err)
}

func tooMany(n int) error {
	return fmt.Errorf("the fleet file holds %d files; one holds at most %d", n, MaxFleet)
}

func tooMuch() error {
	return fmt.Errorf("the fleet file unpacks to more than %d MB", MaxFleetUnpacked>>20)
}

// shown writes a name from a zip so that no dialog or terminal falls for it.
func shown(name string) string {
	if len(name) > 60 {
		name = name[:60] + "…"
	}
	return fmt.Sprintf("%q", name)
}
