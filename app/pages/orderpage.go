package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// orderPage is what has to be bought, and when the order must be out: for the
// open asset with its terms and its staged purchase, or for the whole fleet.
type orderPage struct {
	f     *Frame
	fleet *fleetOrder
	whole bool // the fleet is shown

	rows   *orderRows
	lines  *grid.Grid
	card   *look.CardBox
	total  *look.Text
	note   *look.Paragraph
	about  *scrolled // the selected line
	terms  *grid.Grid
	hint   *look.Paragraph
	staged *stagedView
	list   *scrolled // cautions
	last   *lastTime
	drawer *drawer
	parts  *tabs // of the lower part
	asset  fyne.CanvasObject
	all    *fyne.Container

	currency string // in the head
	freight  bool   // there is a column of it
}

func newOrder(f *Frame) *orderPage {
	p := &orderPage{f: f, total: look.Accented(""), note: look.Note(""), about: newScrolled(), hint: look.Note(""), list: newScrolled()}
	p.rows = &orderRows{f: f}
	p.lines = grid.New(orderColumns("", false), p.rows, grid.RowHeight(38))
	p.lines.OnSelect = func(int, int) { p.showLine() }
	p.card = look.Card(say.T("Order"), container.NewBorder(nil, p.note, nil, nil, p.lines))
	p.card.SetExtra(container.NewHBox(p.total, spacer(6), look.Button(say.T("Whole fleet"), func() { p.turn(true) })))
	p.drawer = newDrawer(f, "Order", p.card, p.lowerCard(), 226, func() float32 {
		return p.card.Around() + p.lines.HeightOf(3) + p.note.MinSize().Height
	})
	p.asset = p.drawer.all
	p.fleet = newFleetOrder(f, func() { p.turn(false) })
	p.all = container.NewStack(p.asset, p.fleet.content)
	return p
}

// turn shows the whole fleet, or the open asset.
func (p *orderPage) turn(whole bool) {
	grid.CommitOpen()
	p.whole = whole
	p.update()
	p.all.Refresh()
	p.f.focusPage()
}

// lowerCard is what stands below the lines: the staged purchase, the selected
// line in words, the terms of the order, and the cautions.
func (p *orderPage) lowerCard() *look.CardBox {
	p.staged, p.last = newStagedView(p.f), newLastTime(p.f)
	terms := fieldLines{p.f, session.Whole, func() int { return 0 }, session.OrderFields()}
	cols := terms.columns()
	cols[0].Width = 210
	p.terms = grid.New(cols, terms, grid.Dense())
	p.hint.SetText(say.T("Staged purchase: how many to order unseen follows from what a piece too many and one too few cost. Without a rush price of yours it is 3 times the price: our own choice."))
	p.terms.OnSelect = func(row, _ int) { p.hint.SetText(say.T(terms.fields[row].Hint)) }
	parts := container.NewStack(p.staged.content, p.last.list.scroll, p.about.scroll, container.New(beside{420}, p.terms, p.hint), p.list.scroll)
	p.parts = partTabs(parts, say.T("Staged purchase"), say.T("Last time"), say.T("Selected line"), say.T("Terms"), say.T("Cautions"))
	show := p.parts.buttons[1].OnTapped
	p.parts.buttons[1].OnTapped = func() {
		show()
		p.last.update() // it is only computed once it is looked at
	}
	card := look.Card(say.T("Before the order goes out"), parts)
	card.SetExtra(p.parts.row)
	return card
}

// partTabs is a row of tabs of which each shows its object of a stack.
func partTabs(parts *fyne.Container, titles ...string) *tabs {
	var t *tabs
	show := func(i int) {
		grid.CommitOpen()
		for k, part := range parts.Objects {
			if k == i {
				part.Show()
			} else {
				part.Hide()
			}
		}
		t.mark(i)
		parts.Refresh()
	}
	t = newTabs(titles, show)
	show(0)
	return t
}

func (p *orderPage) title() string              { return say.T("Order") }
func (p *orderPage) content() fyne.CanvasObject { return p.all }
func (p *orderPage) lower() *drawer             { return p.drawer }

func (p *orderPage) first() *grid.Grid {
	if p.whole {
		return p.fleet.months
	}
	return p.lines
}

func (p *orderPage) update() {
	if p.whole {
		p.asset.Hide()
		p.fleet.content.Show()
		p.fleet.update()
		return
	}
	p.fleet.content.Hide()
	p.asset.Show()
	o := p.f.s.Outcome()
	p.parts.mark(p.parts.chosen()) // in the theme's colour
	p.rows.set(o)
	if o == nil {
		p.lines.Refresh()
		return
	}
	costs := o.Asset.Costs
	freight := costs.FreightPerKg > 0 || costs.FreightPerOrder > 0
	if o.Asset.Currency != p.currency || freight != p.freight {
		p.currency, p.freight = o.Asset.Currency, freight
		p.lines.SetColumns(orderColumns(p.currency, freight))
	}
	sum := order.Sum(order.Totals(o.Asset, o.Order))
	text := say.T("to buy %s %s", session.Figure(sum.Price, 0), p.currency)
	if freight {
		text += say.T(" and freight %s", session.Figure(sum.Freight, 0))
	}
	p.total.SetText(text)
	p.card.Refresh()
	p.note.SetText(say.T("To buy: pieces and spares less what is in stock, up to a full multiple that the pattern is sold in. Type over spares and stock; shares, freight and rush stand under Terms. Prices undiscounted."))
	if len(o.Order) == 0 {
		p.note.SetText(say.T("Nothing has to be bought: what is fitted lasts, or no docking lies ahead."))
	}
	p.lines.Refresh()
	p.terms.Refresh()
	p.showLine()
	p.staged.update()
	p.last.update()
	p.drawer.say(say.T("Staged purchase, last time, terms of the order, cautions"))
	p.showCautions(o)
}

func (p *orderPage) showCautions(o *plan.Outcome) {
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
