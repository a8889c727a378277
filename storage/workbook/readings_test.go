package workbook_test

import (
	"fmt"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

func TestReadingsAndWhatTheyTeach(t *testing.T) {
	a := tern(t)
	a.Readings = append(a.Readings, hull.Reading{
		Date: hull.NewDate(2026, 7, 1), Zone: "side", Pattern: "al-45", By: "=diver", Gone: 30, NotSeen: 2,
		Grades:      &hull.Grades{Bounds: []float64{0, 0.25, 0.5}, Counts: []int{3, 1, 0}},
		Potentials:  []hull.Measure{{Potential: -0.85, Electrode: hull.CopperSulphate}},
		CoatingWord: "FAIR",
	})
	w := write(t, plan.Compute(a, today))
	rows, _ := w.table("Readings", "Date", "Zone", "Pattern")
	if len(rows) != 2 {
		t.Fatalf("%d readings", len(rows))
	}
	first, second := rows[0], rows[1]
	if first[1] != "Vertical sides" || first[5] != "11, 14 %" || first[17] != "weighed" {
		t.Errorf("first %q", first)
	}
	w.same(first[6], 0.125)
	predicted, ok := w.o.Predicted(0)
	if !ok {
		t.Fatal("nothing is predicted")
	}
	w.same(first[7], predicted)
	if second[5] != "0 to 25 %: 3; 25 to 50 %: 1; from 50 %: 0" || second[6] != "" || second[8] != "30" || second[12] != "2" ||
		second[13] != "-0.850 Cu/CuSO4" || second[14] != "-0.800" || second[15] != "FAIR" || second[17] != "graded" {
		t.Errorf("second %q", second)
	}
	factors, _ := w.table("Readings", "Circuit", "Zone")
	if len(factors) != 1 || factors[0][0] != "hull" || factors[0][2] != "2" || factors[0][4] != "1.00 (0.42 to 2.39)" || factors[0][6] != "1" {
		t.Errorf("factors %q", factors)
	}
	all := fmt.Sprint(w.rows("Readings"))
	for _, want := range []string{"This plan rests on the design figures", "To be settled with the surveyor", "but 24 were fitted"} {
		if !strings.Contains(all, want) {
			t.Errorf("no %q in %s", want, all)
		}
	}
	w = write(t, plan.Compute(a, today, plan.WithReadings()))
	factors, _ = w.table("Readings", "Circuit", "Zone")
	w.same(factors[0][6], w.o.Zones[0].Learned.Used)
	a.Readings = nil
	w = write(t, plan.Compute(a, today))
	if all := fmt.Sprint(w.rows("Readings")); !strings.Contains(all, "No readings are kept.") {
		t.Errorf("without readings: %s", all)
	}
}
