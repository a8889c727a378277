package pages

import (
	"sync/atomic"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
	"anodewright/app/say"
)

// patience is how long something may take before the window says that it goes
// on and how it is stopped.
const patience = 500 * time.Millisecond

// aside runs something on a goroutine of its own; testOnlyInline makes it run
// at once, so that tests need not wait.
func aside(do func()) {
	if testOnlyInline {
		do()
		return
	}
	go do()
}

var testOnlyInline bool

// work does something beside the window and then, on the window's own
// goroutine, done with its error. What takes longer than a moment shows that
// it goes on and can be stopped: then stopped says so to it, and done is not
// called unless it was finished by then.
func (f *Frame) work(title string, do func(stopped func() bool) error, done func(error)) {
	var stop atomic.Bool
	finished := false // read and written on the window's goroutine
	var d *dialog.CustomDialog
	aside(func() {
		err := do(stop.Load)
		fyne.Do(func() {
			finished = true
			if d != nil {
				f.hide(d)
			}
			if !stop.Load() || err == nil {
				done(err)
			}
		})
	})
	if finished {
		return
	}
	time.AfterFunc(patience, func() {
		fyne.Do(func() {
			if !finished {
				d = f.showProgress(title, func() { stop.Store(true) })
			}
		})
	})
}

// showProgress shows that something goes on, and a button that stops it.
func (f *Frame) showProgress(title string, stop func()) *dialog.CustomDialog {
	d := dialog.NewCustomWithoutButtons(title, container.NewVBox(look.Body(say.T("This may take a moment.")), widget.NewProgressBarInfinite()), f.win)
	cancel := look.Button(say.T("Cancel"), func() {
		stop()
		f.hide(d)
	})
	cancel.OnEscape = cancel.OnTapped
	d.SetButtons([]fyne.CanvasObject{cancel})
	d.Resize(dialogSize(f.win, 420, 170))
	d.Show()
	f.win.Canvas().Focus(cancel)
	return d
}
