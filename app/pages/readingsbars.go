package pages

import (
	"fmt"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/look"
	"anodewright/app/say"
)

// factorBars draws the demand factor of zones: the 90 % range before the
// readings as a thin bar, that after them as a thick one with its median, on a
// scale on which halving and doubling are equally long.
type factorBars struct {
	widget.BaseWidget
	rows []factorBar
}

type factorBar struct {
	name          string
	before, after plan.Factor
	learned       bool
}

func newFactorBars() *factorBars {
	b := &factorBars{}
	b.ExtendBaseWidget(b)
	return b
}

// add adds a zone.
func (b *factorBars) add(z *plan.Zone, before plan.Factor) {
	row := factorBar{name: z.Zone.Name, before: before}
	if z.Learned != nil {
		row.after, row.learned = z.Learned.Factor, true
	}
	b.rows = append(b.rows, row)
}

// CreateRenderer implements fyne.Widget.
func (b *factorBars) CreateRenderer() fyne.WidgetRenderer { return &factorRenderer{b: b} }

type factorRenderer struct {
	b       *factorBars
	objects []fyne.CanvasObject
}

func (r *factorRenderer) Destroy()                     {}
func (r *factorRenderer) Objects() []fyne.CanvasObject { return r.objects }
func (r *factorRenderer) MinSize() fyne.Size           { return fyne.NewSize(look.Px(160), look.Px(60)) }
func (r *factorRenderer) Layout(fyne.Size)             { r.draw() }
func (r *factorRenderer) Refresh()                     { r.draw(); canvas.Refresh(r.b) }

// leastFactor and mostFactor end the scale.
const leastFactor, mostFactor = 0.2, 5.0

func (r *factorRenderer) draw() {
	r.objects = nil
	size := r.b.Size()
	if size.Width < 40 || size.Height < 30 {
		return
	}
	em := theme.Size(theme.SizeNameCaptionText)
	text := func(s string, x, y, anchor float32, name fyne.ThemeColorName) {
		t := canvas.NewText(s, look.Color(name))
		t.TextSize = em
		m := t.MinSize()
		t.Move(fyne.NewPos(min(max(0, x-anchor*m.Width), max(0, size.Width-m.Width)), y))
		t.Resize(m)
		r.objects = append(r.objects, t)
	}
	x := func(f float64) float32 {
		share := math.Log(min(max(f, leastFactor), mostFactor)/leastFactor) / math.Log(mostFactor/leastFactor)
		return look.Px(6) + float32(share)*(size.Width-look.Px(16))
	}
	bar := func(from, to float64, y, height float32, name fyne.ThemeColorName) {
		o := canvas.NewRectangle(look.Color(name))
		o.Move(fyne.NewPos(x(from), y))
		o.Resize(fyne.NewSize(max(x(to)-x(from), look.Px(2)), height))
		r.objects = append(r.objects, o)
	}
	line := em * 1.4
	foot := size.Height - line
	for _, f := range []float64{0.25, 0.5, 1, 2, 4} {
		rule := canvas.NewLine(look.Color(look.ColorLine))
		rule.StrokeWidth = look.Px(1)
		rule.Position1, rule.Position2 = fyne.NewPos(x(f), 0), fyne.NewPos(x(f), foot)
		r.objects = append(r.objects, rule)
		text(fmt.Sprintf("%g", f), x(f), foot, 0.5, look.ColorMuted)
	}
	row := line + look.Px(22)
	for i, b := range r.b.rows {
		y := float32(i) * row
		left := len(r.b.rows) - i
		if y+row > foot || left > 1 && y+row+line > foot {
			text(say.T("and %d more in the table", left), 0, y, 0, look.ColorMuted)
			break
		}
		text(b.name, 0, y, 0, look.ColorInk)
		y += line
		bar(b.before.Low, b.before.High, y+look.Px(1), look.Px(4), look.ColorMuted)
		if b.learned {
			bar(b.after.Low, b.after.High, y+look.Px(7), look.Px(8), look.ColorAccent)
			bar(b.after.Median, b.after.Median, y+look.Px(5), look.Px(12), look.ColorInk)
		}
	}
}
