package pages

import (
	"anodewright/app/say"
	"anodewright/app/session"
)

// The zone that is selected is the same on all pages; here those that list
// something else than zones follow it.

// selectZone goes to the first of the zone's fitted sets. A zone without
// anodes of its own leaves the selection where it is.
func (p *anodesPage) selectZone(zone int) {
	row, _ := p.fitted.grid.Selected()
	if row >= 0 && row < len(p.fitted.sets) && p.fitted.sets[row].zone == zone {
		return
	}
	for i, set := range p.fitted.sets {
		if set.zone == zone {
			_, col := p.fitted.grid.Selected()
			p.fitted.grid.Select(i, max(col, 0))
			return
		}
	}
}

// cursorMoved shows the wastage and the states of the cursor's new day.
func (p *anodesPage) cursorMoved() { p.fitted.showDay() }

// showDay says which day the table's last columns are of.
func (s *fittedSets) showDay() {
	title := say.T("Fitted at the last docking · as it is on %s", session.Day(s.page.f.cursor))
	s.card.SetTitle(title)
	s.page.drawer.say(title)
	s.grid.Refresh()
}

// selectZone goes to the latest reading of the zone. Without one the selection
// stays where it is.
func (p *readingsPage) selectZone(zone int) {
	a := p.f.s.Asset()
	if a == nil || zone < 0 || zone >= len(a.Zones) {
		return
	}
	id := a.Zones[zone].ID
	row, col := p.list.Selected()
	if row >= 0 && row < len(a.Readings) && a.Readings[row].Zone == id {
		return
	}
	best := -1
	for i, r := range a.Readings {
		if r.Zone == id && (best < 0 || r.Date >= a.Readings[best].Date) {
			best = i
		}
	}
	if best >= 0 {
		p.list.Select(best, max(col, 0))
	}
}

// follow selects the zone of the reading that is selected, everywhere.
func (p *readingsPage) follow() {
	selected := p.list.OnSelect
	p.list.OnSelect = func(row, col int) {
		selected(row, col)
		a := p.f.s.Asset()
		if a == nil || row < 0 || row >= len(a.Readings) {
			return
		}
		for i := range a.Zones {
			if a.Zones[i].ID == a.Readings[row].Zone {
				p.f.selectZone(i)
			}
		}
	}
}
