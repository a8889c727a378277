package sheet

import (
	"fmt"
	"slices"
	"strings"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// steps tell the surveyor how the sheet is filled in.
var steps = []string{
	"Fill in the boxes only. Rows may be moved; the survey is read back by hidden marks in them. Please save it as .xlsx.",
	"Tell of each piece once: weigh some, measure some, judge some by eye, count the rest. Weighing tells most, a glance least.",
	"Weighed: the cleaned piece with its insert, in kg. Measured: girth round the middle and length of the same piece, in mm, one above the other.",
	"Seen: per cent of the metal gone, piece by piece. Or count the pieces by quarters of wastage.",
	"Gone: only the insert is left. Not wasted: less than 5 % gone. Fallen: lost, insert and all. Painted over: it gives no current. Not seen: it could not be looked at.",
	"Potentials in volts with their sign, and the electrode against which they were read: afloat and before the dock falls dry.",
	"A box left empty says nothing, a 0 says none. Decimals may stand behind a point or a comma.",
}

// cautions are what a surveyor should think of first.
var cautions = []string{
	"Tanks and void spaces: enter only with a valid gas-free certificate, ventilation and a watch outside.",
	"Cutting and welding of anodes is hot work: a permit, tanks behind the plating gas-free, coatings and cables protected.",
	"Divers: impressed current, propellers and sea suctions switched off and locked first.",
	"Anodes are heavy and sharp, and their welds may be wasted: sling a piece before it is cut, and stand clear below.",
	"Magnesium and aluminium burn and spark: no dropped pieces and no grinding where there may be gas.",
}

// cover writes the first sheet: what is surveyed, by whom and when, how the
// sheet is filled in, and what to take care of.
func (w *writer) cover() {
	w.sheet, w.row = coverSheet, 1
	w.across(labelCol, lastCol, "Anode survey: "+w.a.Name, titleLook)
	w.height(26)
	w.row++
	sets, count := 0, 0
	for _, z := range w.a.Zones {
		for _, f := range z.Fitted {
			sets, count = sets+1, count+f.Count
		}
	}
	w.across(labelCol, lastCol, fmt.Sprintf("Docking of %s: %d zones, %d sets, %d anodes as they were fitted.", w.docking.Time().Format("2 January 2006"), len(w.a.Zones), sets, count), noteLook)
	w.row += 2
	ask := func(p part, label string, l look) {
		w.key(key{part: p}, label)
		w.across(firstBox, firstBox+5, "", l)
	}
	ask(byPart, "Surveyor", remarkLook)
	w.row++
	ask(datePart, "Date of the survey", dateLook)
	v := excelize.NewDataValidation(true)
	v.SetSqref(cellName(firstBox, w.row))
	w.check(v.SetRange(2, 200000, excelize.DataValidationTypeDate, excelize.DataValidationOperatorBetween))
	v.SetInput("Date", "As 2027-03-15. On which most was looked at.")
	v.SetError(excelize.DataValidationErrorStyleStop, "Date", "A date such as 2027-03-15.")
	w.check(w.f.AddDataValidation(w.sheet, v))
	w.row++
	ask(methodPart, "Looked at", wordLook)
	w.choose(0, methodList, "Looked at", "How the anodes were looked at.")
	w.row++
	ask(electrodePart, "Reference electrode", wordLook)
	w.choose(0, electrodeList, "Electrode", "Against which all potentials were read that name no other. Empty: Ag/AgCl.")
	w.row++
	w.key(key{part: notePart}, "Remarks")
	w.across(firstBox, lastCol, "", remarkLook)
	w.height(54)
	w.row += 2
	w.list("How to fill it in", append(slices.Clone(steps), onPaper()), stepLook)
	w.list("Take care", cautions, cautionLook)
	w.across(labelCol, lastCol, plan.Closing, noteLook)
	w.setUp([]float64{0, 25, 9}, 0)
}

// onPaper names what the drop-down lists offer, for whoever fills in a print.
func onPaper() string {
	return fmt.Sprintf("On paper write one of these. Looked at: %s. Electrode: %s. The coating in a word: %s.",
		strings.Join(methods, "; "), strings.Join(electrodeNames(), ", "), strings.Join(hull.Condition("").Words(), ", "))
}

func (w *writer) list(title string, lines []string, l look) {
	w.across(labelCol, lastCol, title, zoneLook)
	w.height(18)
	w.row++
	for i, text := range lines {
		w.across(labelCol, lastCol, fmt.Sprintf("%d.  %s", i+1, text), l)
		w.height(15)
		if len(text) > 165 {
			w.height(27)
		}
		w.row++
	}
	w.row++
}
