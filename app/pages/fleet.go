package pages

import (
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// fleetList is the list of assets at the left.
type fleetList struct {
	f      *Frame
	search *look.Search
	cards  *fyne.Container
	all    fyne.CanvasObject
	shown  map[string]*assetCard
	unread []fyne.CanvasObject // a word on each asset that cannot be opened
	sort   fleetSort
	sorted *linkText // says how the list is sorted; pressed, sorts it the next way
	most   int       // cards shown at once
	more   *linkText // shows further ones
}

// fleetCards is how many cards the list shows at first, and more at each wish:
// a thousand would take much memory, and nobody reads them.
const fleetCards = 100

func newFleetList(f *Frame) *fleetList {
	l := &fleetList{f: f, search: look.NewSearch(), cards: container.NewVBox(), shown: map[string]*assetCard{}, most: fleetCards}
	l.more = newLinkText(func() {
		l.most += fleetCards
		l.update()
	})
	l.search.SetPlaceHolder(say.T("find an asset"))
	l.search.OnChanged = func(string) {
		l.most = fleetCards
		l.update()
	}
	l.sorted = newLinkText(func() { l.sortBy(l.sort.next()) })
	l.sort = fleetSort(f.s.Setting("fleet sort"))
	head := container.NewBorder(nil, nil, look.Heading(say.T("Fleet")), f.rail.hide)
	background := canvas.NewRectangle(look.Color(look.ColorRail))
	l.all = &themed{do: func() { background.FillColor = look.Color(look.ColorRail); background.Refresh() }, object: container.NewStack(background,
		container.New(padded{}, container.NewBorder(container.NewVBox(head, l.search, l.sorted), nil, nil, nil, container.NewVScroll(l.cards))))}
	l.all.(*themed).ExtendBaseWidget(l.all.(*themed))
	return l
}

func (l *fleetList) content() fyne.CanvasObject { return l.all }

func (l *fleetList) update() {
	var objects []fyne.CanvasObject
	wanted := strings.ToLower(strings.TrimSpace(l.search.Text))
	l.sorted.set(l.sort.words() + " ▾")
	left := 0
	for _, item := range l.sort.in(l.f.s.Fleet()) {
		if !strings.Contains(strings.ToLower(item.Asset.Name+" "+session.Words(item.Asset.Kind)), wanted) {
			continue
		}
		if len(objects) >= l.most && !item.Open {
			left++
			continue
		}
		card := l.shown[item.ID]
		if card == nil {
			id := item.ID
			card = newAssetCard(func() {
				grid.CommitOpen() // into the asset that is still open
				l.f.s.Select(id)
			})
			l.shown[id] = card
		}
		card.set(item)
		objects = append(objects, card)
	}
	if left > 0 {
		l.more.set(say.T("and %d more ▾", left))
		objects = append(objects, l.more)
	}
	if len(objects) == 0 && wanted != "" {
		objects = append(objects, look.Note(say.T("No asset has this in its name or kind.")))
	}
	if l.unread == nil {
		for _, u := range l.f.s.Unread() {
			l.unread = append(l.unread, look.Wrong(say.T("⚠ %s cannot be opened and stays in the register as it is. %s", u.Name, u.Why)))
		}
	}
	objects = append(objects, l.unread...)
	if !slices.Equal(objects, l.cards.Objects) {
		l.cards.Objects = objects
		l.cards.Refresh()
	}
}

// assetCard shows one asset and opens it when pressed, by mouse or by keyboard.
type assetCard struct {
	widget.BaseWidget
	name, kind, dock, order *look.Text
	badge                   *look.Badge
	open, focused           bool
	item                    session.Summary // what is shown
	pressed                 func()
	box                     *canvas.Rectangle
	inside                  *fyne.Container
}

func newAssetCard(pressed func()) *assetCard {
	c := &assetCard{
		name: look.Strong(""), kind: look.Muted(""), dock: look.Muted(""), order: look.Muted(""),
		badge: look.StateBadge(look.StateSound, ""), pressed: pressed, box: canvas.NewRectangle(nil),
	}
	for _, t := range []*look.Text{c.name, c.kind, c.dock, c.order} {
		t.Shrink = true
	}
	c.inside = container.NewVBox(c.name, c.kind, c.dock, c.order, container.New(atMost{}, c.badge))
	c.ExtendBaseWidget(c)
	return c
}

func (c *assetCard) set(item session.Summary) {
	if item == c.item {
		return // a fleet has many
	}
	c.item = item
	c.open = item.Open
	c.name.SetText(item.Asset.Name)
	c.kind.SetText(kindText(item.Asset))
	c.dock.SetText(say.T("computing…"))
	c.order.SetText(" ")
	c.badge.Hide()
	if o := item.Outlook; o != nil {
		c.dock.SetText(say.T("no docking ahead"))
		if !o.Docking.IsZero() {
			c.dock.SetText(say.T("dock %s", session.Day(o.Docking)))
		}
		c.order.SetText(say.T("nothing to order"))
		if !o.OrderBy.IsZero() {
			c.order.SetText(say.T("order %s", inDays(int(o.OrderBy-o.Today))))
		}
		if o.State == plan.Sound {
			c.badge.Set(string(o.State), "")
			c.badge.Show()
		} else if o.State != "" {
			// The picture shows today; the list looks ahead.
			c.badge.Set(string(o.State), say.T("%s, by %s", say.Sentence(o.Cause), month(o.By)))
			c.badge.Show()
		}
	}
	c.Refresh()
}

func kindText(a *hull.Asset) string {
	s := session.Words(a.Kind)
	if p := a.Particulars; p != nil {
		if p.ShipType != "" && p.ShipType != "other" {
			s = say.In("ship type, kind", "%s %s", session.Words(p.ShipType), s)
		}
		if p.LengthPP > 0 {
			s += ", " + session.ShownWith(say.Length, p.LengthPP, 0)
		}
	}
	return s
}

// MouseDown opens the asset.
func (c *assetCard) MouseDown(*desktop.MouseEvent) {
	if canvas := fyne.CurrentApp().Driver().CanvasForObject(c); canvas != nil {
		canvas.Focus(c)
	}
	c.pressed()
}

// FocusGained implements fyne.Focusable.
func (c *assetCard) FocusGained() {
	c.focused = true
	c.Refresh()
}

// FocusLost implements fyne.Focusable.
func (c *assetCard) FocusLost() {
	c.focused = false
	c.Refresh()
}

// TypedRune implements fyne.Focusable.
func (c *assetCard) TypedRune(rune) {}

// TypedKey opens the asset at Enter and at Space, and goes on with the arrows.
func (c *assetCard) TypedKey(key *fyne.KeyEvent) {
	switch key.Name {
	case fyne.KeyReturn, fyne.KeyEnter, fyne.KeySpace:
		c.pressed()
	case fyne.KeyDown:
		fyne.CurrentApp().Driver().CanvasForObject(c).FocusNext()
	case fyne.KeyUp:
		fyne.CurrentApp().Driver().CanvasForObject(c).FocusPrevious()
	default:
		look.Forward(c, key)
	}
}

// MouseUp implements desktop.Mouseable.
func (c *assetCard) MouseUp(*desktop.MouseEvent) {}

// Cursor shows that the card can be pressed.
func (c *assetCard) Cursor() desktop.Cursor { return desktop.PointerCursor }

// CreateRenderer implements fyne.Widget.
func (c *assetCard) CreateRenderer() fyne.WidgetRenderer {
	return &cardRenderer{c, []fyne.CanvasObject{c.box, c.inside}}
}

type cardRenderer struct {
	c       *assetCard
	objects []fyne.CanvasObject
}

func (r *cardRenderer) Destroy()                     {}
func (r *cardRenderer) Objects() []fyne.CanvasObject { return r.objects }

func (r *cardRenderer) MinSize() fyne.Size {
	return fyne.NewSize(look.Px(120), r.c.inside.MinSize().Height+2*look.Px(8))
}

func (r *cardRenderer) Layout(size fyne.Size) {
	r.c.box.Resize(size)
	r.c.inside.Move(fyne.NewPos(look.Px(10), look.Px(8)))
	r.c.inside.Resize(size.Subtract(fyne.NewSize(look.Px(20), look.Px(16))))
}

func (r *cardRenderer) Refresh() {
	r.c.box.CornerRadius = look.Px(8)
	r.c.box.FillColor, r.c.box.StrokeColor = look.Color(look.ColorRail), look.Color(look.ColorRail)
	r.c.box.StrokeWidth = look.Px(1.5)
	if r.c.open {
		r.c.box.FillColor, r.c.box.StrokeColor = look.Color(look.ColorSurface), look.Color(look.ColorAccent)
	}
	if r.c.focused {
		r.c.box.StrokeColor, r.c.box.StrokeWidth = look.Color(look.ColorAccent), look.Px(2.5)
	}
	r.c.box.Refresh()
	r.c.inside.Refresh()
	r.Layout(r.c.Size())
}

// themed is an object that does something when the theme changes.
type themed struct {
	widget.BaseWidget
	object fyne.CanvasObject
	do     func()
}

// CreateRenderer implements fyne.Widget.
func (t *themed) CreateRenderer() fyne.WidgetRenderer {
	return &themedRenderer{widget.NewSimpleRenderer(t.object), t}
}

type themedRenderer struct {
	fyne.WidgetRenderer
	t *themed
}

func (r *themedRenderer) Refresh() {
	r.t.do()
	r.WidgetRenderer.Refresh()
}
