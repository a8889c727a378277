package pages

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"anodewright/app/chart"
	"anodewright/app/look"
)

type chartRenderer struct {
	v       *chartView
	objects []fyne.CanvasObject
	drawn   *chart.Drawing
	fixed   []fyne.CanvasObject // of the drawing, without the cursor
	dark    bool
}

func (r *chartRenderer) Destroy()                     {}
func (r *chartRenderer) Objects() []fyne.CanvasObject { return r.objects }
func (r *chartRenderer) MinSize() fyne.Size           { return fyne.NewSize(look.Px(200), look.Px(70)) }
func (r *chartRenderer) Layout(fyne.Size)             { r.draw() }
func (r *chartRenderer) Refresh()                     { r.draw(); canvas.Refresh(r.v) }

// roleName is the theme's colour of a chart's role.
func roleName(role chart.Role) fyne.ThemeColorName {
	switch role {
	case chart.First:
		return look.ColorAccent
	case chart.Second, chart.Found:
		return look.ColorInk
	case chart.Third, chart.Event, chart.Label:
		return look.ColorMuted
	case chart.Limit, chart.Today:
		return look.ColorFault
	case chart.Rule:
		return look.ColorLine
	}
	return look.ColorEdge
}

func roleColor(role chart.Role) color.Color { return look.Color(roleName(role)) }

// roleWidth is the width of a role's lines at text scale 1.
func roleWidth(role chart.Role) float32 {
	switch role {
	case chart.First, chart.Second:
		return 2
	case chart.Found:
		return 1.5
	}
	return 1
}

// roleDash is the length of a role's dashes: limits and dockings are broken, so
// that colour alone does not tell them. The chart itself breaks a second
// series.
func roleDash(role chart.Role) float32 {
	switch role {
	case chart.Limit:
		return 6
	case chart.Event:
		return 3
	}
	return 0
}

// draw lays the chart out anew where its size or its figures changed, and
// places the cursor.
func (r *chartRenderer) draw() {
	r.objects = nil
	v, size := r.v, r.v.Size()
	if v.chart == nil || size.Width < 20 || size.Height < 20 {
		return
	}
	em := look.TextSize(11)
	if key := (laidFor{v.chart, size, em}); v.laid != key {
		v.drawing, v.laid = v.chart.Lay(size.Width, size.Height, em), key
	}
	if r.drawn != v.drawing || r.dark != look.IsDark() {
		r.drawn, r.dark = v.drawing, look.IsDark()
		r.fix(em, size)
	}
	r.objects = append(r.objects, r.fixed...)
	if v.shown && v.cursor >= v.chart.From && v.cursor <= v.chart.To {
		l := v.drawing.Cursor(v.cursor)
		cursor := canvas.NewLine(look.Color(look.ColorAccent))
		cursor.StrokeWidth = look.Px(1.5)
		if v.focused {
			cursor.StrokeWidth = look.Px(3)
		}
		cursor.Position1, cursor.Position2 = fyne.NewPos(l.X1, l.Y1), fyne.NewPos(l.X2, l.Y2)
		r.objects = append(r.objects, cursor)
	}
	if v.focused {
		ring := canvas.NewRectangle(color.Transparent)
		ring.StrokeColor, ring.StrokeWidth, ring.CornerRadius = look.Color(look.ColorAccent), look.Px(1.5), look.Px(4)
		ring.Resize(size)
		r.objects = append(r.objects, ring)
	}
}

// fix makes the objects of the drawing.
func (r *chartRenderer) fix(em float32, size fyne.Size) {
	r.fixed = nil
	for _, l := range r.drawn.Lines {
		r.line(l)
	}
	for _, t := range r.drawn.Texts {
		text := canvas.NewText("", roleColor(t.Role))
		text.TextSize = em
		text.Text = look.Ellipsis(t.Text, size.Width-t.X*(1-t.Anchor), em, fyne.TextStyle{})
		m := text.MinSize()
		text.Move(fyne.NewPos(min(max(0, t.X-t.Anchor*m.Width), max(0, size.Width-m.Width)), t.Y-m.Height/2))
		text.Resize(m)
		r.fixed = append(r.fixed, text)
	}
}

// line makes one line, broken where its role asks for it.
func (r *chartRenderer) line(l chart.Line) {
	width, dash := look.Px(roleWidth(l.Role)), look.Px(roleDash(l.Role))
	add := func(x1, y1, x2, y2 float32) {
		line := canvas.NewLine(roleColor(l.Role))
		line.StrokeWidth = width
		line.Position1, line.Position2 = fyne.NewPos(x1, y1), fyne.NewPos(x2, y2)
		r.fixed = append(r.fixed, line)
	}
	dx, dy := l.X2-l.X1, l.Y2-l.Y1
	length := max(abs(dx), abs(dy))
	if dash == 0 || length <= 2*dash {
		add(l.X1, l.Y1, l.X2, l.Y2)
		return
	}
	for at := float32(0); at < length; at += 2 * dash {
		a, b := at/length, min(1, (at+dash)/length)
		add(l.X1+a*dx, l.Y1+a*dy, l.X1+b*dx, l.Y1+b*dy)
	}
}

func abs(x float32) float32 { return max(x, -x) }
