package renewal

import "anodewright/hull"

// Trial is a set whose fitness a forecast is asked about: of one zone, from
// one boundary to another.
type Trial struct {
	Zone      int
	From, To  int // boundaries; a kept set's From is 0
	JudgeFrom int // the first interval in which it has to hold
	Kept      bool
	Pattern   *hull.Pattern // of a new set
	Count     int
	Add       int // the boundary of an add, 0 without
	AddTo     *hull.Pattern
	AddCount  int
}

// Keeps reports whether a forecast keeps a zone sound with the set of a trial,
// the zone with what it holds as a circuit alone.
type Keeps func(Trial) bool

// mostForeseen bounds the count of a set that is sized by the forecast.
const mostForeseen = 20000

// least returns the least count, from at least on and in steps of the zone's
// multiple, that keeps, and whether there is one up to the most. More pieces
// never keep worse.
func (z *zone) least(from, most int, keeps func(n int) bool) (int, bool) {
	low := z.upToMultiple(max(1, from))
	if low > most {
		return low, false
	}
	step := z.z.CountMultiple
	high := low
	for width := step; !keeps(high); width *= 2 {
		low = high + step
		if high >= most {
			return high, false
		}
		high = min(high+width, max(low, most-(most-high)%step))
	}
	for low < high {
		mid := low + (high-low)/(2*step)*step
		if keeps(mid) {
			high = mid
		} else {
			low = mid + step
		}
	}
	return high, high <= most
}

// most is the most pieces that the zone may carry.
func (z *zone) most() int {
	if z.z.MaxCount != nil {
		return *z.z.MaxCount
	}
	return mostForeseen
}

// foreseenSet sizes a new set by the forecast. What the code's criteria would
// ask stands in its need.
func (z *zone) foreseenSet(m *piece, i, j int) (s stock, ok bool) {
	s = stock{from: i, to: j, piece: m, need: z.need(m, i, j), governs: "forecast"}
	s.count, ok = z.least(z.z.MinCount, z.most(), func(n int) bool {
		return z.keeps(Trial{Zone: z.index, From: i, To: j, JudgeFrom: i, Pattern: m.p, Count: n})
	})
	return s, ok && z.mayFit(m, i)
}

// foreseenKeep reports whether the forecast lets the fitted set stay to j.
func (z *zone) foreseenKeep(j int) bool {
	return z.keeps(Trial{Zone: z.index, To: j, JudgeFrom: 1, Kept: true})
}

// foreseenAdd sizes an add by the forecast.
func (z *zone) foreseenAdd(s stock, o *old, m *piece, i, j int) (stock, bool) {
	t := Trial{Zone: z.index, From: s.from, To: j, JudgeFrom: i, Kept: s.kept, Pattern: s.piece.pattern(), Count: s.count, Add: i, AddTo: m.p}
	n, ok := z.least(1, z.most()-o.pieces, func(n int) bool {
		t.AddCount = n
		return z.keeps(t)
	})
	s.add, s.to, s.addPiece, s.addCount, s.addWord = i, j, m, n, "forecast"
	return s, ok
}
