package pages

import (
	"fyne.io/fyne/v2"

	"anodewright/app/say"
)

// zoneItems are the commands on the selected zone. Wherever they are given,
// they are shown on the page Steel.
func (f *Frame) zoneItems(item func(string, fyne.KeyName, fyne.KeyModifier, func()) *fyne.MenuItem) []*fyne.MenuItem {
	onSteel := func(do func(p *steel)) func() {
		return func() {
			if f.s.Asset() == nil {
				return
			}
			for i, p := range f.pages {
				if p, ok := p.(*steel); ok {
					if f.current != i {
						f.show(i)
					}
					do(p)
				}
			}
		}
	}
	alt := fyne.KeyModifierAlt
	return []*fyne.MenuItem{
		item(say.T("Add a zone"), fyne.KeyInsert, alt, onSteel(func(p *steel) { p.addZone() })),
		item(say.T("Duplicate the zone"), fyne.KeyD, fyne.KeyModifierControl, onSteel(func(p *steel) { p.changeZones(f.s.DuplicateZone) })),
		item(say.T("Move the zone up"), fyne.KeyUp, alt, onSteel(func(p *steel) {
			p.changeZones(func(zone int) (int, error) { return f.s.MoveZone(zone, -1) })
		})),
		item(say.T("Move the zone down"), fyne.KeyDown, alt, onSteel(func(p *steel) {
			p.changeZones(func(zone int) (int, error) { return f.s.MoveZone(zone, 1) })
		})),
		item(say.T("Remove the zone"), fyne.KeyDelete, alt, onSteel(func(p *steel) { f.report(f.s.RemoveZone(p.selected())) })),
	}
}
