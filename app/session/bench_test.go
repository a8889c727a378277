package session_test

import (
	"fmt"
	"path/filepath"
	"slices"
	"testing"
	"time"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// wide is the demo ship with so many zones: its own, over and over.
func wide(b *testing.B, zones int) *hull.Asset {
	a := demo(b)[0]
	own := len(a.Zones)
	for n := 0; len(a.Zones) < zones; n++ {
		z := assetfile.Clone(a).Zones[n%own]
		z.ID, z.Name = fmt.Sprintf("%s-%d", z.ID, n), fmt.Sprintf("%s %d", z.Name, n)
		if z.HeldBy != "" {
			z.HeldBy = a.Zones[n%own].HeldBy
		}
		a.Zones = append(a.Zones, z)
	}
	return a
}

// times are how long the runs of a benchmark took.
type times []time.Duration

func (t times) report(b *testing.B, what string) {
	slices.Sort(t)
	at := func(share float64) float64 {
		return float64(t[min(int(share*float64(len(t))), len(t)-1)].Microseconds()) / 1000
	}
	b.ReportMetric(at(0.5), what+"-p50-ms")
	b.ReportMetric(at(0.99), what+"-p99-ms")
}

// BenchmarkKeystroke types areas into a zone of an asset of 200: how long until
// the session has stored the edit, and until the new outcome is there.
func BenchmarkKeystroke(b *testing.B) {
	r, err := storage.Open(filepath.Join(b.TempDir(), "fleet.anodewright"))
	if err != nil {
		b.Fatal(err)
	}
	defer r.Close()
	s, err := session.Open(r, today)
	if err != nil {
		b.Fatal(err)
	}
	if err := s.Add(wide(b, 200), "bench"); err != nil {
		b.Fatal(err)
	}
	s.Wait()
	f := zoneField(b, "wetted_area_m2")
	var edits, outcomes times
	for i := 0; b.Loop(); i++ {
		begin := time.Now()
		if err := s.SetText(session.Zones, i%200, f, fmt.Sprint(50+i%37)); err != nil {
			b.Fatal(err)
		}
		edits = append(edits, time.Since(begin))
		s.Wait()
		outcomes = append(outcomes, time.Since(begin))
	}
	edits.report(b, "stored")
	outcomes.report(b, "figures")
}
