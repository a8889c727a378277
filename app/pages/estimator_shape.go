package pages

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull/area"
)

// shapeForm estimates a shape of which the sizes are entered.
type shapeForm struct {
	choice  *choice
	sizes   *fyne.Container
	shape   *area.Shape // nil: none chosen
	entries []*formEntry
	pieces  *formEntry
	box     *fyne.Container
	chosen  func() // shows the sizes
}

// newShapeForm calls changed when another shape or size is entered.
func newShapeForm(changed, escape func()) *shapeForm {
	s := &shapeForm{sizes: container.NewHBox()}
	shapes := area.Shapes()
	var names []string
	for _, x := range shapes {
		names = append(names, x.Name)
	}
	entry := func(label, usual string) *formEntry {
		e := &formEntry{escape: escape}
		e.ExtendBaseWidget(e)
		e.SetPlaceHolder(usual)
		e.OnChanged = func(string) { changed() }
		s.sizes.Add(look.Plain(label))
		s.sizes.Add(container.New(wide{70}, e))
		return e
	}
	s.choice = newChoice(names, "", func(name string) {
		s.sizes.RemoveAll()
		s.entries = nil
		for i := range shapes {
			if shapes[i].Name == name {
				s.shape = &shapes[i]
			}
		}
		for _, size := range s.shape.Sizes {
			s.entries = append(s.entries, entry(strings.TrimSpace(say.T(size.Title)+" "+say.Unit(size.Unit)), session.ShownNumber(say.Of(size.Unit), size.Usual)))
		}
		s.pieces = entry(say.T("pieces"), "1")
		s.chosen()
		changed()
	})
	for _, b := range s.choice.buttons {
		b.OnEscape = escape
	}
	sizes := container.NewHScroll(s.sizes)
	sizes.Hide()
	s.chosen = sizes.Show
	s.box = container.NewVBox(container.NewBorder(nil, nil, look.Plain(say.T("Or a shape")), nil, container.NewHScroll(s.choice.row)), sizes)
	return s
}

// estimates returns the shape's estimates; none where no shape is chosen.
func (s *shapeForm) estimates() (es []area.Estimate, err error) {
	if s.shape == nil {
		return nil, nil
	}
	number := func(entry *formEntry, title string, q say.Quantity, usual float64) float64 {
		text := strings.TrimSpace(entry.Text)
		if text == "" {
			return usual
		}
		x, bad := session.ParseShown(q, text)
		if bad != nil && err == nil {
			err = fmt.Errorf("%s: %w", title, bad)
		}
		return x
	}
	var sizes []float64
	for i, size := range s.shape.Sizes {
		sizes = append(sizes, number(s.entries[i], size.Title, say.Of(size.Unit), size.Usual))
	}
	n := number(s.pieces, "pieces", say.Plain, 1)
	if err == nil && (n < 1 || n > 100000 || n != float64(int(n))) {
		err = fmt.Errorf("pieces: want a whole number from 1 to 100 000, got %s", session.Number(n))
	}
	if err != nil {
		return nil, err
	}
	return s.shape.Estimates(int(n), sizes)
}
