package pages

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/chart"
	"anodewright/app/look"
)

// chartView paints a chart and tells where the mouse is on it.
type chartView struct {
	widget.BaseWidget
	chart   *chart.Chart
	drawing *chart.Drawing
	cursor  float64 // a time; NaN shows none
	shown   bool
	moved   func(at float64)
}

func newChartView(moved func(at float64)) *chartView {
	v := &chartView{moved: moved}
	v.ExtendBaseWidget(v)
	return v
}

func (v *chartView) set(c *chart.Chart) {
	v.chart = c
	v.Refresh()
}

// point shows the cursor at a time.
func (v *chartView) point(at float64, shown bool) {
	v.cursor, v.shown = at, shown
	v.Refresh()
}

// MouseIn implements desktop.Hoverable.
func (v *chartView) MouseIn(e *desktop.MouseEvent) { v.MouseMoved(e) }

// MouseMoved tells the time under the mouse.
func (v *chartView) MouseMoved(e *desktop.MouseEvent) {
	if v.drawing != nil {
		if at, ok := v.drawing.At(e.Position.X); ok {
			v.moved(at)
		}
	}
}

// MouseOut implements desktop.Hoverable.
func (v *chartView) MouseOut() {}

// CreateRenderer implements fyne.Widget.
func (v *chartView) CreateRenderer() fyne.WidgetRenderer { return &chartRenderer{v: v} }

type chartRenderer struct {
	v       *chartView
	objects []fyne.CanvasObject
}

func (r *chartRenderer) Destroy()                     {}
func (r *chartRenderer) Objects() []fyne.CanvasObject { return r.objects }
func (r *chartRenderer) MinSize() fyne.Size           { return fyne.NewSize(look.Px(200), look.Px(90)) }
func (r *chartRenderer) Layout(fyne.Size)             { r.draw() }
func (r *chartRenderer) Refresh()                     { r.draw(); canvas.Refresh(r.v) }

// roleColors are the theme's colours of the chart's roles.
func roleColor(role chart.Role) color.Color {
	switch role {
	case chart.First:
		return look.Color(look.ColorAccent)
	case chart.Second:
		return look.Color(look.ColorInk)
	case chart.Third, chart.Event:
		return look.Color(look.ColorMuted)
	case chart.Limit, chart.Today:
		return look.Color(look.ColorFault)
	case chart.Label:
		return look.Color(look.ColorMuted)
	case chart.Rule:
		return look.Color(look.ColorLine)
	}
	return look.Color(look.ColorEdge)
}

func (r *chartRenderer) draw() {
	r.objects = nil
	size := r.v.Size()
	if r.v.chart == nil || size.Width < 20 || size.Height < 20 {
		return
	}
	em := look.TextSize(11)
	d := r.v.chart.Lay(size.Width, size.Height, em)
	r.v.drawing = d
	for _, l := range d.Lines {
		r.line(l)
	}
	if r.v.shown {
		r.line(d.Cursor(r.v.cursor))
	}
	for _, t := range d.Texts {
		text := canvas.NewText(t.Text, roleColor(t.Role))
		text.TextSize = em
		m := text.MinSize()
		text.Move(fyne.NewPos(min(max(0, t.X-t.Anchor*m.Width), max(0, size.Width-m.Width)), t.Y-m.Height/2))
		text.Resize(m)
		r.objects = append(r.objects, text)
	}
}

// line paints one line; limits and dockings are dashed, so that colour alone
// does not tell them.
func (r *chartRenderer) line(l chart.Line) {
	width := look.Px(1)
	if l.Role == chart.First || l.Role == chart.Second {
		width = look.Px(2)
	}
	dash := float32(0)
	switch l.Role {
	case chart.Limit:
		dash = look.Px(6)
	case chart.Event:
		dash = look.Px(3)
	}
	add := func(x1, y1, x2, y2 float32) {
		line := canvas.NewLine(roleColor(l.Role))
		line.StrokeWidth = width
		line.Position1, line.Position2 = fyne.NewPos(x1, y1), fyne.NewPos(x2, y2)
		r.objects = append(r.objects, line)
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
