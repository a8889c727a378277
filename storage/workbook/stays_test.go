package workbook_test

import (
	"slices"
	"strconv"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// A fitted set that may stay by the plan is said to; after a change of a
// wetted area the workbook says what the program says of the same action
// pinned.
func TestWhetherAFittedSetMayStayFollowsTheInputs(t *testing.T) {
	asked, refused := 0, 0
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(a, today)
		w := write(t, o)
		rows := w.rows("Schedule")
		head := slices.IndexFunc(rows, func(r []string) bool { return slices.Contains(r, "The fitted set") })
		if head < 0 {
			continue
		}
		col := slices.Index(rows[head], "The fitted set")
		zones := slices.IndexFunc(w.rows("Zones"), func(r []string) bool { return len(r) > 1 && r[0] == "Zone" }) + 1
		for n := head + 1; n < len(rows) && rows[n][0] != "Total"; n++ {
			cell, _ := excelize.CoordinatesToCellName(col+1, n+1)
			if formula, _ := w.f.GetCellFormula("Schedule", cell); formula == "" {
				continue
			}
			w.same(rows[n][col], 0)
			i := slices.IndexFunc(o.Schedule, func(l renewal.Line) bool {
				return l.Date.String() == dayOf(w, rows[n][0]) && o.Zones[l.Zone].Zone.Name == rows[n][1]
			})
			l := o.Schedule[i]
			if l.Action != renewal.Keep {
				continue
			}
			for _, factor := range []float64{1.05, 1.5, 3} {
				b := assetfile.Clone(a)
				b.Zones[l.Zone].WettedArea *= factor
				area := "E" + strconv.Itoa(zones+l.Zone+1)
				if err := w.f.SetCellValue("Zones", area, b.Zones[l.Zone].WettedArea); err != nil {
					t.Fatal(err)
				}
				got, err := w.f.CalcCellValue("Schedule", cell, excelize.Options{RawCellValue: true})
				if err != nil {
					t.Fatal(err)
				}
				want := "0"
				if !mayStay(b, o, l.Zone) {
					want = "1"
					refused++
				}
				if asked++; got != want {
					t.Errorf("%s, %s, area times %g: the workbook says %s, the program %s", a.Name, rows[n][1], factor, got, want)
				}
				if err := w.f.SetCellValue("Zones", area, a.Zones[l.Zone].WettedArea); err != nil {
					t.Fatal(err)
				}
			}
		}
	}
	if asked < 15 || refused < 3 || refused == asked {
		t.Errorf("%d asked, %d refused: the case says too little", asked, refused)
	}
}

// mayStay asks the program whether a zone may have the actions of a plan.
func mayStay(a *hull.Asset, o *plan.Outcome, zone int) bool {
	var pins []renewal.Pin
	for k, d := range a.Ahead() {
		p := renewal.Pin{Zone: a.Zones[zone].ID, Docking: d.Date, Action: renewal.Keep} // nothing is done
		for _, l := range o.Schedule {
			if l.Zone == zone && l.Docking == k && l.Action != renewal.Keep {
				p.Action, p.Pattern = l.Action, l.Pattern.ID
			}
		}
		pins = append(pins, p)
	}
	for _, p := range plan.Compute(a, today, plan.WithPins(pins)).Pins {
		if p.Refused != "" {
			return false
		}
	}
	return true
}

// dayOf is the day of a date as a workbook stores it.
func dayOf(w written, text string) string {
	return (hull.NewDate(1899, 12, 30) + hull.Date(w.whole(text))).String()
}
