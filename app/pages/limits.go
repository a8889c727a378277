package pages

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/layout"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// limitsDialog asks what may be done at one docking at most.
type limitsDialog struct {
	f       *Frame
	d       *dialog.CustomDialog
	entries []*formEntry
	wrong   *look.Paragraph
}

// askLimits asks for the limits at every docking of the open asset.
func (f *Frame) askLimits() {
	if a := f.s.Asset(); a != nil {
		l := f.newLimits(f.s.Limits(), a.Currency)
		l.d.Resize(dialogSize(f.win, 520, 320))
		l.d.Show()
		f.win.Canvas().Focus(l.entries[0])
	}
}

func (f *Frame) newLimits(now renewal.Limits, currency string) *limitsDialog {
	l := &limitsDialog{f: f, wrong: look.Wrong("")}
	form := container.New(layout.NewFormLayout())
	for _, field := range []struct {
		title string
		value float64
	}{
		{say.T("Pieces fitted"), float64(now.Pieces)},
		{say.T("Money spent, %s, undiscounted", currency), now.Budget},
		{say.T("Patterns ordered"), float64(now.Patterns)},
	} {
		e := &formEntry{escape: func() { f.hide(l.d) }}
		e.ExtendBaseWidget(e)
		e.SetPlaceHolder(say.T("no limit"))
		if field.value > 0 {
			e.SetText(session.Number(field.value))
		}
		e.OnSubmitted = func(string) { l.use() }
		l.entries = append(l.entries, e)
		form.Add(widget.NewLabel(field.title))
		form.Add(e)
	}
	note := look.Note(say.T("At most so much at any one docking: what the yard can fit, what may be spent, how many patterns an order may name. The plan then is the cheapest within them; where none is, it says which zone and docking stand against it."))
	l.d = dialog.NewCustomWithoutButtons(say.T("Limits at each docking"), container.NewVBox(form, note, l.wrong), f.win)
	cancel := look.Button(say.T("Cancel"), func() { f.hide(l.d) })
	use := look.AccentButton(say.T("Use"), l.use)
	cancel.OnEscape, use.OnEscape = cancel.OnTapped, cancel.OnTapped
	l.d.SetButtons([]fyne.CanvasObject{cancel, use})
	return l
}

// use takes the limits over and closes the dialog, or says what is wrong.
func (l *limitsDialog) use() {
	var figures [3]float64
	for i, e := range l.entries {
		if strings.TrimSpace(e.Text) == "" {
			continue
		}
		x, err := session.ParseNumber(e.Text)
		if err == nil && i != 1 && x != float64(int(x)) {
			err = fmt.Errorf("want a whole number, got %q", e.Text)
		}
		if err != nil {
			l.wrong.SetText(say.Sentence(err.Error()))
			l.f.win.Canvas().Focus(e)
			return
		}
		figures[i] = x
	}
	if err := l.f.s.SetLimits(renewal.Limits{Pieces: int(figures[0]), Budget: figures[1], Patterns: int(figures[2])}); err != nil {
		l.wrong.SetText(say.Sentence(err.Error()))
		return
	}
	l.f.hide(l.d)
}

// limitsText says how the plan stands to its limits; empty where none are set.
func limitsText(o *plan.Outcome) string {
	if o.OverLimits != "" {
		return say.T("Without limits, for %s", say.Sentence(o.OverLimits))
	}
	if o.Limits == (renewal.Limits{}) {
		return ""
	}
	var all []string
	for _, line := range o.LimitTexts() {
		all = append(all, say.Sentence(line))
	}
	return say.T("Within limits: %s", strings.Join(all, "; "))
}
