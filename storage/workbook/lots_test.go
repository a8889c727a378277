package workbook_test

import (
	"testing"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// The formulas follow pieces that readings found gone, fallen and painted over
// after the last docking, the docking that cleans them, and the coating works
// of a docking that was closed.
func TestFormulasOfPiecesThatFareDifferently(t *testing.T) {
	share, adds, closed := 0.6, 0, 0
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		a.Readings = nil
		ahead := a.Ahead()
		for i := range a.Zones {
			z := &a.Zones[i]
			if z.Coated() && !z.Coating.Applied.IsZero() && z.Coating.Applied < a.Start()-100 {
				closed++
				a.Closed = []hull.Closed{{Date: a.Start() - 50, Works: []hull.Work{{Zone: z.ID, Coating: hull.TouchUp, Share: &share}}}}
			}
			for n, f := range z.Fitted {
				if f.Count < 4 || len(z.Fitted) > 1 && n == 0 {
					continue
				}
				found := func(days hull.Date, r hull.Reading) {
					r.Date, r.Zone, r.Pattern, r.Fitted = min(a.Start()+days, ahead[0].Date-1), z.ID, f.Pattern, f.Fitted
					a.Readings = append(a.Readings, r)
				}
				found(200, hull.Reading{Painted: 2})
				found(330, hull.Reading{Gone: 1, Painted: 1})
			}
			if i%2 == 0 {
				d := &a.Dockings[len(a.Dockings)-len(ahead)]
				d.Works = append(d.Works, hull.Work{Zone: z.ID, Coating: hull.Clean})
			}
		}
		if faults := hull.Check(a); len(faults) > 0 {
			t.Fatalf("%s: %v", a.Name, faults)
		}
		o := plan.Compute(a, today)
		for _, l := range o.Schedule {
			z := &a.Zones[l.Zone]
			if l.Action == renewal.Add && len(z.Fitted) > 0 && len(survey.Lots(a, z, len(z.Fitted)-1)) > 1 {
				adds++
			}
		}
		write(t, o).formulas(a.Name)
	}
	if adds < 3 || closed == 0 {
		t.Errorf("%d additions to sets of several fates, %d closed dockings: the case says too little", adds, closed)
	}
}

// What readings teach of the coatings is in the formulas' inputs, and a new
// coat has the design's constants.
func TestFormulasOfTaughtCoatings(t *testing.T) {
	share, found := 0.4, 6.0
	taught := 0
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		d := &a.Dockings[len(a.Dockings)-len(a.Ahead())]
		for i := range a.Zones {
			z := &a.Zones[i]
			if !z.Coated() {
				continue
			}
			a.Readings = append(a.Readings, hull.Reading{Date: min(a.Start()+300, today-1), Zone: z.ID, CoatingPercent: &found})
			work := hull.Work{Zone: z.ID, Coating: hull.Recoat}
			if i%2 == 0 {
				work = hull.Work{Zone: z.ID, Coating: hull.PartRecoat, Share: &share}
			}
			d.Works = append(d.Works, work)
		}
		if faults := hull.Check(a); len(faults) > 0 {
			t.Fatalf("%s: %v", a.Name, faults)
		}
		o := plan.Compute(a, today, plan.WithReadings())
		for i := range a.Zones {
			was, _ := a.Zones[i].BreakdownConstants()
			if now, _ := o.BreakdownConstants(i); now != was {
				taught++
			}
		}
		w := write(t, o)
		w.formulas(a.Name)
		rows, _ := w.table("Demand", "Zone", "From", "To")
		row := 0
		for _, z := range o.Zones {
			for _, iv := range z.Intervals {
				w.same(rows[row][3], iv.Breakdown.Initial)
				w.same(rows[row][5], iv.Breakdown.Final)
				row++
			}
		}
	}
	if taught < 5 {
		t.Errorf("the readings teach of %d coatings", taught)
	}
}
