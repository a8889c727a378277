package main

import (
	"fmt"
	"io"

	"anodewright/anodes/plan"
)

// printProtections writes what holds or burdens zones beside anodes in water:
// coats of zinc, impressed current, nobler metal, rods in soil.
func printProtections(w io.Writer, o *plan.Outcome) {
	first := true
	for i := range o.Zones {
		z := &o.Zones[i]
		if z.Protection == nil {
			continue
		}
		if first {
			fmt.Fprintln(w, "\nother protections")
			first = false
		}
		fmt.Fprintf(w, "- %s: %s\n", z.Zone.Name, z.Protection.Heading())
		for _, line := range z.Protection.Words() {
			fmt.Fprintf(w, "    %s\n", line)
		}
	}
}
