package pages

import (
	"fmt"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/session"
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
}

func newOrder(f *Frame) *orderPage {
	p := &orderPage{f: f, cells: &fixed{}, note: look.Note(""), list: newScrolled()}
	p.lines = grid.New([]grid.Column{
		{Title: "Order by", Width: 118}, {Title: "For docking", Width: 104}, {Title: "Pattern", Width: 190, Fill: true},
		{Title: "Alloy", Width: 76}, {Title: "Pieces", Width: 62, Right: true}, {Title: "Spares", Width: 62, Right: true},
		{Title: "In stock", Width: 66, Right: true}, {Title: "To buy", Width: 66, Right: true},
		{Title: "Net", Unit: "kg", Width: 76, Right: true}, {Title: "Gross", Unit: "kg", Width: 76, Right: true},
		{Title: "Price", Width: 90, Right: true},
	}, p.cells, grid.RowHeight(40))
	p.card = look.Card("Order", container.NewBorder(nil, p.note, nil, nil, p.lines))
	cautions := look.Card("Cautions", p.list.scroll)
	p.all = container.New(above{250, 0.45}, p.card, cautions)
	return p
}

func (p *orderPage) title() string              { return "Order" }
func (p *orderPage) content() fyne.CanvasObject { return p.all }

func (p *orderPage) update() {
	var cells [][]grid.Cell
	o := p.f.s.Outcome()
	if o == nil {
		p.cells.cells = nil
		p.lines.Refresh()
		return
	}
	total := 0.0
	for _, l := range o.Order {
		due := grid.Cell{Text: session.Day(l.OrderBy), Sub: inDays(int(l.OrderBy - o.Today)), Bold: true}
		if l.LateDays > 0 {
			due.Fault = "the order should have been out " + inDays(-l.LateDays)[len("late "):] + " ago"
		}
		name := l.Pattern.Name
		if name == "" {
			name = l.Pattern.ID
		}
		cells = append(cells, []grid.Cell{
			due, {Text: session.Day(l.Docking)}, {Text: name, Sub: l.Pattern.ItemNo}, {Text: string(l.Pattern.Alloy)},
			{Text: fmt.Sprint(l.Pieces)}, {Text: fmt.Sprint(l.Spares)}, {Text: fmt.Sprint(l.FromStock)}, {Text: fmt.Sprint(l.Ordered), Bold: true},
			{Text: session.Figure(l.Net, 0)}, {Text: session.Figure(l.Gross, 0)}, {Text: session.Figure(l.Price, 0)},
		})
		total += l.Price
	}
	p.cells.cells = cells
	p.card.SetExtra(look.Accented(fmt.Sprintf("to buy %s %s", session.Figure(total, 0), o.Asset.Currency)))
	p.note.SetText("Spares are 5 % rounded up: common practice, no source. Prices undiscounted. Order by: docking less lead time and float.")
	if len(o.Order) == 0 {
		p.note.SetText("Nothing has to be bought: what is fitted lasts, or no docking lies ahead.")
	}
	p.lines.Refresh()
	var cautions []fyne.CanvasObject
	for _, c := range append(append([]plan.Caution(nil), o.Cautions...), plan.Usual()...) {
		where := ""
		if c.Zone >= 0 {
			where = o.Asset.Zones[c.Zone].Name + ": "
		}
		cautions = append(cautions, look.Body("• "+where+c.Text))
	}
	p.list.set(append(cautions, look.Note(plan.Closing))...)
}
