package pages

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/storage/sheet"
)

// surveyForm is the dialog that shows what a survey sheet says, before any of
// it is stored: the readings, and the cells that were not understood.
type surveyForm struct {
	f       *Frame
	v       *session.Survey
	d       *dialog.CustomDialog
	list    *grid.Grid
	detail  *look.Paragraph // of the selected reading
	faults  *grid.Grid
	correct *widget.Check
	store   *look.PushButton
	cancel  *look.PushButton
}

func newSurveyForm(f *Frame, v *session.Survey, file string) *surveyForm {
	s := &surveyForm{f: f, v: v, detail: look.Note("")}
	s.list = grid.New([]grid.Column{
		{Title: say.T("Zone"), Width: 110, Fill: true},
		{Title: say.T("Set"), Unit: say.T("pattern, fitted"), Width: 160},
		{Title: say.T("Date"), Width: 102},
		{Title: say.T("Understood"), Width: 250, Fill: true},
		{Title: say.T("From"), Unit: say.T("cells"), Width: 145},
		{Title: say.T("What happens"), Width: 170},
	}, &fixed{cells: surveyRows(f, v)}, grid.RowHeight(36), grid.Sticky())
	head := []fyne.CanvasObject{look.Body(s.summary(file))}
	const most = 5
	for i, w := range v.Warnings {
		if i == most {
			head = append(head, look.Note(say.T("and %d more", len(v.Warnings)-most)))
			break
		}
		head = append(head, look.Wrong("⚠ "+say.Sentence(w)))
	}
	s.list.OnSelect = func(row, _ int) { s.showDetail(row) }
	foot := container.NewVBox(s.detail)
	if len(v.Faults) > 0 {
		var cells [][]grid.Cell
		for _, fault := range v.Faults {
			cells = append(cells, []grid.Cell{{Text: say.Sentence(fault.Box.String()), Bold: true}, {Text: fault.Found}, {Text: say.Sentence(fault.Why)}})
		}
		s.faults = grid.New([]grid.Column{
			{Title: say.T("Not understood"), Unit: say.T("cell"), Width: 150},
			{Title: say.T("Found"), Width: 140},
			{Title: say.T("Why"), Width: 400, Fill: true},
		}, &fixed{cells: cells}, grid.Dense(), grid.FitRows(5))
		foot.Add(s.faults)
	}
	s.correct = widget.NewCheck(say.T("withdraw the stored readings that these differ from"), nil)
	s.correct.SetChecked(true)
	if v.Count(sheet.Differs) > 0 {
		foot.Add(s.correct)
	}
	s.d = dialog.NewCustomWithoutButtons(say.T("Take in a survey"), container.NewBorder(container.NewVBox(head...), foot, nil, nil, s.list), f.win)
	s.cancel = look.Button(say.T("Cancel"), s.close)
	n := len(v.ToStore())
	s.store = look.AccentButton(say.N("Store %d reading", "Store %d readings", n), s.take)
	if n == 0 {
		s.store.Disable()
	}
	s.cancel.OnEscape, s.store.OnEscape = s.close, s.close
	escape := func(_, _ int, key *fyne.KeyEvent) bool {
		if key.Name == fyne.KeyEscape {
			s.close()
		}
		return key.Name == fyne.KeyEscape
	}
	s.list.OnKey = escape
	if s.faults != nil {
		s.faults.OnKey = escape
	}
	s.d.SetButtons([]fyne.CanvasObject{s.cancel, s.store})
	return s
}

// summary says how much was understood.
func (s *surveyForm) summary(file string) string {
	v := s.v
	if len(v.Readings)+len(v.Faults) == 0 {
		return say.T("%s: nothing is filled in.", file)
	}
	text := say.T("%s: %d readings understood, %d of them new, %d that differ from stored ones, %d there already.", file,
		len(v.Readings), v.Count(sheet.New), v.Count(sheet.Differs), v.Count(sheet.There))
	if n := len(v.Faults); n > 0 {
		text += " " + say.T("⚠ %d cells were not understood: see below. What was understood can be stored without them.", n)
	}
	return text
}

// surveyRows are the lines of the table of readings.
func surveyRows(f *Frame, v *session.Survey) (rows [][]grid.Cell) {
	a := f.s.Asset()
	for i := range v.Readings {
		u := &v.Readings[i]
		r := &u.Reading
		set := r.Pattern
		if !r.Fitted.IsZero() {
			set += ", " + session.Day(r.Fitted)
		}
		from := ""
		if len(u.Boxes) > 0 {
			from = say.Sentence(u.Boxes[0].String())
		}
		if n := len(u.Boxes); n > 1 {
			from += " +" + fmt.Sprint(n-1)
		}
		found := grid.Cell{Text: say.Sentence(sheet.Describe(r))}
		if len(u.Doubts) > 0 {
			found.Sub = "⚠ " + doubtText(u.Doubts[0])
		}
		rows = append(rows, []grid.Cell{
			{Text: zoneName(a, r.Zone), Bold: true}, {Text: set}, {Text: session.Day(r.Date)}, found, {Text: from, Muted: true},
			{Text: say.T(u.Status.String()), Accent: u.Status == sheet.New || u.Status == sheet.Differs, Muted: u.Status == sheet.There},
		})
	}
	return rows
}

// doubtText is a doubt without the words that say which reading it is about.
func doubtText(doubt string) string {
	doubt = say.Sentence(doubt)
	if _, after, found := strings.Cut(doubt, ": "); found {
		return after
	}
	return doubt
}

// showDetail says all of a reading: what was found, in which cells, and what
// contradicts itself.
func (s *surveyForm) showDetail(row int) {
	if row < 0 || row >= len(s.v.Readings) {
		return
	}
	u := &s.v.Readings[row]
	var boxes []string
	for _, b := range u.Boxes {
		boxes = append(boxes, say.Sentence(b.String()))
	}
	text := say.Sentence(sheet.Describe(&u.Reading)) + " (" + strings.Join(boxes, ", ") + ")"
	for _, d := range u.Doubts {
		text += " ⚠ " + doubtText(d)
	}
	s.detail.SetText(text)
	s.d.Refresh() // it may need more lines
}

func (s *surveyForm) show() {
	s.d.Resize(dialogSize(s.f.win, 1120, 620))
	s.d.Show()
	s.list.Select(0, 0)
	if s.store.Disabled() {
		s.f.win.Canvas().Focus(s.cancel)
	} else {
		s.f.win.Canvas().Focus(s.store)
	}
}

func (s *surveyForm) close() { s.f.hide(s.d) }

// take stores the readings and shows them.
func (s *surveyForm) take() {
	if _, err := s.f.s.StoreSurvey(s.v, s.correct.Checked); err != nil {
		s.close()
		s.f.report(err)
		return
	}
	s.close()
	for i, p := range s.f.pages {
		if _, ok := p.(*readingsPage); ok {
			s.f.show(i)
		}
	}
}
