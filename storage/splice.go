package storage

import "unicode/utf8"

// A splice makes a text from the one before it: the first head bytes of that,
// then middle, then its last tail bytes. An edit changes little of an asset,
// so its history takes hundreds of bytes an edit instead of a copy.
type splice struct {
	head, tail int
	middle     string
}

// wholeEvery is how many revisions apart the history holds a whole text, so
// that a revision follows from few others.
const wholeEvery = 32

// follow returns what the history holds of revision rev: a splice, or the
// whole text when it is the revision's turn or no longer than it.
func follow(rev int64, old, new string) splice {
	if rev%wholeEvery != 0 {
		if s := spliceOf(old, new); len(s.middle) < len(new) {
			return s
		}
	}
	return splice{middle: new}
}

// spliceOf returns the shortest splice of old that makes new and whose middle
// starts and ends between characters.
func spliceOf(old, new string) (s splice) {
	shorter := min(len(old), len(new))
	for s.head < shorter && old[s.head] == new[s.head] {
		s.head++
	}
	for s.head > 0 && !atRune(new, s.head) {
		s.head--
	}
	for s.tail < shorter-s.head && old[len(old)-1-s.tail] == new[len(new)-1-s.tail] {
		s.tail++
	}
	for s.tail > 0 && !atRune(new, len(new)-s.tail) {
		s.tail--
	}
	s.middle = new[s.head : len(new)-s.tail]
	return s
}

// atRune reports whether a character starts at byte i of text, or it ends
// there.
func atRune(text string, i int) bool { return i == len(text) || utf8.RuneStart(text[i]) }

// apply returns the text that follows from old, and whether it can.
func (s splice) apply(old string) (string, bool) {
	if s.head < 0 || s.tail < 0 || s.head > len(old) || s.tail > len(old)-s.head {
		return "", false
	}
	return old[:s.head] + s.middle + old[len(old)-s.tail:], true
}
