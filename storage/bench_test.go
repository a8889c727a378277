package storage

import (
	"database/sql"
	"fmt"
	"testing"

	"anodewright/hull"
)

// withZones is the sample with n zones more.
func withZones(t testing.TB, n int) *hull.Asset {
	a := sample(t)
	for i := range n {
		z := a.Zones[0]
		z.ID, z.Name = fmt.Sprintf("tank-%d", i), fmt.Sprintf("Tank %d", i)
		a.Zones = append(a.Zones, z)
	}
	return a
}

// One edit of one figure, stored durably.
func BenchmarkSave(b *testing.B) {
	for _, zones := range []int{0, 40, 2000} {
		b.Run(fmt.Sprintf("zones=%d", zones+2), func(b *testing.B) {
			r := opened(b, newPath(b))
			a := withZones(b, zones)
			id, err := r.Add(a, "")
			if err != nil {
				b.Fatal(err)
			}
			rev := int64(1)
			for b.Loop() {
				a.Costs.PerZone++
				rev = save(b, r, id, rev, a, "cost of a zone")
			}
		})
	}
}

func BenchmarkOpen(b *testing.B) {
	path := newPath(b)
	r, _ := added(b, path)
	r.Close()
	for b.Loop() {
		opened(b, path).Close()
	}
}

// The list of a register with 1000 assets, opened and read.
func BenchmarkListOfThousand(b *testing.B) {
	path := newPath(b)
	r := opened(b, path)
	a := sample(b)
	err := r.edit("test", func(tx *sql.Tx) error {
		body, err := encode(a)
		if err != nil {
			return err
		}
		for n := range 1000 {
			e := edited{id: fmt.Sprint(n), rev: 1, at: r.stamp(), name: a.Name, kind: a.Kind, body: body}
			if err := r.put(tx, e, Added, ""); err != nil {
				return err
			}
		}
		return nil
	})
	if err != nil {
		b.Fatal(err)
	}
	r.Close()
	for b.Loop() {
		r := opened(b, path)
		if list, err := r.List(); err != nil || len(list) != 1000 {
			b.Fatalf("%d assets, error %v", len(list), err)
		}
		r.Close()
	}
}
