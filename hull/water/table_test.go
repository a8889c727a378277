package water

import (
	"strings"
	"testing"
	"unicode"

	"anodewright/assets"
)

// Box means of World Ocean Atlas 2013 and COADS with the resistivity at the
// mean, cold and fresh, and warm and salt, computed apart from this program.
func TestSeaAreaResistivity(t *testing.T) {
	for _, c := range []struct {
		name                      string
		mean, coldFresh, warmSalt float64
	}{
		{"Baltic proper", 1.186, 1.617, 0.8},
		{"Gulf of Bothnia", 1.639, 2.06, 1.22},
		{"Kattegat", 0.411, 0.554, 0.313},
		{"North Sea (central)", 0.265, 0.312, 0.23},
		{"Norwegian Sea", 0.278, 0.304, 0.253},
		{"Bering Sea", 0.327, 0.373, 0.281},
		{"Mediterranean west", 0.202, 0.228, 0.177},
		{"Mediterranean east", 0.186, 0.207, 0.166},
		{"Adriatic", 0.202, 0.234, 0.178},
		{"Black Sea", 0.423, 0.518, 0.348},
		{"Red Sea north", 0.163, 0.175, 0.154},
		{"Red Sea south", 0.162, 0.176, 0.152},
		{"Persian Gulf", 0.168, 0.192, 0.149},
		{"Gulf of Mexico", 0.182, 0.208, 0.167},
		{"Singapore Strait and approaches", 0.185, 0.189, 0.18},
		{"South China Sea", 0.185, 0.196, 0.179},
		{"Panama Bay (Pacific side)", 0.199, 0.206, 0.192},
		{"Amazon plume shelf", 0.176, 0.181, 0.173},
		{"Bay of Bengal north", 0.198, 0.214, 0.189},
		{"Arabian Sea", 0.175, 0.183, 0.167},
		{"North Atlantic (40-50N)", 0.226, 0.245, 0.205},
		{"US East coast (NY bight)", 0.241, 0.3, 0.198},
		{"California coast", 0.245, 0.256, 0.231},
		{"Japan Pacific coast", 0.205, 0.236, 0.184},
		{"Yellow Sea", 0.256, 0.318, 0.202},
		{"Gulf of Guinea", 0.184, 0.216, 0.173},
		{"Australia NW shelf", 0.182, 0.194, 0.173},
		{"Brazil SE (Campos)", 0.182, 0.192, 0.175},
		{"English Channel", 0.245, 0.275, 0.224},
		{"Irish Sea", 0.262, 0.291, 0.235},
		{"Barents Sea", 0.308, 0.332, 0.284},
	} {
		e, ok := Find(strings.ToUpper(c.name))
		if !ok || e.Name != c.name {
			t.Errorf("%s: not found whatever the case", c.name)
			continue
		}
		near(t, c.name+", mean", e.Resistivity.Mean, c.mean, 0.0015)
		near(t, c.name+", cold and fresh", e.Resistivity.High, c.coldFresh, 0.0015)
		near(t, c.name+", warm and salt", e.Resistivity.Low, c.warmSalt, 0.0015)
	}
}

func TestEveryEntryIsUsable(t *testing.T) {
	ids := map[string]bool{}
	media := map[string]int{}
	for _, e := range Entries() {
		if ids[e.ID] || e.ID == "" || strings.ContainsFunc(e.ID, unicode.IsSpace) {
			t.Errorf("%s: id %q is taken or not an id", e.Name, e.ID)
		}
		ids[e.ID] = true
		media[e.Medium]++
		if e.Source == "" || e.Confidence == "" {
			t.Errorf("%s: source %q, confidence %q", e.Name, e.Source, e.Confidence)
		}
		r := e.Resistivity
		if !(0 < r.Low && r.Low <= r.Mean && r.Mean <= r.High && r.High < 1e4) {
			t.Errorf("%s: resistivity %+v", e.Name, r)
		}
		for what, r := range map[string]*Range{"salinity": e.Salinity, "temperature": e.Temperature, "conductivity": e.Conductivity25} {
			if r != nil && !(r.Low <= r.Mean && r.Mean <= r.High) {
				t.Errorf("%s: %s %+v", e.Name, what, *r)
			}
		}
		if got, ok := Find(e.ID); !ok || got.Name != e.Name {
			t.Errorf("%s is not found by its id %s", e.Name, e.ID)
		}
	}
	if media["seawater"] < 32 || media["fresh"] < 8 || media["sediment"] < 3 || media["soil"] < 4 {
		t.Errorf("entries by medium: %v", media)
	}
}

func TestSearch(t *testing.T) {
	for query, want := range map[string]string{"baltic": "Baltic proper", "RHINE fresh": "Rhine at Lobith", "gravel little": "Gravel, sand, stones, little clay"} {
		if found := Search(query); len(found) != 1 || found[0].Name != want {
			t.Errorf("search %q: got %d entries, want %s alone", query, len(found), want)
		}
	}
	if n := len(Search(" ")); n != len(Entries()) {
		t.Errorf("empty search finds %d of %d", n, len(Entries()))
	}
	if _, ok := Find("Balt"); ok {
		t.Error("a part of a name is no name")
	}
}

// RIWA, Jahresbericht 2010 Der Rhein: 46 to 74 mS/m.
func TestRhine(t *testing.T) {
	e, _ := Find("Rhine at Lobith")
	near(t, "at 25 degC, saltest", FreshResistivity(e.Conductivity25.High, 25), 13.5, 0.05)
	near(t, "at 25 degC, freshest", FreshResistivity(e.Conductivity25.Low, 25), 21.7, 0.05)
	if e.Resistivity.High < 21.7 {
		t.Errorf("cold water is no worse than at 25 degC: %g", e.Resistivity.High)
	}
}

func TestSeverity(t *testing.T) {
	for rho, want := range map[float64]string{201: "essentially not corrosive", 150: "mildly corrosive", 60: "moderately corrosive", 40: "corrosive", 20: "highly corrosive", 5: "extremely corrosive"} {
		if got := Severity(rho); got != want {
			t.Errorf("%g ohm m: %s, want %s", rho, got, want)
		}
	}
}

// The tables of this package carry what a reader needs to trace a figure.
func TestTablesHaveAValueForEachColumn(t *testing.T) {
	for _, table := range assets.Tables() {
		for _, row := range table.Rows {
			if len(row.Values) != len(table.Columns) || row.Confidence == "" {
				t.Errorf("table %s, %s: %d values for %d columns, confidence %q", table.ID, row.Name, len(row.Values), len(table.Columns), row.Confidence)
			}
		}
	}
}
