package grid

import (
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"anodewright/app/look"
)

// cellView holds the objects one cell is drawn with. Views are pooled: which
// cell one shows changes from one drawing to the next.
type cellView struct {
	fill, border *canvas.Rectangle
	text, sub    *canvas.Text
	sign         *canvas.Circle
	bang, more   *canvas.Text
	badge        *look.Badge
}

func newCellView() *cellView {
	return &cellView{
		fill: canvas.NewRectangle(nil), border: canvas.NewRectangle(nil),
		text: canvas.NewText("", nil), sub: canvas.NewText("", nil),
	}
}

// show draws a cell at pos into the clip, in text of two sizes, and says whether
// text was cut short. pick asks for the mark of a pick-list.
func (v *cellView) show(into *clip, c Cell, right, pick bool, textSize, subSize float32, pos fyne.Position, size fyne.Size) (cut bool) {
	pad := look.Px(8)
	left, end := pos.X+pad, pos.X+size.Width-pad

	if c.Accent {
		v.fill.FillColor = look.Color(look.ColorAccentPale)
		v.fill.CornerRadius = 5
		v.fill.Move(pos.AddXY(2, 3))
		v.fill.Resize(size.SubtractWidthHeight(4, 5))
		into.add(v.fill)
	}
	if c.Fault != "" {
		left, end = v.showFault(into, right, left, end, pos, size)
	}
	if pick {
		end = v.showMore(into, end, pos, size)
	}
	lineH := fyne.MeasureText("X", textSize, fyne.TextStyle{}).Height
	if c.State != "" {
		lineH = max(lineH, v.stateHeight(c.State))
	}
	subH := float32(0)
	if c.Sub != "" {
		subH = fyne.MeasureText("X", subSize, fyne.TextStyle{}).Height - 1
	}
	top := pos.Y + (size.Height-lineH-subH)/2
	if c.State != "" {
		left = v.showBadge(into, left, top+lineH/2, end)
	}
	if c.Text != "" {
		cut = setText(v.text, c.Text, textSize, c.Bold, c.Muted, right, left, top, end, lineH)
		into.add(v.text)
	}
	if c.Sub != "" {
		// the second line begins at the cell's edge, also beside a badge
		from := min(left, pos.X+pad)
		if right {
			from = left
		}
		cut = setText(v.sub, c.Sub, subSize, false, true, right, from, top+lineH-1, end, subH+1) || cut
		into.add(v.sub)
	}
	return cut
}

// showFault marks the cell with a border and a round sign, and returns the room
// left for text.
func (v *cellView) showFault(into *clip, right bool, left, end float32, pos fyne.Position, size fyne.Size) (float32, float32) {
	if v.sign == nil {
		v.sign = canvas.NewCircle(nil)
		v.bang = canvas.NewText("!", nil)
		v.bang.TextStyle.Bold = true
		v.bang.Alignment = fyne.TextAlignCenter
	}
	fault := look.Color(look.ColorFault)
	v.border.FillColor = nil
	v.border.StrokeColor = fault
	v.border.StrokeWidth = 1.5
	v.border.CornerRadius = 4
	v.border.Move(pos.AddXY(4, 5))
	v.border.Resize(size.SubtractWidthHeight(8, 9))

	d := look.Px(16)
	x := end - d
	if right {
		x = left
		left += d + look.Px(4)
	} else {
		end -= d + look.Px(4)
	}
	y := pos.Y + (size.Height-d)/2
	v.sign.FillColor = fault
	v.sign.Move(fyne.NewPos(x, y))
	v.sign.Resize(fyne.NewSquareSize(d))
	_, v.bang.TextSize = textSizes()
	v.bang.Color = look.Color(look.ColorOnFault)
	h := v.bang.MinSize().Height
	v.bang.Move(whole(x, y+(d-h)/2))
	v.bang.Resize(fyne.NewSize(d, h))
	into.add(v.border, v.sign, v.bang)
	return left, end
}

// showMore draws the mark of a pick-list and returns the right end for text.
func (v *cellView) showMore(into *clip, end float32, pos fyne.Position, size fyne.Size) float32 {
	if v.more == nil {
		v.more = canvas.NewText("▾", nil)
	}
	v.more.TextSize, _ = textSizes()
	v.more.Color = look.Color(look.ColorMuted)
	m := v.more.MinSize()
	v.more.Move(whole(end-m.Width, pos.Y+(size.Height-m.Height)/2))
	v.more.Resize(m)
	into.add(v.more)
	return end - m.Width - look.Px(4)
}

// stateHeight makes the badge say the state and returns its height.
func (v *cellView) stateHeight(state string) float32 {
	if v.badge == nil {
		v.badge = look.StateBadge(state, "")
	}
	v.badge.Set(state, "")
	return v.badge.MinSize().Height
}

// showBadge draws the badge around the height mid and returns where text may
// begin.
func (v *cellView) showBadge(into *clip, left, mid, end float32) float32 {
	s := v.badge.MinSize()
	s.Width = min(s.Width, max(end-left, 0))
	v.badge.Resize(s)
	v.badge.Move(fyne.NewPos(left, mid-s.Height/2))
	into.add(v.badge)
	return left + s.Width + look.Px(6)
}

// setText fits a line into left..end and says whether it was cut short.
func setText(t *canvas.Text, s string, size float32, bold, muted, right bool, left, top, end, height float32) (cut bool) {
	t.TextSize = size
	t.TextStyle = fyne.TextStyle{Bold: bold}
	t.Text = look.Ellipsis(s, end-left, size, t.TextStyle)
	t.Color = look.Color(look.ColorInk)
	if muted {
		t.Color = look.Color(look.ColorMuted)
	}
	t.Alignment = fyne.TextAlignLeading
	if right {
		t.Alignment = fyne.TextAlignTrailing
	}
	t.Move(whole(left, top))
	t.Resize(fyne.NewSize(max(end-left, 0), height))
	return t.Text != s
}

// whole returns a place rounded to whole pixels, since Fyne draws text on
// fractions of a pixel unevenly.
func whole(x, y float32) fyne.Position {
	return fyne.NewPos(float32(math.Round(float64(x))), float32(math.Round(float64(y))))
}
