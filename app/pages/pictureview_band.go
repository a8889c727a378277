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
	"anodewright/app/picture"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// band is what stands above the pages: a line with the date and what the
// mouse is on, the picture, and the strip of dates. It folds to the line. A
// tall asset's picture stands beside the pages instead, where they keep the
// width that they need.
type band struct {
	f     *Frame
	date  *look.Text
	line  *look.Text
	fold  *linkText
	view  *pictureView
	strip *dateStrip
	panel *canvas.Rectangle
	all   *fyne.Container
	side  *fyne.Container // the picture: over its room in all, or beside the pages
	frame *canvas.Rectangle

	open    bool
	tall    bool    // the asset's picture goes beside the pages
	beside  float32 // the picture's width there, nought where it is above
	choice  string  // "open", "folded", or "" for as there is room
	height  float32
	outcome *plan.Outcome
	states  *plan.States
	over    string // what the mouse is on, in words
}

func newBand(f *Frame) *band {
	b := &band{f: f, date: look.Accented(""), line: look.Muted(""), panel: canvas.NewRectangle(nil), frame: canvas.NewRectangle(nil)}
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
	b.all = container.New(b, panel, b.date, b.line, b.fold, b.strip)
	b.side = container.New(sideLayout{b}, b.frame, b.view)
	b.paint()
	return b
}

func (b *band) paint() {
	for _, p := range []*canvas.Rectangle{b.panel, b.frame} {
		p.FillColor, p.StrokeColor = look.Color(look.ColorSurface), look.Color(look.ColorLine)
		p.StrokeWidth, p.CornerRadius = 1, 8
		p.Refresh()
	}
}

// say shows words in the line; with none it tells of all zones.
func (b *band) say(words string) {
	b.over = words
	b.write()
}

// least is the height that picture and strip need at least.
func least() float32 { return look.Px(152) }

// heightIn is how high the band is where it has this much room with the pages.
// It takes no more than 30 % of it, and folds by itself where that is too
// little.
func (b *band) heightIn(room fyne.Size) float32 {
	b.beside = 0
	b.open = b.choice != "folded" && least() <= 0.24*room.Height
	if b.choice == "open" {
		b.open = least() <= 0.3*room.Height
	}
	b.height = b.lineHeight() + look.Px(6)
	if w := min(max(look.Px(180), 0.15*room.Width), look.Px(320)); b.tall && b.choice != "folded" && room.Width-w-gap() >= besideFrom() {
		b.beside, b.open = w, true
		b.height += b.strip.MinSize().Height + look.Px(4)
	} else if b.open {
		b.height = max(least(), 0.21*room.Height)
	}
	return b.height
}

// besideFrom is the least width that a tall asset's picture leaves the pages:
// eight columns of zones and the panel beside them.
func besideFrom() float32 { return look.Px(1020) }

func (b *band) lineHeight() float32 { return b.date.MinSize().Height }

func (b *band) isOpen() bool { return b.open }

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
		b.side.Hide()
		return
	}
	b.all.Show()
	b.tall = picture.Tall(a)
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
	if b.open {
		b.strip.Show()
		strip := b.strip.MinSize().Height
		put(b.strip, pad, size.Height-strip-look.Px(3), size.Width-2*pad, strip)
	} else {
		b.strip.Hide()
	}
}

// pictureRoom is where the picture lies in the band: its upper edge and its
// height.
func (b *band) pictureRoom() (y, height float32) {
	y = look.Px(3) + b.lineHeight() + look.Px(2)
	return y, max(b.height-b.strip.MinSize().Height-look.Px(6)-y, 0)
}

// sideLayout lays out the picture: alone over the band, in a panel of its own
// beside the pages.
type sideLayout struct{ b *band }

func (l sideLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(0, 0) }

func (l sideLayout) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	margin := float32(0)
	if l.b.frame.Hidden = l.b.beside == 0; !l.b.frame.Hidden {
		margin = look.Px(10)
	}
	objects[0].Resize(size)
	objects[1].Move(fyne.NewPos(margin, margin))
	objects[1].Resize(fyne.NewSize(max(size.Width-2*margin, 0), max(size.Height-2*margin, 0)))
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
