package pages

import (
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/look"
	"anodewright/app/say"
)

// zonePick is the list from which a page takes the zone that it is about.
type zonePick struct {
	list   *look.Select
	chosen int
}

// newZonePick calls show when a person has chosen a zone, which is then
// selected everywhere.
func newZonePick(f *Frame, show func()) *zonePick {
	z := &zonePick{}
	z.list = look.NewSelect(nil, func(string) {
		z.chosen = max(0, z.list.SelectedIndex())
		f.selectZone(z.chosen)
		show()
	})
	return z
}

func (z *zonePick) content() fyne.CanvasObject {
	return container.NewBorder(nil, nil, look.Plain(say.T("Zone")), nil, z.list)
}

// update lists the outcome's zones. It reports whether the choice changed, and
// with it show was called.
func (z *zonePick) update(o *plan.Outcome) bool {
	var names []string
	for _, zone := range o.Zones {
		names = append(names, zone.Zone.Name)
	}
	z.chosen = min(z.chosen, len(names)-1)
	if !slices.Equal(names, z.list.Options) {
		z.list.SetOptions(names)
	}
	if z.list.SelectedIndex() == z.chosen {
		return false
	}
	z.list.SetSelectedIndex(z.chosen)
	return true
}
