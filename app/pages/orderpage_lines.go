package pages

import (
	"fmt"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes"
	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// orderRows are the lines of an order by docking, each docking with its sum.
type orderRows struct {
	f   *Frame
	o   *plan.Outcome
	all []orderRow
}

// orderRow is a line, or the sum of a docking.
type orderRow struct {
	line  *order.Line
	total order.Total
}

// The columns of an order.
const (
	orderDue = iota
	orderDocking
	orderPattern
	orderPieces
	orderSpares
	orderStock
	orderBuy
	orderNet
	orderGross
	orderPrice
	orderFreight
)

func orderColumns(currency string, freight bool) []grid.Column {
	cols := []grid.Column{
		{Title: say.T("Order by"), Width: 140}, {Title: say.T("For docking"), Width: 114}, {Title: say.T("Pattern"), Width: 160, Fill: true},
		{Title: say.T("Pieces"), Width: 58, Right: true}, {Title: say.T("Spares"), Width: 62, Right: true, Edit: true},
		{Title: say.T("From stock"), Width: 86, Right: true, Edit: true}, {Title: say.T("To buy"), Width: 62, Right: true},
		{Title: say.T("Net"), Unit: say.Mass.Unit(), Width: 76, Right: true}, {Title: say.T("Gross"), Unit: say.Mass.Unit(), Width: 80, Right: true},
		{Title: say.T("Price"), Unit: currency, Width: 76, Right: true},
	}
	if freight {
		cols = append(cols, grid.Column{Title: say.T("Freight"), Unit: currency, Width: 70, Right: true})
	}
	return cols
}

// set takes the lines of an outcome; the sum of a docking only where it has
// several.
func (r *orderRows) set(o *plan.Outcome) {
	r.o, r.all = o, nil
	if o == nil {
		return
	}
	for _, t := range order.Totals(o.Asset, o.Order) {
		var lines []*order.Line
		for i := range o.Order {
			if o.Order[i].Docking == t.Docking {
				lines = append(lines, &o.Order[i])
			}
		}
		slices.SortStableFunc(lines, func(a, b *order.Line) int { return int(a.OrderBy - b.OrderBy) })
		for _, l := range lines {
			r.all = append(r.all, orderRow{line: l})
		}
		if len(lines) > 1 || t.Freight > 0 {
			r.all = append(r.all, orderRow{total: t})
		}
	}
}

// Rows implements grid.Source.
func (r *orderRows) Rows() int { return len(r.all) }

// Cell implements grid.Source.
func (r *orderRows) Cell(row, col int) grid.Cell {
	if row >= len(r.all) || r.o == nil {
		return grid.Cell{}
	}
	if l := r.all[row].line; l != nil {
		return r.lineCell(l, col)
	}
	t := r.all[row].total
	text := map[int]string{
		orderDue: say.T("in all"), orderDocking: session.Day(t.Docking), orderPieces: fmt.Sprint(t.Pieces), orderSpares: fmt.Sprint(t.Spares),
		orderStock: fmt.Sprint(t.FromStock), orderBuy: fmt.Sprint(t.Bought), orderNet: session.Shown(say.Mass, t.Net, 0), orderGross: session.Shown(say.Mass, t.Gross, 0),
		orderPrice: session.Figure(t.Price, 0), orderFreight: session.Figure(t.Freight, 0),
	}[col]
	return grid.Cell{Text: text, Muted: true, Bold: true}
}

func (r *orderRows) lineCell(l *order.Line, col int) grid.Cell {
	switch col {
	case orderDue:
		due := grid.Cell{Text: session.Day(l.OrderBy), Sub: inDays(int(l.OrderBy - r.o.Today)), Bold: true}
		switch {
		case l.Ordered == 0:
			due.Sub, due.Muted = say.T("nothing to buy"), true
		case l.Docking < r.o.Today:
			due.Sub = say.T("docking is past")
		case l.LateDays > 0:
			due.Fault = say.N("the order should have been out %d day ago", "the order should have been out %d days ago", l.LateDays)
		}
		return due
	case orderDocking:
		return grid.Cell{Text: session.Day(l.Docking)}
	case orderPattern:
		return grid.Cell{Text: patternName(l.Pattern), Sub: patternText(l.Pattern)}
	case orderPieces:
		return grid.Cell{Text: fmt.Sprint(l.Pieces)}
	case orderSpares:
		return r.sparesCell(l)
	case orderStock:
		c := grid.Cell{Text: fmt.Sprint(l.FromStock)}
		if n := r.f.s.StockOf(l.Pattern.ID); n > 0 {
			c.Sub = say.T("of %d", n)
		}
		return c
	case orderBuy:
		return grid.Cell{Text: fmt.Sprint(l.Ordered), Bold: true}
	case orderNet:
		return grid.Cell{Text: session.Shown(say.Mass, l.Net, 0)}
	case orderGross:
		return grid.Cell{Text: session.Shown(say.Mass, l.Gross, 0)}
	case orderPrice:
		return grid.Cell{Text: session.Figure(l.Price, 0)}
	}
	return grid.Cell{Text: session.Figure(l.Freight, 0)}
}

// sparesCell shows the spares, and how they are set.
func (r *orderRows) sparesCell(l *order.Line) grid.Cell {
	i, f := r.spares(l)
	if i < 0 {
		return grid.Cell{}
	}
	text, fault := r.f.s.Text(session.Patterns, i, f)
	if fault != "" {
		return grid.Cell{Text: text, Fault: say.Sentence(fault)}
	}
	c := grid.Cell{Text: fmt.Sprint(l.Spares)}
	if l.Pattern.SpareCount == nil {
		c.Sub = session.Figure(100*order.ShareOfSpares(r.o.Asset, l.Pattern), 0) + " %"
	}
	return c
}

// spares is the field of a line's spares, and the place of its pattern.
func (r *orderRows) spares(l *order.Line) (int, session.Field) {
	a := r.f.s.Asset()
	if a == nil {
		return -1, session.Field{}
	}
	i := slices.IndexFunc(a.Patterns, func(p hull.Pattern) bool { return p.ID == l.Pattern.ID })
	for _, f := range session.PatternFields() {
		if f.Key == "spare_share" {
			return i, f
		}
	}
	panic("pages: patterns have no field of spares")
}

// EditText implements grid.EditTexter: spares are edited as they are set, stock
// as the whole stock of the pattern.
func (r *orderRows) EditText(row, col int) string {
	if row >= len(r.all) || r.all[row].line == nil {
		return r.Cell(row, col).Text
	}
	l := r.all[row].line
	switch col {
	case orderSpares:
		if i, f := r.spares(l); i >= 0 {
			if text, _ := r.f.s.Text(session.Patterns, i, f); text != "" {
				return text
			}
			return fmt.Sprint(l.Spares)
		}
	case orderStock:
		return fmt.Sprint(r.f.s.StockOf(l.Pattern.ID))
	}
	return r.Cell(row, col).Text
}

// Commit implements grid.Source. Spares left as the share makes them stay so.
func (r *orderRows) Commit(row, col int, text string) {
	if row >= len(r.all) || r.all[row].line == nil || text == r.EditText(row, col) {
		return
	}
	l := r.all[row].line
	switch col {
	case orderSpares:
		if i, f := r.spares(l); i >= 0 {
			r.f.report(r.f.s.SetText(session.Patterns, i, f, text))
		}
	case orderStock:
		r.f.report(r.f.s.SetStock(l.Pattern.ID, text))
	}
}

// showLine says of the selected line what an order has to say, and what is
// next best where it is late.
func (p *orderPage) showLine() {
	o := p.rows.o
	row, _ := p.lines.Selected()
	var l *order.Line
	for k := max(row, 0); k < len(p.rows.all) && l == nil; k++ {
		l = p.rows.all[k].line
	}
	if o == nil || l == nil {
		p.about.set(look.Note(say.T("Select a line to see what its order has to say.")))
		return
	}
	q := l.Pattern
	objects := []fyne.CanvasObject{look.Lead(say.T("%d pieces of %s for the docking of %s", l.Ordered, patternName(q), session.Day(l.Docking)))}
	objects = append(objects, p.lateWords(l)...)
	add := func(name, text string) {
		if text = strings.TrimSpace(text); text != "" {
			label := look.Plain(name)
			label.SetColor(look.ColorMuted)
			objects = append(objects, container.New(named{150}, label, look.Body(text)))
		}
	}
	add(say.T("Item number"), q.ItemNo)
	add(say.T("Alloy"), say.Sentence(anodes.SpecificationText(q)))
	add(say.T("Certificate"), q.Certificate)
	add(say.T("Fixing"), q.Fixing)
	add(say.T("A piece"), say.T("%s net, %s gross, %s %s", mass(q.NetMass), mass(q.Gross()), session.Figure(q.Price, 2), o.Asset.Currency))
	add(say.T("Lead time"), say.T("%g weeks, and %g weeks of float", q.LeadWeeks, o.Asset.Costs.FloatWeeks))
	if q.OrderMultiple > 1 {
		add(say.T("Sold in"), say.T("multiples of %d", q.OrderMultiple))
	}
	p.about.set(objects...)
}

// lateWords says how late a line is, and what is next best.
func (p *orderPage) lateWords(l *order.Line) []fyne.CanvasObject {
	if l.LateDays == 0 || l.Docking < p.rows.o.Today {
		return nil
	}
	objects := []fyne.CanvasObject{look.Wrong("⚠ " + say.N("late by %d day", "late by %d days", l.LateDays))}
	bought, known := p.f.s.Purchase()
	if !known {
		return append(objects, look.Note(say.T("weighing what is next best…")))
	}
	for _, x := range bought.Late {
		if x.Docking == l.Docking && x.Pattern.ID == l.Pattern.ID {
			objects = append(objects, look.Note(say.T("Next best")))
			for _, s := range x.NextBest(p.rows.o.Asset) {
				objects = append(objects, look.Body("• "+say.Sentence(s)))
			}
		}
	}
	return objects
}

// patternText is a pattern's alloy and its number, if it has one.
func patternText(p *hull.Pattern) string {
	s := map[hull.Alloy]string{hull.Aluminium: say.T("aluminium"), hull.Zinc: say.T("zinc"), hull.Magnesium: say.T("magnesium")}[p.Alloy]
	if p.ItemNo != "" {
		s += say.T(", item %s", p.ItemNo)
	}
	return s
}

// mass writes a mass with its unit.
func mass(x float64) string { return kilograms(x) + " " + say.Mass.Unit() }

// named lays out a name at the left, as wide as given at text scale 1, and a
// text that wraps beside it.
type named struct{ width float32 }

// MinSize implements fyne.Layout.
func (n named) MinSize(objects []fyne.CanvasObject) fyne.Size {
	name, text := objects[0].MinSize(), objects[1].MinSize()
	return fyne.NewSize(look.Px(n.width)+text.Width, max(name.Height, text.Height))
}

// Layout implements fyne.Layout.
func (n named) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	w := min(look.Px(n.width), size.Width/2)
	objects[0].Resize(fyne.NewSize(w, objects[0].MinSize().Height))
	objects[0].Move(fyne.NewPos(0, 0))
	objects[1].Resize(fyne.NewSize(size.Width-w, size.Height))
	objects[1].Move(fyne.NewPos(w, 0))
}
