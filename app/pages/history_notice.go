package pages

import (
	"time"

	"fyne.io/fyne/v2"

	"anodewright/app/grid"
)

// noticeEvery is how often the window looks for other programs' edits.
const noticeEvery = 2 * time.Second

// watch looks for other programs' edits from now on until Close, and at once
// when the window comes to the front.
func (f *Frame) watch() {
	if f.watching != nil {
		return
	}
	stop := make(chan struct{})
	f.watching = stop
	f.app.Lifecycle().SetOnEnteredForeground(func() { fyne.Do(f.notice) })
	go func() {
		tick := time.NewTicker(noticeEvery)
		defer tick.Stop()
		for {
			select {
			case <-tick.C:
				fyne.Do(f.notice)
			case <-stop:
				return
			}
		}
	}()
}

// unwatch ends watch.
func (f *Frame) unwatch() {
	if f.watching != nil {
		close(f.watching)
		f.watching = nil
	}
}

// notice shows what other programs stored, unless something is being typed or
// a dialog is open: then it waits for the next time. What goes wrong is told
// once.
func (f *Frame) notice() {
	if f.busyTyping() {
		return
	}
	_, err := f.s.Notice()
	switch {
	case err == nil:
		f.noticed = ""
	case err.Error() != f.noticed:
		f.noticed = err.Error()
		f.report(err)
	}
}

func (f *Frame) busyTyping() bool {
	c := f.win.Canvas()
	if c.Overlays().Top() != nil {
		return true
	}
	if _, ok := c.Focused().(*grid.Grid); ok {
		return false
	}
	_, entry := c.Focused().(interface{ SelectedText() string })
	return entry
}
