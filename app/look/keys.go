package look

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/widget"
)

// Forward gives a key that an object has no use for to the object's window.
func Forward(o fyne.CanvasObject, key *fyne.KeyEvent) {
	if c := fyne.CurrentApp().Driver().CanvasForObject(o); c != nil && c.OnTypedKey() != nil {
		c.OnTypedKey()(key)
	}
}

// IsFunctionKey says whether a key is one that no entry or choice has a use
// for, and that commands of the window are given by.
func IsFunctionKey(name fyne.KeyName) bool {
	switch name {
	case fyne.KeyF1, fyne.KeyF3, fyne.KeyF4, fyne.KeyF5, fyne.KeyF6, fyne.KeyF7, fyne.KeyF8, fyne.KeyF9, fyne.KeyF10, fyne.KeyF11, fyne.KeyF12:
		return true
	}
	return false
}

// Check is a check box that leaves function keys to its window.
type Check struct{ widget.Check }

// NewCheck returns a check box that calls changed.
func NewCheck(label string, changed func(bool)) *Check {
	c := &Check{}
	c.Text, c.OnChanged = label, changed
	c.ExtendBaseWidget(c)
	return c
}

// TypedKey implements fyne.Focusable.
func (c *Check) TypedKey(key *fyne.KeyEvent) {
	if IsFunctionKey(key.Name) {
		Forward(c, key)
		return
	}
	c.Check.TypedKey(key)
}

// Select is a choice from a list that leaves function keys to its window.
type Select struct{ widget.Select }

// NewSelect returns a choice that calls changed.
func NewSelect(options []string, changed func(string)) *Select {
	s := &Select{}
	s.Options, s.OnChanged = options, changed
	s.PlaceHolder = "–"
	s.ExtendBaseWidget(s)
	return s
}

// TypedKey implements fyne.Focusable.
func (s *Select) TypedKey(key *fyne.KeyEvent) {
	if IsFunctionKey(key.Name) {
		Forward(s, key)
		return
	}
	s.Select.TypedKey(key)
}

// Search is an entry that leaves function keys to its window and is emptied by
// Escape.
type Search struct{ widget.Entry }

// NewSearch returns an empty entry.
func NewSearch() *Search {
	e := &Search{}
	e.ExtendBaseWidget(e)
	return e
}

// TypedKey implements fyne.Focusable.
func (e *Search) TypedKey(key *fyne.KeyEvent) {
	switch {
	case IsFunctionKey(key.Name):
		Forward(e, key)
	case key.Name == fyne.KeyEscape:
		e.SetText("")
	default:
		e.Entry.TypedKey(key)
	}
}
