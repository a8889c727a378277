package pages

import (
	"bytes"
	"flag"
	"fmt"
	"math/rand/v2"
	"runtime"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// soaked is how many random commands and keys the soak gives. For a long one:
// go test -tags ci ./app/pages -run Soak -soak 5000 -timeout 0.
var soaked = flag.Int("soak", 60, "how many random commands the soak of the pages gives")

// keysOf a table and its editor.
var keysOf = []fyne.KeyName{
	fyne.KeyUp, fyne.KeyDown, fyne.KeyLeft, fyne.KeyRight, fyne.KeyHome, fyne.KeyEnd, fyne.KeyPageDown, fyne.KeyPageUp,
	fyne.KeyReturn, fyne.KeyF2, fyne.KeyEscape, fyne.KeyDelete, fyne.KeyBackspace,
}

// Random keys, texts, edits, undos, days, zones, pages and assets with every
// page attached: nothing falls over, what is shown is stored and has no fault,
// and memory stays flat.
func TestSoakOfThePages(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	r, err := storage.Open(register, storage.ForReading())
	must(t, err)
	defer r.Close()
	random := rand.New(rand.NewPCG(8, 2028))
	columns := append(session.ZoneColumns(), session.ZoneDetails()...)
	counts := map[string]int{}
	var memory []string
	for n := range *soaked {
		a := f.s.Asset()
		zone := random.IntN(len(a.Zones))
		did := ""
		switch d := random.IntN(20); {
		case d < 4:
			did = "page"
			f.show(random.IntN(len(f.pages)))
		case d < 8:
			did = "keys"
			for range 1 + random.IntN(6) {
				if f.win.Canvas().Focused() == nil {
					break
				}
				if random.IntN(3) > 0 {
					key(f, keysOf[random.IntN(len(keysOf))])
				} else if _, takes := f.win.Canvas().Focused().(interface{ TypedRune(rune) }); takes {
					f.win.Canvas().Focused().TypedRune([]rune("0123456789,.x% -")[random.IntN(16)])
				}
			}
		case d < 9:
			did = "day"
			f.setCursor(a.Start() + hull.Date(random.IntN(int(a.Horizon-a.Start())+1)))
		case d < 10:
			did = "zone"
			f.pickZone(zone)
		case d < 11:
			did = "asset"
			all := f.s.Fleet()
			f.s.Select(all[random.IntN(len(all))].ID)
		case d < 12:
			did = "look"
			f.setLook([]look.Mode{look.Light, look.Dark}[random.IntN(2)], []float32{1, 1.25, 1.5}[random.IntN(3)])
		case d < 14:
			did = "undo"
			must(t, f.s.Undo())
		case d < 15:
			did = "redo"
			must(t, f.s.Redo())
		case d < 16 && len(a.Zones) < 14:
			did = "add a zone"
			f.s.AddZone(zone)
		case d < 16:
			did = "remove a zone"
			f.s.RemoveZone(zone)
		default:
			did = "value"
			must(t, f.s.SetText(session.Zones, zone, columns[random.IntN(len(columns))], fmt.Sprint(1+random.IntN(300))))
		}
		counts[did]++
		settle(f)
		if f.win.Canvas().Overlays().Top() != nil { // a help or a fault: read and closed
			key(f, fyne.KeyEscape)
			if top := f.win.Canvas().Overlays().Top(); top != nil {
				f.win.Canvas().Overlays().Remove(top)
			}
			f.focusPage()
		}
		if n%25 == 24 {
			f.win.Canvas().Capture() // a frame, after which the toolkit drops what was not drawn for a minute
		}
		if n%10 != 9 {
			continue
		}
		for _, item := range f.s.Fleet() {
			stored, _, err := r.Load(item.ID)
			must(t, err)
			if !bytes.Equal(assetfile.Encode(stored), assetfile.Encode(item.Asset)) {
				t.Fatalf("after %d commands %s is stored other than shown", n+1, item.Asset.Name)
			}
			must(t, hull.Check(item.Asset).Err())
		}
		if o := f.s.Outcome(); o == nil || o.Asset != f.s.Asset() {
			t.Fatalf("after %d commands the outcome is of an older state", n+1)
		}
		if (n+1)%max(*soaked/10, 100) == 0 {
			var m runtime.MemStats
			runtime.GC()
			runtime.GC()
			runtime.ReadMemStats(&m)
			memory = append(memory, fmt.Sprintf("%.1f", float64(m.HeapAlloc)/1e6))
			t.Logf("%d commands, %s MB", n+1, memory[len(memory)-1])
		}
	}
	for _, p := range f.pages {
		f.open(t, p.title())
		wants(t, f, f.s.Asset().Name)
	}
	t.Logf("%d commands, %v; MB in use: %v", *soaked, counts, memory)
	if len(counts) < 8 {
		t.Errorf("only %v was done", counts)
	}
}
