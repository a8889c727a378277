package pages

import (
	"anodewright/app/grid"
	"anodewright/hull"
)

// zonePage is a page that is about one zone.
type zonePage interface{ selectZone(zone int) }

// cursorPage is a page that shows something as of the cursor's day.
type cursorPage interface{ cursorMoved() }

// pickZone selects a zone from the picture.
func (f *Frame) pickZone(zone int) {
	grid.CommitOpen()
	f.selectZone(zone)
	f.pages[f.current].update()
}

// selectZone selects a zone in the picture and on every page.
func (f *Frame) selectZone(zone int) {
	if zone < 0 || zone == f.zone {
		return
	}
	f.zone = zone
	for _, p := range f.pages {
		if z, ok := p.(zonePage); ok {
			z.selectZone(zone)
		}
	}
	f.band.update()
}

// setCursor looks at another day: the picture and the open page follow.
func (f *Frame) setCursor(d hull.Date) {
	f.cursor = d
	f.band.follow()
	if p, ok := f.pages[f.current].(cursorPage); ok {
		p.cursorMoved()
	}
}

// keepCursor keeps the cursor within the asset's time. On another asset it
// begins at today.
func (f *Frame) keepCursor(a *hull.Asset) {
	if a == nil {
		return
	}
	for _, item := range f.s.Fleet() {
		if item.Open && item.ID != f.shown {
			f.shown, f.cursor = item.ID, f.s.Today()
			if !a.Today.IsZero() {
				f.cursor = a.Today
			}
		}
	}
	f.cursor = min(max(f.cursor, a.Start()), a.Horizon)
	f.zone = min(f.zone, len(a.Zones)-1)
}

// toggleBand folds or opens the picture with the dates, and keeps the choice.
func (f *Frame) toggleBand() {
	f.band.toggle()
	f.s.SetSetting("picture", f.band.choice)
	f.Update()
}
