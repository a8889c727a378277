package sheet

import (
	"archive/zip"
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"os"
	"strconv"
	"strings"

	"github.com/xuri/excelize/v2"
)

// Limits of a file from outside: far above any real survey sheet.
const (
	MaxSize     = 4 << 20  // bytes of the file
	maxUnzipped = 24 << 20 // bytes of all its parts
	maxParts    = 400
	maxSheets   = 40
	maxRows     = 20000
	maxCols     = 256
	maxCells    = 300000
	maxMerged   = 5000   // cells merged
	maxFilled   = 50000  // boxes in which something stands
	maxBytes    = 100000 // of one text anywhere in a workbook
	maxText     = 4000   // letters in one cell that is read
)

// load reads a file whole, if it is an ordinary one and not too large.
func load(path string) ([]byte, error) {
	f, err := os.Open(path)
	if err != nil {
		var pe *os.PathError
		if errors.As(err, &pe) {
			return nil, fmt.Errorf("%s cannot be opened: %w", path, pe.Err)
		}
		return nil, err
	}
	defer f.Close()
	info, err := f.Stat()
	if err != nil {
		return nil, err
	}
	if !info.Mode().IsRegular() {
		return nil, fmt.Errorf("%s is not a file", path)
	}
	if info.Size() > MaxSize {
		return nil, tooLarge(info.Size())
	}
	content, err := io.ReadAll(io.LimitReader(f, MaxSize+1))
	if err != nil {
		return nil, fmt.Errorf("%s cannot be read: %w", path, err)
	}
	if len(content) > MaxSize {
		return nil, tooLarge(int64(len(content)))
	}
	return content, nil
}

func tooLarge(size int64) error {
	return fmt.Errorf("the file has %.1f MB; a survey sheet has at most %d MB", float64(size)/(1<<20), MaxSize>>20)
}

var errDamaged = errors.New("the workbook is damaged: it cannot be read")

// Open opens an Excel workbook from outside. It is looked over first: its size
// packed and unpacked, encryption, macros, rows, columns, cells and texts. A panic of the reader of workbooks becomes an error.
func Open(content []byte) (f *excelize.File, err error) {
	defer recovered(&err)
	if err := inspect(content); err != nil {
		return nil, err
	}
	f, err = excelize.OpenReader(bytes.NewReader(content), excelize.Options{
		UnzipSizeLimit: maxUnzipped, UnzipXMLSizeLimit: maxUnzipped, RawCellValue: true,
	})
	if err != nil {
		return nil, errDamaged
	}
	return f, nil
}

// recovered turns a panic into the error of a damaged workbook.
func recovered(err *error) {
	if r := recover(); r != nil {
		*err = errDamaged
	}
}

// inspect looks at a workbook's parts without reading them as XML.
func inspect(content []byte) error {
	switch {
	case len(content) > MaxSize:
		return tooLarge(int64(len(content)))
	case bytes.HasPrefix(content, []byte("\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1")):
		return errors.New("the workbook is encrypted, or in the old format .xls: save it as .xlsx without a password")
	case !bytes.HasPrefix(content, []byte("PK\x03\x04")):
		return errors.New("the file is no Excel workbook (.xlsx)")
	}
	z, err := zip.NewReader(bytes.NewReader(content), int64(len(content)))
	if err != nil {
		return errDamaged
	}
	if len(z.File) > maxParts {
		return fmt.Errorf("the workbook has %d parts; a survey sheet has at most %d", len(z.File), maxParts)
	}
	left, names := int64(maxUnzipped), map[string]bool{}
	for _, part := range z.File {
		name := strings.ToLower(part.Name)
		if strings.HasSuffix(name, "vbaproject.bin") {
			return errMacros
		}
		if names[name] {
			return errDamaged
		}
		names[name] = true
		r, err := part.Open()
		if err != nil {
			return errDamaged
		}
		// What a part says of its own size may be wrong: it is counted.
		var text bytes.Buffer
		n, err := io.Copy(&text, io.LimitReader(r, left+1))
		r.Close()
		if left -= n; left < 0 {
			return fmt.Errorf("the workbook unpacks to more than %d MB: it is not opened", maxUnzipped>>20)
		}
		if err != nil || uint64(n) != part.UncompressedSize64 {
			return errDamaged
		}
		if name == "[content_types].xml" && bytes.Contains(text.Bytes(), []byte("macroEnabled")) {
			return errMacros
		}
		if err := measure(name, text.Bytes()); err != nil {
			return err
		}
	}
	if !names["[content_types].xml"] || !names["xl/workbook.xml"] {
		return errors.New("the file is a zip but no Excel workbook: save it as .xlsx")
	}
	return nil
}

var errMacros = errors.New("the workbook holds macros and is not opened: save it as .xlsx")

// measure goes through a part that is XML before anything reads it whole: how
// far its rows and columns reach and how many cells it has. What is no XML is
// left to the reader of workbooks.
func measure(name string, text []byte) error {
	text = bytes.TrimPrefix(text, []byte("\xef\xbb\xbf"))
	if bytes.HasPrefix(text, []byte("\xff\xfe")) || bytes.HasPrefix(text, []byte("\xfe\xff")) {
		return errDamaged // UTF-16, which no office program writes
	}
	d := xml.NewDecoder(bytes.NewReader(text))
	cells, merged, sheets, row, col := 0, 0, 0, 0, 0
	for {
		token, err := d.RawToken()
		if err == io.EOF {
			return nil
		}
		if err != nil {
			if strings.HasSuffix(name, ".xml") {
				return errDamaged
			}
			return nil
		}
		switch t := token.(type) {
		case xml.CharData:
			if len(t) > maxBytes {
				return fmt.Errorf("%s: a text has more than %d letters", name, maxBytes)
			}
		case xml.Directive:
			return errDamaged // a document type, which no office program writes
		case xml.StartElement:
			switch t.Name.Local {
			case "sheet":
				if sheets++; sheets > maxSheets {
					return fmt.Errorf("the workbook has more than %d sheets", maxSheets)
				}
			case "mergeCell":
				if merged++; merged > maxMerged {
					return fmt.Errorf("%s: there are more than %d merged cells", name, maxMerged)
				}
			case "row":
				row, col = place(t, row+1), 0
				if row > maxRows {
					return fmt.Errorf("%s: there are more than %d rows", name, maxRows)
				}
			case "c":
				cells++
				if col = place(t, col+1); col > maxCols {
					return fmt.Errorf("%s: there are more than %d columns", name, maxCols)
				}
				if cells > maxCells {
					return fmt.Errorf("%s: there are more than %d cells", name, maxCells)
				}
			}
		}
	}
}

// place returns the row or the column that an element says it is in, else the
// next one.
func place(t xml.StartElement, next int) int {
	for _, a := range t.Attr {
		if a.Name.Local != "r" {
			continue
		}
		if n, err := strconv.Atoi(a.Value); err == nil {
			return n
		}
		if col, row, err := excelize.CellNameToCoordinates(a.Value); err == nil {
			if row > maxRows {
				return maxCols + 1
			}
			return col
		}
		return maxRows + 1
	}
	return next
}
