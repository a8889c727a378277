package renewal

import (
	"math"
	"testing"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

func sides(t *testing.T, readings ...hull.Reading) *zone {
	t.Helper()
	a, err := assetfile.Read("../../testdata/assets/tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	a.Readings = readings
	a.Dockings[0].Works = append(a.Dockings[0].Works, hull.Work{Zone: "side", Coating: hull.Clean})
	return newZone(a, 0, hull.Demand(a)[0].Total, 1)
}

// The charge of each stretch between readings is borne by the pieces that give
// current in it, piece by piece.
func TestFittedSetByLiveCount(t *testing.T) {
	first, second := hull.NewDate(2025, 3, 15), hull.NewDate(2026, 3, 15)
	z := sides(t,
		hull.Reading{Date: first, Zone: "side", Fallen: 4},
		hull.Reading{Date: second, Zone: "side", Gone: 1, Painted: 2},
		hull.Reading{Date: z0.AddMonths(5 * 12), Zone: "side", Fallen: 2})
	m := z.fitted[0].piece
	mean, start := z.demand[0].Mean, z.date(0)
	hours := func(a, b hull.Date) float64 { return 24 * float64(b-a) }
	at := z.fittedAt(1)
	each := mean * (hours(start, first)/24 + hours(first, second)/20 + hours(second, z.date(1))/17)
	rested := mean * (hours(start, first)/24 + hours(first, second)/20)
	near := func(what string, got, want float64) {
		t.Helper()
		if math.Abs(got-want) > 1e-9*math.Abs(want) {
			t.Errorf("%s: %.10g, by hand %.10g", what, got, want)
		}
	}
	near("usable left", at.left, 17*(m.usable-each)+2*(m.usable-rested)) // the docking has cleaned the two
	near("wastage", at.wastage, (17*each+2*rested)/(19*m.full))
	near("worn output after the docking", at.outWorn[1], 19*m.outWorn[1])
	near("worn output before the docking", at.outWornEnd[0], 17*m.outWornEnd[0])
	near("worn output at the end", at.outWornEnd[z.end()-1], 17*m.outWornEnd[z.end()-1])
	if at.pieces != 19 || z.fittedAt(z.end()).pieces != 17 || z.fittedAt(0).pieces != 24 {
		t.Errorf("%d, then %d, then %d pieces, want 24, 19, 17", z.fittedAt(0).pieces, at.pieces, z.fittedAt(z.end()).pieces)
	}
}

var z0 = hull.NewDate(2024, 3, 15) // the last docking of testdata's asset

// What is left in pieces that are found fallen later is not counted on for an
// add that has to last beyond that.
func TestAddDoesNotCountOnPiecesThatLeave(t *testing.T) {
	z := sides(t, hull.Reading{Date: z0.AddMonths(5 * 12), Zone: "side", Fallen: 8})
	whole := sides(t)
	at, all := z.fittedAt(1), whole.fittedAt(1)
	if math.Abs(at.left-all.left) > 1e-6 || math.Abs(at.leftTo[z.end()]-all.left*16/24) > 1e-6 || math.Abs(at.leftTo[1]-all.left) > 1e-6 || all.leftTo != nil {
		t.Errorf("left %v, to the end %v, of a set left alone %v", at.left, at.leftTo, all.left)
	}
	m := z.offered[0]
	few, ok := whole.addTo(stock{to: 1, kept: true, count: 24}, m, 1, z.end())
	more, fits := z.addTo(stock{to: 1, kept: true, count: 24}, m, 1, z.end())
	if !ok || !fits || more.addNeed.ByMass <= few.addNeed.ByMass || more.count != 16 || few.count != 24 {
		t.Errorf("added %+v, to a set left alone %+v", more, few)
	}
}

// A set that may stay may not once too few of its pieces are left, and pieces
// that are not there are not taken off.
func TestKeptSetByLiveCount(t *testing.T) {
	whole := sides(t)
	m := whole.fitted[0].piece
	for k := range whole.demand { // what the set just holds
		whole.demand[k] = hull.Current{Mean: 0.1, Final: 20 * m.outWornEnd[k]}
	}
	if s, ok := whole.keep(2); !ok || s.count != 24 {
		t.Fatalf("whole, the set has to stay: %+v, %t", s, ok)
	}
	for n, want := range map[int]bool{4: true, 5: false} {
		z := sides(t, hull.Reading{Date: hull.NewDate(2026, 3, 15), Zone: "side", Gone: n})
		copy(z.demand, whole.demand)
		s, ok := z.keep(2)
		if ok != want || s.count != 24-n {
			t.Errorf("%d gone: may stay %t with %d pieces", n, ok, s.count)
		}
		lines := z.lines([]stock{s, {from: 2, to: z.end(), piece: m, count: 30}})
		if lines[0].Count != 24-n || lines[1].Removed != 24-n {
			t.Errorf("%d gone: kept %d, taken off %d", n, lines[0].Count, lines[1].Removed)
		}
		if got, want := z.span(s).cost, z.worth[2]*float64(24-n)*z.a.Costs.RemovePerPiece; math.Abs(got-want) > 1e-9 {
			t.Errorf("%d gone: removal costs %v, want %v", n, got, want)
		}
	}
	// More than a piece has: what the others cannot give is missing.
	z := sides(t, hull.Reading{Date: hull.NewDate(2024, 4, 15), Zone: "side", Gone: 23})
	for k := range z.demand {
		z.demand[k] = hull.Current{Mean: z.fitted[0].outNew[k] * 0.99}
	}
	if _, ok := z.keep(z.end()); ok || z.fittedAt(z.end()).short <= 0 {
		t.Errorf("one piece left for ten years may stay, short of %v Ah", z.fittedAt(z.end()).short)
	}
}
