package pages

import (
	"fmt"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// why explains the count of one action.
type why struct {
	card          *look.CardBox
	list          *scrolled
	next          []fyne.CanvasObject
	zone, docking int // that are explained
}

func newWhy() *why {
	w := &why{list: newScrolled()}
	w.card = look.Card(say.T("Why this count?"), w.list.scroll)
	return w
}

// show explains what the plan does with a zone at a docking.
func (w *why) show(o *plan.Outcome, zone, docking int) {
	w.next = nil
	if zone != w.zone || docking != w.docking {
		w.zone, w.docking = zone, docking
		w.list.scroll.Offset = fyne.Position{}
	}
	defer func() { w.list.set(w.next...) }()
	w.card.SetTitle(say.T("Why this count?"))
	if zone < 0 || zone >= len(o.Zones) || docking < 0 {
		w.add(look.Note(say.T("Select an action in the table to see which criterion asks for how many pieces.")))
		w.rules(o)
		return
	}
	z := o.Zones[zone]
	w.pin(o, zone, docking)
	l, ok := o.Action(zone, docking)
	if !ok || l.Action == renewal.Keep {
		text := say.T("%s: nothing is done here.", z.Zone.Name)
		if ok {
			text = say.T("%s keeps its %d pieces up to %s: their mass, their worn output and the renewal limit of %s allow it.",
				z.Zone.Name, l.Count, session.Day(l.Until), session.Percent(o.Asset.Basis.RenewAbove))
		} else if held := heldText(o.Asset, z.Zone); held != say.T("own anodes") {
			text = z.Zone.Name + ": " + held + "."
		}
		w.add(look.Note(text))
		w.rules(o)
		return
	}
	w.card.SetTitle(say.T("Why %d?", l.Count))
	w.add(look.Note(say.T("%s: %s on %s, to last to %s.", z.Zone.Name, pieces(l.Count, l.Pattern), session.Day(l.Date), session.Day(l.Until))))
	most, _ := l.Need.Largest()
	most = math.Max(most, float64(l.Count))
	w.criterion(say.T("mass"), l.Need.ByMass, most, say.T("%s of metal must waste", session.ShownWith(say.Mass, l.Need.Mass, 0)))
	limit := say.T("%s gone at no docking passed", session.Percent(o.Asset.Basis.RenewAbove))
	if l.Action == renewal.Add {
		limit = say.T("not asked of an add")
	}
	w.criterion(say.T("renewal limit"), l.Need.ByRenewAbove, most, limit)
	w.criterion(say.T("initial current"), l.Need.ByInitial, most, say.T("new pieces, just after the docking"))
	w.criterion(say.T("final current"), l.Need.ByFinal, most, say.T("worn pieces, before the next"))
	w.add(look.Lead(rounding(o, l)))
	if l.Action == renewal.Add {
		note := say.T("What the old set still gives is already taken off.")
		if q, word := l.Need.Largest(); word != l.Governs {
			note = say.T("%s would take %s. With fewer than %d new pieces the old set would be used up before the end, and the new ones alone would fall short of the final current.", governsText(word), session.Figure(q, 2), l.Count)
		}
		w.add(look.Note(note))
	}
	for _, why := range z.Refused {
		w.add(look.Note(say.T("Not offered: %s", say.Sentence(why))))
	}
	w.rules(o)
}

func (w *why) add(object fyne.CanvasObject) { w.next = append(w.next, object) }

// criterion adds one criterion with its exact count as a bar.
func (w *why) criterion(name string, count, most float64, note string) {
	label := look.Plain(name)
	label.Shrink = true
	w.add(container.NewBorder(nil, nil, nil, look.Plain(session.Figure(count, 2)), label))
	w.add(newBar(count / most))
	w.add(look.Note(note))
	w.add(lift(4))
}

// rounding says how the largest quotient became the count.
func rounding(o *plan.Outcome, l renewal.Line) string {
	z := o.Zones[l.Zone].Zone
	q, word := l.Need.Largest()
	s := fmt.Sprintf("%s %s → %d", governsText(word), session.Figure(q, 2), l.Count)
	switch {
	case l.Governs == "min_count":
		s = say.T("least count %d → %d", z.MinCount, l.Count)
	case l.Governs != word:
		s = fmt.Sprintf("%s → %d", governsText(l.Governs), l.Count)
	}
	if z.CountMultiple > 1 {
		s += say.T(", in steps of %d", z.CountMultiple)
	}
	return s
}

// rules shows what the simple rules would cost.
func (w *why) rules(o *plan.Outcome) {
	w.add(lift(4))
	w.add(look.Lead(say.T("Beside this plan")))
	cost := func(name string, x float64) {
		text := say.T("%s: not possible", name)
		if !math.IsNaN(x) {
			text = fmt.Sprintf("%s: %s %s", name, session.Figure(x, 0), o.Asset.Currency)
		}
		w.add(look.Note(text))
	}
	cost(say.T("renew all at every docking"), o.Money.RenewAll)
	cost(say.T("as late as possible"), o.Money.AsLate)
}

// newBar is a bar filled to a share.
func newBar(share float64) fyne.CanvasObject {
	track, fill := canvas.NewRectangle(look.Color(look.ColorTrack)), canvas.NewRectangle(look.Color(look.ColorAccent))
	track.CornerRadius, fill.CornerRadius = look.Px(3), look.Px(3)
	return container.New(barLayout(min(max(share, 0), 1)), track, fill)
}

type barLayout float64

func (barLayout) MinSize([]fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(look.Px(60), look.Px(10))
}

func (b barLayout) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	objects[0].Resize(size)
	objects[1].Resize(fyne.NewSize(size.Width*float32(b), size.Height))
}
