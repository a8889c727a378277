package hull

import (
	"fmt"
	"strings"
)

// Fault is one thing wrong with what a person entered: the path of the field,
// what was wanted there and what was got.
type Fault struct {
	Path string // for instance zones[3].coating.a
	Want string
	Got  string
}

// Error writes the fault as one line.
func (f Fault) Error() string {
	s := f.Path + ": want " + f.Want
	if f.Path == "" {
		s = "want " + f.Want
	}
	if f.Got != "" {
		s += ", got " + f.Got
	}
	return s
}

// Faults is every fault found in one go, in the order of the fields. It is an
// error only when it is not empty: use Err.
type Faults []Fault

// Error writes one fault a line.
func (fs Faults) Error() string {
	lines := make([]string, len(fs))
	for i, f := range fs {
		lines[i] = f.Error()
	}
	return strings.Join(lines, "\n")
}

// Err returns nil when there is no fault.
func (fs Faults) Err() error {
	if len(fs) == 0 {
		return nil
	}
	return fs
}

// At returns the first fault of exactly this field, if there is one.
func (fs Faults) At(path string) (Fault, bool) {
	for _, f := range fs {
		if f.Path == path {
			return f, true
		}
	}
	return Fault{}, false
}

func (fs *Faults) add(path, want, got string, args ...any) {
	*fs = append(*fs, Fault{Path: path, Want: want, Got: fmt.Sprintf(got, args...)})
}
