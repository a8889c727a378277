package pages

import (
	"errors"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/test"
)

func TestFailedSaysWhyAndClosesByKey(t *testing.T) {
	a := test.NewTempApp(t)
	w := a.NewWindow("")
	w.Resize(small)
	closed := false
	w.SetOnClosed(func() { closed = true })
	Failed(a, w, errors.New("cannot open x: it is not a register"))
	all := ""
	for _, o := range within(w.Content()) {
		if line, ok := o.(*canvas.Text); ok {
			all += line.Text + " "
		}
	}
	if !strings.Contains(all, "cannot open x: it is not a register") || !strings.Contains(all, "-register") {
		t.Errorf("it says %q", all)
	}
	w.Canvas().Focused().TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	if !closed {
		t.Error("Enter does not close the window")
	}
}
