package sheet

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"math"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/anodes/survey"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

// Option is a choice about a survey sheet.
type Option func(*writer)

// WithForecast shows with each set the wastage that the forecast expects at
// the docking. A surveyor who knows what is expected tends to find it: without
// this option nothing is said.
func WithForecast(o *plan.Outcome) Option { return func(w *writer) { w.expected = o } }

// Write writes the survey sheet of a docking to path: beside it first, then
// renamed, so that a file that is there stays whole until the new one is.
func Write(path string, a *hull.Asset, tie Tie, docking hull.Date, options ...Option) error {
	if path == "" {
		return errors.New("the survey sheet needs the name of a file to be written to")
	}
	var b bytes.Buffer
	if err := WriteTo(&b, a, tie, docking, options...); err != nil {
		return err
	}
	if err := assetfile.WriteFile(path, b.Bytes()); err != nil {
		return fmt.Errorf("the survey sheet was not written: %w", err)
	}
	return nil
}

// WriteTo writes the survey sheet of a docking to w. Equal assets give equal
// bytes.
func WriteTo(to io.Writer, a *hull.Asset, tie Tie, docking hull.Date, options ...Option) error {
	w := &writer{f: excelize.NewFile(), a: a, tie: tie, docking: docking, styles: map[look]int{}}
	for _, option := range options {
		option(w)
	}
	defer w.f.Close()
	w.check(w.f.SetDefaultFont(fontName))
	w.check(w.f.SetSheetName("Sheet1", coverSheet))
	for _, name := range []string{surveySheet, listSheet} {
		_, err := w.f.NewSheet(name)
		w.check(err)
	}
	w.lists()
	w.cover()
	w.zones()
	at := docking.Time().UTC().Format("2006-01-02T15:04:05Z")
	w.check(w.f.SetDocProps(&excelize.DocProperties{
		Title: "Anode survey, " + workbook.CellText(a.Name), Creator: "Anodewright", LastModifiedBy: "Anodewright",
		Created: at, Modified: at, Language: "en-GB",
	}))
	full := true
	w.check(w.f.SetCalcProps(&excelize.CalcPropsOptions{FullCalcOnLoad: &full}))
	w.f.SetActiveSheet(0)
	w.f.SetZipWriter(workbook.NewPacker)
	if w.err == nil {
		w.err = w.f.Write(to)
	}
	if w.err != nil {
		return fmt.Errorf("the survey sheet could not be written: %w", w.err)
	}
	return nil
}

const (
	coverSheet  = "Cover"
	surveySheet = "Survey"
	listSheet   = "Lists"
)

// writer is the survey sheet being written. The first error stays; what
// follows it does no harm.
type writer struct {
	f        *excelize.File
	a        *hull.Asset
	tie      Tie
	docking  hull.Date
	expected *plan.Outcome
	styles   map[look]int
	sheet    string
	row      int     // next, from 1
	used     float64 // height of the rows on the page, in points
	err      error
}

func (w *writer) check(err error) {
	if w.err == nil {
		w.err = err
	}
}

// put writes a text, always as a text, and the look of its cell.
func (w *writer) put(col int, text string, l look) {
	cell := cellName(col, w.row)
	w.check(w.f.SetCellStyle(w.sheet, cell, cell, w.style(l)))
	if text != "" {
		w.check(w.f.SetCellStr(w.sheet, cell, workbook.CellText(text)))
	}
}

// across writes a text into merged cells of the row.
func (w *writer) across(first, last int, text string, l look) {
	w.check(w.f.SetCellStyle(w.sheet, cellName(first, w.row), cellName(last, w.row), w.style(l)))
	w.put(first, text, l)
	if last > first {
		w.check(w.f.MergeCell(w.sheet, cellName(first, w.row), cellName(last, w.row)))
	}
}

// height sets the height of the row, in points.
func (w *writer) height(points float64) { w.check(w.f.SetRowHeight(w.sheet, w.row, points)) }

// key starts a row of boxes.
func (w *writer) key(k key, label string) {
	w.put(keyCol, k.text(), hiddenLook)
	w.put(labelCol, label, labelLook)
	w.height(boxHeight)
}

// lists writes the hidden sheet: the tie, and the words of the drop-downs
// under a name each.
func (w *writer) lists() {
	w.sheet, w.row = listSheet, 1
	w.put(0, key{part: tiePart}.text(), hiddenLook)
	w.put(1, ascii(tied{format, version, w.a.Name, w.docking, w.tie}), hiddenLook)
	for i, list := range []struct {
		name  string
		words []string
	}{{electrodeList, electrodeNames()}, {conditionList, hull.Condition("").Words()}, {methodList, methods}} {
		for r, word := range list.words {
			w.row = 3 + r
			w.put(2+i, word, hiddenLook)
		}
		first, err := excelize.CoordinatesToCellName(3+i, 3, true)
		w.check(err)
		last, err := excelize.CoordinatesToCellName(3+i, 2+len(list.words), true)
		w.check(err)
		w.check(w.f.SetDefinedName(&excelize.DefinedName{Name: list.name, RefersTo: listSheet + "!" + first + ":" + last}))
	}
	w.check(w.f.SetSheetVisible(listSheet, false))
}

const (
	electrodeList = "survey_electrodes"
	conditionList = "survey_conditions"
	methodList    = "survey_methods"
)

// methods are how a surveyor may have looked.
var methods = []string{"in dock, dry", "afloat, by diver", "afloat, by vehicle with camera"}

// zones writes a block for each zone.
func (w *writer) zones() {
	w.sheet, w.row = surveySheet, 1
	w.across(labelCol, lastCol, w.a.Name+": anodes found", titleLook)
	w.height(titleHeight)
	w.row++
	w.across(labelCol, lastCol, "Each piece once: weighed, measured, seen, or counted. An empty box says nothing; a 0 says none.", noteLook)
	w.height(noteHeight)
	w.row++
	for i := range w.a.Zones {
		w.zone(i)
	}
	w.setUp([]float64{0, 25, 9}, 2)
}

func (w *writer) zone(i int) {
	z := &w.a.Zones[i]
	w.breakBefore(w.heightOf(z))
	w.height(gapHeight)
	w.row++
	w.across(labelCol, lastCol, fmt.Sprintf("%s (%s)", z.Name, z.ID), zoneLook)
	w.height(zoneHeight)
	w.row++

	w.key(key{part: potentialPart, zone: z.ID}, "Potential of the steel, V")
	for n := range potentialBoxes {
		w.put(firstBox+n, "", boxLook)
	}
	w.between(potentialPart, 8, 9)
	w.across(firstBox+electrodeBox, lastCol, "", wordLook)
	w.numbers(0, potentialBoxes-1, -3, 3, excelize.DataValidationTypeDecimal, "Potential", "Volts, with their sign: -0.92")
	w.choose(electrodeBox, electrodeList, "Electrode", "Empty: the electrode of the cover.")
	w.row++

	w.key(key{part: coatingPart, zone: z.ID}, "Coating and water")
	w.between(coatingPart, 0, 1)
	w.put(firstBox+brokenBox, "", boxLook)
	w.between(coatingPart, 3, 4)
	w.across(firstBox+wordBox, firstBox+wordBox+1, "", wordLook)
	w.between(coatingPart, 8, 9)
	w.across(firstBox+waterBox, lastCol, "", boxLook)
	w.numbers(brokenBox, brokenBox, 0, 100, excelize.DataValidationTypeDecimal, "Coating", "Per cent of the zone's coated area that is broken down: 5")
	w.choose(wordBox, conditionList, "Coating", "The class surveyor's word: GOOD below 3 %, FAIR, POOR above 20 % broken down.")
	w.numbers(waterBox, waterBox, 0.01, 100000, excelize.DataValidationTypeDecimal, "Water", "Resistivity as measured, ohm m: 0.25")
	w.row++

	w.key(key{part: remarkPart, zone: z.ID}, "Remarks")
	w.across(firstBox, lastCol, "", remarkLook)
	w.row++
	for set := range z.Fitted {
		w.set(i, set)
	}
}

// between writes a label between the boxes of a row.
func (w *writer) between(p part, first, last int) {
	w.across(firstBox+first, firstBox+last, labels[p][first], betweenLook)
}

// heightOf is how high a zone's block is, in points.
func (w *writer) heightOf(z *hull.Zone) float64 {
	h := gapHeight + zoneHeight + 3*boxHeight
	for _, f := range z.Fitted {
		n := 2 + eyeRows(f.Count)
		if p, ok := w.a.Pattern(f.Pattern); ok && measurable(p) {
			n += 2
		}
		h += setHeight + headHeight + float64(n)*boxHeight
	}
	return h
}

// eyeRows is how many rows of boxes a set has for pieces seen.
func eyeRows(count int) int { return min(max(1, int(math.Ceil(float64(count)/boxes))), 3) }

// measurable reports whether girth and length tell the wastage of a pattern.
func measurable(p *hull.Pattern) bool {
	_, err := survey.Wastage(p, hull.Measured{Girth: 0.001, Length: 0.001})
	return err == nil
}

func (w *writer) set(zone, set int) {
	z := &w.a.Zones[zone]
	fitted := z.Fitted[set]
	p, ok := w.a.Pattern(fitted.Pattern)
	if !ok {
		return
	}
	k := key{zone: z.ID, pattern: fitted.Pattern, fitted: fitted.Fitted, count: fitted.Count}
	w.across(labelCol, lastCol, w.describe(zone, set, p), setLook)
	w.height(setHeight)
	w.row++
	w.counts(k, fitted.Count, measurable(p))
	for n := range eyeRows(fitted.Count) {
		label := "Seen: wasted, %"
		if n > 0 {
			label = "… more pieces"
		}
		w.boxes(k, eyePart, label, 0, 100, "Seen", "Per cent of a piece's metal that is gone: 35")
	}
	w.boxes(k, weighPart, "Weighed with insert, kg", 0, math.Ceil(1.02*p.Gross()), "Weighed", fmt.Sprintf("Mass of a cleaned piece with its insert, kg. New: %.4g", p.Gross()))
	if measurable(p) {
		w.boxes(k, girthPart, "Girth left, mm", 5, 60000, "Measured", "Round the middle, mm. Its length stands below.")
		w.boxes(k, lengthPart, "Length left, mm", 5, 60000, "Measured", "Of the same piece as the girth above, mm.")
	}
}

// describe says which set a block is of.
func (w *writer) describe(zone, set int, p *hull.Pattern) string {
	f := w.a.Zones[zone].Fitted[set]
	name := p.ID
	if p.Name != "" && p.Name != p.ID {
		name = p.Name + " (" + p.ID + ")"
	}
	s := fmt.Sprintf("%d × %s, fitted %s; new %.4g kg with insert", f.Count, name, f.Fitted.Time().Format("2 Jan 2006"), p.Gross())
	if p.Length > 0 {
		s += fmt.Sprintf(", %.0f mm long", 1000*p.Length)
	}
	if p.GrossMass == 0 && p.InsertVolume == 0 {
		s += " (its insert's mass is not known: weigh without it)"
	}
	if x, ok := w.expects(zone, set); ok {
		s += fmt.Sprintf("; the forecast expects %.0f %% wasted", 100*x)
	}
	return s
}

// expects is the wastage of a set that the forecast has at the docking.
func (w *writer) expects(zone, set int) (float64, bool) {
	if w.expected == nil || zone >= len(w.expected.Zones) {
		return 0, false
	}
	f := w.a.Zones[zone].Fitted[set]
	for _, iv := range w.expected.Zones[zone].Intervals {
		if iv.To != w.docking || iv.From != w.a.Start() {
			continue
		}
		if set < len(iv.Fitted) && iv.Fitted[set].Pattern.ID == f.Pattern {
			return iv.Fitted[set].Wastage, true
		}
	}
	return 0, false
}

// counts writes the boxes for counts of pieces, their headings above.
func (w *writer) counts(k key, fitted int, measured bool) {
	for i, name := range []string{"0–25 %", "25–50 %", "50–75 %", "over 75 %"} {
		w.put(firstBox+i, name, headLook)
	}
	for i, name := range countNames {
		w.put(firstBox+countBox+i, name, headLook)
	}
	w.across(firstBox+toldBox, lastCol, fmt.Sprintf("told, of %d", fitted), headLook)
	w.height(headHeight)
	w.row++
	k.part = countPart
	w.key(k, "Pieces counted")
	for i := range quarters {
		w.put(firstBox+i, "", boxLook)
	}
	for i := range countNames {
		w.put(firstBox+countBox+i, "", boxLook)
	}
	w.numbers(0, len(quarters)-1, 0, fitted, excelize.DataValidationTypeWhole, "Pieces", "How many pieces are wasted so far, beside those entered singly.")
	w.numbers(countBox, countBox+len(countNames)-1, 0, fitted, excelize.DataValidationTypeWhole, "Pieces",
		"Gone: only the insert is left. Not wasted: less than 5 % gone. Fallen: lost whole. Painted over: gives no current. Not seen: could not be looked at.")
	w.across(firstBox+toldBox, lastCol, "", toldLook)
	below := eyeRows(fitted) + 1
	if measured {
		below++
	}
	w.check(w.f.SetCellFormula(w.sheet, cellName(firstBox+toldBox, w.row), fmt.Sprintf("SUM(%s:%s)+COUNT(%s:%s)",
		cellName(firstBox, w.row), cellName(firstBox+countBox+len(countNames)-1, w.row), cellName(firstBox, w.row+1), cellName(lastCol, w.row+below))))
	w.row++
}

// boxes writes a row of boxes of one kind.
func (w *writer) boxes(k key, p part, label string, least, most float64, title, hint string) {
	k.part = p
	w.key(k, label)
	for n := range boxes {
		w.put(firstBox+n, "", boxLook)
	}
	w.numbers(0, boxes-1, least, most, excelize.DataValidationTypeDecimal, title, hint)
	w.row++
}
