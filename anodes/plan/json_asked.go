package plan

import (
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// What a plan was made under, where it is not the cheapest of all.
type (
	pinJSON struct {
		Docking hull.Date `json:"docking"`
		Zone    string    `json:"zone"`
		Action  string    `json:"action"`
		Pattern string    `json:"pattern,omitempty"`
		Count   int       `json:"count,omitempty"`
		Cost    *float64  `json:"cost"`              // what the plan would save without it
		Refused string    `json:"refused,omitempty"` // why the plan does without it
	}
	limitsJSON struct {
		Pieces   int            `json:"pieces_per_docking,omitempty"`
		Budget   float64        `json:"budget_per_docking,omitempty"`
		Patterns int            `json:"patterns_per_order,omitempty"`
		Quay     map[string]int `json:"quay,omitempty"` // pieces there at the first docking, nothing else can be fitted then
	}
)

func (o *Outcome) pinsJSON() (all []pinJSON) {
	for _, p := range o.Pins {
		all = append(all, pinJSON{p.Docking, p.Zone, string(p.Action), p.Pattern, p.Count, known(p.Cost), p.Refused})
	}
	return all
}

func (o *Outcome) limitsJSON() *limitsJSON {
	if o.Limits == (renewal.Limits{}) && o.Quay == nil {
		return nil
	}
	return &limitsJSON{o.Limits.Pieces, o.Limits.Budget, o.Limits.Patterns, o.Quay}
}

// Under says in words what the plan was made under: one line for each pin that
// stands and each limit that it keeps to.
func (o *Outcome) Under() (lines []string) {
	for _, p := range o.Pins {
		if p.Refused == "" {
			lines = append(lines, o.pinText(p))
		}
	}
	return append(lines, o.LimitTexts()...)
}
