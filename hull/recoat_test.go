package hull_test

import (
	"testing"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// A recoat that states one constant keeps the zone's own for the other, and
// bare steel has no coating to touch up.
func TestWorksKeepWhatTheyDoNotState(t *testing.T) {
	load := func() *hull.Asset {
		a, err := assetfile.Read("../testdata/assets/tern-passage.json")
		if err != nil {
			t.Fatal(err)
		}
		return a
	}
	f := func(x float64) *float64 { return &x }
	a := load()
	a.Zones[0].Coating = hull.Coating{Category: hull.CategoryOwn, Applied: a.LastDocking, A: f(0.05), B: f(0.03)}
	a.Dockings[0].Works = []hull.Work{{Zone: "side", Coating: hull.Recoat, A: f(0.02)}}
	b := hull.Demand(a)[0].Breakdown[1]
	if years := a.Intervals()[1].Years(); b.Initial != 0.02 || b.Final < 0.02+0.03*years-1e-12 || b.Final > 0.02+0.03*years+1e-12 {
		t.Errorf("recoat with a alone: breakdown %.5f to %.5f, want 0.02 growing by 0.03 a year", b.Initial, b.Final)
	}
	a.Dockings[0].Works = []hull.Work{{Zone: "side", Coating: hull.PartRecoat, Share: f(0.5), B: f(0.01)}}
	before := hull.Demand(a)[0].Breakdown[0].Final
	if got, want := hull.Demand(a)[0].Breakdown[1].Initial, 0.5*before+0.5*0.05; got < want-1e-12 || got > want+1e-12 {
		t.Errorf("part-recoat with b alone: breakdown %.5f, want %.5f", got, want)
	}
	a = load()
	a.Dockings[0].Works = []hull.Work{{Zone: "propeller", Coating: hull.TouchUp, Share: f(0.5)}}
	if b := hull.Demand(a)[1].Breakdown[1]; b != (hull.Breakdown{Initial: 1, Mean: 1, Final: 1}) {
		t.Errorf("touch-up of bare metal: breakdown %v, want 1", b)
	}
}

// Where no part of a zone is coated its breakdown is reported as 1.
func TestBreakdownWithoutACoatedPart(t *testing.T) {
	a, err := assetfile.Read("../testdata/assets/tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	a.Zones[0].BareArea = a.Zones[0].WettedArea
	d := hull.Demand(a)[0]
	if d.Breakdown[0] != (hull.Breakdown{Initial: 1, Mean: 1, Final: 1}) {
		t.Errorf("breakdown %v, want 1", d.Breakdown[0])
	}
	if want := 0.2 * a.Zones[0].WettedArea; d.Own[0].Initial != want {
		t.Errorf("initial demand %v A, want %v: 200 mA/m2 of bare steel", d.Own[0].Initial, want)
	}
}
