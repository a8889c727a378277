//go:build e2e && !ci && linux

// Journeys through the real program: its own window on an X server of ours,
// driven by keys and mouse. They cover what tests without a window cannot
// see: focus, shortcuts, the user interface's thread, starting and ending.
// Pixels are never compared; journeys look at saved files and at what the
// program writes to standard error.
package main_test

import (
	"strings"
	"testing"
)

func TestWindowOpensAndClosesCleanly(t *testing.T) {
	w := open(t)
	w.close()
	// The toolkit now and then reads its own preferences file in the moment
	// it writes it, and says so; the app keeps only the recent registers there.
	out := strings.Replace(w.stderr.String(), "Fyne error:  Preferences load error:", "", 1)
	if strings.Contains(out, "Fyne error") {
		t.Errorf("standard error:\n%s", out)
	}
}
