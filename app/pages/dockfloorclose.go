package pages

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/dialog"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// closeDocking shows what the closing of the docking will record, and closes
// it once that is confirmed. From another page it first goes to the dock
// floor, so that nothing is closed unseen.
func (f *Frame) closeDocking() {
	grid.CommitOpen()
	if f.s.Asset() == nil || f.win.Canvas().Overlays().Top() != nil {
		return
	}
	for i, p := range f.pages {
		if _, ok := p.(*dockFloor); ok && f.current != i {
			f.show(i)
			return
		}
	}
	var floor *session.Floor
	f.work(say.T("Planning the day in dock"), func(func() bool) (err error) {
		floor, err = f.s.FloorNow()
		return err
	}, func(err error) {
		if err != nil {
			f.report(err)
			return
		}
		f.askClosing(floor)
	})
}

// askClosing shows what a closing records and asks for it to be confirmed.
func (f *Frame) askClosing(floor *session.Floor) {
	f.Update()
	body := newScrolled()
	lines, ready := closingLines(f.s.Asset(), floor, f.s.Today())
	d := dialog.NewCustomWithoutButtons(say.T("Close the docking of %s?", session.Day(floor.Closing.Date)), body.scroll, f.win)
	cancel := look.Button(say.T("Not yet"), func() { f.hide(d) })
	act := look.AccentButton(say.T("Close the docking"), func() {
		f.hide(d)
		f.work(say.T("Closing the docking"), func(func() bool) error { return f.s.CloseFloor() }, f.closedDocking)
	})
	cancel.OnEscape, act.OnEscape = cancel.OnTapped, cancel.OnTapped
	d.SetButtons([]fyne.CanvasObject{cancel, act})
	d.Resize(dialogSize(f.win, 680, 540))
	d.Show()
	body.set(lines...) // now that it knows its width
	if !ready {
		act.Disable()
		f.win.Canvas().Focus(cancel)
		return
	}
	f.win.Canvas().Focus(act)
}

// closedDocking shows planned against found of the docking just closed.
func (f *Frame) closedDocking(err error) {
	if err != nil {
		f.report(err)
		return
	}
	f.Update()
	all := f.s.Closed()
	if len(all) == 0 {
		return
	}
	lines := []fyne.CanvasObject{look.Note(say.T("Ctrl+Z takes the closing back, with all that was typed. It is kept in Last time on Order."))}
	for _, text := range all[0].Words() {
		lines = append(lines, look.Body("• "+say.Sentence(text)))
	}
	f.read(say.T("The docking of %s is closed", session.Day(all[0].Closed.Date)), lines)
}

// closingLines sum up what the closing records, and say whether it can be done
// so.
func closingLines(a *hull.Asset, f *session.Floor, today hull.Date) (lines []fyne.CanvasObject, ready bool) {
	ready = true
	wrong := func(text string) {
		lines, ready = append(lines, look.Wrong("⚠ "+text)), false
	}
	for _, field := range f.WrongFields() {
		wrong(say.Sentence(f.Name(field)) + ": " + say.Sentence(f.Wrong[field]))
	}
	for _, fault := range f.Faults {
		wrong(say.Sentence(f.Named(hull.Faults{fault}).Error()))
	}
	c := f.Closing
	head := func(text string) { lines = append(lines, lift(3), look.Lead(text)) }
	line := func(text string) { lines = append(lines, look.Body(text)) }
	seen, found := 0, 0
	for _, s := range c.Sets {
		found += s.Found
		if s.How != hull.Forecasted {
			seen++
		}
	}
	head(say.In("wastage", "Found"))
	if seen == len(c.Sets) {
		line(say.T("Pieces: %d. Every set was looked at.", found))
	} else {
		line(say.T("Pieces: %d. Sets looked at: %d of %d; the others count as forecast.", found, seen, len(c.Sets)))
	}
	head(say.T("Taken off and put on"))
	done := 0
	for _, r := range f.Rows {
		if !r.First || r.Zoned.Off+sumOn(r.Zoned.On) == 0 {
			continue
		}
		done++
		line(say.T("%s: %d off, %s on", zoneName(a, r.Key.Zone), r.Zoned.Off, onText(a, r.Zoned.On)))
	}
	if done == 0 {
		line(say.T("Nothing: all anodes are kept."))
	}
	var left []string
	for _, q := range f.Quay {
		if q.Left() > 0 {
			left = append(left, pieces(q.Left(), q.Pattern))
		}
	}
	if len(left) > 0 {
		line(say.T("Left on the quay, to stock: %s.", strings.Join(left, ", ")))
	}
	if len(f.Works) > 0 {
		head(say.T("Works"))
	}
	for _, w := range f.Works {
		switch share := w.Work.Share; {
		case !w.Done:
			line(say.T("%s: %s, not done", zoneName(a, w.Work.Zone), workText(w.Work)))
		case share != nil:
			line(say.T("%s: %s, %s", zoneName(a, w.Work.Zone), workText(w.Work), session.Percent(*share)))
		default:
			line(say.T("%s: %s, done", zoneName(a, w.Work.Zone), workText(w.Work)))
		}
	}
	head(say.T("Cost and dates"))
	if c.Cost != nil && c.PlannedCost != nil {
		line(say.T("%s %s; planned were %s.", session.Figure(*c.Cost, 0), a.Currency, session.Figure(*c.PlannedCost, 0)))
	}
	line(nextText(a, c))
	warnings := floorWarnings(a, f)
	if days := int(c.Date - today); days > 0 {
		warnings = append(warnings, "⚠ "+say.N("The date in dock lies %d day ahead of today.", "The date in dock lies %d days ahead of today.", days))
	}
	if len(warnings) > 0 && ready {
		head(say.T("To be known"))
		for _, w := range warnings {
			lines = append(lines, look.Wrong(w))
		}
	}
	return lines, ready
}

func nextText(a *hull.Asset, c hull.Closing) string {
	next, horizon := c.Next, c.Horizon
	if next.IsZero() {
		for _, d := range a.Ahead() {
			if d.Date > max(c.Date, c.Docking) {
				next = d.Date
				break
			}
		}
	}
	if horizon.IsZero() {
		horizon = a.Horizon
	}
	return say.T("Next docking %s, planned to %s.", session.Day(next), session.Day(horizon))
}

// onText is what was put on: 14 × 45 kg + 2 × 7 kg, or 0.
func onText(a *hull.Asset, on []hull.PutOn) string {
	var all []string
	for _, p := range on {
		if pattern, ok := a.Pattern(p.Pattern); ok {
			all = append(all, pieces(p.Count, pattern))
		} else {
			all = append(all, fmt.Sprintf("%d × %s", p.Count, p.Pattern))
		}
	}
	if len(all) == 0 {
		return "0"
	}
	return strings.Join(all, " + ")
}
