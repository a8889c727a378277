// Package renewal decides which anodes a zone gets at which docking: it sizes
// sets of anodes by the criteria of the design code for the time they have to
// last, and finds the cheapest plan over all zones, dockings and patterns.
//
// Dockings ahead are numbered from 1; boundary 0 is the last docking and the
// boundary after the last docking ahead is the horizon. Interval k runs from
// boundary k to k+1. Charge is in Ah, current in A, money in the asset's
// currency, discounted to the last docking.
package renewal

import (
	"encoding/binary"
	"math"
	"slices"

	"anodewright/anodes"
	"anodewright/anodes/protection"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// slack is the relative difference that no comparison of the plan heeds.
const slack = 1e-9

// covers reports whether have is at least need, but for slack.
func covers(have, need float64) bool { return have >= need-slack*math.Abs(need) }

// roundUp returns the least whole number that is not below q, but for slack.
func roundUp(q float64) float64 { return math.Ceil(q - slack*max(1, q)) }

// piece is one pattern in one zone: what a piece holds, gives and costs.
type piece struct {
	p          *hull.Pattern
	full       float64   // Ah in the whole net mass
	usable     float64   // Ah down to the utilisation factor
	outNew     []float64 // A, new, at the start of interval k
	outWorn    []float64 // A, worn, at the start of interval k
	outWornEnd []float64 // A, worn, at the end of interval k
	perWornEnd []float64 // one over that
	cost       float64   // to buy and fit
	// mutual and mutualEnd are by how much a row of rods in soil hinders
	// itself, 1/A, at the start and the end of interval k; nil elsewhere.
	mutual, mutualEnd []float64
	order             int // among the patterns offered
}

// group is fitted pieces of one pattern that fare alike.
type group struct {
	*piece
	count   int
	wastage float64
	lot     survey.Lot
}

// zone is all that the plan of one zone depends on.
type zone struct {
	index      int
	z          *hull.Zone
	demand     []hull.Current // times the demand factor, with what the zone holds
	hours      []float64
	offered    []*piece
	fitted     []group
	a          *hull.Asset
	ahead      []hull.Docking
	worth      []float64 // of one unit of money at boundary k
	known      []old     // the fitted set by boundary, once the demand is settled
	key        string    // under which a memo has it; empty: none does
	remembered *remembered
	keeps      Keeps       // sizes by the forecast; nil by the code
	pins       map[int]Pin // by boundary
	limits     Limits
	quay       bool // what can be fitted at the first docking ahead is limited
}

// newZone gathers the zone's side of the plan.
func newZone(a *hull.Asset, i int, demand []hull.Current, factor float64) *zone {
	return newZoneOf(a, i, demand, factor, map[pieceKey]*piece{})
}

// pieceKey is what a piece depends on: the pattern, the zone's shielding and
// medium, and the waters' resistivities.
type pieceKey struct {
	p         *hull.Pattern
	medium    hull.Medium
	shielding float64
	rho       string
}

// newZoneOf is newZone with pieces that other zones may share.
func newZoneOf(a *hull.Asset, i int, demand []hull.Current, factor float64, known map[pieceKey]*piece) *zone {
	z := &zone{index: i, z: &a.Zones[i], a: a, ahead: a.Ahead()}
	ivs := a.Intervals()
	rho := make([]float64, len(ivs))
	rhoEnd := make([]float64, len(ivs))
	z.worth = append(z.worth, 1)
	for k, iv := range ivs {
		z.demand = append(z.demand, demand[k].Times(factor))
		z.hours = append(z.hours, iv.Hours())
		rho[k] = a.Resistivity(z.z, iv.From)
		rhoEnd[k] = a.Resistivity(z.z, iv.To-1)
		z.worth = append(z.worth, math.Pow(1+a.Costs.DiscountRate, -iv.To.Years(ivs[0].From)))
	}
	key := pieceKey{medium: a.Medium(z.z), shielding: z.z.Shielding, rho: bits(rho, rhoEnd)}
	made := func(p *hull.Pattern) *piece {
		key.p = p
		m, ok := known[key]
		if !ok {
			m = newPiece(a, z.z, p, rho, rhoEnd)
			m.order = slices.IndexFunc(a.Patterns, func(q hull.Pattern) bool { return q.ID == p.ID })
			known[key] = m
		}
		return m
	}
	offered, _ := anodes.Offered(a, z.z)
	for _, p := range offered {
		z.offered = append(z.offered, made(p))
	}
	for n, f := range z.z.Fitted {
		p, _ := a.Pattern(f.Pattern)
		m := made(p).inRow(f.Count)
		for _, lot := range survey.Lots(a, z.z, n) {
			z.fitted = append(z.fitted, group{m, lot.Count, f.Wastage, lot})
		}
	}
	return z
}

// bits writes numbers so that equal ones are equal texts.
func bits(of ...[]float64) string {
	var b []byte
	for _, xs := range of {
		for _, x := range xs {
			b = binary.BigEndian.AppendUint64(b, math.Float64bits(x))
		}
	}
	return string(b)
}

func newPiece(a *hull.Asset, z *hull.Zone, p *hull.Pattern, rho, rhoEnd []float64) *piece {
	medium := a.Medium(z)
	metal := anodes.MetalOf(p, medium)
	m := &piece{
		p:      p,
		full:   p.NetMass * metal.Capacity,
		usable: p.NetMass * metal.Capacity * p.Utilisation,
		cost:   p.Price + a.Costs.FitPerPiece,
	}
	if p.FitPerPiece != nil {
		m.cost = p.Price + *p.FitPerPiece
	}
	for k := range rho {
		m.outNew = append(m.outNew, anodes.OutputNew(p, medium, rho[k], z.Shielding))
		m.outWorn = append(m.outWorn, anodes.OutputWorn(p, medium, rho[k], z.Shielding))
		m.outWornEnd = append(m.outWornEnd, anodes.OutputWorn(p, medium, rhoEnd[k], z.Shielding))
		m.perWornEnd = append(m.perWornEnd, 1/m.outWornEnd[k])
		if driving := z.Shielding * (anodes.Protective() - metal.Potential); p.Shape == hull.SoilRod && p.Spacing > 0 && driving > 0 {
			m.mutual = append(m.mutual, rho[k]/(p.Spacing*driving))
			m.mutualEnd = append(m.mutualEnd, rhoEnd[k]/(p.Spacing*driving))
		}
	}
	return m
}

// inRow returns the piece as one of n: rods in soil at a spacing s add
// rho p(n)/s to the resistance of their row, so that each gives less than it
// would alone. Other pieces are what they are.
func (m *piece) inRow(n int) *piece {
	if m.mutual == nil || n < 2 {
		return m
	}
	f := float64(n) * protection.GroupFactor(n)
	less := func(out, mutual []float64) []float64 {
		row := make([]float64, len(out))
		for k := range out {
			row[k] = out[k] / (1 + f*mutual[k]*out[k])
		}
		return row
	}
	r := *m
	r.outNew, r.outWorn, r.outWornEnd = less(m.outNew, m.mutual), less(m.outWorn, m.mutual), less(m.outWornEnd, m.mutualEnd)
	return &r
}

// pattern is the piece's, nil where there is no piece.
func (m *piece) pattern() *hull.Pattern {
	if m == nil {
		return nil
	}
	return m.p
}

// longestRow is the most rods that a row is sized for.
const longestRow = 5000

// end returns the boundary of the horizon.
func (z *zone) end() int { return len(z.hours) }

// date returns the date of a boundary.
func (z *zone) date(k int) hull.Date {
	switch {
	case k == 0:
		return z.a.Start()
	case k == z.end():
		return z.a.Horizon
	}
	return z.ahead[k-1].Date
}

// charge returns the charge in Ah that the steel takes from boundary i to j.
func (z *zone) charge(i, j int) float64 {
	q := 0.0
	for k := i; k < j; k++ {
		q += z.demand[k].Mean * z.hours[k]
	}
	return q
}

// mayFit reports whether the pattern can be fitted at docking i.
func (z *zone) mayFit(m *piece, i int) bool {
	return z.ahead[i-1].Kind != hull.InWater || m.p.Afloat
}

// upToMultiple raises n to the zone's count_multiple.
func (z *zone) upToMultiple(n int) int {
	k := z.z.CountMultiple
	return (n + k - 1) / k * k
}

func (z *zone) belowMax(n int) bool { return z.z.MaxCount == nil || n <= *z.z.MaxCount }

// own is the asset's pattern; a remembered zone has those of an earlier state
// of the asset.
func (z *zone) own(p *hull.Pattern) *hull.Pattern {
	if p == nil {
		return nil
	}
	own, ok := z.a.Pattern(p.ID)
	if !ok {
		panic("renewal: no pattern " + p.ID)
	}
	return own
}
