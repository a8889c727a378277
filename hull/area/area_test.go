package area

import (
	"math"
	"testing"

	"anodewright/hull"
)

// Holtrop and Mennen 1982, worked example: 7381.45 m2.
func TestHoltropMennenExample(t *testing.T) {
	if got := HoltropMennen(205, 32, 10, 37500, 0.98, 0.75, 20); math.Abs(got-7381.45) > 0.005 {
		t.Errorf("got %.3f m2, want 7381.45", got)
	}
}

// Nicholls's Seamanship and Nautical Knowledge, p. 482: 400 x 54 x 15 ft,
// block coefficient 0.8, gives 27 480 ft2.
func TestDennyMumfordExample(t *testing.T) {
	if got := DennyMumford(400, 15, 0.8*400*54*15); math.Abs(got-27480) > 0.5 {
		t.Errorf("got %.1f ft2, want 27480", got)
	}
}

// Benchmark hulls with a published wetted surface: KCS and JBC of the Tokyo
// 2015 workshop, KVLCC1 of SIMMAN 2008.
func TestBenchmarkHulls(t *testing.T) {
	for _, c := range []struct {
		name string
		p    hull.Particulars
		s    float64
	}{
		{"KCS", hull.Particulars{ShipType: "container", LengthPP: 230, LengthWL: 232.5, Beam: 32.2, Draught: 10.8, Volume: 52030}, 9424},
		{"KVLCC1", hull.Particulars{ShipType: "tanker", LengthPP: 320, LengthWL: 325.5, Beam: 58, Draught: 20.8, Volume: 312738}, 27320},
		{"JBC", hull.Particulars{ShipType: "bulk-carrier", LengthPP: 280, LengthWL: 285, Beam: 45, Draught: 16.5, Volume: 178369.9}, 19556.1},
	} {
		if off := ByType(c.p)/c.s - 1; math.Abs(off) > 0.02 {
			t.Errorf("%s: by type is off by %.2f %%, want at most 2 %%", c.name, 100*off)
		}
		if off := DennyMumford(c.p.LengthPP, c.p.Draught, c.p.Volume)/c.s - 1; off > -0.015 || off < -0.055 {
			t.Errorf("%s: Denny-Mumford is off by %.2f %%, want 1.5 to 5.5 %% low", c.name, 100*off)
		}
	}
}
