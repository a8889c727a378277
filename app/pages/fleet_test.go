package pages

import (
	"testing"

	"anodewright/app/look"
)

// Of a large fleet the list shows so many cards, the open asset's among them,
// and the rest at a wish or by a search.
func TestLargeFleetIsShownInParts(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	l := f.fleet
	sorted := l.sort.in(f.s.Fleet())
	f.s.Select(sorted[4].ID)
	settle(f)
	cards := func() (names []string, more bool) {
		for _, o := range l.cards.Objects {
			switch o := o.(type) {
			case *assetCard:
				names = append(names, o.item.Asset.Name)
			case *linkText:
				more = true
			}
		}
		return names, more
	}
	if names, more := cards(); len(names) != 5 || more {
		t.Fatalf("five assets: %q, more %v", names, more)
	}
	l.most = 2
	l.update()
	if names, more := cards(); len(names) != 3 || names[2] != sorted[4].Asset.Name || !more || l.more.text.String() != "and 2 more ▾" {
		t.Errorf("two and the open one: %q, %q", names, l.more.text.String())
	}
	l.more.press()
	if names, more := cards(); len(names) != 5 || more {
		t.Errorf("after the wish: %q, more %v", names, more)
	}
	l.most = 1
	l.search.SetText("jetty")
	if names, more := cards(); len(names) == 0 || more {
		t.Errorf("searched: %q, more %v", names, more)
	}
}
