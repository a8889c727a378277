package main

import (
	"fmt"
	"io"
	"strconv"
	"strings"

	"anodewright/hull"
)

// printSteps writes figures with where they come from.
func printSteps(w io.Writer, steps []hull.Step) {
	for _, s := range steps {
		fmt.Fprintf(w, "%s = %s\n    %s\n", s.Figure, quantity(s.Value, s.Unit), s.Formula)
		var inputs []string
		for _, in := range s.Inputs {
			inputs = append(inputs, in.Name+" "+quantity(in.Value, in.Unit))
		}
		if len(inputs) > 0 {
			fmt.Fprintf(w, "    with %s\n", strings.Join(inputs, ", "))
		}
		fmt.Fprintf(w, "    %s (%s)\n", s.Source, s.Confidence)
	}
}

func quantity(x float64, unit string) string {
	return strings.TrimSpace(strconv.FormatFloat(x, 'g', 6, 64) + " " + unit)
}
