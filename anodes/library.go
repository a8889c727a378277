package anodes

import (
	"bytes"
	"encoding/json"
	"fmt"
	"slices"
	"sync"

	"anodewright/assets"
	"anodewright/hull"
)

// library is read once.
var library = sync.OnceValue(func() []hull.Pattern {
	var raw []json.RawMessage
	if err := json.Unmarshal(assets.Patterns, &raw); err != nil {
		panic("anodes: pattern library: " + err.Error())
	}
	var ps []hull.Pattern
	for i, text := range raw {
		var p hull.Pattern
		hull.SetDefaults(&p)
		d := json.NewDecoder(bytes.NewReader(text))
		d.DisallowUnknownFields()
		if err := d.Decode(&p); err != nil {
			panic(fmt.Sprintf("anodes: pattern library, %d: %v", i, err))
		}
		ps = append(ps, p)
	}
	return ps
})

// Library returns patterns to start from: castings of no maker, for a person
// to copy and to correct. Their prices are round figures without a currency.
func Library() []hull.Pattern { return slices.Clone(library()) }

// Copy returns the pattern with an id that the asset does not use yet: its
// own, else its own with a number.
func Copy(a *hull.Asset, p hull.Pattern) hull.Pattern {
	id := p.ID
	for n := 2; ; n++ {
		if _, taken := a.Pattern(p.ID); !taken {
			break
		}
		p.ID = fmt.Sprintf("%s-%d", id, n)
	}
	p.Capacity, p.Potential, p.FitPerPiece = same(p.Capacity), same(p.Potential), same(p.FitPerPiece)
	return p
}

// same returns a number of its own for an optional one.
func same(x *float64) *float64 {
	if x == nil {
		return nil
	}
	y := *x
	return &y
}
