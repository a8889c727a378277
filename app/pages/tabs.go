package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
	"anodewright/app/say"
)

// tabs is a row of buttons of which one is chosen, marked by its fill and by a
// line under it. The buttons stay the same ones, so that none loses the
// keyboard when another is chosen.
type tabs struct {
	row     *fyne.Container
	buttons []*look.PushButton
	lines   []*canvas.Rectangle
}

// saidAll says several texts.
func saidAll(english []string) []string {
	var all []string
	for _, s := range english {
		all = append(all, say.T(s))
	}
	return all
}

func newTabs(titles []string, chosen func(i int)) *tabs {
	t := &tabs{row: container.NewHBox()}
	for i, title := range titles {
		b := look.QuietButton(title, func() { chosen(i) })
		line := canvas.NewRectangle(look.Color(look.ColorAccent))
		t.buttons, t.lines = append(t.buttons, b), append(t.lines, line)
		t.row.Add(container.NewStack(b, container.NewBorder(nil, line, nil, nil)))
	}
	return t
}

// mark shows which tab is chosen.
func (t *tabs) mark(chosen int) {
	moved := false
	for i, b := range t.buttons {
		importance := widget.LowImportance
		if i == chosen {
			importance = widget.MediumImportance
		}
		if b.Importance != importance {
			b.Importance = importance
			b.Refresh()
		}
		line := t.lines[i]
		moved = moved || line.Hidden != (i != chosen)
		line.Hidden = i != chosen
		line.FillColor = look.Color(look.ColorAccent)
		line.SetMinSize(fyne.NewSize(0, look.Px(3)))
		line.Refresh()
	}
	if moved {
		t.row.Refresh()
	}
}

// chosen is the tab that is marked.
func (t *tabs) chosen() int {
	for i, line := range t.lines {
		if !line.Hidden {
			return i
		}
	}
	return 0
}
