package pages

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// band is what stands above the pages: a line with the date and what the
// mouse is on, the picture, and the strip of dates. It folds to the line.
type band struct {
	f     *Frame
	date  *look.Text
	line  *look.Text
	fold  *linkText
	view  *pictureView
	strip *dateStrip
	panel *canvas.Rectangle
	all   *fyne.Container

	choice  string // "open", "folded", or "" for as there is room
	height  float32
	outcome *plan.Outcome
	states  *plan.States
	over    string // what the mouse is on, in words
}

func newBand(f *Frame) *band {
	b := &band{f: f, date: look.Accented(""), line: look.Muted(""), panel: canvas.NewRectangle(nil)}
	b.fold = newLinkText(f.toggleBand)
	b.view = newPictureView(f.pickZone, func(zone int) {
		words := ""
		if zone >= 0 {
			words = b.view.asset.Zones[zone].Name + " · " + b.view.words(zone)
		}
		b.say(words)
	})
	b.strip = newDateStrip(f.setCursor, b.say)
	panel := &themed{object: b.panel, do: b.paint}
	panel.ExtendBaseWidget(panel)
	b.all = container.New(b, panel, b.date, b.line, b.fold, b.view, b.strip)
	b.paint()
	return b
}

func (b *band) paint() {
	b.panel.FillColor, b.panel.StrokeColor = look.Color(look.ColorSurface), look.Color(look.ColorLine)
	b.panel.StrokeWidth, b.panel.CornerRadius = 1, 8
	b.panel.Refresh()
}

// say shows words in the line; with none it tells of all zones.
func (b *band) say(words string) {
	b.over = words
	b.write()
}

// least is the height that picture and strip need at least.
func least() float32 { return look.Px(152) }

// heightIn is how high the band is in a window with this much room below its
// menu. It takes no more than 30 % of it, and folds by itself where that is
// too little.
func (b *band) heightIn(room float32) float32 {
	open := b.choice != "folded" && least() <= 0.24*room
	if b.choice == "open" {
		open = least() <= 0.3*room
	}
	b.height = b.lineHeight() + look.Px(6)
	if open {
		b.height = max(least(), 0.21*room)
	}
	return b.height
}

func (b *band) lineHeight() float32 { return b.date.MinSize().Height }

func (b *band) isOpen() bool { return b.height >= least() }

// toggle folds the band or opens it, if the window is high enough.
func (b *band) toggle() {
	if b.isOpen() {
		b.choice = "folded"
	} else {
		b.choice = "open"
	}
}

// update shows the session.
func (b *band) update() {
	a, o := b.f.s.Asset(), b.f.s.Outcome()
	if a == nil {
		b.all.Hide()
		return
	}
	b.all.Show()
	b.paint()
	if o != b.outcome {
		b.outcome, b.states = o, nil
		if o != nil {
			b.states = o.States()
		}
	}
	if o != nil {
		a = o.Asset // the states are its zones'
	}
	b.strip.set(a, o, b.f.s.Today(), b.f.cursor)
	b.color(a)
}

// color shows the zones of an asset as they are at the cursor.
func (b *band) color(a *hull.Asset) {
	var states []plan.ZoneState
	if b.states != nil {
		states = b.states.At(b.f.cursor)
	}
	b.view.set(a, states, b.f.zone)
	b.write()
}

// follow shows the cursor's new day.
func (b *band) follow() {
	b.strip.point(b.f.cursor)
	if b.view.asset != nil {
		b.color(b.view.asset)
	}
}

// write fills the line with as much as it has room for.
func (b *band) write() {
	b.date.SetText(say.T("As of %s", session.Day(b.f.cursor)))
	arrow := say.T("Show picture ▾")
	if b.isOpen() {
		arrow = say.T("Hide picture ▴")
	}
	b.fold.set(arrow)
	text := ""
	for _, s := range b.sentences() {
		text = s
		if b.measure(s) <= b.room() {
			break
		}
	}
	if b.measure(text) > b.room() {
		text = ""
	}
	b.line.SetText(text)
	b.Layout(b.all.Objects, b.all.Size())
}

func (b *band) measure(s string) float32 {
	return fyne.MeasureText(s, look.TextSize(11), fyne.TextStyle{}).Width + look.Px(6)
}

// room is the width left for the words in the line.
func (b *band) room() float32 {
	return b.all.Size().Width - b.date.MinSize().Width - b.fold.MinSize().Width - 3*gap() - 2*look.Px(10)
}

// sentences are what the line may say, from the most to the least.
func (b *band) sentences() []string {
	if b.over != "" {
		return []string{b.over}
	}
	if b.choice == "open" && !b.isOpen() && b.all.Size().Height > 0 {
		return []string{say.T("the window is too low for the picture"), ""}
	}
	if b.states == nil {
		return []string{say.T("computing…")}
	}
	names := map[plan.State][]string{}
	for i, s := range b.states.At(b.f.cursor) {
		if s.State != "" {
			names[s.State] = append(names[s.State], b.view.asset.Zones[i].Name)
		}
	}
	var long, short []string
	for _, state := range []plan.State{plan.Spent, plan.Short, plan.Thin, plan.Sound} {
		if n := len(names[state]); n > 0 {
			part := fmt.Sprintf("%d %s", n, say.T(string(state)))
			short = append(short, part)
			if state != plan.Sound {
				part += ": " + strings.Join(names[state], ", ")
			}
			long = append(long, part)
		}
	}
	return []string{strings.Join(long, " · "), strings.Join(short, " · ")}
}

// MinSize implements fyne.Layout.
func (b *band) MinSize([]fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(look.Px(300), b.lineHeight()+look.Px(6))
}

// Layout implements fyne.Layout.
func (b *band) Layout(_ []fyne.CanvasObject, size fyne.Size) {
	b.all.Objects[0].Resize(size)
	pad, h := look.Px(10), b.lineHeight()
	y := look.Px(3)
	put := func(o fyne.CanvasObject, x, y, w, h float32) {
		o.Move(fyne.NewPos(x, y))
		o.Resize(fyne.NewSize(max(w, 0), max(h, 0)))
	}
	date, fold := b.date.MinSize().Width, b.fold.MinSize().Width
	put(b.date, pad, y, date, h)
	put(b.line, pad+date+gap(), y, b.line.MinSize().Width, h)
	put(b.fold, size.Width-pad-fold, y, fold, h)
	open := b.isOpen() && size.Height >= least()-1
	for _, o := range []fyne.CanvasObject{b.view, b.strip} {
		if open {
			o.Show()
		} else {
			o.Hide()
		}
	}
	if !open {
		return
	}
	strip := b.strip.MinSize().Height
	put(b.strip, pad, size.Height-strip-look.Px(3), size.Width-2*pad, strip)
	put(b.view, pad, y+h+look.Px(2), size.Width-2*pad, size.Height-strip-look.Px(8)-y-h)
}

// linkText is a few words that do something when pressed.
type linkText struct {
	widget.BaseWidget
	text  *look.Text
	press func()
}

func newLinkText(press func()) *linkText {
	l := &linkText{text: look.NewText("", look.ColorAccent, theme.SizeNameCaptionText, false), press: press}
	l.ExtendBaseWidget(l)
	return l
}

func (l *linkText) set(s string) {
	if l.text.String() != s {
		l.text.SetText(s)
		l.Refresh()
	}
}

// MouseDown presses it.
func (l *linkText) MouseDown(*desktop.MouseEvent) { l.press() }

// MouseUp implements desktop.Mouseable.
func (l *linkText) MouseUp(*desktop.MouseEvent) {}

// Cursor shows that it can be pressed.
func (l *linkText) Cursor() desktop.Cursor { return desktop.PointerCursor }

// CreateRenderer implements fyne.Widget.
func (l *linkText) CreateRenderer() fyne.WidgetRenderer { return widget.NewSimpleRenderer(l.text) }
