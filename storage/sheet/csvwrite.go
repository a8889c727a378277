package sheet

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"strings"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// WriteCSV writes an empty CSV file of readings to path, as Write does: a line
// for each zone and each fitted set, to be filled in.
func WriteCSV(path string, a *hull.Asset) error {
	if err := assetfile.WriteFile(path, EncodeCSV(a)); err != nil {
		return fmt.Errorf("the CSV file was not written: %w", err)
	}
	return nil
}

// EncodeCSV returns an empty CSV file of readings: UTF-8 with the mark by
// which spreadsheets know it, semicolons between the cells.
func EncodeCSV(a *hull.Asset) []byte {
	var b bytes.Buffer
	b.WriteString("\xef\xbb\xbf")
	w := csv.NewWriter(&b)
	w.Comma, w.UseCRLF = ';', true
	w.Write(csvColumns) // a buffer takes all
	line := func(cells ...string) {
		for i := range cells {
			cells[i] = neutral(cells[i])
		}
		w.Write(append(cells, make([]string, len(csvColumns)-len(cells))...))
	}
	for _, z := range a.Zones {
		line(a.Name, z.ID)
		for _, f := range z.Fitted {
			line(a.Name, z.ID, f.Pattern, f.Fitted.String(), fmt.Sprint(f.Count))
		}
	}
	w.Flush()
	return b.Bytes()
}

// neutral is a text that no spreadsheet takes for a formula when it opens a
// CSV file.
func neutral(s string) string {
	if s != "" && strings.ContainsRune("=+-@\t\r\n", rune(s[0])) {
		return "'" + s
	}
	return s
}
