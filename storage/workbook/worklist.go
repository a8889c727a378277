package workbook

import (
	"fmt"
	"strings"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// workList writes what the yard does at each docking: what comes off, what
// goes on and how it is fixed, the coating works, and what to mind, with boxes
// to tick and lines to sign.
func (b *book) workList() {
	s := b.sheet("Work list", "work list for the yard", 11)
	s.line(lead, "Pieces and masses follow the inputs of this workbook. Tick what is done.")
	// One heading for all dockings, to be repeated on every page: a docking may
	// be longer than one.
	head := s.header(column{head: "Done", most: 6}, column{head: "Zone", most: 22}, column{head: "Work", most: 18},
		column{head: "Off", format: whole}, column{head: "On", format: whole}, column{head: "Pattern", most: 24}, column{head: "Fixing", most: 20},
		column{head: "Gross mass a piece, kg", format: one}, column{head: "Gross mass, kg", format: one}, column{head: "Mind", most: 54}, column{head: "Foreman", most: 16})
	for k, d := range b.a.Ahead() {
		s.docking(k, d)
	}
	if len(b.a.Ahead()) == 0 {
		s.line(lead, "There is no docking ahead.")
	}
	s.line(section, "Always")
	for _, c := range plan.Usual() {
		s.line(figure, c.Text)
	}
	s.finish(page{frozenRows: head, firstTitle: 1, lastTitle: head})
}

// box is what is ticked when a line is done.
const box = "☐"

// docking writes one docking.
func (s *sheet) docking(k int, d hull.Docking) {
	s.gap()
	s.part()
	s.line(section, fmt.Sprintf("%d. %s, %s", k+1, upperFirst(plain(d.Kind)), d.Date))
	first := s.next
	off, on, mass := 0.0, 0.0, 0.0
	for i, l := range s.o.Schedule {
		if l.Docking != k {
			continue
		}
		if l.Action == renewal.Keep {
			s.row(box, s.names[l.Zone], "keep, and look at", nil, nil, "", "", nil, nil, "Read wastage and potentials for the survey.", "")
			continue
		}
		in, c := s.cells.patterns[s.patternIndex(l.Pattern.ID)], s.cells.calc.actions[i]
		n := float64(l.Count)
		work := "renew"
		if l.Action == renewal.Add {
			work = "add to those there"
		}
		row := s.next
		s.row(box, s.names[l.Zone], work, c.off.live(), c.count.live(), patternName(l.Pattern), l.Pattern.Fixing, in.gross.live(),
			live{at(4, row) + "*" + at(7, row), n * l.Pattern.Gross()}, s.mind(l), "")
		off, on, mass = off+float64(l.Removed), on+n, mass+n*l.Pattern.Gross()
	}
	for _, w := range d.Works {
		s.row(box, s.zoneName(w.Zone), "coating", nil, nil, "", "", nil, nil, upperFirst(strings.TrimPrefix(work(w), "coating: "))+".", "")
	}
	if s.next == first {
		s.line(lead, "Nothing to do at this docking.")
		return
	}
	s.totals("Total", first, map[int]float64{3: off, 4: on, 8: mass})
	s.line(label, "Foreman, name and date: ____________________     For the owner: ____________________     Class: ____________________")
}

// mind is what has to be minded while anodes are fitted in a zone.
func (b *book) mind(l renewal.Line) string {
	var parts []string
	if strings.Contains(strings.ToLower(l.Pattern.Fixing), "weld") {
		parts = append(parts, "Hot work: gas-free certificate and permit first; make good the paint behind.")
	}
	for _, c := range b.o.Cautions {
		if c.Zone == l.Zone && whileFitting[c.ID] {
			parts = append(parts, c.Text)
		}
	}
	return strings.Join(parts, "\n")
}

// whileFitting are the cautions that concern whoever fits anodes in a zone.
var whileFitting = map[string]bool{
	"tank-approval": true, "drop-energy": true, "tank-gas": true, "tank-fixing": true, "fuel-behind": true, "divers": true, "inflow": true, "hot-zinc": true,
}
