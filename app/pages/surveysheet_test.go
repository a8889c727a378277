package pages

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
)

func surveyFile(t *testing.T, text string) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "survey.csv")
	must(t, os.WriteFile(path, []byte(text), 0o600))
	return path
}

// A survey dropped on the window shows what was understood and what was not,
// and is stored as one edit only when that is asked for.
func TestDroppedSurvey(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	before := f.s.Asset()
	path := surveyFile(t, "zone;pattern;fitted;date;percent;gone;potentials;colour\n"+
		"side;al-45;2024-03-15;2026-11-20;20 25;2;;red\nside;;;2026-11-20;0,5;;;\nVertical sides;;;2026-11-20;;;-0,92;\n")
	f.importFile(path)
	wants(t, f, "Take in a survey", "2 readings understood, 2 of them new", "1 cells were not understood", "seen 20 %, 25 %; 2 gone",
		"line 3, percent", "want per cent with its sign", "-0.920 V Ag/AgCl", `The column "colour" is not used.`, "Store 2 readings", "new")
	if f.s.Asset() != before {
		t.Fatal("it was stored before anyone said so")
	}
	key(f, fyne.KeyEscape)
	if f.win.Canvas().Overlays().Top() != nil || f.s.Asset() != before {
		t.Fatal("Escape did not leave it")
	}
	f.importFile(path)
	key(f, fyne.KeyReturn) // the button that stores has the keyboard
	settle(f)
	if n := len(f.s.Asset().Readings); n != len(before.Readings)+2 {
		t.Fatalf("%d readings", n)
	}
	wants(t, f, "20 25")

	// Again: nothing to store; changed: the stored one is withdrawn.
	f.importFile(path)
	wants(t, f, "2 there already", "already there", "Store 0 readings")
	key(f, fyne.KeyEscape)
	f.importFile(surveyFile(t, "zone;pattern;fitted;date;percent;gone\nside;al-45;2024-03-15;2026-11-20;20 30;2\n"))
	wants(t, f, "1 that differ from stored ones", "withdraw the stored readings that these differ from")
	key(f, fyne.KeyReturn)
	settle(f)
	r := f.s.Asset().Readings
	if n := len(r); n != len(before.Readings)+3 || r[n-1].Percent[1] != 30 || r[n-3].Withdrawn.IsZero() {
		t.Errorf("corrected, the readings are %+v", r)
	}
}

// A sheet in which nothing is filled in says so.
func TestEmptySurvey(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.importFile(surveyFile(t, "zone;date;percent\nside;2026-11-20;\n"))
	wants(t, f, "survey.csv: nothing is filled in.", "Store 0 readings")
	key(f, fyne.KeyReturn) // Cancel has the keyboard
	if f.win.Canvas().Overlays().Top() != nil {
		t.Error("the dialog stays")
	}
}

// What is no survey of this asset is said in a sentence.
func TestSurveyThatCannotBeRead(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	path := filepath.Join(t.TempDir(), "survey.xlsx")
	must(t, os.WriteFile(path, []byte("\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1"), 0o600))
	f.importFile(path)
	wants(t, f, "the workbook is encrypted, or in the old format .xls")
}

// The sheet is asked for by docking, and written.
func TestSurveySheetIsWritten(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	dir := t.TempDir()
	f.s.SetSetting("folder", dir)
	f.exportSurvey()
	wants(t, f, "15 Mar 2027", "dry dock", "With the forecast…")
	key(f, fyne.KeyReturn)
	wants(t, f, "Export a survey sheet")
	key(f, fyne.KeyReturn)
	path := filepath.Join(dir, "Tern Passage survey 2027-03-15.xlsx")
	wants(t, f, "Written:")
	v, err := f.s.ReadSurveySheet(path)
	must(t, err)
	if v.Asset != "Tern Passage" || len(v.Readings)+len(v.Faults) != 0 || !strings.HasPrefix(v.Docking.String(), "2027-03-15") {
		t.Errorf("read back as %+v", v.Preview)
	}
}
