package assetfile

import (
	"fmt"
	"math"
	"reflect"
	"strings"

	"pgregory.net/rapid"

	"anodewright/assets"
	"anodewright/hull"
)

// drawAsset is a random valid asset: every field of the vocabulary at random
// within its range, so that a new field is drawn too, and then what the rules
// of hull.Check ask for between fields.
func drawAsset(t *rapid.T) *hull.Asset {
	a := new(hull.Asset)
	drawFields(t, reflect.ValueOf(a).Elem(), "")
	mendDates(t, a)
	mendBasis(&a.Basis)
	mendWaters(t, a)
	mendPatterns(a)
	mendZones(t, a)
	mendDockings(t, a)
	mendReadings(t, a)
	mendClosed(t, a)
	mendLedger(t, a)
	if faults := hull.Check(a); len(faults) > 0 {
		t.Fatalf("the random asset is at fault:\n%v", faults)
	}
	return a
}

func drawFields(t *rapid.T, v reflect.Value, path string) {
	hull.SetDefaults(v.Addr().Interface())
	for _, f := range hull.Fields(v.Type()) {
		drawValue(t, v.Field(f.Index), f, joinPath(path, f.Name))
	}
}

func drawValue(t *rapid.T, v reflect.Value, f hull.Field, path string) {
	kind := v.Kind()
	if kind != reflect.Struct && !f.Needed && rapid.Bool().Draw(t, path+" absent") {
		return
	}
	f.Needed = true
	if w, ok := v.Interface().(interface{ Words() []string }); ok && kind == reflect.String {
		v.SetString(rapid.SampledFrom(w.Words()).Draw(t, path))
		return
	}
	switch {
	case v.Type() == dateType:
		v.Set(reflect.ValueOf(drawDate(t, path)))
	case kind == reflect.Pointer:
		p := reflect.New(v.Type().Elem())
		drawValue(t, p.Elem(), f, path)
		v.Set(p)
	case kind == reflect.Struct:
		drawFields(t, v, path)
	case kind == reflect.Slice:
		n := rapid.IntRange(1, 3).Draw(t, path+" length")
		s := reflect.MakeSlice(v.Type(), n, n)
		for i := range n {
			drawValue(t, s.Index(i), f, fmt.Sprintf("%s[%d]", path, i))
		}
		v.Set(s)
	case kind == reflect.String:
		v.SetString("x" + rapid.String().Draw(t, path))
	case kind == reflect.Bool:
		v.SetBool(rapid.Bool().Draw(t, path))
	case kind == reflect.Float64:
		v.SetFloat(drawNumber(t, f.Range, path))
	case kind == reflect.Int:
		v.SetInt(int64(rapid.IntRange(int(f.Range.Low), int(f.Range.High)).Draw(t, path)))
	default:
		t.Fatalf("%s: no random %s", path, v.Type())
	}
}

func drawNumber(t *rapid.T, r hull.Range, path string) float64 {
	if !r.Limited {
		r.Low, r.High = -math.MaxFloat64, math.MaxFloat64
	}
	x := rapid.Float64Range(r.Low, r.High).Draw(t, path)
	if r.OpenLow && x == r.Low {
		return r.High
	}
	if x > 0 && x < 0.001 && r.Low == 0 {
		return 0.001 // sizes below a millimetre are refused
	}
	return x
}

func drawDate(t *rapid.T, path string) hull.Date {
	return hull.NewDate(1800, 1, 1) + hull.Date(rapid.IntRange(0, 200000).Draw(t, path))
}

func ptr[T any](x T) *T { return &x }

// mendDates puts service, last docking, dockings and horizon in their order.
func mendDates(t *rapid.T, a *hull.Asset) {
	d := drawDate(t, "start") + 10 // some dockings were closed before
	next := func(what string) hull.Date {
		d += hull.Date(rapid.IntRange(1, 3000).Draw(t, what))
		return d
	}
	a.InService = d
	a.LastDocking = 0
	if rapid.Bool().Draw(t, "has a last docking") {
		a.LastDocking = next("last docking")
	} else {
		d++ // a fitting date makes the start
	}
	for i := range a.Dockings {
		a.Dockings[i].Date = next("docking")
	}
	a.Horizon = next("horizon")
	mendService(t, a, a.Service)
	for i := range a.Zones {
		mendService(t, a, a.Zones[i].Service)
	}
}

func mendService(t *rapid.T, a *hull.Asset, ss []hull.Service) {
	from := a.InService
	for i := range ss {
		from += hull.Date(rapid.IntRange(1, 3000).Draw(t, "change"))
		ss[i].From = from
		if len(ss[i].Waters) == 0 && ss[i].UnderWayFactor == nil {
			ss[i].UnderWayFactor = ptr(1.1)
		}
		mendShares(t, a, ss[i].Waters)
	}
}

// mendShares makes shares of known waters that add up to 1.
func mendShares(t *rapid.T, a *hull.Asset, ws []hull.WaterShare) {
	for i := range ws {
		ws[i] = hull.WaterShare{Water: waterID(rapid.IntRange(0, len(a.Waters)-1).Draw(t, "water")), Share: 1 / float64(len(ws))}
	}
}

// mendBasis gives a decay law of one's own its constants.
func mendBasis(b *hull.Basis) {
	if b.Decay == hull.OwnDecay && (b.DecayC == nil || b.DecayD == nil) {
		b.DecayC, b.DecayD = ptr(3.0), ptr(-0.3)
	}
}

func waterID(i int) string   { return fmt.Sprint("water ", i) }
func zoneID(i int) string    { return fmt.Sprint("zone ", i) }
func patternID(i int) string { return fmt.Sprint("pattern ", i) }

// mendWaters makes all waters one medium, so that they mix, of a temperature
// that the scale of salinity covers.
func mendWaters(t *rapid.T, a *hull.Asset) {
	areas := assets.Get("class-densities").Rows
	for i := range a.Waters {
		w := &a.Waters[i]
		w.ID, w.Medium = waterID(i), a.Waters[0].Medium
		w.Temperature = ptr(rapid.Float64Range(-2, 40).Draw(t, "temperature"))
		if w.Resistivity == nil && w.Conductivity25 == nil && w.Salinity == nil {
			w.Salinity = ptr(35.0)
		}
		if a.Basis.Densities == hull.SeaArea {
			w.Name = rapid.SampledFrom(areas).Draw(t, "area").Name
		}
	}
}

// mendPatterns gives every shape its sizes.
func mendPatterns(a *hull.Asset) {
	for i := range a.Patterns {
		p := &a.Patterns[i]
		p.ID = patternID(i)
		for _, x := range []*float64{&p.Length, &p.Width, &p.Height, &p.Radius, &p.ShapeFactor, &p.ShapeFactorWorn} {
			if *x == 0 {
				*x = 0.25
			}
		}
		if p.Diameter == 0 || p.Length < 2*p.Diameter {
			p.Length = max(p.Length, 0.01)
			p.Diameter = p.Length / 10
		}
		if p.GrossMass < p.NetMass {
			p.GrossMass = 0
		}
	}
	for i := range a.Stock {
		a.Stock[i].Pattern = patternID(i % len(a.Patterns))
	}
}

func mendZones(t *rapid.T, a *hull.Asset) {
	for i := range a.Zones {
		z := &a.Zones[i]
		z.ID = zoneID(i)
		z.BareArea = min(z.BareArea, z.WettedArea)
		mendShares(t, a, z.Waters)
		mendCoating(z.Coating.Category, &z.Coating.A, &z.Coating.B)
		z.Coating.Applied = min(z.Coating.Applied, a.InService)
		for j := range z.Patterns {
			z.Patterns[j] = patternID(j % len(a.Patterns))
		}
		if z.MaxCount != nil {
			z.MinCount = min(z.MinCount, *z.MaxCount)
		}
		for j := range z.Fitted {
			z.Fitted[j].Pattern = patternID(j % len(a.Patterns))
			z.Fitted[j].Fitted = a.InService
		}
		if z.HeldBy != "" {
			z.HeldBy = ""
			if i > 0 {
				z.HeldBy = zoneID(rapid.IntRange(0, i-1).Draw(t, "host"))
				z.Fitted, z.Protection = nil, nil
			}
		}
		if a.Basis.Densities == hull.OwnDensities && z.OwnDensities == nil {
			z.OwnDensities = &hull.Densities{Initial: 150, Mean: 70, Final: 90}
		}
		if p := z.Protection; p != nil {
			p.Anode, p.Class = "graphite", "C5"
			p.Thickness = max(p.Thickness, 1)
		}
	}
}

func mendCoating(cat hull.Category, a, b **float64) {
	if cat != hull.CategoryOwn {
		return
	}
	if *a == nil {
		*a = ptr(0.05)
	}
	if *b == nil {
		*b = ptr(0.02)
	}
}

func mendDockings(t *rapid.T, a *hull.Asset) {
	for i := range a.Dockings {
		d := &a.Dockings[i]
		d.PiecesPerDay = max(d.PiecesPerDay, 1)
		mendWorks(t, a, d.Works)
	}
}

func mendWorks(t *rapid.T, a *hull.Asset, works []hull.Work) {
	for j := range works {
		w := &works[j]
		w.Zone = zoneID(rapid.IntRange(0, len(a.Zones)-1).Draw(t, "work on"))
		mendCoating(w.Category, &w.A, &w.B)
		if w.Share == nil {
			w.Share = ptr(0.5)
		}
		if w.Breakdown == nil {
			w.Breakdown = ptr(0.1)
		}
	}
}

func mendReadings(t *rapid.T, a *hull.Asset) {
	for i := range a.Readings {
		r := &a.Readings[i]
		r.Zone = zoneID(rapid.IntRange(0, len(a.Zones)-1).Draw(t, "read on"))
		r.Pattern = patternID(i % len(a.Patterns))
		if !r.Withdrawn.IsZero() {
			r.Withdrawn = max(r.Withdrawn, r.Date)
		}
		switch rapid.IntRange(0, 3).Draw(t, "kind of reading") {
		case 0:
			r.Measured, r.Percent, r.Grades = nil, nil, nil
		case 1:
			r.WeighedWastage, r.Percent, r.Grades = nil, nil, nil
		case 2:
			r.WeighedWastage, r.Measured, r.Grades = nil, nil, nil
		default:
			r.WeighedWastage, r.Measured, r.Percent = nil, nil, nil
			r.Grades = &hull.Grades{Bounds: []float64{0, 0.25, 0.5}, Counts: []int{1, 2, 3}}
		}
	}
}

// mendClosed puts closed dockings before the last one.
func mendClosed(t *rapid.T, a *hull.Asset) {
	date := max(a.Start()-hull.Date(rapid.IntRange(10, 3000).Draw(t, "first closed")), hull.NewDate(1800, 1, 1))
	for i := range a.Closed {
		date++
		a.Closed[i].Date = date
		mendWorks(t, a, a.Closed[i].Works)
	}
}

// mendLedger makes the facts drawn ones of the fitted sets, after those with
// which a ledger begins, and the fitted sets what follows from them.
func mendLedger(t *rapid.T, a *hull.Asset) {
	drawn := a.Ledger
	if a.Ledger = nil; drawn == nil {
		return
	}
	for _, z := range a.Zones {
		for j := range z.Fitted {
			z.Fitted[j].Count = z.Fitted[j].Count%1000 + 1 // a ledger knows equal sets as one
		}
	}
	a.Ledger = hull.Opening(a)
	for _, f := range drawn {
		sets, _ := hull.FittedSets(a.Ledger)
		zone := a.Zones[rapid.IntRange(0, len(a.Zones)-1).Draw(t, "fact of")].ID
		if len(sets[zone]) == 0 {
			continue
		}
		set := sets[zone][0]
		f.Zone, f.Pattern, f.Fitted, f.Date = zone, set.Pattern, set.Fitted, a.Start()
		if f.Deed == hull.WasFitted && set.Count == 1000000 { // found so
			f.Deed = hull.WasRemoved
		}
		if f.Deed != hull.WasFound {
			f.Wastage, f.Count = 0, 1
		}
		a.Ledger = append(a.Ledger, f)
	}
	sets, _ := hull.FittedSets(a.Ledger)
	for i := range a.Zones {
		if len(a.Ledger) > 0 {
			a.Zones[i].Fitted = sets[a.Zones[i].ID]
		}
	}
}

// seeds are asset texts, good and bad, to start from.
func seeds() [][]byte {
	texts := assets.Demo()
	for _, s := range []string{``, `{}`, `[]`, `null`, `{"format": "anodewright-asset", "version": 1}`, strings.Repeat("[", 40)} {
		texts = append(texts, []byte(s))
	}
	return texts
}
