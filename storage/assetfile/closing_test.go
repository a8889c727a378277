package assetfile_test

import (
	"reflect"
	"testing"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// A closing is written and read without loss, and as strictly as an asset.
func TestClosingRoundTrip(t *testing.T) {
	day := func(y, m, d int) hull.Date { return hull.NewDate(y, 1, 1).AddMonths(m-1) + hull.Date(d-1) }
	share, cost := 0.5, 1234.5
	c := hull.Closing{
		Date: day(2027, 3, 20), Docking: day(2027, 3, 15), By: "superintendent", Note: "wind",
		Sets: []hull.ClosingSet{{Zone: "side", Pattern: "al-45", Fitted: day(2024, 3, 15), Found: 24, Wastage: 0.125, How: hull.Surveyed, Off: 3}},
		On:   []hull.PutOn{{Zone: "side", Pattern: "al-45", Count: 4}}, Works: []hull.Work{{Zone: "side", Coating: hull.TouchUp, Share: &share}},
		Cleaned: []string{"side"}, Ordered: []hull.Stock{{Pattern: "al-45", Count: 5}}, Cost: &cost, PlannedCost: &cost,
		Planned:  []hull.Planned{{Zone: "side", Action: "add", Pattern: "al-45", Count: 4, Until: day(2034, 3, 15)}},
		Expected: []hull.Expectation{{Zone: "side", Pattern: "al-45", Fitted: day(2024, 3, 15), Count: 24, Low: 0.1, Median: 0.2, High: 0.3}},
		Next:     day(2029, 3, 15), Horizon: day(2034, 3, 15),
	}
	got, err := assetfile.DecodeClosing(assetfile.EncodeClosing(c))
	if err != nil || !reflect.DeepEqual(got, c) {
		t.Errorf("%v\n%s\nread back\n%+v", err, assetfile.EncodeClosing(c), got)
	}
	for text, want := range map[string]string{
		`{"date": "2027-03-15", "offf": 3}`:                         "offf",
		`{"date": "15.3.2027"}`:                                     "date",
		`{"date": "2027-03-15", "sets": [{"zone": 3}]}`:             "sets[0].zone",
		`{"date": "2027-03-15", "on": [{"zone": "a", "count": 1}]}`: "on[0].pattern",
		`[]`: "",
	} {
		_, err := assetfile.DecodeClosing([]byte(text))
		faults, ok := err.(hull.Faults)
		if !ok || faults[0].Path != want {
			t.Errorf("%s: %v, want a fault of %q", text, err, want)
		}
	}
}
