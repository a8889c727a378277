package storage

import (
	"errors"
	"fmt"
	"time"
)

// Error is a failure of a register in a sentence for people. Test it with
// errors.Is and one of the kinds below; what the database or the system said
// can be unwrapped too.
type Error struct {
	Doing  string // such as "save Tern Passage in"
	Path   string // of the register
	Kind   error  // one of the kinds below; nil when none fits
	Detail string // more about it, or nothing
	Cause  error  // from the database or the system; may be nil
}

// The kinds of Error. Their texts are the reasons in its sentence.
var (
	ErrMissing     = errors.New("there is no such file")
	ErrFolder      = errors.New("it is a folder; a register is one file")
	ErrEmptyFile   = errors.New("it is empty; a register never is, so take a copy of it or choose another name")
	ErrNotRegister = errors.New("it is not a register")
	ErrDamaged     = errors.New("it is damaged and was left as it is; take a copy of an earlier day")
	ErrForbidden   = errors.New("this user may not read or make it")
	ErrReadOnly    = errors.New("it can be read but not changed")
	ErrBusy        = errors.New("another program is writing it; try again in a moment")
	ErrMoved       = errors.New("the file was moved, renamed or deleted since it was opened; nothing was stored")
	ErrDiskFull    = errors.New("the disk is full; nothing was stored")
	ErrDisk        = errors.New("the disk reports a failure")
	ErrClosed      = errors.New("it is closed")
	ErrInvalid     = errors.New("the asset has faults, and only a faultless one is stored")
	ErrNoAsset     = errors.New("there is no such asset")
	ErrNoRevision  = errors.New("there is no such revision of the asset")
	ErrNotRemoved  = errors.New("the asset is not removed")
)

// Error writes the sentence.
func (e *Error) Error() string {
	s := "cannot " + e.Doing + " " + e.Path
	if e.Kind != nil {
		s += ": " + e.Kind.Error()
	}
	if e.Detail != "" {
		s += ": " + e.Detail
	}
	return s
}

// Unwrap returns the kind and the cause.
func (e *Error) Unwrap() []error {
	var errs []error
	if e.Kind != nil {
		errs = append(errs, e.Kind)
	}
	if e.Cause != nil {
		errs = append(errs, e.Cause)
	}
	return errs
}

// ErrClash is what every *Clash is, for errors.Is.
var ErrClash = errors.New("the asset was changed elsewhere")

// Clash means that the stored asset is no longer the revision that was
// edited. Nothing was overwritten.
type Clash struct {
	ID      string
	Name    string    // as stored
	Mine    int64     // the revision that was edited
	Stored  int64     // the revision that is stored
	Who     string    // who stored it
	When    time.Time // when, UTC
	Removed bool      // the asset was removed meanwhile
}

// Error writes the clash as a sentence.
func (c *Clash) Error() string {
	deed := "changed"
	if c.Removed {
		deed = "removed"
	}
	return fmt.Sprintf("%s was %s by %s at %s UTC (revision %d) after revision %d was opened here; nothing was overwritten",
		c.Name, deed, c.Who, c.When.UTC().Format("2006-01-02 15:04"), c.Stored, c.Mine)
}

// Is makes a clash an ErrClash.
func (c *Clash) Is(target error) bool { return target == ErrClash }

// because makes an Error of which fail has still to say what was being done.
func because(kind error, detail string, cause error) *Error {
	return &Error{Kind: kind, Detail: detail, Cause: cause}
}

// failure says of an error from below what was being done with which file.
// It makes nil of nil and leaves a clash as it is.
func failure(doing, path string, err error) error {
	var clash *Clash
	if err == nil || errors.As(err, &clash) {
		return err
	}
	var ours *Error
	if !errors.As(err, &ours) {
		detail, kind := sqlite.explain(err)
		ours = because(kind, detail, err)
	}
	if ours.Doing == "" {
		ours.Doing, ours.Path = doing, path
	}
	return ours
}

// fail is failure for this register.
func (r *Register) fail(doing string, err error) error {
	if err != nil && r.closed.Load() {
		err = because(ErrClosed, "", err)
	}
	return failure(doing, r.path, err)
}
