package pages

import (
	"fmt"
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// orderPage is what has to be bought, and when the order must be out.
type orderPage struct {
	f     *Frame
	lines *grid.Grid
	cells *fixed
	card  *look.CardBox
	note  *look.Paragraph
	list  *scrolled
	all   fyne.CanvasObject

	currency string // in the head
}

func newOrder(f *Frame) *orderPage {
	p := &orderPage{f: f, cells: &fixed{}, note: look.Note(""), list: newScrolled()}
	p.lines = grid.New(orderColumns(""), p.cells, grid.RowHeight(40))
	p.card = look.Card(say.T("Order"), container.NewBorder(nil, p.note, nil, nil, p.lines))
	cautions := look.Card(say.T("Cautions"), p.list.scroll)
	p.all = container.New(above{250, 0.45}, p.card, cautions)
	return p
}

func (p *orderPage) title() string              { return say.T("Order") }
func (p *orderPage) content() fyne.CanvasObject { return p.all }
func (p *orderPage) first() *grid.Grid          { return p.lines }

func orderColumns(currency string) []grid.Column {
	return []grid.Column{
		{Title: say.T("Order by"), Width: 118}, {Title: say.T("For docking"), Width: 108}, {Title: say.T("Pattern"), Width: 262, Fill: true},
		{Title: say.T("Pieces"), Width: 62, Right: true}, {Title: say.T("Spares"), Width: 62, Right: true},
		{Title: say.T("In stock"), Width: 66, Right: true}, {Title: say.T("To buy"), Width: 66, Right: true},
		{Title: say.T("Net"), Unit: "kg", Width: 76, Right: true}, {Title: say.T("Gross"), Unit: "kg", Width: 76, Right: true},
		{Title: say.T("Price"), Unit: currency, Width: 90, Right: true},
	}
}

func (p *orderPage) update() {
	var cells [][]grid.Cell
	o := p.f.s.Outcome()
	if o == nil {
		p.cells.cells = nil
		p.lines.Refresh()
		return
	}
	total := 0.0
	if currency := o.Asset.Currency; currency != p.currency {
		p.currency = currency
		p.lines.SetColumns(orderColumns(currency))
	}
	lines := slices.Clone(o.Order)
	slices.SortStableFunc(lines, func(a, b order.Line) int { return int(a.OrderBy - b.OrderBy) })
	for _, l := range lines {
		due := grid.Cell{Text: session.Day(l.OrderBy), Sub: inDays(int(l.OrderBy - o.Today)), Bold: true}
		if l.LateDays > 0 {
			due.Fault = say.N("the order should have been out %d day ago", "the order should have been out %d days ago", l.LateDays)
		}
		name := l.Pattern.Name
		if name == "" {
			name = l.Pattern.ID
		}
		cells = append(cells, []grid.Cell{
			due, {Text: session.Day(l.Docking)}, {Text: name, Sub: patternText(l.Pattern)},
			{Text: fmt.Sprint(l.Pieces)}, {Text: fmt.Sprint(l.Spares)}, {Text: fmt.Sprint(l.FromStock)}, {Text: fmt.Sprint(l.Ordered), Bold: true},
			{Text: session.Figure(l.Net, 0)}, {Text: session.Figure(l.Gross, 0)}, {Text: session.Figure(l.Price, 0)},
		})
		total += l.Price
	}
	p.cells.cells = cells
	p.card.SetExtra(look.Accented(say.T("to buy %s %s", session.Figure(total, 0), o.Asset.Currency)))
	p.note.SetText(say.T("To buy: pieces and spares less what is in stock, up to a full multiple that the pattern is sold in. Spares are 5 % rounded up: common practice, no source. Prices undiscounted. Order by: docking less lead time and float."))
	if len(o.Order) == 0 {
		p.note.SetText(say.T("Nothing has to be bought: what is fitted lasts, or no docking lies ahead."))
	}
	p.lines.Refresh()
	var cautions []fyne.CanvasObject
	for _, c := range o.AllCautions() {
		where := ""
		if c.Zone >= 0 {
			where = o.Asset.Zones[c.Zone].Name + ": "
		}
		cautions = append(cautions, look.Body("• "+where+say.Sentence(c.Text)))
	}
	p.list.set(append(cautions, look.Note(say.T(plan.Closing)))...)
}

// patternText is a pattern's alloy and its number, if it has one.
func patternText(p *hull.Pattern) string {
	s := map[hull.Alloy]string{hull.Aluminium: say.T("aluminium"), hull.Zinc: say.T("zinc"), hull.Magnesium: say.T("magnesium")}[p.Alloy]
	if p.ItemNo != "" {
		s += say.T(", item %s", p.ItemNo)
	}
	return s
}
