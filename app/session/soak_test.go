package session_test

import (
	"flag"
	"fmt"
	"hash/fnv"
	"math/rand/v2"
	"path/filepath"
	"runtime"
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// soaked is how many random commands the soak gives. For a long one:
// go test -tags ci ./app/session -run Soak -soak 100000 -timeout 0, with TMPDIR
// on a disk in memory.
var soaked = flag.Int("soak", 300, "how many random commands the soak gives")

// soak is a session that random commands are given to, with what it ought to
// have in its lists of steps: a number for each state, by asset.
type soak struct {
	*testing.T
	s            *session.Session
	random       *rand.Rand
	past, future map[string][]uint64

	done, edits, undos, redos, refused int
}

// number stands for a state of an asset.
func number(a *hull.Asset) uint64 {
	h := fnv.New64a()
	h.Write(assetfile.Encode(a))
	return h.Sum64()
}

func (k *soak) pick(n int) int { return k.random.IntN(max(n, 1)) }

// step gives one command and looks at what came of it.
func (k *soak) step() {
	k.done++
	before, id := k.s.Asset(), openID(k, k.s)
	switch d := k.random.IntN(100); {
	case d < 20:
		k.swap("undo", k.s.Undo, k.past, k.future, &k.undos)
	case d < 32:
		k.swap("redo", k.s.Redo, k.future, k.past, &k.redos)
	case d < 34:
		all := k.s.Fleet()
		k.s.Select(all[k.pick(len(all))].ID)
	case d < 35:
		must(k, k.s.SetLearns(!k.s.Learns()))
	case d < 37:
		if o := k.s.Outcome(); o != nil && len(o.Schedule) > 0 {
			l := o.Schedule[k.pick(len(o.Schedule))]
			zone, docking := o.Asset.Zones[l.Zone].ID, l.Date
			if k.pick(2) == 0 {
				k.s.Pin(renewal.Pin{Zone: zone, Docking: docking, Action: l.Action})
			} else {
				k.s.Unpin(zone, docking)
			}
		}
		k.s.Decisions()
	default:
		if err := k.command(before, d); err != nil {
			k.refused++
		}
		if now := k.s.Asset(); now != before {
			k.edits++
			k.past[id] = append(k.past[id], number(before))
			k.future[id] = nil
		}
	}
}

// swap takes back or does again, which leads to the state that was there.
func (k *soak) swap(what string, do func() error, from, to map[string][]uint64, count *int) {
	before, id := k.s.Asset(), openID(k, k.s)
	must(k, do())
	n := len(from[id])
	if n == 0 {
		if k.s.Asset() != before {
			k.Fatalf("step %d: %s with nothing to take changed %s", k.done, what, before.Name)
		}
		return
	}
	*count++
	if number(k.s.Asset()) != from[id][n-1] {
		k.Fatalf("step %d: %s of %s leads to another state", k.done, what, before.Name)
	}
	from[id] = from[id][:n-1]
	to[id] = append(to[id], number(before))
}

// command gives one of the commands that change an asset. Assets are kept
// about the size that they have.
func (k *soak) command(a *hull.Asset, d int) (err error) {
	zone, large := k.pick(len(a.Zones)), len(a.Zones) > 12
	switch {
	case d < 41 && !large:
		_, err = k.s.AddZone(zone)
	case d < 45 && large:
		return k.s.RemoveZone(zone)
	case d < 47 && !large:
		_, err = k.s.DuplicateZone(zone)
	case d < 49:
		_, err = k.s.MoveZone(zone, k.pick(5)-2)
	case d < 51 && len(a.Dockings) < 6:
		return k.s.AddDocking()
	case d < 53:
		return k.s.RemoveDocking(k.pick(len(a.Dockings)))
	case d < 54 && len(a.Waters) < 8:
		return k.s.AddWater()
	case d < 56 && len(a.Patterns) < 8:
		_, err = k.s.DuplicatePattern(k.pick(len(a.Patterns)))
	case d < 58:
		return k.s.RemovePattern(k.pick(len(a.Patterns)))
	case d < 60:
		return k.s.AddFitted(zone, a.Patterns[k.pick(len(a.Patterns))].ID)
	case d < 62:
		return k.s.RemoveFitted(zone, k.pick(len(a.Zones[zone].Fitted)))
	case d < 63 && len(a.Readings) < 12:
		_, err = k.s.AddReading(len(a.Readings) - 1)
	case d < 65:
		return k.s.RemoveReading(k.pick(len(a.Readings)))
	case d < 67:
		return k.s.SetStock(a.Patterns[k.pick(len(a.Patterns))].ID, k.text())
	case d < 70:
		columns := session.ZoneColumns()
		var cells []session.Cell
		for i := range min(3, len(a.Zones)) {
			cells = append(cells, session.Cell{Item: i, Field: columns[k.pick(len(columns))], Text: k.text()})
		}
		_, err = k.s.SetBlock(session.Zones, cells)
	default:
		list := []session.List{session.Whole, session.Zones, session.Waters, session.Dockings, session.Patterns}[k.pick(5)]
		l := lists(a)[list]
		i, f, text := k.pick(l.n), l.fields[k.pick(len(l.fields))], k.text()
		if f.Choices != nil && k.pick(2) == 0 {
			choices := f.Choices(a)
			text = choices[k.pick(len(choices))]
		}
		return k.s.SetText(list, i, f, text)
	}
	return err
}

func (k *soak) text() string {
	if k.pick(2) == 0 {
		return fmt.Sprint(1 + k.pick(400))
	}
	return texts[k.pick(len(texts))]
}

// memory is what is in use once nothing is left to collect, in bytes.
func memory() float64 {
	var m runtime.MemStats
	runtime.GC()
	runtime.GC()
	runtime.ReadMemStats(&m)
	return float64(m.HeapAlloc)
}

// slope is that of the straight line of least squares.
func slope(x, y []float64) float64 {
	var n, sx, sy, sxx, sxy float64
	for i := range x {
		n, sx, sy, sxx, sxy = n+1, sx+x[i], sy+y[i], sxx+x[i]*x[i], sxy+x[i]*y[i]
	}
	return (n*sxy - sx*sy) / (n*sxx - sx*sx)
}

// Random commands, undos and redos on a fleet: each undo leads back, what is
// shown is stored and has no fault, the outcome is that of the newest state,
// a second session on the register sees the same, and memory stays flat.
func TestSoak(t *testing.T) {
	r := register(t, filepath.Join(t.TempDir(), "fleet.anodewright"))
	s := open(t, r)
	must(t, session.AddDemo(s))
	k := &soak{T: t, s: s, random: rand.New(rand.NewPCG(8, 2027)), past: map[string][]uint64{}, future: map[string][]uint64{}}
	var at, used []float64
	every := max(*soaked/40, 100)
	for k.done < *soaked {
		k.step()
		if k.done%25 == 0 {
			k.holds(r)
		}
		if k.done%every == 0 {
			at, used = append(at, float64(k.done)), append(used, memory())
			t.Logf("%d commands, %.1f MB", k.done, used[len(used)-1]/1e6)
		}
	}
	k.holds(r)
	again := open(t, register(t, r.Path()))
	for i, item := range again.Fleet() {
		if !equal(item.Asset, s.Fleet()[i].Asset) {
			t.Errorf("%s is another one when the register is opened again", item.Asset.Name)
		}
	}
	t.Logf("%d commands: %d edits, %d undos, %d redos, %d refused", k.done, k.edits, k.undos, k.redos, k.refused)
	if k.edits*4 < k.done || k.undos == 0 || k.redos == 0 {
		t.Error("the soak hardly did anything")
	}
	if len(at) < 10 {
		return // too short for a line
	}
	// Each step leaves a number here and its name and revision in the list of
	// steps: less than 200 bytes.
	settled := len(at) / 4
	growth := slope(at[settled:], used[settled:])
	t.Logf("memory after a quarter %.1f MB, at the end %.1f MB, %.0f bytes a command", used[settled]/1e6, used[len(used)-1]/1e6, growth)
	if *soaked >= 10_000 && growth > 500 {
		t.Errorf("memory grows by %.0f bytes with each command", growth)
	}
}

// holds looks at what must hold of all assets once outcomes are computed.
func (k *soak) holds(r interface {
	Load(string) (*hull.Asset, int64, error)
}) {
	k.Helper()
	k.s.Wait()
	for _, item := range k.s.Fleet() {
		stored, _, err := r.Load(item.ID)
		must(k, err)
		if !equal(stored, item.Asset) {
			k.Fatalf("step %d: %s is stored other than shown", k.done, item.Asset.Name)
		}
		if err := hull.Check(item.Asset).Err(); err != nil {
			k.Fatalf("step %d: %s has faults: %v", k.done, item.Asset.Name, err)
		}
		if item.Outlook == nil || item.Open && k.s.Outcome().Asset != item.Asset {
			k.Fatalf("step %d: %s has no outcome of its newest state", k.done, item.Asset.Name)
		}
	}
}
