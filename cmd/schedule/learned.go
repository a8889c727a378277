package main

import (
	"fmt"
	"io"

	"anodewright/anodes/plan"
)

// printLearned writes, where the plan uses what readings teach, the demand
// factor of each zone that they tell of.
func printLearned(w io.Writer, o *plan.Outcome) {
	if !o.Learns {
		return
	}
	any := false
	for _, z := range o.Zones {
		if z.Coating != nil {
			fmt.Fprintf(w, "%s: %s\n", z.Zone.Name, z.Coating.Text())
		}
		if z.Learned == nil {
			continue
		}
		any = true
		fmt.Fprintf(w, "%s: demand factor %.2f (%.2f to %.2f), planned with %.2f\n", z.Zone.Name, z.Factor.Median, z.Factor.Low, z.Factor.High, z.Factor.Used)
	}
	if next := o.NextReadings(); len(next) > 0 && next[0].Narrows >= 0.01 {
		s := next[0]
		set := o.Zones[s.Zone].Zone.Fitted[s.Set]
		fmt.Fprintf(w, "what would help to decide most: %s, %d pieces of %s fitted on %s weighed today: range %.2f to %.2f becomes about %.2f to %.2f\n",
			o.Zones[s.Zone].Zone.Name, s.Pieces, set.Pattern, set.Fitted, s.Demand.Low, s.Demand.High, s.After.Low, s.After.High)
		if s.Wrong >= 0.005 {
			fmt.Fprintf(w, "whether it may stay to %s: a decision now is wrong with %.0f %%, after that reading with about %.0f %%\n", s.Until, 100*s.Wrong, 100*s.WrongAfter)
		}
	}
	if !any {
		fmt.Fprintln(w, "no reading tells of the demand factor: planned with the design figures")
	}
}
