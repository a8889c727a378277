package plan_test

import (
	"bytes"
	"encoding/json"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

func ternPassage(t *testing.T) *hull.Asset {
	t.Helper()
	a, err := assetfile.Read("../../testdata/assets/tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// One zone with anodes that give what the steel asks: the wastage is in
// proportion to the factor, and two normal distributions are combined by hand.
func TestTwoWeighedAnodesByHand(t *testing.T) {
	o := plan.Compute(ternPassage(t), 0)
	// 2080 m² of paint broken down by 0.02 + 0.012 a year, 20 m² bare, 0.1 A/m²,
	// and 1.90 A of the propeller, over 808 days; 24 pieces of 45 kg.
	const days = 808.0
	breakdown := 0.02 + 0.012*days/365/2
	charge := ((2080*breakdown+20)*0.1 + 1.9) * days * 24
	predicted := charge / (24 * 45 * 2000)
	if math.Abs(predicted-0.0972) > 0.0001 {
		t.Fatalf("predicted %.5f", predicted)
	}
	if got, ok := o.Predicted(0); !ok || math.Abs(got-predicted) > 1e-6 {
		t.Errorf("predicted %.6f, by hand %.6f", got, predicted)
	}
	const tau2, spread2 = 0.53 * 0.53, 0.25 * 0.25 / 2
	found := (math.Log(0.11/predicted) + math.Log(0.14/predicted)) / 2
	mean, sd := found*tau2/(tau2+spread2), math.Sqrt(tau2*spread2/(tau2+spread2))
	l := o.Zones[0].Learned
	if l == nil || l.Readings != 1 || l.Anodes != 2 {
		t.Fatalf("learned %+v", l)
	}
	for what, x := range map[string][2]float64{
		"median": {l.Median, math.Exp(mean)}, "low": {l.Low, math.Exp(mean - 1.6449*sd)}, "high": {l.High, math.Exp(mean + 1.6449*sd)}, "used": {l.Used, math.Exp(mean)},
	} {
		// At the high end the anodes no longer give all that is asked.
		if math.Abs(x[0]/x[1]-1) > 0.005 {
			t.Errorf("%s: %.5f, by hand %.5f", what, x[0], x[1])
		}
	}
	if held := o.Zones[1].Learned; held == nil || math.Abs(held.Median/l.Median-1) > 1e-9 {
		t.Errorf("the propeller, without anodes, has not the factor of its circuit: %+v", held)
	}
}

// By default readings stand beside the plan and change nothing in it.
func TestReadingsAloneChangeNothing(t *testing.T) {
	a := ternPassage(t)
	with := plan.Compute(a, 0)
	without := assetfile.Clone(a)
	without.Readings = nil
	o := plan.Compute(without, 0)
	learning := plan.Compute(without, 0, plan.WithReadings())
	for i := range o.Zones {
		if o.Zones[i].Learned != nil || learning.Zones[i].Learned != nil {
			t.Errorf("%s: learned from nothing", o.Zones[i].Zone.ID)
		}
		if with.Zones[i].Factor != o.Zones[i].Factor || learning.Zones[i].Factor != o.Zones[i].Factor {
			t.Errorf("%s: another factor", o.Zones[i].Zone.ID)
		}
	}
	if a, b := marshal(t, o), marshal(t, learning); !bytes.Equal(a, b) {
		t.Error("asking for readings changes a plan without any")
	}
	if bytes.Contains(marshal(t, o), []byte("learned_factor")) {
		t.Error("a learned factor without readings")
	}
	if l, _ := with.Action(0, 0); l.Count != 14 || with.Money.Total != 10080 {
		t.Errorf("with readings kept: %d pieces for %v", l.Count, with.Money.Total)
	}
}

func marshal(t *testing.T, o *plan.Outcome) []byte {
	t.Helper()
	text, err := json.Marshal(o)
	if err != nil {
		t.Fatal(err)
	}
	return text
}

func TestPlanningWithReadings(t *testing.T) {
	a := ternPassage(t)
	o := plan.Compute(a, 0, plan.WithReadings())
	z := o.Zones[0]
	if z.Factor != z.Learned.Factor || z.Factor.Median < 1.2 {
		t.Errorf("factor %+v, learned %+v", z.Factor, z.Learned)
	}
	if l, ok := o.Action(0, 0); !ok || l.Count <= 14 {
		t.Errorf("%s %d, want more than the 14 of the design figures", l.Action, l.Count)
	}
	// In the protected regime the forecast wastes by the learned median.
	iv := z.Intervals[0]
	if got, want := iv.Fitted[0].Wastage, z.Factor.Median*iv.Total.Mean*iv.Hours()/(24*45*2000); math.Abs(got-want) > 1e-9 {
		t.Errorf("wastage %.9f, want %.9f", got, want)
	}
	if text := captions(o); !strings.Contains(text, "readings: Circuit hull: 1 reading of 2 anodes suggests that the steel takes 1.2") || !strings.Contains(text, "Plan and forecast use it.") {
		t.Errorf("cautions:\n%s", text)
	}
	// More anodes that wasted as much leave less doubt.
	a.Readings[0].WeighedWastage = []float64{0.11, 0.14, 0.11, 0.14, 0.11, 0.14}
	six := plan.Compute(a, 0).Zones[0].Learned
	if six.High/six.Low >= z.Learned.High/z.Learned.Low {
		t.Errorf("six anodes leave %.3f to %.3f, two %.3f to %.3f", six.Low, six.High, z.Learned.Low, z.Learned.High)
	}
}

func captions(o *plan.Outcome) string {
	var b strings.Builder
	for _, c := range o.Cautions {
		b.WriteString(c.ID + ": " + c.Text + "\n")
	}
	return b.String()
}

// A probability, that never falls while nothing is done, whatever the asset,
// and with or without the plan learning.
func TestSpentProbability(t *testing.T) {
	some := 0
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		for _, how := range [][]plan.Option{nil, {plan.WithReadings()}} {
			o := plan.Compute(a, hull.NewDate(2026, 12, 1), how...)
			for i, z := range o.Zones {
				before := 0.0
				for k, iv := range z.Intervals {
					if k > 0 {
						if l, ok := o.Action(i, k-1); ok && l.Action != "keep" {
							before = 0
						}
					}
					p := iv.SpentProbability
					if (p == nil) != (len(iv.Fitted) == 0) {
						t.Fatalf("%s, %s: a probability %v of %d groups", a.Name, z.Zone.ID, p, len(iv.Fitted))
					}
					if p == nil {
						continue
					}
					if math.IsNaN(*p) || *p < before || *p > 1 {
						t.Errorf("%s, %s to %s: probability %v after %v", a.Name, z.Zone.ID, iv.To, *p, before)
					}
					if *p > 0.01 && *p < 0.99 {
						some++
					}
					before = *p
				}
			}
		}
	}
	if some < 5 {
		t.Errorf("only %d probabilities between 1 and 99 %%", some)
	}
}

// Without a reading: the set lasts while the factor is below what is left over
// what the design figures take.
func TestSpentProbabilityByThePrior(t *testing.T) {
	a := ternPassage(t)
	a.Readings = nil
	a.Zones[0].Fitted[0].Wastage = 0.70
	iv := plan.Compute(a, 0).Zones[0].Intervals[0]
	taken := iv.Total.Mean * iv.Hours() / (24 * 45 * 2000)
	want := 0.5 * math.Erfc(math.Log((0.85-0.70)/taken)/0.53/math.Sqrt2)
	if got := *iv.SpentProbability; math.Abs(got-want) > 0.01 {
		t.Errorf("probability %.4f, by hand %.4f", got, want)
	}
}

func TestQuestionsAndCountsBecomeCautions(t *testing.T) {
	a := ternPassage(t)
	a.Readings = append(a.Readings, hull.Reading{Date: hull.NewDate(2026, 8, 1), Zone: "side", WeighedWastage: []float64{0.05}, Gone: 1, Painted: 2})
	text := captions(plan.Compute(a, 0))
	for _, want := range []string{
		"reading-question: Reading of 2026-08-01, zone side: the anodes have wasted less (5 %) than on 2026-06-01",
		"reading-count: By the readings 1 gone, 2 painted over of the 24 pieces of al-45; 21 give current now. Plan and forecast count by that from the day of the reading on",
		"2 readings of 4 anodes suggest",
	} {
		if !strings.Contains(text, want) {
			t.Errorf("no %q in\n%s", want, text)
		}
	}
	a.Readings = []hull.Reading{{Date: hull.NewDate(2027, 1, 1), Zone: "side", WeighedWastage: []float64{0.1}}}
	o := plan.Compute(a, 0)
	if text = captions(o); o.Zones[0].Learned != nil || !strings.Contains(text, "1 reading is kept, but none tells") || !strings.Contains(text, "the date is after today") {
		t.Errorf("a reading after today: learned %+v\n%s", o.Zones[0].Learned, text)
	}
}

// The two weighed anodes left a zone of doubt; four more would narrow it.
func TestNextReadings(t *testing.T) {
	a := ternPassage(t)
	next := plan.Compute(a, 0).NextReadings()
	if len(next) != 1 || next[0].Zone != 0 || next[0].Pieces != 4 {
		t.Fatalf("%+v", next)
	}
	s := next[0]
	// sd before: two anodes; expected after: six.
	sd := func(n float64) float64 { return math.Sqrt(1 / (1/(0.53*0.53) + n/(0.25*0.25))) }
	if want := 1 - sd(6)/sd(2); math.Abs(s.Narrows-want) > 0.01 {
		t.Errorf("narrows by %.3f, by hand %.3f", s.Narrows, want)
	}
	if s.After.Low <= s.Demand.Low || s.After.High >= s.Demand.High {
		t.Errorf("before %+v, after %+v", s.Demand, s.After)
	}
	a.Readings = nil
	if next = plan.Compute(a, 0).NextReadings(); len(next) != 1 || next[0].Narrows < 0.7 {
		t.Errorf("without readings: %+v", next)
	}
	a.Today = a.LastDocking
	if next = plan.Compute(a, 0).NextReadings(); next != nil {
		t.Errorf("on the day of the docking: %+v", next)
	}
}

// What a ship with another true demand would show teaches that demand: the
// densities of all steel are multiplied, its anodes are left to waste, and
// what is found on them is read by the design figures.
func TestReadingsTeachTheTrueDemand(t *testing.T) {
	for _, truth := range []float64{0.6, 1.8} {
		a := ternPassage(t)
		rudder := a.Zones[0]
		rudder.ID, rudder.Name, rudder.WettedArea, rudder.BareArea = "rudder", "Rudder", 60, 4
		rudder.MinCount, rudder.CountMultiple, rudder.MaxCount = 0, 1, nil
		rudder.Fitted = []hull.Fitted{{Pattern: "al-45", Count: 2, Fitted: a.LastDocking}}
		a.Zones = append(a.Zones, rudder)
		a.Readings = nil
		ship := assetfile.Clone(a)
		day := hull.NewDate(2026, 6, 1)
		ship.Dockings[0].Date, ship.Dockings[0].Works = day, nil
		for i := range ship.Zones {
			z := &ship.Zones[i]
			z.OwnDensities = &hull.Densities{Initial: 200 * truth, Mean: 100 * truth, Final: 130 * truth}
		}
		for i := range a.Zones {
			a.Zones[i].OwnDensities = &hull.Densities{Initial: 200, Mean: 100, Final: 130}
		}
		for _, z := range plan.Compute(ship, 0).Zones {
			iv := z.Intervals[0]
			for _, g := range iv.Fitted {
				a.Readings = append(a.Readings, hull.Reading{Date: day, Zone: z.Zone.ID, Pattern: g.Pattern.ID, WeighedWastage: []float64{g.Wastage, g.Wastage, g.Wastage, g.Wastage, g.Wastage, g.Wastage}})
			}
		}
		if len(a.Readings) != 2 {
			t.Fatalf("%d readings", len(a.Readings))
		}
		o := plan.Compute(a, 0, plan.WithReadings())
		for _, i := range []int{0, 2} {
			l := o.Zones[i].Learned
			if l.Readings != 2 || l.Anodes != 12 || math.Abs(math.Log(l.Median/truth)) > 0.06 || l.Low > truth || l.High < truth {
				t.Errorf("true factor %.1f: %s learned %+v", truth, o.Zones[i].Zone.ID, l)
			}
		}
	}
}

// The readings of a zone that is not bonded, with anodes of its own, teach its
// own circuit.
func TestUnbondedZoneLearnsItsOwn(t *testing.T) {
	a := ternPassage(t)
	shaft := a.Zones[0]
	shaft.ID, shaft.Name, shaft.Bonded, shaft.WettedArea, shaft.BareArea = "shaft", "Shaft", false, 40, 2
	shaft.Fitted = []hull.Fitted{{Pattern: "al-45", Count: 2, Fitted: a.LastDocking}}
	a.Zones = append(a.Zones, shaft)
	a.Readings = []hull.Reading{{Date: hull.NewDate(2026, 6, 1), Zone: "shaft", WeighedWastage: []float64{0.2, 0.2}}}
	o := plan.Compute(a, 0)
	if l := o.Zones[2].Learned; l == nil || l.Anodes != 2 || o.Zones[0].Learned.Anodes != 0 {
		t.Errorf("shaft %+v, sides %+v", l, o.Zones[0].Learned)
	}
}

// The band lies about the course, and readings narrow it.
func TestBand(t *testing.T) {
	a := ternPassage(t)
	width := func(o *plan.Outcome) float64 {
		course := o.Course(0)
		low, high := o.Band(0)
		if len(course) == 0 || len(low) != len(course) || len(high) != len(course) {
			t.Fatalf("%d samples between %d and %d", len(course), len(low), len(high))
		}
		widest := 0.0
		for i, s := range course {
			if low[i].Date != s.Date || low[i].Wastage > s.Wastage+1e-9 || high[i].Wastage < s.Wastage-1e-9 {
				t.Errorf("%s: %.4f is not between %.4f and %.4f", s.Date, s.Wastage, low[i].Wastage, high[i].Wastage)
			}
			widest = max(widest, high[i].Wastage-low[i].Wastage)
		}
		return widest
	}
	with := width(plan.Compute(a, 0, plan.WithReadings()))
	a.Readings = nil
	if without := width(plan.Compute(a, 0)); with > 0.7*without {
		t.Errorf("the band is %.3f wide with readings, %.3f without", with, without)
	}
	a.Zones[1].Bonded = false // and so held by nobody
	if low, high := plan.Compute(a, 0).Band(1); low != nil || high != nil {
		t.Error("a band of a zone without a circuit")
	}
}

// Whatever stands in readings, there is a plan, and what they teach is a
// factor with a range about it.
func TestAnyReadingsGiveAFactor(t *testing.T) {
	a := ternPassage(t)
	rapid.Check(t, func(t *rapid.T) {
		b := assetfile.Clone(a)
		b.Today = b.Start() + hull.Date(rapid.IntRange(-100, 4500).Draw(t, "today"))
		b.Zones[0].Fitted[0].Wastage = rapid.SampledFrom([]float64{0, 0.3, 0.84, 0.85, 1}).Draw(t, "stated wastage")
		b.Zones[0].Fitted[0].Count = rapid.SampledFrom([]int{1, 6, 24}).Draw(t, "count")
		b.Readings = nil
		share := rapid.Float64Range(0, 1)
		for range rapid.IntRange(1, 5).Draw(t, "readings") {
			r := hull.Reading{Zone: "side", Date: b.Start() + hull.Date(rapid.IntRange(-10, 4500).Draw(t, "day"))}
			values := rapid.SliceOfN(share, 0, 4).Draw(t, "values")
			switch rapid.IntRange(0, 2).Draw(t, "kind") {
			case 0:
				r.WeighedWastage = values
			case 1:
				r.Grades = &hull.Grades{Bounds: []float64{0, 0.25, 0.5, 0.75}, Counts: []int{0, rapid.IntRange(0, 20).Draw(t, "graded"), 2, 0}}
			}
			r.Gone, r.NotWasted = rapid.IntRange(0, 30).Draw(t, "gone"), rapid.IntRange(0, 30).Draw(t, "not wasted")
			r.Fallen, r.Painted = rapid.IntRange(0, 30).Draw(t, "fallen"), rapid.IntRange(0, 30).Draw(t, "painted")
			b.Readings = append(b.Readings, r)
		}
		if err := hull.Check(b).Err(); err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(b, 0, plan.WithReadings())
		f := o.Zones[0].Factor
		if !(f.Low > 0.001 && f.Low <= f.Median && f.Median <= f.High && f.High < 1000) || math.IsNaN(f.Used) {
			t.Fatalf("factor %+v of %+v", f, b.Readings)
		}
		for _, s := range o.NextReadings() {
			if math.IsNaN(s.Narrows) || s.Narrows < 0 || s.Narrows > 1 {
				t.Fatalf("suggestion %+v", s)
			}
		}
		// There is a probability as long as a piece is left.
		if p := o.Zones[0].Intervals[0].SpentProbability; p == nil && len(o.Zones[0].Intervals[0].Fitted) > 0 || p != nil && (math.IsNaN(*p) || *p < 0 || *p > 1) {
			t.Fatalf("probability %v", p)
		}
		if _, err := json.Marshal(o); err != nil {
			t.Fatal(err)
		}
	})
}

// The reading comes first that helps to decide at the next docking: of a set
// that may or may not last, not of one whose answer is plain, however much it
// would narrow the factor there.
func TestNextReadingHelpsToDecide(t *testing.T) {
	a := ternPassage(t)
	a.Readings = nil
	alone := func(id string, area float64, wastage float64) hull.Zone {
		z := a.Zones[0]
		z.ID, z.Name, z.Circuit, z.WettedArea, z.BareArea = id, id, id, area, 1
		z.Fitted = []hull.Fitted{{Pattern: "al-45", Count: 6, Fitted: a.LastDocking, Wastage: wastage}}
		return z
	}
	a.Zones = []hull.Zone{alone("plenty", 40, 0), alone("doubtful", 300, 0.3)}
	a.Dockings[0].Works, a.Dockings[1].Works = nil, nil
	a.Patterns[0].NetMass, a.Patterns[0].GrossMass = 15, 0 // which gives more than enough current
	next := plan.Compute(a, 0).NextReadings()
	if len(next) != 2 || next[0].Zone != 1 {
		t.Fatalf("%+v", next)
	}
	s, plain := next[0], next[1]
	if s.Until != a.Dockings[1].Date || s.Wrong < 0.1 || s.WrongAfter > 0.85*s.Wrong || s.WrongAfter <= 0 {
		t.Errorf("the doubtful one: %+v", s)
	}
	if plain.Wrong > 0.01 || plain.Narrows < s.Narrows {
		t.Errorf("the plain one: %+v, the doubtful one %+v", plain, s)
	}
	// By hand: the prior of the factor against the one at which it is spent,
	// which lies between two forecasts.
	iv := plan.Compute(a, 0).Zones[1].Intervals
	taken := (iv[0].Total.Mean*iv[0].Hours() + iv[1].Total.Mean*iv[1].Hours()) / (6 * 15 * 2000)
	limit := math.Log((0.85 - 0.3) / taken)
	if want := 0.5 * math.Erfc(math.Abs(limit)/0.53/math.Sqrt2); math.Abs(s.Wrong-want) > 0.01 {
		t.Errorf("wrong with %.3f, by hand %.3f", s.Wrong, want)
	}
}

// Pieces gone long before the design figures waste them are asked about, those
// that had their time or that fell are not.
func TestPiecesGoneEarlyAreAskedAbout(t *testing.T) {
	asked := func(wastage float64, r hull.Reading) (texts string) {
		a := ternPassage(t)
		a.Zones[0].Fitted[0].Wastage = wastage
		r.Date, r.Zone = hull.NewDate(2026, 6, 1), "side"
		a.Readings = []hull.Reading{r}
		for _, q := range plan.Compute(a, hull.NewDate(2026, 12, 1)).Questions() {
			texts += q.Text
		}
		return texts
	}
	if got := asked(0, hull.Reading{Gone: 1}); !strings.Contains(got, "had wasted 10 % by the design figures") {
		t.Errorf("of new anodes gone: %q", got)
	}
	if got := asked(0.3, hull.Reading{Gone: 1}) + asked(0, hull.Reading{Fallen: 1, Percent: []float64{10}}); got != "" {
		t.Errorf("asked %q", got)
	}
}

// A set that was spent at the last docking is spent for certain, whatever a
// reading says, and teaches nothing of the demand.
func TestSetStatedSpent(t *testing.T) {
	a := ternPassage(t)
	a.Zones[0].Fitted[0].Wastage = 0.85
	for _, readings := range [][]hull.Reading{nil, {{Date: hull.NewDate(2026, 6, 1), Zone: "side", WeighedWastage: []float64{0.6, 0.7}}}} {
		a.Readings = readings
		o := plan.Compute(a, hull.NewDate(2026, 12, 1), plan.WithReadings())
		iv := o.Zones[0].Intervals[0]
		if g := iv.Fitted[0]; *iv.SpentProbability != 1 || g.Low != 0.85 || g.High != 0.85 || o.Zones[0].Learned != nil {
			t.Errorf("%d readings: probability %v, %.3f to %.3f wasted, learned %+v", len(readings), *iv.SpentProbability, g.Low, g.High, o.Zones[0].Learned)
		}
	}
}

// A factor that no chance explains is said to be so.
func TestFactorBeyondChance(t *testing.T) {
	for wastage, want := range map[float64]bool{0.84: true, 0.2: false} {
		a := ternPassage(t)
		a.Readings = []hull.Reading{{Date: hull.NewDate(2026, 6, 1), Zone: "side", WeighedWastage: []float64{wastage, wastage, wastage, wastage}}}
		text := ""
		for _, c := range plan.Compute(a, hull.NewDate(2026, 12, 1)).Cautions {
			text += c.Text
		}
		if strings.Contains(text, "by chance: look for another cause") != want {
			t.Errorf("%.2f wasted: %s", wastage, text)
		}
	}
}

// A stern whose anodes waste faster than the rest of its circuit is forecast
// so once the plan learns.
func TestForecastUsesTheCurrentFactor(t *testing.T) {
	a := ternPassage(t)
	stern := a.Zones[0]
	stern.ID, stern.Fitted = "stern", []hull.Fitted{a.Zones[0].Fitted[0]}
	a.Zones = append(a.Zones, stern)
	date := hull.NewDate(2026, 6, 1)
	a.Readings = []hull.Reading{
		{Date: date, Zone: "side", WeighedWastage: []float64{0.10, 0.11, 0.12, 0.11}},
		{Date: date, Zone: "stern", WeighedWastage: []float64{0.20, 0.22, 0.21, 0.23}},
	}
	apart := func(opts ...plan.Option) float64 {
		o := plan.Compute(a, hull.NewDate(2026, 12, 1), opts...)
		return o.Zones[len(o.Zones)-1].Intervals[0].Fitted[0].Wastage / o.Zones[0].Intervals[0].Fitted[0].Wastage
	}
	if x, learned := apart(), apart(plan.WithReadings()); math.Abs(x-1) > 1e-9 || learned < 1.4 || learned > 2 {
		t.Errorf("the stern wastes %.3f times the sides, learned %.3f", x, learned)
	}
}
