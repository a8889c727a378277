package pages

import "fyne.io/fyne/v2"

// drawn is a page with a lower part that folds.
type drawn interface{ lower() *drawer }

// windowKey acts on a key that no object had a use for.
func (f *Frame) windowKey(name fyne.KeyName) {
	switch name {
	case fyne.KeyF1:
		f.helpAbout()
	case fyne.KeyF4:
		f.closeDocking()
	case fyne.KeyF7:
		f.toggleLower()
	case fyne.KeyF8:
		f.toggleBand()
	case fyne.KeyF9:
		f.rail.toggle()
	}
}

// toggleLower folds or opens the lower part of the page, if it has one.
func (f *Frame) toggleLower() {
	if p, ok := f.pages[f.current].(drawn); ok {
		p.lower().toggle()
	}
}

func (f *Frame) lowerIsOpen() bool {
	p, ok := f.pages[f.current].(drawn)
	return ok && p.lower().open
}
