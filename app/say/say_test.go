package say

import "testing"

// speak uses a test's own table for the length of the test.
func speak(t *testing.T, texts map[string]string) {
	t.Helper()
	before := current.Load()
	t.Cleanup(func() { current.Store(before); UseComma(false) })
	current.Store(&table{code: "xx", texts: texts, templates: newTemplates(texts)})
}

func TestTextIsSaidInTheChosenLanguage(t *testing.T) {
	t.Cleanup(func() { Use("en") })
	Use("es")
	if got := N("the order should have been out %d day ago", "the order should have been out %d days ago", 1); got != "el pedido debería haber salido hace 1 día" {
		t.Errorf("one: %q", got)
	}
	if got := N("the order should have been out %d day ago", "the order should have been out %d days ago", 3); got != "el pedido debería haber salido hace 3 días" {
		t.Errorf("many: %q", got)
	}
	if got := T("no such key %s", "x"); got != "no such key x" {
		t.Errorf("a missing key is said as %q, not in English", got)
	}
	Use("xx")
	if Language() != "en" || T("%d kB", 1) != "1 kB" || T("Zone") != "Zone" {
		t.Errorf("an unknown language is %q, not English", Language())
	}
}

func TestSentencesAreFoundByTheirTemplate(t *testing.T) {
	speak(t, map[string]string{
		"zone %s needs %.3g A at %s": "en %[3]s la zona %[1]s pide %[2]s A",
		"%s needs %s":                "%s pide %s",
		"the start":                  "el comienzo",
		"Nothing fits.":              "Nada cabe.",
		"%d %% is gone.":             "Falta el %d %%.",
	})
	for english, want := range map[string]string{
		"zone side needs 12.5 A at the start": "en el comienzo la zona side pide 12.5 A",
		"the start needs more":                "el comienzo pide more",
		"Nothing fits. 12 % is gone.":         "Nada cabe. Falta el 12 %.",
		"unknown":                             "unknown",
		"rudder: the start":                   "rudder: el comienzo",
	} {
		for range 2 { // made, then kept
			if got := Sentence(english); got != want {
				t.Errorf("%q: got %q, want %q", english, got, want)
			}
		}
	}
}

func TestNamesAreNoWords(t *testing.T) {
	speak(t, map[string]string{"%s asks for %d pieces": "%s pide %d piezas", "port": "babor", "%s, %s": "%s, %s", "sea chest": "toma de mar"})
	t.Cleanup(func() { KeepNames(nil) })
	if got := Sentence("sea chest, port asks for 2 pieces"); got != "toma de mar, babor pide 2 piezas" {
		t.Errorf("words: %q", got)
	}
	KeepNames(map[string]bool{"sea chest, port": true})
	if got := Sentence("sea chest, port asks for 2 pieces"); got != "sea chest, port pide 2 piezas" {
		t.Errorf("a name: %q", got)
	}
}

func TestDecimalSignFollowsTheChoice(t *testing.T) {
	speak(t, nil)
	UseComma(true)
	if got := T("%.1f m of %s", 2.5, "M1.5"); got != "2,5 m of M1.5" {
		t.Errorf("got %q", got)
	}
	for in, want := range map[string]string{
		"1.5 and 2.5 3.5":          "1,5 and 2,5 3,5",
		"clause 6.3.4 of B401-2.1": "clause 6.3.4 of B401-2.1",
		"It is 0.5.":               "It is 0,5.",
		"In 2027. 12 pieces":       "In 2027. 12 pieces",
	} {
		if got := Sentence(in); got != want {
			t.Errorf("%q: got %q, want %q", in, got, want)
		}
	}
}
