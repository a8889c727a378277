package pages

import (
	"errors"
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/layout"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/hull/propose"
)

// newAsset asks what the asset is and shows, as its particulars are entered,
// the zones that will be proposed.
func (f *Frame) newAsset() {
	n := &assetForm{f: f, form: propose.Form{Kind: hull.Ship, Ship: "general-cargo"}}
	n.build()
	n.d.Show()
	f.win.Canvas().Focus(n.name)
}

// assetForm is the form of a new asset.
type assetForm struct {
	f      *Frame
	d      *dialog.CustomDialog
	form   propose.Form
	name   *formEntry
	kinds  *choice
	types  *choice
	typed  *container.Scroll     // of the types, shown for ships
	texts  map[string]*formEntry // by the particular's key
	body   *fyne.Container
	fields *fyne.Container
	scroll *container.Scroll
	zones  *scrolled
	title  *look.Text
	hint   *look.Paragraph
	wrong  *look.Paragraph
}

func (n *assetForm) build() {
	n.name = n.entry(say.T("The name in the fleet; it can be changed later."))
	n.name.SetPlaceHolder(say.T("name of the ship, unit or structure"))
	n.kinds = newChoice(hull.Kind("").Words(), string(n.form.Kind), func(word string) {
		n.form.Kind = hull.Kind(word)
		n.showFields()
	})
	n.types = newChoice(hull.ShipType("").Words(), string(n.form.Ship), func(word string) {
		n.form.Ship = hull.ShipType(word)
		n.update()
	})
	n.fields = container.New(layoutOfFields{})
	n.scroll = container.NewVScroll(n.fields)
	n.zones = newScrolled()
	n.title = look.Heading("")
	n.title.Shrink = true
	n.hint, n.wrong = look.Note(""), look.Wrong("")
	n.typed = container.NewHScroll(n.types.row)
	head := container.NewVBox(
		container.NewBorder(nil, nil, look.Strong(say.T("Name")), nil, n.name), container.NewHScroll(n.kinds.row), n.typed)
	preview := container.NewBorder(container.NewVBox(n.title, look.Note(say.T("A place to start from: correct every figure from drawings and surveys."))), nil, nil, nil, n.zones.scroll)
	body := topDown(head, container.New(beside{500}, n.scroll, preview), container.NewVBox(n.hint, n.wrong))
	n.body = body
	n.d = dialog.NewCustomWithoutButtons(say.T("New asset"), body, n.f.win)
	cancel, ok := look.Button(say.T("Cancel"), n.hide), look.AccentButton(say.T("Make it"), n.make)
	for _, b := range append(append([]*look.PushButton{cancel, ok}, n.kinds.buttons...), n.types.buttons...) {
		b.OnEscape = n.hide
	}
	n.d.SetButtons([]fyne.CanvasObject{cancel, ok})
	n.showFields()
	n.d.Resize(dialogSize(n.f.win, 1060, 720))
}

// topDown lays out a head, a middle that takes the rest, and a foot. Other than
// Fyne's border container it keeps them in this order for the Tab key too.
func topDown(head, middle, foot fyne.CanvasObject) *fyne.Container {
	return container.New(layout.NewBorderLayout(head, foot, nil, nil), head, middle, foot)
}

// dialogSize is a size at text scale 1, as far as the window has room.
func dialogSize(win fyne.Window, width, height float32) fyne.Size {
	room := win.Canvas().Size().Subtract(fyne.NewSize(24, 24))
	return fyne.NewSize(min(look.Px(width), room.Width), min(look.Px(height), room.Height))
}

// showFields shows the particulars of the chosen kind, empty.
func (n *assetForm) showFields() {
	n.form.Entered = map[string]float64{}
	n.texts = map[string]*formEntry{}
	n.fields.RemoveAll()
	if n.form.Kind == hull.Ship {
		n.typed.Show()
	} else {
		n.typed.Hide()
	}
	for _, field := range n.form.Fields() {
		text := say.T(field.Hint)
		if text == "" {
			text = say.T(field.Title) + "."
		}
		e := n.entry(say.T("%s Empty: the value shown.", text))
		label := look.Plain(say.T(field.Title))
		label.Shrink = true
		n.texts[field.Key] = e
		n.fields.Add(label)
		n.fields.Add(e)
		n.fields.Add(look.Muted(say.Unit(field.Unit)))
	}
	n.body.Refresh() // the types' row has come or gone
	n.scroll.Offset = fyne.Position{}
	n.scroll.Refresh()
	n.update()
}

// entry returns an entry that says what it is for, comes into view when it gets
// the keyboard, makes the asset on Enter and closes the form on Escape.
func (n *assetForm) entry(hint string) *formEntry {
	e := &formEntry{escape: n.hide}
	e.ExtendBaseWidget(e)
	e.gained = func() {
		n.hint.SetText(hint)
		n.reveal(e)
	}
	e.OnChanged = func(string) { n.update() }
	e.OnSubmitted = func(string) { n.make() }
	return e
}

// reveal scrolls a particular into view.
func (n *assetForm) reveal(e *formEntry) {
	if n.scroll == nil || e == n.name {
		return
	}
	top, bottom := e.Position().Y, e.Position().Y+e.Size().Height
	switch view := n.scroll.Size().Height; {
	case top < n.scroll.Offset.Y:
		n.scroll.Offset.Y = top
	case bottom > n.scroll.Offset.Y+view:
		n.scroll.Offset.Y = bottom - view
	default:
		return
	}
	n.scroll.Refresh()
}

// read takes over what was entered.
func (n *assetForm) read() error {
	n.form.Entered = map[string]float64{}
	for _, field := range n.form.Fields() {
		text := strings.TrimSpace(n.texts[field.Key].Text)
		if text == "" {
			continue
		}
		x, err := session.ParseShown(say.Of(field.Unit), text)
		if err != nil {
			return fmt.Errorf("%s: %w", field.Title, err)
		}
		n.form.Entered[field.Key] = x
	}
	return nil
}

// update shows the start values and the zones that follow from what is entered.
func (n *assetForm) update() {
	if len(n.texts) == 0 {
		return // not built yet
	}
	err := n.read()
	for _, field := range n.form.Fields() {
		n.texts[field.Key].SetPlaceHolder(whole(say.Of(field.Unit), n.form.Start(field.Key)))
	}
	var p propose.Proposal
	if err == nil {
		p, err = session.Propose(n.form)
	}
	if err != nil {
		n.title.SetText(say.T("No zones"))
		n.wrong.SetText(n.inWords(err))
		n.zones.set()
		return
	}
	n.wrong.SetText("")
	n.title.SetText(say.T("%d zones", len(p.Zones)))
	names := map[string]string{}
	for _, z := range p.Zones {
		names[z.ID] = z.Name
	}
	var rows []fyne.CanvasObject
	for _, z := range p.Zones {
		name := look.Strong(z.Name)
		name.Shrink = true
		rows = append(rows, container.NewBorder(nil, nil, nil, look.Plain(areaText(z.WettedArea)), name))
		held := say.T("own anodes")
		if z.HeldBy != "" {
			held = say.T("held by %s", strings.ToLower(names[z.HeldBy][:1])+names[z.HeldBy][1:])
		} else if z.CountMultiple > 1 {
			held += " " + say.T("in steps of %d", z.CountMultiple)
		}
		e := p.Estimates[z.ID]
		rows = append(rows, look.Note(say.T("%s, %s deep · %s", held, session.ShownWith(say.Length, z.Depth, 1), say.Sentence(e.Formula))))
	}
	n.zones.set(rows...)
}

// inWords writes a fault with the particulars' titles in place of their keys.
func (n *assetForm) inWords(err error) string {
	titled := func(f hull.Fault) hull.Fault {
		for _, field := range n.form.Fields() {
			if field.Key == f.Path {
				f.Path = say.T(field.Title)
			}
		}
		return f
	}
	var faults hull.Faults
	var fault hull.Fault
	switch {
	case errors.As(err, &faults):
		return inWords(titled(faults[0]))
	case errors.As(err, &fault):
		return inWords(titled(fault))
	}
	return inWords(err)
}

// make adds the asset, or says what is wrong.
func (n *assetForm) make() {
	err := n.read()
	if err == nil {
		err = n.f.s.AddProposed(n.name.Text, n.form)
	}
	if err != nil {
		n.wrong.SetText(n.inWords(err))
		if strings.TrimSpace(n.name.Text) == "" {
			n.f.win.Canvas().Focus(n.name)
		}
		return
	}
	n.hide()
	n.f.show(0) // where its figures are corrected
}

func (n *assetForm) hide() { n.f.hide(n.d) }

// areaText writes an area for people.
func areaText(m2 float64) string {
	if m2 < 100 {
		return session.ShownWith(say.Area, m2, 1)
	}
	return session.ShownWith(say.Area, m2, 0)
}

// formEntry is an entry of a form in a dialog.
type formEntry struct {
	widget.Entry
	gained func()
	escape func()
}

// FocusGained implements fyne.Focusable.
func (e *formEntry) FocusGained() {
	e.Entry.FocusGained()
	if e.gained != nil {
		e.gained()
	}
}

// TypedKey implements fyne.Focusable.
func (e *formEntry) TypedKey(key *fyne.KeyEvent) {
	if key.Name == fyne.KeyEscape && e.escape != nil {
		e.escape()
		return
	}
	e.Entry.TypedKey(key)
}

// choice is a row of buttons of which one is chosen.
type choice struct {
	row     *fyne.Container
	words   []string
	buttons []*look.PushButton
	chosen  func(word string)
}

func newChoice(words []string, at string, chosen func(word string)) *choice {
	c := &choice{row: container.NewHBox(), words: words, chosen: chosen}
	for _, w := range words {
		b := look.QuietButton("", func() {
			c.mark(w)
			c.chosen(w)
		})
		c.buttons = append(c.buttons, b)
		c.row.Add(b)
	}
	c.mark(at)
	return c
}

// mark shows which word is chosen, by its fill and by a tick.
func (c *choice) mark(word string) {
	for i, b := range c.buttons {
		b.Importance, b.Text = widget.LowImportance, session.Words(c.words[i])
		if c.words[i] == word {
			b.Importance, b.Text = widget.MediumImportance, "✓ "+b.Text
		}
		b.Refresh()
	}
	c.row.Refresh() // the tick makes a button wider
}

// layoutOfFields lays out a form in rows of three objects: a label, an entry
// and a unit.
type layoutOfFields struct{}

func (layoutOfFields) sizes() (entry, unit float32) { return look.Px(120), look.Px(52) }

func (l layoutOfFields) MinSize(objects []fyne.CanvasObject) fyne.Size {
	entry, unit := l.sizes()
	size := fyne.NewSize(look.Px(120)+entry+unit, 0)
	for i := 1; i < len(objects); i += 3 {
		size.Height += objects[i].MinSize().Height + columnGap()
	}
	return size
}

func (l layoutOfFields) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	entry, unit := l.sizes()
	y := float32(0)
	for i := 0; i+2 < len(objects); i += 3 {
		h := objects[i+1].MinSize().Height
		x := size.Width - entry - unit
		for k, w := range []float32{x - gap(), entry, unit - gap()} {
			at := []float32{0, x, x + entry + gap()}[k]
			objects[i+k].Resize(fyne.NewSize(w, h))
			objects[i+k].Move(fyne.NewPos(at, y))
		}
		y += h + columnGap()
	}
}
