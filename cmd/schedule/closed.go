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
	for i, d := range a.Closed {
		if i > 0 {
			fmt.Fprintln(w)
		}
		by := ""
		if d.By != "" {
			by = ", closed by " + oneLine(d.By)
		}
		fmt.Fprintf(w, "%s, %s on %s%s: planned against found\n", oneLine(a.Name), d.Kind, d.Date, by)
		for _, line := range plan.CompareClosed(a, i).Words() {
			fmt.Fprintf(w, "- %s\n", oneLine(line))
		}
	}
}
