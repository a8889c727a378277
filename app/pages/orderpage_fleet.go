package pages

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/order"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/storage/workbook"
)

// fleetOrder is the orders of the whole fleet: by month, late ones first, and
// those that could go out together.
type fleetOrder struct {
	f       *Frame
	months  *grid.Grid
	cells   *fixed
	members []int // of each row, -1 for a month's sum
	card    *look.CardBox
	weeks   *formEntry
	rest    *look.PushButton
	words   *scrolled
	orders  *session.FleetOrders // that are shown; nil before any are known
	content fyne.CanvasObject
}

// joinWeeks is how close order-by dates lie to be joined: our own choice.
const joinWeeks = 4

func newFleetOrder(f *Frame, back func()) *fleetOrder {
	v := &fleetOrder{f: f, cells: &fixed{}, words: newScrolled()}
	v.months = grid.New([]grid.Column{
		{Title: say.T("Month"), Width: 94}, {Title: say.T("Asset"), Width: 160, Fill: true}, {Title: say.T("First order by"), Width: 112},
		{Title: say.T("Pieces"), Width: 64, Right: true}, {Title: say.T("Gross"), Unit: say.Mass.Unit(), Width: 76, Right: true},
		{Title: say.T("Price"), Width: 112, Right: true}, {Title: say.T("Freight"), Width: 76, Right: true},
	}, v.cells, grid.Dense())
	v.months.OnOpen = func(row, _ int) { v.open(row) }
	v.card = look.Card(say.T("Orders of the fleet by month"), v.months)
	v.weeks = &formEntry{}
	v.weeks.ExtendBaseWidget(v.weeks)
	v.weeks.SetText(fmt.Sprint(joinWeeks))
	v.weeks.OnChanged = func(string) { v.update() }
	v.rest = look.Button("", func() {
		_, _, rests := f.s.FleetProgress()
		f.s.RestFleet(!rests)
	})
	v.rest.Hide()
	v.card.SetExtra(container.NewHBox(v.rest,
		look.Button(say.T("Copy as text"), v.copy),
		look.Button(say.T("Export…"), v.export),
		look.Button(say.T("This asset"), back)))
	within := container.NewHBox(look.Plain(say.T("Join order dates within")), container.New(fixedWidth{52}, v.weeks), look.Plain(say.T("weeks")))
	side := look.Card(say.T("Late and joined orders"), container.NewBorder(within, nil, nil, nil, v.words.scroll))
	v.content = container.New(beside{300}, v.card, side)
	return v
}

func (v *fleetOrder) update() {
	weeks, err := session.ParseNumber(strings.TrimSpace(v.weeks.Text))
	if err != nil || weeks < 0 || weeks > 520 {
		weeks = joinWeeks
	}
	computed, of, rests := v.f.s.FleetProgress()
	title := say.T("Orders of the fleet by month")
	switch {
	case computed < of && rests:
		title = say.T("Orders of the fleet: %d of %d assets, the rest waits", computed, of)
		v.rest.SetText(say.T("Go on"))
		v.rest.Show()
	case computed < of:
		title = say.T("Orders of the fleet: %d of %d assets, computing…", computed, of)
		v.rest.SetText(say.T("Stop"))
		v.rest.Show()
	default:
		v.rest.Hide()
	}
	v.card.SetTitle(title)
	if orders := v.f.s.FleetOrders(weeks); orders != v.orders && orders != nil {
		v.orders = orders
		v.list()
		v.say()
	}
}

// list writes the months with the assets of each.
func (v *fleetOrder) list() {
	v.cells.cells, v.members = nil, nil
	add := func(member int, cells ...grid.Cell) {
		v.cells.cells, v.members = append(v.cells.cells, cells), append(v.members, member)
	}
	for _, m := range v.orders.Months {
		for k, sum := range m.Money {
			row := []grid.Cell{{}, {}, {}, {}, {}, {Text: money(sum.Price, sum.Currency), Bold: true}, {Text: freightText(sum.Freight), Muted: true}}
			if k == 0 {
				row[0] = grid.Cell{Text: monthName(m), Bold: true}
				if m.First.IsZero() {
					row[0].Fault = say.T("these orders should have been out")
				}
				row[1] = grid.Cell{Text: say.N("%d asset", "%d assets", len(m.Shares)), Muted: true}
				row[3], row[4] = grid.Cell{Text: fmt.Sprint(m.Pieces), Bold: true}, grid.Cell{Text: session.Shown(say.Mass, m.Gross, 0), Bold: true}
			}
			add(-1, row...)
		}
		for _, s := range m.Shares {
			add(s.Member, grid.Cell{}, grid.Cell{Text: v.orders.Fleet[s.Member].Name}, grid.Cell{Text: session.Day(s.By)}, grid.Cell{Text: fmt.Sprint(s.Pieces)},
				grid.Cell{Text: session.Shown(say.Mass, s.Gross, 0)}, grid.Cell{Text: money(s.Price, s.Currency)}, grid.Cell{Text: freightText(s.Freight), Muted: true})
		}
	}
	v.months.Refresh()
}

func monthName(m order.Month) string {
	if m.First.IsZero() {
		return say.T("late")
	}
	return month(m.First)
}

func freightText(x float64) string {
	if x == 0 {
		return ""
	}
	return session.Figure(x, 0)
}

func money(x float64, currency string) string {
	return strings.TrimSpace(session.Figure(x, 0) + " " + currency)
}

// say writes the late orders, then those that could be joined.
func (v *fleetOrder) say() {
	var objects []fyne.CanvasObject
	name := func(d order.Due) string { return v.orders.Fleet[d.Member].Name }
	for _, d := range v.orders.Late {
		objects = append(objects, look.Wrong("⚠ "+say.N("%[2]s: %[3]d of %[4]s for %[5]s, late by %[1]d day", "%[2]s: %[3]d of %[4]s for %[5]s, late by %[1]d days",
			d.LateDays, d.LateDays, name(d), d.Ordered, d.Pattern.ID, session.Day(d.Docking))))
	}
	if len(v.orders.Late) == 0 {
		objects = append(objects, look.Body(say.T("No order of the fleet is late.")))
	}
	objects = append(objects, lift(4))
	for _, j := range v.orders.Joins {
		by := say.T("%d of %s by %s", j.Joined, patternName(j.Pattern), session.Day(j.By))
		if j.Lines[0].LateDays > 0 {
			by = say.T("%d of %s now: one of them is late", j.Joined, patternName(j.Pattern))
		}
		objects = append(objects, look.Lead(by))
		text := say.T("%s gross in one order", session.ShownWith(say.Mass, j.Gross, 0))
		if saved := j.Pieces - j.Joined; saved > 0 {
			text += say.N("; %d piece less than one by one, for the multiples it is sold in", "; %d pieces less than one by one, for the multiples it is sold in", saved)
		}
		objects = append(objects, look.Note(text))
		for _, d := range j.Lines {
			objects = append(objects, look.Note(say.T("• %s: %d for %s, by itself by %s", name(d), d.Ordered, session.Day(d.Docking), session.Day(d.OrderBy))))
		}
	}
	if len(v.orders.Joins) == 0 {
		objects = append(objects, look.Note(say.T("No two assets order the same casting within that time: id, alloy, shape and masses have to agree.")))
	}
	v.words.set(objects...)
}

// open opens the asset of a row, on its own order.
func (v *fleetOrder) open(row int) {
	if v.orders != nil && row < len(v.members) && v.members[row] >= 0 {
		v.f.s.Select(v.orders.IDs[v.members[row]])
		for _, p := range v.f.pages {
			if p, ok := p.(*orderPage); ok {
				p.whole = false
			}
		}
		v.f.Update()
		v.f.focusPage()
	}
}

// copy puts the calendar on the clipboard as tab-separated text.
func (v *fleetOrder) copy() { v.f.app.Clipboard().SetContent(v.months.CopyAll()) }

// export writes the calendar as a workbook.
func (v *fleetOrder) export() {
	calendar := v.orders
	if calendar == nil {
		return
	}
	v.f.export(say.T("Export the fleet's orders as an Excel workbook"), "fleet orders.xlsx", func(path string) error {
		return workbook.WriteFleet(path, v.f.s.Today(), calendar.Fleet, calendar.Calendar)
	})
}
