package pages

import (
	"fmt"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// pinKey pins what the plan does in the selected cell, or takes the pin back.
func (p *dockings) pinKey(row, col int, key *fyne.KeyEvent) bool {
	if key.Name != fyne.KeyP {
		return false
	}
	o, docking := p.f.s.Outcome(), col-2
	if o == nil || row < 0 || row >= len(o.Zones) || docking < 0 || docking >= len(o.Asset.Ahead()) {
		return true
	}
	if pin, ok := o.PinAt(row, docking); ok {
		p.f.report(p.f.s.Unpin(pin.Zone, pin.Docking))
	} else if canPin(o, row) {
		p.f.report(p.f.s.Pin(o.Pin(row, docking)))
	}
	return true
}

// canPin reports whether a zone has anodes of its own to plan.
func canPin(o *plan.Outcome, zone int) bool {
	return heldText(o.Asset, o.Zones[zone].Zone) == "own anodes"
}

// pinMenu offers what can be pinned in a cell.
func (p *dockings) pinMenu(row, col int, at fyne.Position) {
	if menu := p.pinChoices(row, col-2); menu != nil {
		widget.ShowPopUpMenuAtPosition(menu, p.f.win.Canvas(), at)
	}
}

// pinChoices is the menu of a zone at a docking; nil where nothing can be
// pinned and no pin is to be taken back.
func (p *dockings) pinChoices(zone, docking int) *fyne.Menu {
	o := p.f.s.Outcome()
	if o == nil || zone < 0 || zone >= len(o.Zones) || docking < 0 || docking >= len(o.Asset.Ahead()) {
		return nil
	}
	var items []*fyne.MenuItem
	add := func(label string, do func() error) {
		items = append(items, fyne.NewMenuItem(label, func() { p.f.report(do()) }))
	}
	if pin, ok := o.PinAt(zone, docking); ok {
		add(say.T("Unpin: %s   P", pinText(pin.Pin)), func() error { return p.f.s.Unpin(pin.Zone, pin.Docking) })
	} else if canPin(o, zone) {
		add(say.T("Pin: %s   P", pinText(o.Pin(zone, docking))), func() error { return p.f.s.Pin(o.Pin(zone, docking)) })
	}
	if canPin(o, zone) {
		items = append(items, p.otherPins(o, zone, docking)...)
	}
	if len(o.Pins) > 1 {
		add(say.T("Unpin all %d", len(o.Pins)), p.f.s.UnpinAll)
	}
	if len(items) == 0 {
		return nil
	}
	return fyne.NewMenu("", items...)
}

// otherPins are the actions that may be pinned in place of the plan's own.
func (p *dockings) otherPins(o *plan.Outcome, zone, docking int) []*fyne.MenuItem {
	pin := renewal.Pin{Zone: o.Zones[zone].Zone.ID, Docking: o.Asset.Ahead()[docking].Date, Action: renewal.Keep}
	item := func(label string, pin renewal.Pin) *fyne.MenuItem {
		return fyne.NewMenuItem(label, func() { p.f.report(p.f.s.Pin(pin)) })
	}
	items := []*fyne.MenuItem{item(say.T("Pin: nothing is done here"), pin)}
	for _, action := range []renewal.Action{renewal.Renew, renewal.Add} {
		var choices []*fyne.MenuItem
		for i := range o.Asset.Patterns {
			m := &o.Asset.Patterns[i]
			listed := len(o.Zones[zone].Zone.Patterns) == 0
			for _, id := range o.Zones[zone].Zone.Patterns {
				listed = listed || id == m.ID
			}
			if !listed || o.Zones[zone].Refused[m.ID] != "" {
				continue
			}
			pin.Action, pin.Pattern = action, m.ID
			choices = append(choices, item(m.Name, pin))
		}
		if len(choices) > 0 {
			sub := fyne.NewMenuItem(say.T("Pin: %s with", say.T(string(action))), nil)
			sub.ChildMenu = fyne.NewMenu("", choices...)
			items = append(items, sub)
		}
	}
	return items
}

// pinText is a pinned action in words.
func pinText(p renewal.Pin) string {
	if p.Action == renewal.Keep {
		return say.T("nothing is done here")
	}
	if p.Count > 0 {
		return fmt.Sprintf("%s %d × %s", say.T(string(p.Action)), p.Count, p.Pattern)
	}
	return say.T("%s with %s", say.T(string(p.Action)), p.Pattern)
}

// signed writes a difference in money: +210, ±0, −35.
func signed(x float64) string {
	switch s := session.Figure(math.Abs(x), 0); {
	case s == "0":
		return "±0"
	case x < 0:
		return "−" + s
	default:
		return "+" + s
	}
}

// pinnedCell marks a cell of the plan that is pinned.
func pinnedCell(c grid.Cell, o *plan.Outcome, zone, docking int) grid.Cell {
	pin, ok := o.PinAt(zone, docking)
	switch {
	case !ok:
	case pin.Refused != "":
		c.Sub = say.T("pin cannot stand")
	default:
		c.Sub, c.Bold, c.Muted = say.T("pinned %s", signed(pin.Cost)), true, false
		if c.Text == "–" {
			c.Text = say.T("nothing")
		}
	}
	return c
}

// pinsText says what the pins cost together, and how many cannot stand.
func pinsText(o *plan.Outcome) string {
	stand := 0
	for _, p := range o.Pins {
		if p.Refused == "" {
			stand++
		}
	}
	refused := len(o.Pins) - stand
	switch {
	case stand == 0:
		return say.T("%d pinned cannot stand", refused)
	case refused > 0:
		return say.T("%d pinned %s, %d cannot stand", stand, signed(o.Money.Total-o.Money.Free), refused)
	}
	return say.T("%d pinned: %s to the cheapest", stand, signed(o.Money.Total-o.Money.Free))
}

// pin explains what became of a pin.
func (w *why) pin(o *plan.Outcome, zone, docking int) {
	if docking >= len(o.Asset.Ahead()) {
		return
	}
	pin, ok := o.PinAt(zone, docking)
	switch {
	case !ok:
		return
	case pin.Refused != "":
		w.add(look.Wrong(say.T("%s, %s: “%s” cannot be pinned: %s. The plan is made without this pin.",
			o.Zones[zone].Zone.Name, session.Day(pin.Docking), pinText(pin.Pin), pin.Refused)))
	default:
		w.add(look.Lead(say.T("Pinned: %s.", pinText(pin.Pin))))
		note := say.T("The cheapest plan does the same.")
		if s := session.Figure(max(0, pin.Cost), 0); s != "0" {
			note = say.T("Without this pin the plan would cost %s %s less.", s, o.Asset.Currency)
		}
		w.add(look.Note(note))
	}
}
