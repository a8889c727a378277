package plan_test

import (
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"slices"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// recordedCase is one file of testdata/plan: an asset with the plan that a
// separate reference computation found for it by plain enumeration. None of
// its figures comes from this program.
type recordedCase struct {
	Source string          `json:"source"`
	Covers string          `json:"covers"`
	Asset  json.RawMessage `json:"asset"`
	Zones  []struct {
		Zone      string       `json:"zone"`
		Breakdown [][3]float64 `json:"breakdown"` // initial, mean, final of each interval
		Demand    [][3]float64 `json:"demand_a"`
	} `json:"zones"`
	Unmet    []string       `json:"unmet"` // zones; no plan below then
	Schedule []recordedLine `json:"schedule"`
	Total    float64        `json:"total"`
	RenewAll float64        `json:"renew_all_every_docking"`
	AsLate   float64        `json:"as_late_as_possible"`
}

type recordedLine struct {
	Docking hull.Date     `json:"docking"`
	Zone    string        `json:"zone"`
	Action  string        `json:"action"`
	Pattern string        `json:"pattern"`
	Count   int           `json:"count"`
	Until   hull.Date     `json:"until"`
	Cost    float64       `json:"cost"`
	Need    *recordedNeed `json:"need"` // none for a kept set
}

type recordedNeed struct {
	Mass         float64 `json:"mass_kg"`
	ByMass       float64 `json:"by_mass"`
	ByRenewAbove float64 `json:"by_renew_above"`
	ByInitial    float64 `json:"by_initial"`
	ByFinal      float64 `json:"by_final"`
}

func TestRecordedPlans(t *testing.T) {
	files, err := filepath.Glob("../../testdata/plan/*.json")
	if err != nil || len(files) < 16 {
		t.Fatalf("%d recorded plans: %v", len(files), err)
	}
	for _, file := range files {
		t.Run(filepath.Base(file), func(t *testing.T) {
			text, err := os.ReadFile(file)
			if err != nil {
				t.Fatal(err)
			}
			var c recordedCase
			if err := json.Unmarshal(text, &c); err != nil {
				t.Fatal(err)
			}
			a, err := assetfile.Decode(c.Asset)
			if err != nil {
				t.Fatal(err)
			}
			c.check(t, plan.Compute(a, a.Today))
		})
	}
}

func (c *recordedCase) check(t *testing.T, o *plan.Outcome) {
	same := func(what string, got, want float64) {
		t.Helper()
		if math.IsNaN(got) || math.Abs(got-want) > 1e-9*max(1, math.Abs(want)) {
			t.Errorf("%s: %.12g, the reference says %.12g", what, got, want)
		}
	}
	if len(c.Zones) != len(o.Zones) {
		t.Fatalf("%d zones, the reference has %d", len(o.Zones), len(c.Zones))
	}
	for i, z := range c.Zones {
		got := o.Zones[i]
		if len(got.Intervals) != len(z.Demand) {
			t.Fatalf("%s: %d intervals, the reference has %d", z.Zone, len(got.Intervals), len(z.Demand))
		}
		for k, iv := range got.Intervals {
			same(z.Zone+" breakdown initial", iv.Breakdown.Initial, z.Breakdown[k][0])
			same(z.Zone+" breakdown mean", iv.Breakdown.Mean, z.Breakdown[k][1])
			same(z.Zone+" breakdown final", iv.Breakdown.Final, z.Breakdown[k][2])
			same(z.Zone+" demand initial", iv.Demand.Initial, z.Demand[k][0])
			same(z.Zone+" demand mean", iv.Demand.Mean, z.Demand[k][1])
			same(z.Zone+" demand final", iv.Demand.Final, z.Demand[k][2])
		}
	}
	var unmet []string
	for _, u := range o.Unmet {
		unmet = append(unmet, o.Asset.Zones[u.Zone].ID)
	}
	if !slices.Equal(unmet, c.Unmet) {
		t.Errorf("unmet %v, the reference says %v", unmet, c.Unmet)
	}
	if len(c.Unmet) > 0 {
		return
	}
	same("total", o.Money.Total, c.Total)
	same("lower bound", o.Money.LowerBound, c.Total)
	same("renewing all at every docking", o.Money.RenewAll, c.RenewAll)
	same("as late as possible", o.Money.AsLate, c.AsLate)
	if len(o.Schedule) != len(c.Schedule) {
		t.Fatalf("%d lines, the reference has %d", len(o.Schedule), len(c.Schedule))
	}
	for i, want := range c.Schedule {
		l := o.Schedule[i]
		got := recordedLine{
			Docking: l.Date, Zone: o.Asset.Zones[l.Zone].ID, Action: string(l.Action),
			Pattern: l.Pattern.ID, Count: l.Count, Until: l.Until,
		}
		what := want.Docking.String() + " " + want.Zone + " "
		same(what+"cost", l.Cost, want.Cost)
		if n := want.Need; n != nil {
			same(what+"mass", l.Need.Mass, n.Mass)
			same(what+"by mass", l.Need.ByMass, n.ByMass)
			same(what+"by renew_above", l.Need.ByRenewAbove, n.ByRenewAbove)
			same(what+"by initial", l.Need.ByInitial, n.ByInitial)
			same(what+"by final", l.Need.ByFinal, n.ByFinal)
		}
		want.Cost, want.Need = 0, nil
		if got != want {
			t.Errorf("line %d: %+v, the reference says %+v", i, got, want)
		}
	}
}
