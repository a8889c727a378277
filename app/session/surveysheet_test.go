package session_test

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/app/session"
	"anodewright/storage/sheet"
)

// fill writes a survey sheet of the open asset, fills in a date and what was
// seen of the first set, and saves it.
func fill(t *testing.T, s *session.Session, seen ...any) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "survey.xlsx")
	must(t, s.WriteSurveySheet(path, s.SurveyDockings()[0], false))
	f, err := excelize.OpenFile(path)
	must(t, err)
	defer f.Close()
	for label, values := range map[string][]any{"Date of the survey": {"2026-11-20"}, "Seen: wasted, %": seen} {
		for _, name := range []string{"Cover", "Survey"} {
			cells, err := f.SearchSheet(name, label)
			must(t, err)
			if len(cells) > 0 {
				row := strings.TrimPrefix(cells[0], "B")
				must(t, f.SetSheetRow(name, "C"+row, &values))
			}
		}
	}
	must(t, f.Save())
	return path
}

func TestSurveySheetThereAndBack(t *testing.T) {
	s, _ := ship(t)
	before := s.Asset()
	path := fill(t, s, 30, "35 %", "many")
	v, err := s.ReadSurveySheet(path)
	must(t, err)
	if len(v.Readings) != 1 || len(v.Faults) != 1 || !strings.HasPrefix(v.Faults[0].Error(), "Survey!E") || len(v.Warnings) != 0 {
		t.Fatalf("understood %+v; faults %v; warnings %v", v.Readings, v.Faults, v.Warnings)
	}
	if s.Asset() != before {
		t.Error("reading the sheet changed the asset")
	}
	n, err := s.StoreSurvey(v, true)
	must(t, err)
	r := s.Asset().Readings
	if n != 1 || len(r) != len(before.Readings)+1 || len(r[len(r)-1].Percent) != 2 {
		t.Errorf("%d stored: %+v", n, r[len(r)-1])
	}
	if undo, _ := s.CanUndo(); undo != "take in a survey" {
		t.Errorf("undo would take back %q", undo)
	}

	again, err := s.ReadSurveySheet(path)
	must(t, err)
	if again.Count(sheet.There) != 1 || len(again.Warnings) != 1 || !strings.Contains(again.Warnings[0], "is now at revision 2") {
		t.Errorf("read again: %+v, %v", again.Readings, again.Warnings)
	}
	if n, err := s.StoreSurvey(again, true); err == nil || n != 0 {
		t.Errorf("it was stored again: %d", n)
	}
	must(t, s.Undo())
	if !equal(s.Asset(), before) {
		t.Error("undone, the asset is another one")
	}
}

func TestASurveyIsStoredInItsOwnAssetAlone(t *testing.T) {
	s, _ := ship(t)
	v, err := s.ReadSurveySheet(fill(t, s, 30))
	must(t, err)
	must(t, s.Add(demo(t)[1], "test"))
	before := s.Asset()
	if _, err := s.StoreSurvey(v, true); err == nil || s.Asset() != before {
		t.Errorf("stored in another asset, error %v", err)
	}
	if _, err := s.ReadSurveySheet(fill(t, s, 30)); err != nil {
		t.Error(err)
	}
}

func TestSurveyAsCSV(t *testing.T) {
	s, _ := ship(t)
	path := filepath.Join(t.TempDir(), "survey.CSV")
	must(t, s.WriteSurveySheet(path, 0, false))
	text, err := os.ReadFile(path)
	must(t, err)
	z := s.Asset().Zones[0]
	must(t, os.WriteFile(path, []byte("zone;date;percent\n"+z.Name+";2026-11-20;20 22,5\n"), 0o600))
	v, err := s.ReadSurveySheet(path)
	must(t, err)
	if !strings.Contains(string(text), ";"+z.ID+";") || len(v.ToStore()) != 1 {
		t.Errorf("the template is %.200q, and read was %+v, %v", text, v.Readings, v.Faults)
	}
}
