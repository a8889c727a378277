package sheet

import (
	"fmt"
	"math"
	"slices"

	"anodewright/anodes/survey"
	"anodewright/hull"
)

// findings are what a file says of one set, or of one zone, on one day.
type findings struct {
	zone, pattern string
	fitted, date  hull.Date
	by, how, note string
	dated         bool // else the date was at fault

	eye, weighed []float64
	measured     []hull.Measured
	grades       *hull.Grades
	counts       [5]int // in the order of countNames
	counted      bool
	potentials   []hull.Measure
	coating      *float64
	word         hull.Condition
	resistivity  *float64
	boxes        map[string][]Box // by what they tell
}

// countNames are the counts of pieces, in their order.
var countNames = [5]string{"gone", "not wasted", "fallen", "painted over", "not seen"}

// quarters are the classes of wastage that the sheet counts by.
var quarters = []float64{0, 0.25, 0.5, 0.75}

func (f *findings) at(kind string, b Box) {
	if f.boxes == nil {
		f.boxes = map[string][]Box{}
	}
	if !slices.Contains(f.boxes[kind], b) {
		f.boxes[kind] = append(f.boxes[kind], b)
	}
}

// readings makes readings of the findings: one for each way of telling the
// wastage, as a reading has only one. Counts of pieces go with the first;
// what is of the zone makes one too where there is no other.
func (f *findings) readings() (list []Understood) {
	base := hull.Reading{Date: f.date, Zone: f.zone, Pattern: f.pattern, Fitted: f.fitted, By: f.by, How: f.how}
	add := func(kind string, set func(r *hull.Reading)) {
		r := base
		set(&r)
		list = append(list, Understood{Reading: r, Boxes: f.boxes[kind], Of: -1})
	}
	if len(f.weighed) > 0 {
		add("weighed", func(r *hull.Reading) { r.WeighedWastage = f.weighed })
	}
	if len(f.measured) > 0 {
		add("measured", func(r *hull.Reading) { r.Measured = f.measured })
	}
	if len(f.eye) > 0 {
		add("seen", func(r *hull.Reading) { r.Percent = f.eye })
	}
	if f.grades != nil {
		add("graded", func(r *hull.Reading) { r.Grades = f.grades })
	}
	if f.counted {
		if list == nil {
			add("counted", func(*hull.Reading) {})
		} else {
			list[0].Boxes = append(list[0].Boxes, f.boxes["counted"]...)
		}
		r := &list[0].Reading
		r.Gone, r.NotWasted, r.Fallen, r.Painted, r.NotSeen = f.counts[0], f.counts[1], f.counts[2], f.counts[3], f.counts[4]
	}
	if len(f.potentials) > 0 || f.coating != nil || f.word != "" || f.resistivity != nil || f.note != "" {
		if list == nil {
			add("zone", func(*hull.Reading) {})
		} else {
			list[0].Boxes = append(list[0].Boxes, f.boxes["zone"]...)
		}
		r := &list[0].Reading
		r.Potentials, r.CoatingPercent, r.CoatingWord, r.Resistivity, r.Note = f.potentials, f.coating, f.word, f.resistivity, f.note
	}
	if !f.dated {
		for i := range list {
			list[i].Status = Faulty
		}
	}
	return list
}

// wastageOf turns the mass of a piece with its insert into the share of its
// net mass that is gone. A new piece and a bare insert may weigh 2 % more or
// less than the pattern says.
func wastageOf(p *hull.Pattern, kg float64) (float64, string) {
	gross, insert := p.Gross(), p.Gross()-p.NetMass
	switch {
	case kg > 1.02*gross:
		return 0, fmt.Sprintf("want at most the %.4g kg of a new piece with its insert", gross)
	case kg < 0.98*insert-0.02*p.NetMass:
		return 0, fmt.Sprintf("want at least the %.4g kg of the insert alone: is this a mass without it?", insert)
	}
	// No scale tells more than a hundredth of a per cent.
	return math.Round(1e4*min(max((gross-kg)/p.NetMass, 0), 1)) / 1e4, ""
}

// measure is the girth and length of what is left of a piece, if a piece of
// the pattern can have them.
func measured(p *hull.Pattern, girth, length float64) (hull.Measured, string) {
	m := hull.Measured{Girth: girth, Length: length}
	if _, err := survey.Wastage(p, m); err != nil {
		return m, err.Error()
	}
	return m, ""
}
