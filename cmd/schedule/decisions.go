package main

import (
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// printDecisions writes what each decision of the plan is worth.
func printDecisions(w io.Writer, o *plan.Outcome) {
	decisions := plan.Decisions(o)
	if len(decisions) == 0 {
		fmt.Fprintln(w, "there is no plan whose decisions could be weighed")
		return
	}
	fmt.Fprintf(w, "what each decision is worth, in %s over the total of %s\n", o.Asset.Currency, strconv.FormatFloat(o.Money.Total, 'f', 0, 64))
	topic := plan.Topic("")
	for _, d := range decisions {
		if d.Topic != topic {
			topic = d.Topic
			fmt.Fprintf(w, "\n%s\n", topic)
		}
		difference := "no figure"
		if !math.IsNaN(d.Difference) {
			difference = fmt.Sprintf("%+.0f", d.Difference)
		}
		fmt.Fprintf(w, "%10s  %s\n", difference, oneLine(d.Text))
	}
}

// printPins writes what the pins cost.
func printPins(w io.Writer, o *plan.Outcome) {
	for _, p := range o.Pins {
		fmt.Fprintf(w, "pinned: %s %s %s %s: %+.0f %s\n", p.Zone, p.Docking, p.Action, p.Pattern, p.Cost, o.Asset.Currency)
	}
	if len(o.Pins) > 0 {
		fmt.Fprintf(w, "all pins together: %+.0f %s to the cheapest plan of %.0f\n\n", o.Money.Total-o.Money.Free, o.Asset.Currency, o.Money.Free)
	}
}

// parsePin reads zone:docking:keep, zone:docking:renew:pattern or
// zone:docking:add:pattern, the latter two with :count after them if wanted.
func parsePin(text string) (p renewal.Pin, err error) {
	parts := strings.Split(text, ":")
	if len(parts) < 3 || len(parts) > 5 {
		return p, fmt.Errorf("want zone:docking:action:pattern:count, without pattern for keep, got %q", text)
	}
	p.Zone, p.Action = parts[0], renewal.Action(parts[2])
	if p.Docking, err = hull.ParseDate(parts[1]); err != nil {
		return p, err
	}
	if len(parts) > 3 {
		p.Pattern = parts[3]
	}
	if len(parts) > 4 {
		if p.Count, err = strconv.Atoi(parts[4]); err != nil || p.Count < 1 {
			return p, fmt.Errorf("want a count of at least 1, got %q", parts[4])
		}
	}
	return p, nil
}

// parseQuay reads pattern:pieces pairs, parted by commas. An empty text is a
// quay with nothing on it.
func parseQuay(text string) (map[string]int, error) {
	quay := map[string]int{}
	if text == "" {
		return quay, nil
	}
	for _, part := range strings.Split(text, ",") {
		id, count, ok := strings.Cut(part, ":")
		n, err := strconv.Atoi(count)
		if _, twice := quay[id]; !ok || err != nil || n < 0 || twice {
			return nil, fmt.Errorf("want each pattern once as pattern:pieces, got %q", part)
		}
		quay[id] = n
	}
	return quay, nil
}
