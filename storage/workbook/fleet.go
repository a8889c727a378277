package workbook

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"time"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// WriteFleet writes the orders of a fleet as a workbook to path, as [Write]
// does that of an asset.
func WriteFleet(path string, today hull.Date, fleet []order.Member, c order.Calendar) error {
	if path == "" {
		return errors.New("the workbook needs the name of a file to be written to")
	}
	var b bytes.Buffer
	if err := WriteFleetTo(&b, today, fleet, c); err != nil {
		return err
	}
	if err := assetfile.WriteFile(path, b.Bytes()); err != nil {
		return fmt.Errorf("the workbook was not written: %w", err)
	}
	return nil
}

// WriteFleetTo writes the orders of a fleet to w: by month, line by line, and
// those that could go out together. Equal calendars give equal bytes.
func WriteFleetTo(w io.Writer, today hull.Date, fleet []order.Member, c order.Calendar) error {
	a := &hull.Asset{Name: "Fleet"}
	b := &book{f: excelize.NewFile(excelize.Options{ShortDatePattern: datePattern}), o: &plan.Outcome{Asset: a, Today: today}, a: a, styles: map[style]int{}}
	defer b.f.Close()
	b.check(b.f.SetSheetName("Sheet1", "By month"))
	for _, name := range []string{"Lines", "Joined orders"} {
		_, err := b.f.NewSheet(name)
		b.check(err)
	}
	b.fleetMonths(fleet, c)
	b.fleetLines(fleet, c)
	b.fleetJoins(fleet, c)
	asOf := today.Time().UTC().Format(time.RFC3339)
	b.check(b.f.SetDocProps(&excelize.DocProperties{
		Title: "Anode orders of the fleet", Creator: "Anodewright", LastModifiedBy: "Anodewright", Created: asOf, Modified: asOf, Language: "en-GB",
	}))
	b.check(b.f.SetDefaultFont(fontName))
	b.f.SetZipWriter(newPacker)
	if b.err == nil {
		b.err = b.f.Write(w)
	}
	if b.err != nil {
		return fmt.Errorf("the workbook could not be written: %w", b.err)
	}
	return nil
}

// fleetMonths writes what every asset has to order in every month.
func (b *book) fleetMonths(fleet []order.Member, c order.Calendar) {
	s := b.sheet("By month", "anodes to order by month", 9)
	s.line(lead, "Each asset by the month of its order-by dates: docking less lead time and float. Prices are not discounted; freight is by mass and once for each docking's order.")
	if len(c.Late) > 0 {
		s.line(warning, fmt.Sprintf("Orders that are late already: %d. They stand first.", len(c.Late)))
	}
	head := s.header(column{head: "Month", format: date}, column{head: "When", most: 12}, column{head: "Asset", most: 40}, column{head: "First order by", format: date},
		column{head: "Pieces", format: whole}, column{head: "Gross mass, kg", format: one}, column{head: "Price", format: two}, column{head: "Freight", format: two}, column{head: "Currency", most: 10})
	first := s.next
	for _, m := range c.Months {
		when := "in time"
		if m.First.IsZero() {
			when = "late"
		}
		for _, x := range m.Shares {
			s.row(m.First, when, fleet[x.Member].Name, x.By, x.Pieces, x.Gross, x.Price, x.Freight, x.Currency)
		}
	}
	if s.next == first {
		s.line(lead, "Nothing has to be ordered.")
	} else {
		s.fleetSums(first, c)
	}
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}

// fleetSums writes the sums over all rows from the first on, money by
// currency.
func (s *sheet) fleetSums(first int, c order.Calendar) {
	last := s.next - 1
	var sums []order.Money
	pieces, gross := 0, 0.0
	for _, m := range c.Months {
		pieces, gross = pieces+m.Pieces, gross+m.Gross
		for _, x := range m.Money {
			sums = order.AddMoney(sums, x)
		}
	}
	sum := func(col int, v float64) live {
		return live{fmt.Sprintf("SUMIF(I%d:I%d,I%d,%s:%s)", first, last, s.next, at(col, first), at(col, last)), v}
	}
	for k, m := range sums {
		row := []any{nil, nil, "In " + m.Currency, nil, nil, nil, sum(6, m.Price), sum(7, m.Freight), m.Currency}
		if m.Currency == "" {
			row[2] = "Without a currency"
			row[6], row[7] = m.Price, m.Freight // no cell to compare with
		}
		if k == 0 {
			row[4] = live{fmt.Sprintf("SUM(%s:%s)", at(4, first), at(4, last)), float64(pieces)}
			row[5] = live{fmt.Sprintf("SUM(%s:%s)", at(5, first), at(5, last)), gross}
		}
		s.write(total, row)
	}
}

// fleetLines writes every line that still has to be bought.
func (b *book) fleetLines(fleet []order.Member, c order.Calendar) {
	s := b.sheet("Lines", "anodes to order, line by line", 17)
	head := s.header(column{head: "Order by", format: date}, column{head: "Late", format: late, most: 20}, column{head: "Asset", most: 40}, column{head: "Docking", format: date},
		column{head: "Item no", most: 20}, column{head: "Pattern", most: 20}, column{head: "Alloy", most: 18}, column{head: "Fixing", most: 22},
		column{head: "Pieces", format: whole}, column{head: "Spares", format: whole}, column{head: "From stock", format: whole}, column{head: "To buy", format: whole},
		column{head: "Net mass, kg", format: one}, column{head: "Gross mass, kg", format: one}, column{head: "Price", format: two}, column{head: "Freight by mass", format: two}, column{head: "Currency", most: 10})
	for _, d := range order.Sorted(fleet) {
		l, p := d.Line, d.Pattern
		s.row(l.OrderBy, l.LateDays, fleet[d.Member].Name, l.Docking, p.ItemNo, p.ID, alloyWords(p.Alloy), p.Fixing,
			l.Pieces, l.Spares, l.FromStock, l.Ordered, l.Net, l.Gross, l.Price, l.Freight, fleet[d.Member].Currency)
	}
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}

// fleetJoins writes the orders that could go out together.
func (b *book) fleetJoins(fleet []order.Member, c order.Calendar) {
	s := b.sheet("Joined orders", "orders that could go out together", 10)
	s.line(lead, "The same casting for several assets, its order-by dates close to each other: one order by the earliest of them. The pieces together are the sum of what is needed, up to one full multiple.")
	head := s.header(column{head: "Order by", format: date}, column{head: "Pattern", most: 24}, column{head: "Alloy", most: 18}, column{head: "Together", format: whole}, column{head: "Gross mass, kg", format: one},
		column{head: "Asset", most: 40}, column{head: "Docking", format: date}, column{head: "By itself by", format: date}, column{head: "By itself", format: whole}, column{head: "Less together", format: whole})
	for _, j := range c.Joins {
		for k, d := range j.Lines {
			if k == 0 {
				s.row(j.By, j.Pattern.ID, alloyWords(j.Pattern.Alloy), j.Joined, j.Gross, fleet[d.Member].Name, d.Docking, d.OrderBy, d.Ordered, j.Pieces-j.Joined)
			} else {
				s.row(nil, nil, nil, nil, nil, fleet[d.Member].Name, d.Docking, d.OrderBy, d.Ordered)
			}
		}
	}
	if len(c.Joins) == 0 {
		s.line(lead, "No two assets order the same casting at about the same time.")
	}
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}
