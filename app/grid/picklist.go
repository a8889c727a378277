package grid

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
)

// pickList shows the choices of the cell being edited. It is part of the grid,
// not a pop-up, since a pop-up would take the keyboard from the editor.
type pickList struct {
	widget.BaseWidget
	g      *Grid
	all    []string // every choice; nil while there is no list
	items  []string // those that fit what was typed
	at     int      // the marked item, -1 if none
	top    int      // the first item in view
	shown  int      // how many are in view
	picked bool     // the user moved the mark
	typed  bool     // the user typed
	follow bool     // the mark is to be kept in view

	panel, mark *canvas.Rectangle
	texts       []*canvas.Text
	thumb       *canvas.Rectangle
}

func newPickList(g *Grid) *pickList {
	p := &pickList{g: g, at: -1, panel: canvas.NewRectangle(nil), mark: canvas.NewRectangle(nil), thumb: canvas.NewRectangle(nil)}
	p.ExtendBaseWidget(p)
	p.Hidden = true
	return p
}

// open offers new choices; nil closes the list.
func (p *pickList) open(all []string) {
	p.all, p.items, p.at, p.top = all, all, -1, 0
	p.picked, p.typed, p.follow = false, false, true
}

// choose marks the item that equals text, without counting as the user's choice.
func (p *pickList) choose(text string) {
	for i, s := range p.items {
		if s == text {
			p.at = i
		}
	}
}

// filter keeps the items that begin with the typed text, or failing those, the
// ones that contain it.
func (p *pickList) filter(text string) {
	if p.all == nil {
		return
	}
	text = strings.ToLower(strings.TrimSpace(text))
	p.typed, p.picked, p.follow, p.top = true, false, true, 0
	keep := func(fits func(s, part string) bool) (out []string) {
		for _, s := range p.all {
			if fits(strings.ToLower(s), text) {
				out = append(out, s)
			}
		}
		return out
	}
	if p.items = keep(strings.HasPrefix); len(p.items) == 0 {
		p.items = keep(strings.Contains)
	}
	p.at = -1
	if text != "" && len(p.items) > 0 {
		p.at = 0
	}
}

// resolve turns typed text into the choice it stands for, or returns it as it is.
func (p *pickList) resolve(text string) string {
	if p.picked && p.at >= 0 && p.at < len(p.items) {
		return p.items[p.at]
	}
	for _, s := range p.all {
		if strings.EqualFold(s, strings.TrimSpace(text)) {
			return s
		}
	}
	if p.typed && p.at >= 0 && p.at < len(p.items) {
		return p.items[p.at]
	}
	return text
}

// key moves the mark; it reports whether there is a list to move it in.
func (p *pickList) key(name fyne.KeyName) bool {
	if len(p.items) == 0 {
		return false
	}
	step := map[fyne.KeyName]int{fyne.KeyUp: -1, fyne.KeyDown: 1, fyne.KeyPageUp: -p.shown, fyne.KeyPageDown: p.shown}[name]
	p.at = min(max(p.at+step, 0), len(p.items)-1)
	p.picked, p.follow = true, true
	return true
}

func itemHeight() float32 { return look.Px(26) }

// place puts the list below the cell that reaches from above to below, or above
// it if there is more room.
func (p *pickList) place(seen bool, x, above, below, width float32, size fyne.Size) {
	p.Hidden = !seen || len(p.items) == 0
	if p.Hidden {
		return
	}
	const most = 8
	want := min(len(p.items), most)
	fit := func(room float32) int { return min(want, int((room-2)/itemHeight())) }
	p.shown = fit(size.Height - below)
	up := p.shown < want && above > size.Height-below
	if up {
		p.shown = fit(above)
	}
	p.shown = max(p.shown, 1)
	h := float32(p.shown)*itemHeight() + 2
	y := below
	if up {
		y = above - h
	}
	p.top = max(min(p.top, len(p.items)-p.shown), 0)
	if p.follow && p.at >= 0 {
		p.top = min(max(p.top, p.at-p.shown+1), p.at)
	}
	text, _ := textSizes()
	for _, item := range p.items {
		width = max(width, fyne.MeasureText(item, text, fyne.TextStyle{Bold: true}).Width+look.Px(24))
	}
	p.Move(fyne.NewPos(max(min(x, size.Width-width), 0), y))
	p.Resize(fyne.NewSize(min(width, size.Width), h))
	p.draw()
}

func (p *pickList) draw() {
	p.panel.FillColor, p.panel.StrokeColor, p.panel.StrokeWidth = look.Color(look.ColorSurface), look.Color(look.ColorAccent), 1
	p.panel.CornerRadius = 4
	p.panel.Resize(p.Size())
	for len(p.texts) < p.shown {
		p.texts = append(p.texts, canvas.NewText("", nil))
	}
	size, _ := textSizes()
	for i := range p.shown {
		t, item := p.texts[i], p.items[p.top+i]
		t.TextSize, t.Color = size, look.Color(look.ColorInk)
		t.TextStyle.Bold = p.top+i == p.at
		t.Text = look.Ellipsis(item, p.Size().Width-look.Px(22), size, t.TextStyle)
		h := t.MinSize().Height
		t.Move(whole(look.Px(8), 1+float32(i)*itemHeight()+(itemHeight()-h)/2))
		t.Resize(fyne.NewSize(p.Size().Width-look.Px(16), h))
	}
	row := p.at - p.top
	p.mark.Hidden = p.at < 0 || row < 0 || row >= p.shown
	p.mark.FillColor = look.Color(look.ColorAccentPale)
	p.mark.Move(fyne.NewPos(1, 1+float32(row)*itemHeight()))
	p.mark.Resize(fyne.NewSize(p.Size().Width-2, itemHeight()))

	p.thumb.Hidden = p.shown >= len(p.items)
	p.thumb.FillColor = look.Color(theme.ColorNameScrollBar)
	room := p.Size().Height - 4
	p.thumb.Move(fyne.NewPos(p.Size().Width-6, 2+room*float32(p.top)/float32(len(p.items))))
	p.thumb.Resize(fyne.NewSize(4, room*float32(p.shown)/float32(len(p.items))))
}

// itemAt returns the item at a height of the list.
func (p *pickList) itemAt(y float32) (int, bool) {
	i := p.top + int((y-1)/itemHeight())
	return i, y >= 1 && i < min(p.top+p.shown, len(p.items))
}

// MouseDown chooses the item under the mouse and commits it.
func (p *pickList) MouseDown(ev *desktop.MouseEvent) {
	i, ok := p.itemAt(ev.Position.Y)
	if !ok || ev.Button != desktop.MouseButtonPrimary {
		return
	}
	p.at, p.picked = i, true
	p.g.CommitEdit()
	p.g.Focus()
}

// MouseUp implements desktop.Mouseable.
func (p *pickList) MouseUp(*desktop.MouseEvent) {}

// Scrolled turns the list with the mouse wheel.
func (p *pickList) Scrolled(ev *fyne.ScrollEvent) {
	step := 1
	if ev.Scrolled.DY > 0 {
		step = -1
	}
	p.follow = false
	p.top = max(min(p.top+step, len(p.items)-p.shown), 0)
	p.g.Refresh()
}

func (p *pickList) CreateRenderer() fyne.WidgetRenderer { return &listRenderer{p} }

type listRenderer struct{ p *pickList }

func (r *listRenderer) Destroy()           {}
func (r *listRenderer) Layout(fyne.Size)   {}
func (r *listRenderer) MinSize() fyne.Size { return fyne.NewSize(1, 1) }
func (r *listRenderer) Refresh()           {}

func (r *listRenderer) Objects() []fyne.CanvasObject {
	out := []fyne.CanvasObject{r.p.panel, r.p.mark}
	for _, t := range r.p.texts[:min(r.p.shown, len(r.p.texts))] {
		out = append(out, t)
	}
	return append(out, r.p.thumb)
}
