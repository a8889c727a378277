package main

import (
	"fmt"
	"io"
	"text/tabwriter"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
)

// printOrder writes what has to be bought and until when, with the next best
// of what is late.
func printOrder(w io.Writer, o *plan.Outcome) {
	if len(o.Order) == 0 {
		return
	}
	a := o.Asset
	freighted := a.Costs.FreightPerKg > 0 || a.Costs.FreightPerOrder > 0
	fmt.Fprintln(w, "\norder")
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	head := fmt.Sprintf("order by\tfor docking\tpattern\tpieces\tspares\tfrom stock\tto buy\tnet kg\tgross kg\tprice %s", a.Currency)
	if freighted {
		head += "\tfreight"
	}
	fmt.Fprintln(t, head)
	row := func(by, docking, pattern string, x order.Total) {
		fmt.Fprintf(t, "%s\t%s\t%s\t%d\t%d\t%d\t%d\t%.0f\t%.0f\t%.0f", by, docking, pattern, x.Pieces, x.Spares, x.FromStock, x.Bought, x.Net, x.Gross, x.Price)
		if freighted {
			fmt.Fprintf(t, "\t%.0f", x.Freight)
		}
		fmt.Fprintln(t)
	}
	for _, l := range o.Order {
		late := ""
		switch {
		case l.Docking < o.Today:
			late = " (docking is past)"
		case l.LateDays == 1:
			late = " (late by 1 day)"
		case l.LateDays > 1:
			late = fmt.Sprintf(" (late by %d days)", l.LateDays)
		}
		row(l.OrderBy.String()+late, l.Docking.String(), l.Pattern.ID, order.Total{
			Pieces: l.Pieces, Spares: l.Spares, FromStock: l.FromStock, Bought: l.Ordered, Net: l.Net, Gross: l.Gross, Price: l.Price, Freight: l.Freight,
		})
	}
	totals := order.Totals(a, o.Order)
	if len(o.Order) > 1 || freighted {
		row("in all", "", "", order.Sum(totals))
	}
	t.Flush()
	if freighted {
		fmt.Fprintln(w, "Freight of a pattern by its mass; in all also once for each docking's order.")
	}
	for _, l := range plan.LateOrders(o) {
		for _, s := range l.NextBest(a) {
			fmt.Fprintf(w, "%s for %s, next best: %s\n", l.Pattern.ID, l.Docking, oneLine(s))
		}
	}
}

// printStaged writes, where that was asked for, how many pieces to order
// before anyone has seen the old anodes.
func printStaged(w io.Writer, o *plan.Outcome) {
	if o.Staged == nil {
		return
	}
	fmt.Fprintln(w, "\nstaged purchase, without spares")
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintln(t, "order by\tfor docking\tpattern\tplanned\tneeded with 95 %\tto have then\tenough with\tcan wait\tfrom stock\torder now")
	for _, s := range o.Staged {
		fmt.Fprintf(t, "%s\t%s\t%s\t%d\t%d\t%d\t%.0f %%\t%d\t%d\t%d\n",
			s.OrderBy, s.Docking, s.Pattern.ID, s.Planned, s.Surely, s.Now, 100*s.Enough(), s.Wait(), s.FromStock, s.Ordered)
	}
	t.Flush()
	c := &o.Asset.Costs
	fmt.Fprintf(w, "A piece too few costs %g times its price in a rush, of one too many %g %% comes back: rush_factor and recovered_share, the first our own choice where the file says nothing.\n",
		order.Rush(c), 100*c.Recovered)
}
