package main

import (
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"text/tabwriter"
	"unicode"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// print writes the schedule by zone for people.
func print(w io.Writer, o *plan.Outcome) {
	a := o.Asset
	fmt.Fprintf(w, "%s: anode schedule as of %s, last docking %s, horizon %s\n", oneLine(a.Name), o.Today, a.Start(), a.Horizon)
	fmt.Fprintf(w, "densities by %s, sizing by the code, confidence %g\n", a.Basis.Densities, a.Basis.ConfidenceLevel())
	printLearned(w, o)
	fmt.Fprintln(w)

	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	head := []string{"zone", "fitted now"}
	for _, d := range a.Ahead() {
		head = append(head, d.Date.String())
	}
	fmt.Fprintln(t, strings.Join(head, "\t"))
	for i := range a.Zones {
		row := []string{oneLine(a.Zones[i].Name), fittedNow(a, &a.Zones[i])}
		for k := range a.Ahead() {
			row = append(row, actionText(o, i, k))
		}
		fmt.Fprintln(t, strings.Join(row, "\t"))
	}
	t.Flush()

	fmt.Fprintln(w, "\ncurrent demand in A: initial / mean / final of each interval, own")
	t = tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	for _, z := range o.Zones {
		row := []string{oneLine(z.Zone.Name)}
		for _, iv := range z.Intervals {
			row = append(row, fmt.Sprintf("%s / %s / %s to %s", amperes(iv.Demand.Initial), amperes(iv.Demand.Mean), amperes(iv.Demand.Final), iv.To))
		}
		fmt.Fprintln(t, strings.Join(row, "\t"))
	}
	t.Flush()

	printProtections(w, o)

	printOrder(w, o)
	printStaged(w, o)
	fmt.Fprintf(w, "\ncost %.0f %s, %s", o.Money.Total, a.Currency, proof(o))
	fmt.Fprintf(w, "\nbeside it: renew all at every docking %s, as late as possible %s\n", money(o.Money.RenewAll), money(o.Money.AsLate))
	if len(o.Cautions) > 0 {
		fmt.Fprintln(w, "\ncautions")
		for _, c := range o.Cautions {
			where := oneLine(a.Name)
			if c.Zone >= 0 {
				where = oneLine(a.Zones[c.Zone].Name)
			}
			fmt.Fprintf(w, "- %s: %s\n", where, c.Text)
		}
	}
	fmt.Fprintf(w, "\n%s\n", plan.Closing)
}

// oneLine writes a name so that no table falls apart and no terminal obeys it:
// control characters become blanks.
func oneLine(name string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsControl(r) {
			return ' '
		}
		return r
	}, name)
}

// amperes writes a current to the hundredth, and smaller ones, as those of a
// well coated line, to two figures.
func amperes(x float64) string {
	if x != 0 && math.Abs(x) < 0.1 {
		return strconv.FormatFloat(x, 'g', 2, 64)
	}
	return strconv.FormatFloat(x, 'f', 2, 64)
}

func proof(o *plan.Outcome) string {
	switch {
	case len(o.Unmet) > 0:
		return "without the zones that no set can hold"
	case o.Money.Proven:
		return "proven cheapest"
	case math.IsNaN(o.Money.LowerBound):
		return "nothing to plan"
	}
	return fmt.Sprintf("no plan can cost less than %.0f", o.Money.LowerBound)
}

func money(x float64) string {
	if math.IsNaN(x) {
		return "not possible"
	}
	return fmt.Sprintf("%.0f", x)
}

func fittedNow(a *hull.Asset, z *hull.Zone) string {
	switch h := z.Hold().(type) {
	case hull.ByZone:
		host, _ := a.Zone(h.Host)
		if !z.Bonded {
			return "not bonded to " + oneLine(host.Name)
		}
		return "held by " + oneLine(host.Name)
	case hull.ByImpressedCurrent:
		return "impressed current"
	case hull.ByCoat:
		return "zinc coat"
	case hull.ByAnodes:
		var parts []string
		for _, f := range z.Fitted {
			parts = append(parts, fmt.Sprintf("%d x %s", f.Count, f.Pattern))
		}
		if len(parts) == 0 {
			return "none"
		}
		return strings.Join(parts, " + ")
	}
	panic("schedule: unknown way of holding a zone")
}

func actionText(o *plan.Outcome, zone, docking int) string {
	l, ok := o.Action(zone, docking)
	switch {
	case !ok:
		return "-"
	case l.Action == renewal.Keep:
		return "keep"
	}
	return fmt.Sprintf("%s %d x %s (%s)", l.Action, l.Count, l.Pattern.ID, l.Governs)
}
