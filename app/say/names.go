package say

import (
	"maps"
	"sync/atomic"
)

var names atomic.Pointer[map[string]bool]

// KeepNames names what is never translated in a sentence: what the user calls
// his zones, waters and patterns, which may be words of the program as well.
func KeepNames(kept map[string]bool) {
	if old := names.Load(); old != nil && maps.Equal(*old, kept) {
		return
	}
	names.Store(&kept)
	if ts := current.Load().templates; ts != nil {
		ts.mu.Lock()
		clear(ts.kept)
		ts.mu.Unlock()
	}
}

// isName tells whether a text is one of the kept names.
func isName(s string) bool {
	kept := names.Load()
	return kept != nil && (*kept)[s]
}
