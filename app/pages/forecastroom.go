package pages

import (
	"fyne.io/fyne/v2"

	"anodewright/app/look"
	"anodewright/app/say"
)

// chartShares are the charts' shares of the height where all are shown:
// current, wastage, potential.
var chartShares = []float32{0.42, 0.33, 0.25}

// leastCharts is the height below which one chart is shown instead of all.
func leastCharts() float32 { return look.Px(330) }

// newWhich is the choice of what is shown: all charts or one.
func (p *forecastPage) newWhich() *look.Select {
	w := look.NewSelect([]string{say.T("All charts"), say.T("Current"), say.T("Wasted"), say.T("Potential")}, nil)
	for _, o := range w.Options {
		if len(o) > len(w.PlaceHolder) {
			w.PlaceHolder = o // the widget takes its width from it
		}
	}
	w.SetSelectedIndex(0)
	w.OnChanged = func(string) {
		p.wanted = w.SelectedIndex() - 1
		if p.wanted < 0 && p.room.Size().Height < leastCharts() && p.drawer.open {
			p.drawer.toggle() // its room is what all need
		}
		p.room.Refresh()
	}
	return w
}

// chartRoom lays the charts one below the other, each with its share of the
// height, or the chosen one alone with all of it. Where there is too little
// room for all it shows the first, which is then what the choice says.
type chartRoom struct{ p *forecastPage }

func (chartRoom) MinSize(objects []fyne.CanvasObject) fyne.Size {
	return objects[0].MinSize()
}

func (r chartRoom) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	p := r.p
	one := p.wanted
	if one < 0 && size.Height < leastCharts() {
		one = 0
	}
	if p.one = one; p.which.SelectedIndex() != one+1 {
		p.which.Selected = p.which.Options[one+1]
		p.which.Refresh()
	}
	y := float32(0)
	for i, o := range objects {
		h := size.Height * chartShares[i]
		if one >= 0 {
			h = size.Height
		}
		if one >= 0 && i != one {
			o.Hide()
			continue
		}
		o.Show()
		o.Move(fyne.NewPos(0, y))
		o.Resize(fyne.NewSize(size.Width, h))
		y += h
	}
}
