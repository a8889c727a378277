package workbook_test

import (
	"slices"
	"strconv"
	"strings"
	"testing"
)

// Whether a zone may carry what is planned is said in words that do not depend
// on a colour, in the schedule and under the order.
func TestTheMostThatAZoneMayCarryIsSaidInWords(t *testing.T) {
	w := demo(t)
	head := slices.IndexFunc(w.rows("Schedule"), func(r []string) bool { return len(r) > 12 && r[12] == "Of the zone's most" })
	if head < 0 {
		t.Fatal("the schedule has no column for it")
	}
	said := 0
	for r := head + 1; r < head+30; r++ {
		cell := "M" + strconv.Itoa(r+1)
		if f, _ := w.f.GetCellFormula("Schedule", cell); f == "" {
			continue
		}
		said++
		id, err := w.f.GetCellStyle("Schedule", cell)
		if err != nil {
			t.Fatal(err)
		}
		st, err := w.f.GetStyle(id)
		// LibreOffice shows a section with a greater-than at 0 too.
		if err != nil || st.CustomNumFmt == nil || !strings.HasPrefix(*st.CustomNumFmt, `[=0]"within the most"`) {
			t.Errorf("%s is shown by %+v, %v", cell, st.CustomNumFmt, err)
		}
		w.same(w.rows("Schedule")[r][12], 0)
	}
	limited := 0
	for _, l := range w.o.Schedule {
		if w.o.Zones[l.Zone].Zone.MaxCount != nil && l.Action != "keep" {
			limited++
		}
	}
	if said != limited || limited == 0 {
		t.Errorf("%d actions say it, of %d with a most", said, limited)
	}
	if all, _ := w.f.GetConditionalFormats("Schedule"); len(all) == 0 {
		t.Error("nothing marks what is over the most")
	}
}
