// Package workbook writes an outcome as an Excel workbook that can be sent to
// a yard, a purchaser or a surveyor as it is: the schedule, the order, the
// yard's work list, the zones, their demand and forecast, the patterns, other
// protections, the money, the basis with all cautions, and where every figure
// comes from.
//
// The sheet Calculation holds the chain from steel to order as live formulas:
// breakdown, demand, charge, criteria, pieces, cost. Its inputs, there and on
// Zones, Patterns and Basis and cautions, are marked and unlocked; formulas
// are locked, without a password. The actions of the plan are fixed. Values
// and not formulas are: dates, current densities weighed by the waters,
// resistivities, demand factors, the word for what governs a count, how much
// rods in a row hinder each other, counts that a forecast sized, and all that
// the forecast says.
//
// Units stand in the headings: m, m2, kg, A, ohm m, days, and the asset's own
// currency. Dates are real dates, figures are numbers, totals are formulas
// with their value stored beside them. What does not exist is a word or a
// blank, never a figure.
//
// Each sheet has its own file and one function, the calculation several:
// calc*.go. cells.go knows the cells that formulas refer to and makes
// formulas; each is simple enough for excelize's own calculator, which fails on
// some functions within IF and MAX. sheet.go writes cells from the top down, style.go has the few styles, page.go the print set-up,
// pack.go makes equal outcomes equal files.
package workbook

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"time"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/storage/assetfile"
)

// sheetNames are the sheets in their order.
var sheetNames = []string{
	"Schedule", "Order", "Work list", "Demand", "Forecast", "Charts", "Zones", "Patterns", "Readings", "Protections", "Money",
	"Basis and cautions", "Where from", "Calculation",
}

// Write writes the workbook of an outcome to path: beside it first, then
// renamed, so that a file that is there stays whole until the new one is. The
// error is a sentence for people.
func Write(path string, o *plan.Outcome, options ...Option) error {
	if path == "" {
		return errors.New("the workbook needs the name of a file to be written to")
	}
	var b bytes.Buffer
	if err := WriteTo(&b, o, options...); err != nil {
		return err
	}
	if err := assetfile.WriteFile(path, b.Bytes()); err != nil {
		return fmt.Errorf("the workbook was not written: %w", err)
	}
	return nil
}

// Option is what a workbook says beside the outcome.
type Option func(*book)

// Revision says on every page which revision of the asset the workbook shows.
func Revision(n int64) Option { return func(b *book) { b.revision = n } }

// WriteTo writes the workbook of an outcome to w. Equal outcomes give equal
// bytes.
func WriteTo(w io.Writer, o *plan.Outcome, options ...Option) error {
	b := &book{
		f: excelize.NewFile(excelize.Options{ShortDatePattern: datePattern}), o: o, a: o.Asset,
		names: zoneNames(o.Asset), styles: map[style]int{},
	}
	defer b.f.Close()
	for _, set := range options {
		set(b)
	}
	b.check(b.f.SetSheetName("Sheet1", sheetNames[0]))
	for _, name := range sheetNames[1:] {
		_, err := b.f.NewSheet(name)
		b.check(err)
		if name == "Readings" && b.hasAsBuilt() {
			_, err = b.f.NewSheet(asBuiltName)
			b.check(err)
		}
	}
	// What formulas refer to is written before them.
	for _, write := range []func(*book){
		(*book).zones, (*book).patterns, (*book).basis, (*book).calculation,
		(*book).schedule, (*book).order, (*book).workList, (*book).demand, (*book).forecast, (*book).moneySheet,
		(*book).readings, (*book).asBuilt, (*book).protections, (*book).whereFrom, (*book).charts,
	} {
		write(b)
	}
	b.properties()
	b.check(b.f.SetDefaultFont(fontName))
	b.f.SetZipWriter(newPacker)
	if b.err == nil {
		b.err = b.f.Write(w)
	}
	if b.err != nil {
		return fmt.Errorf("the workbook could not be written: %w", b.err)
	}
	return nil
}

// properties names the workbook, and dates it by the outcome, not the clock.
func (b *book) properties() {
	asOf := b.o.Today.Time().UTC().Format(time.RFC3339)
	b.check(b.f.SetDocProps(&excelize.DocProperties{
		Title: "Anode schedule, " + clean(b.a.Name), Creator: "Anodewright", LastModifiedBy: "Anodewright",
		Created: asOf, Modified: asOf, Language: "en-GB",
	}))
	full := true
	b.check(b.f.SetCalcProps(&excelize.CalcPropsOptions{FullCalcOnLoad: &full}))
	b.f.SetActiveSheet(0)
}
