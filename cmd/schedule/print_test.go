package main

import (
	"errors"
	"io"
	"strings"
	"testing"

	"anodewright/hull"
)

// full is a disk that takes some bytes and no more.
type full struct{ left int }

func (f *full) Write(text []byte) (int, error) {
	if f.left -= len(text); f.left < 0 {
		return 0, errors.New("no space left")
	}
	return len(text), nil
}

// A result that cannot be printed whole is never a success.
func TestWhatCannotBePrintedIsAFault(t *testing.T) {
	for _, args := range [][]string{nil, {"-json"}, {"-schema"}, {"-words"}, {"-decisions"}} {
		var told strings.Builder
		if status := run(args, &full{left: 100}, &told, hull.NewDate(2026, 12, 1)); status != 2 || !strings.Contains(told.String(), "no space left") {
			t.Errorf("%v: status %d, told %q", args, status, told.String())
		}
		if status := run(args, io.Discard, &told, hull.NewDate(2026, 12, 1)); status != 0 {
			t.Errorf("%v: status %d", args, status)
		}
	}
}

// Small currents keep their figures.
func TestAmperes(t *testing.T) {
	for x, want := range map[float64]string{0: "0.00", 0.00247573: "0.0025", 0.0996: "0.1", 0.5: "0.50", 17.7424: "17.74", 364: "364.00"} {
		if got := amperes(x); got != want {
			t.Errorf("%g A is written %q, want %q", x, got, want)
		}
	}
}
