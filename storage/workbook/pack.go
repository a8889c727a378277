package workbook

import (
	"archive/zip"
	"bytes"
	"io"
	"io/fs"
	"regexp"
	"slices"
	"strings"

	"github.com/xuri/excelize/v2"
)

// packer writes the parts of the workbook in the order of their names and
// undated, so that equal outcomes give equal bytes. It also gives the stored
// value of each formula its type, number, which excelize calls text.
type packer struct {
	w     io.Writer
	parts map[string]*bytes.Buffer
}

func newPacker(w io.Writer) excelize.ZipWriter { return &packer{w, map[string]*bytes.Buffer{}} }

// Create starts a part.
func (p *packer) Create(name string) (io.Writer, error) {
	p.parts[name] = new(bytes.Buffer)
	return p.parts[name], nil
}

// AddFS adds the files of a file system as parts.
func (p *packer) AddFS(fsys fs.FS) error {
	return fs.WalkDir(fsys, ".", func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		text, err := fs.ReadFile(fsys, path)
		p.parts[path] = bytes.NewBuffer(text)
		return err
	})
}

// Close writes all parts.
func (p *packer) Close() error {
	z := zip.NewWriter(p.w)
	var names []string
	for name := range p.parts {
		names = append(names, name)
	}
	slices.Sort(names)
	for _, name := range names {
		w, err := z.Create(name)
		if err != nil {
			return err
		}
		if _, err := w.Write(tidy(name, p.parts[name].Bytes())); err != nil {
			return err
		}
	}
	return z.Close()
}

var contentEntry = regexp.MustCompile(`<(?:Default|Override)\b[^>]*>(?:</(?:Default|Override)>)?`)

func tidy(name string, text []byte) []byte {
	switch {
	case strings.HasPrefix(name, "xl/worksheets/"):
		return numbers(text)
	case name == "[Content_Types].xml":
		entries := contentEntry.FindAll(text, -1)
		slices.SortFunc(entries, bytes.Compare)
		i := -1
		return contentEntry.ReplaceAllFunc(bytes.Clone(text), func([]byte) []byte {
			i++
			return entries[i]
		})
	}
	return text
}

// numbers takes the type text from every formula whose stored value is a number.
func numbers(sheet []byte) []byte {
	kind, end := []byte(` t="str"><f>`), []byte("</f><v>")
	var b bytes.Buffer
	b.Grow(len(sheet))
	for {
		i := bytes.Index(sheet, kind)
		if i < 0 {
			b.Write(sheet)
			return b.Bytes()
		}
		rest := sheet[i+len(kind):]
		b.Write(sheet[:i])
		if j := bytes.IndexByte(rest, '<'); j < 0 || !bytes.HasPrefix(rest[j:], end) || !isNumber(rest[j+len(end):]) {
			b.Write(kind)
		} else {
			b.WriteString("><f>")
		}
		sheet = rest
	}
}

// isNumber reports whether a text up to the next tag is a number.
func isNumber(text []byte) bool {
	end := bytes.IndexByte(text, '<')
	return end > 0 && len(bytes.Trim(text[:end], "0123456789.eE+-")) == 0
}
