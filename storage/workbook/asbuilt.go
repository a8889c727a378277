package workbook

import (
	"fmt"
	"strings"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// asBuiltName is the sheet that only assets with an as-built ledger or closed
// dockings have, after the readings.
const asBuiltName = "As built"

// hasAsBuilt reports whether the workbook has that sheet.
func (b *book) hasAsBuilt() bool { return len(b.a.Ledger)+len(b.a.Closed) > 0 }

// asBuilt writes what was planned against what was found at every closed
// docking, the latest first, and the ledger from which the fitted sets follow.
func (b *book) asBuilt() {
	if !b.hasAsBuilt() {
		return
	}
	s := b.sheet(asBuiltName, "as built, planned against found", 13)
	s.line(lead, "Wastage is the share of the net mass gone. Expected: what the forecast said when the docking was closed, with its 90 % range.")
	for i := len(b.a.Closed) - 1; i >= 0; i-- {
		s.closedDocking(plan.CompareClosed(b.a, i))
	}
	s.ledger()
	s.finish(page{frozenRows: 1, firstTitle: 1, lastTitle: 1})
}

// closedDocking writes one closed docking.
func (s *sheet) closedDocking(c *plan.AsBuilt) {
	s.gap()
	s.part()
	s.line(section, joined(", ", upperFirst(plain(c.Closed.Kind)), c.Closed.Date.String(), c.Closed.By))
	if c.Closed.Note != "" {
		s.line(lead, c.Closed.Note)
	}
	s.header(column{head: "Zone", most: 24}, column{head: "Pattern", most: 16}, column{head: "Fitted", format: date},
		column{head: "Pieces expected", format: whole}, column{head: "Pieces found", format: whole}, column{head: "Taken off", format: whole},
		column{head: "Expected", format: percent}, column{head: "At least", format: percent}, column{head: "At most", format: percent},
		column{head: "Found", format: percent}, column{head: "Known by", most: 14}, column{head: "Verdict", most: 28})
	for _, f := range c.Sets {
		row := []any{s.zoneName(f.Zone), f.Pattern, f.Fitted, nil, f.Found, someCount(f.Off), nil, nil, nil, f.Wastage, plain(f.How), string(f.Verdict)}
		if e := f.Expected; e != nil {
			row[3], row[6], row[7], row[8] = e.Count, e.Median, e.Low, e.High
		}
		s.row(row...)
	}
	if len(c.Pieces) > 0 {
		s.header(column{head: "Put on", most: 24}, column{head: "Pattern", most: 16}, column{head: "Planned", format: whole}, column{head: "Put on", format: whole})
		for _, p := range c.Pieces {
			s.row(s.zoneName(p.Zone), p.Pattern, p.Planned, p.PutOn)
		}
	}
	fact := func(format string, args ...any) { s.line(figure, fmt.Sprintf(format, args...)) }
	if c.TakenOff > 0 {
		fact("Taken off: %.0f kg net when new, of which %.0f %% was still there.", c.TakenOff, 100*c.Left)
	}
	if c.Ordered > 0 {
		fact("Ordered: %.0f kg net, of which %.0f %% was not put on.", c.Ordered, 100*c.Unused)
	}
	if m := c.Cost; m != nil {
		fact("%s: %.0f, planned %.0f.", s.money("Cost"), m.Spent, m.Planned)
	}
	if n := len(c.Closed.Works) + len(c.Closed.Cleaned); n > 0 {
		s.header(column{head: "Coating works", most: 24}, column{head: "Work", most: 28})
		for _, w := range c.Closed.Works {
			s.row(s.zoneName(w.Zone), upperFirst(strings.TrimPrefix(work(w), "coating: ")))
		}
		for _, zone := range c.Closed.Cleaned {
			s.row(s.zoneName(zone), "painted anodes cleaned")
		}
	}
}

// ledger writes every fact, in their order.
func (s *sheet) ledger() {
	s.gap()
	s.part()
	s.line(section, "Ledger: what was fitted, found and removed")
	s.line(lead, "Facts are only added. Found replaces the count and the wastage known before; a mistake is put right by a later fact.")
	s.header(column{head: "Zone", most: 24}, column{head: "Pattern", most: 16}, column{head: "Fitted", format: date}, column{head: "Date", format: date},
		column{head: "Deed", most: 12}, column{head: "Pieces", format: whole}, column{head: "Wastage", format: percent}, column{head: "Known by", most: 14},
		column{head: "By", most: 24}, column{head: "Note", most: 30})
	for _, f := range s.a.Ledger {
		var wastage any
		if f.Deed == hull.WasFound {
			wastage = f.Wastage
		}
		s.row(s.zoneName(f.Zone), f.Pattern, f.Fitted, f.Date, plain(f.Deed), f.Count, wastage, plain(f.How), f.By, f.Note)
	}
}
