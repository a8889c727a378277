package workbook

import (
	"io"

	"github.com/xuri/excelize/v2"
)

// CellText returns a text as a cell of any workbook can hold it, so that it
// is read as what it says. Written as a text it stays one, whatever it begins
// with.
func CellText(s string) string { return escape(clean(s)) }

// HeaderText returns a text as a page header shows it: short, on one line,
// its ampersands doubled.
func HeaderText(s string) string { return headerText(s) }

// NewPacker writes the parts of any workbook in the order of their names and
// undated, so that equal ones give equal bytes.
func NewPacker(w io.Writer) excelize.ZipWriter { return newPacker(w) }
