package main

import (
	"fmt"
	"io"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// printClosed writes, for every closed docking, what was planned against what
// was found and done.
func printClosed(w io.Writer, a *hull.Asset) {
	if len(a.Closed) == 0 {
		fmt.Fprintln(w, "no docking of this asset was closed")
	}
	for i := range a.Closed {
		if i > 0 {
			fmt.Fprintln(w)
		}
		printAsBuilt(w, a, i)
	}
}

// printAsBuilt prints what was planned for a closed docking against what was
// found.
func printAsBuilt(w io.Writer, a *hull.Asset, i int) {
	d, by := a.Closed[i], ""
	if d.By != "" {
		by = ", closed by " + oneLine(d.By)
	}
	fmt.Fprintf(w, "%s, %s on %s%s: planned against found\n", oneLine(a.Name), d.Kind, d.Date, by)
	for _, line := range plan.CompareClosed(a, i).Words() {
		fmt.Fprintf(w, "- %s\n", oneLine(line))
	}
}
