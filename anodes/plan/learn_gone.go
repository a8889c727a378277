package plan

import (
	"fmt"
	"slices"

	"anodewright/anodes/survey"
)

// goneEarly is the part of the utilisation factor below which, by the design
// figures, a piece is too little wasted to be gone: four times the demand is
// beyond what sites scatter by (our own judgement).
const goneEarly = 0.25

// Questions are the doubts about the asset's readings, for the surveyor to
// settle: those that the readings raise among themselves, and pieces said to
// be gone long before the design figures waste them. One such piece says that
// the steel takes several times the design; one that came off says nothing.
func (o *Outcome) Questions() []survey.Question {
	all := survey.Questions(o.Asset, o.Today)
	if o.learned == nil {
		return all
	}
	for i := range o.Asset.Readings {
		r := &o.Asset.Readings[i]
		if r.Gone == 0 || !survey.Usable(o.Asset, r, o.Today) {
			continue
		}
		zone := slices.IndexFunc(o.Zones, func(z Zone) bool { return z.Zone.ID == r.Zone })
		z := o.Zones[zone].Zone
		set := survey.Set(z, r)
		p, _ := o.Asset.Pattern(z.Fitted[set].Pattern)
		by := o.learned.design.predicted(zone, set, r.Date)
		if by == nil || by(0) >= goneEarly*p.Utilisation {
			continue
		}
		all = append(all, survey.Question{Reading: i, Text: fmt.Sprintf("Reading of %s, zone %s: ", r.Date, r.Zone) +
			fmt.Sprintf("pieces are gone that had wasted %.0f %% by the design figures; if they came off they are fallen, which teaches nothing of the demand", 100*by(0)) + "."})
	}
	slices.SortStableFunc(all, func(x, y survey.Question) int { return x.Reading - y.Reading })
	return all
}
