package look

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"
)

// PushButton is a button that takes the focus when the mouse goes down on it.
// Fyne 2.7.1's own does not, so a field being edited would not learn that its
// text is to be committed before the button acts.
type PushButton struct {
	widget.Button
	// OnEscape, if not nil, is called at the key Escape, as to close a dialog.
	OnEscape func()
}

// Button returns a button of ordinary weight.
func Button(label string, tapped func()) *PushButton {
	b := &PushButton{}
	b.Text, b.OnTapped = label, tapped
	b.ExtendBaseWidget(b)
	return b
}

// AccentButton returns a button in the accent colour, for the one thing a page
// is there to do.
func AccentButton(label string, tapped func()) *PushButton {
	b := Button(label, tapped)
	b.Importance = widget.HighImportance
	return b
}

// QuietButton returns a button without a fill, for small things in a line.
func QuietButton(label string, tapped func()) *PushButton {
	b := Button(label, tapped)
	b.Importance = widget.LowImportance
	return b
}

// MouseDown takes the focus.
func (b *PushButton) MouseDown(*desktop.MouseEvent) {
	if b.Disabled() {
		return
	}
	if c := fyne.CurrentApp().Driver().CanvasForObject(b); c != nil {
		c.Focus(b)
	}
}

// TypedKey presses the button at Space and at Enter.
func (b *PushButton) TypedKey(key *fyne.KeyEvent) {
	switch key.Name {
	case fyne.KeyReturn, fyne.KeyEnter:
		b.Button.TypedKey(&fyne.KeyEvent{Name: fyne.KeySpace})
	case fyne.KeyEscape:
		if b.OnEscape != nil {
			b.OnEscape()
		}
	default:
		b.Button.TypedKey(key)
		// the window may know the key
		if c := fyne.CurrentApp().Driver().CanvasForObject(b); c != nil && c.OnTypedKey() != nil {
			c.OnTypedKey()(key)
		}
	}
}

// MouseUp implements desktop.Mouseable; the tap does the work.
func (b *PushButton) MouseUp(*desktop.MouseEvent) {}
