package renewal

import (
	"math"

	"anodewright/hull"
)

// Need is what each criterion of the code asks for, as exact counts of
// pieces before rounding, with the net mass that the charge takes.
type Need struct {
	Mass         float64 // kg
	ByMass       float64
	ByRenewAbove float64
	ByInitial    float64
	ByFinal      float64
}

// Largest returns the largest of the four counts and the word for its
// criterion.
func (n Need) Largest() (float64, string) {
	q, word := n.ByFinal, "final"
	for _, c := range []struct {
		q    float64
		word string
	}{{n.ByInitial, "initial"}, {n.ByRenewAbove, "renew_above"}, {n.ByMass, "mass"}} {
		if c.q > q {
			q, word = c.q, c.word
		}
	}
	return q, word
}

// mostPieces bounds a count, so that an absurd need is no overflow.
const mostPieces = 1e9

// stock is a set as the plan handles it: fitted or renewed at boundary from,
// perhaps added to at boundary add, taken off at boundary to.
type stock struct {
	from, to int
	kept     bool   // the fitted set, from boundary 0
	piece    *piece // of a new set
	count    int    // pieces of the new or the kept set
	need     Need
	governs  string
	add      int // 0: nothing is added
	addPiece *piece
	addCount int
	addNeed  Need
	addWord  string
}

func (s stock) pieces() int { return s.count + s.addCount }

// need returns what a new set of one pattern asks for, fitted at i to last to
// j: mass for the charge, the renewal limit at every docking between, initial
// current just after i, and the largest final current worn.
func (z *zone) need(m *piece, i, j int) Need {
	n := Need{ByInitial: z.demand[i].Initial / m.outNew[i]}
	used := 0.0
	for k := i; k < j; k++ {
		used += z.demand[k].Mean * z.hours[k]
		if k+1 < j {
			n.ByRenewAbove = used / (m.full * z.a.Basis.RenewAbove)
		}
		n.ByFinal = max(n.ByFinal, z.demand[k].Final/m.outWornEnd[k])
	}
	n.ByMass = used / m.usable
	n.Mass = n.ByMass * m.p.NetMass
	return n
}

// newSet sizes a set of one pattern fitted at i to last to j. It is not ok
// where the pattern cannot be fitted or max_count is below the need; the set
// is then what would be needed.
func (z *zone) newSet(m *piece, i, j int) (s stock, ok bool) {
	if z.keeps != nil {
		return z.foreseenSet(m, i, j)
	}
	s, ok = z.sized(m, i, j)
	for row := 1; m.mutual != nil && s.count > row && s.count <= longestRow; {
		row = s.count // each rod of a longer row gives less: size it again
		s, ok = z.sized(m.inRow(row), i, j)
	}
	return s, ok && (m.mutual == nil || s.count <= longestRow)
}

const minCount = "min_count"

// word is the word for what governs a new set's count.
func (z *zone) word(n Need) string {
	q, word := n.Largest()
	if max(1, int(roundUp(q))) < z.z.MinCount {
		return minCount
	}
	return word
}

// sized is newSet for pieces that do not hinder each other.
func (z *zone) sized(m *piece, i, j int) (s stock, ok bool) {
	s = stock{from: i, to: j, piece: m, need: z.need(m, i, j)}
	q, word := s.need.Largest()
	s.governs = word
	if q > mostPieces {
		s.count = mostPieces
		return s, false
	}
	n := max(1, int(roundUp(q)))
	if n < z.z.MinCount {
		n, s.governs = z.z.MinCount, minCount
	}
	s.count = z.upToMultiple(n)
	return s, z.mayFit(m, i) && z.belowMax(s.count)
}

// old is a set that is already there at a boundary, from where something may
// be added to it.
type old struct {
	pieces  int
	left    float64   // Ah still usable
	leftTo  []float64 // of it, by boundary: that of pieces which still give current then; nil: all
	short   float64   // Ah that the fitted set should have given and had not
	wastage float64   // share of the net mass gone
	// A worn at the start and the end of interval k, of which the set gives
	// times as much.
	times               float64
	outWorn, outWornEnd []float64
	alloy               hull.Alloy
	mixed               bool // of several alloys
}

func (o *old) worn(k int) float64    { return o.times * o.outWorn[k] }
func (o *old) wornEnd(k int) float64 { return o.times * o.outWornEnd[k] }

// keep returns the fitted set staying to boundary j, and whether it may: past
// the first docking its usable charge has to last, its worn output has to
// cover every final current, and at no docking passed may it be wasted above
// the renewal limit.
func (z *zone) keep(j int) (s stock, ok bool) { return z.stays(z.fittedSets(), j) }

// stays is keep for the fitted set as it is at every boundary.
func (z *zone) stays(fitted []old, j int) (s stock, ok bool) {
	at := &fitted[j]
	s = stock{to: j, kept: true, count: at.pieces}
	if j == 1 {
		return s, true
	}
	if fitted[1].pieces == 0 {
		return s, false
	}
	if z.keeps != nil {
		return s, z.foreseenKeep(j)
	}
	if usable := fitted[0].left; !covers(usable, usable+at.short) {
		return s, false
	}
	for k := 1; k < j; k++ {
		if !covers(at.wornEnd(k), z.demand[k].Final) ||
			!covers(z.a.Basis.RenewAbove, fitted[k].wastage) {
			return s, false
		}
	}
	return s, true
}

// oldAt returns a set as it is at boundary i.
func (s *stock) oldAt(z *zone, i int) old {
	if s.kept {
		return z.fittedAt(i)
	}
	n := float64(s.count)
	q := z.charge(s.from, i)
	return old{
		pieces:     s.count,
		left:       n*s.piece.usable - q,
		wastage:    q / (n * s.piece.full),
		times:      n,
		outWorn:    s.piece.outWorn,
		outWornEnd: s.piece.outWornEnd,
		alloy:      s.piece.p.Alloy,
	}
}

// addTo sizes the pieces of one pattern to add at boundary i, the end of the
// set s, so that both last to j. It is not ok where an add is not open.
func (z *zone) addTo(s stock, m *piece, i, j int) (stock, bool) {
	o := s.oldAt(z, i)
	if !z.mayAdd(&o, m, i) {
		return s, false
	}
	return z.onto(s, &o, m, i, j)
}

// onto is addTo for a set as it is there, to which pieces may be added.
func (z *zone) onto(s stock, o *old, m *piece, i, j int) (stock, bool) {
	if z.keeps != nil {
		return z.foreseenAdd(s, o, m, i, j)
	}
	if o.leftTo != nil {
		staying := *o
		staying.left = o.leftTo[j]
		o = &staying
	}
	n, need, ok := z.addCount(o, m, i, j)
	for row := 1; ok && m.mutual != nil && n > row; {
		row = n
		n, need, ok = z.addCount(o, m.inRow(row), i, j)
		ok = ok && n <= longestRow
	}
	if !ok || !z.belowMax(o.pieces+n) {
		return s, false
	}
	s.add, s.to, s.addPiece, s.addCount, s.addNeed = i, j, m.inRow(n), n, need
	if s.kept {
		s.count = z.fittedAt(j).pieces
	}
	q, word := need.Largest()
	if z.upToMultiple(max(1, int(roundUp(q)))) < n {
		// With fewer, the old set would be used up before the end and the new
		// pieces alone would not give the final current.
		word = "final"
	}
	s.addWord = word
	return s, true
}

// mayAdd reports whether pieces of a pattern may be added to a set at boundary
// i.
func (z *zone) mayAdd(o *old, m *piece, i int) bool {
	return o.pieces > 0 && covers(z.a.Basis.RenewAbove, o.wastage) && z.mayFit(m, i) &&
		(z.z.MixAlloys || !o.mixed && o.alloy == m.p.Alloy)
}

// addCount returns the least count to add: enough charge together with what
// the old set has left; initial current with the old set worn; and final
// current, in which the old set counts if it has the charge for its share by
// worn output.
func (z *zone) addCount(o *old, m *piece, i, j int) (int, Need, bool) {
	q := z.charge(i, j)
	left := max(0, o.left)
	if left <= slack*q {
		left = 0
	}
	initial := z.demand[i].Initial
	if left > 0 {
		initial -= o.worn(i)
	}
	need := Need{
		ByMass:    max(0, (q-left)/m.usable),
		ByInitial: max(0, initial/m.outNew[i]),
	}
	need.Mass = need.ByMass * m.p.NetMass
	byFinal := func(withOld float64) float64 {
		most := 0.0
		for k := i; k < j; k++ {
			most = max(most, (z.demand[k].Final-withOld*o.wornEnd(k))/m.outWornEnd[k])
		}
		return most
	}
	// The old set gives its share of the charge q by worn output; that share
	// falls with the count added and must not exceed what is left.
	bears := func(n int) bool {
		share := o.worn(i) / (o.worn(i) + float64(n)*m.outWorn[i])
		return left > 0 && covers(left, share*q)
	}
	least := max(1, need.ByMass, need.ByInitial)
	with, without := max(least, byFinal(1)), max(least, byFinal(0))
	if without > mostPieces {
		return 0, need, false
	}
	n := z.upToMultiple(int(roundUp(without)))
	if left > 0 {
		// The least count at which the old set bears its share.
		bearing := max(with, o.worn(i)*(q/left-1)/m.outWorn[i])
		if b := z.upToMultiple(int(roundUp(min(bearing, mostPieces)))); b < n && bears(b) {
			n = b
		}
	}
	need.ByFinal = byFinal(0)
	if bears(n) {
		need.ByFinal = byFinal(1)
	}
	return n, need, !math.IsNaN(without)
}
