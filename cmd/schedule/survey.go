package main

import (
	"errors"
	"flag"
	"fmt"
	"io"
	"path/filepath"
	"strconv"
	"strings"

	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/sheet"
)

// surveys is what the command does with survey sheets.
type surveys struct {
	out  string // survey sheet or CSV file to write
	take string // filled one to read
	to   string // asset file to write with what was read
}

func (s *surveys) flags(f *flag.FlagSet) {
	f.StringVar(&s.out, "survey", "", "write the survey sheet of the next docking to this `file`, .xlsx or .csv; plan nothing")
	f.StringVar(&s.take, "take", "", "read a filled survey sheet or a CSV file of readings from this `file` and print what was understood; plan nothing")
	f.StringVar(&s.to, "o", "", "with -take: write the asset file with the readings added to this `file`")
}

func (s *surveys) asked() bool { return s.out != "" || s.take != "" || s.to != "" }

// run writes or reads a sheet of an asset, which was read from the file named.
// Cells that were not understood are one line each on standard error; then
// nothing is written.
func (s *surveys) run(stdout, stderr io.Writer, a *hull.Asset, file string, today hull.Date) int {
	fault := func(err error) int {
		fmt.Fprintln(stderr, err)
		return 2
	}
	if !a.Today.IsZero() {
		today = a.Today
	}
	switch {
	case s.out != "" && s.take != "":
		return fault(errors.New("want either -survey or -take"))
	case s.to != "" && s.take == "":
		return fault(errors.New("-o: want -take too, which says what is added"))
	case s.out != "":
		if file != "" && sameFile(s.out, file) {
			return fault(fmt.Errorf("-survey: want another file than the asset file itself, got %s", s.out))
		}
		if err := s.write(stdout, a, today); err != nil {
			return fault(err)
		}
		return 0
	}
	if s.to != "" && sameFile(s.to, s.take) {
		return fault(fmt.Errorf("-o: want another file than that of -take, got %s", s.to))
	}
	p, err := sheet.ReadFile(s.take, a, sheet.Tie{}, today)
	if err != nil {
		return fault(fmt.Errorf("-take: %w", err))
	}
	printSurvey(stdout, a, p)
	for _, f := range p.Faults {
		fmt.Fprintln(stderr, f.Error())
	}
	if len(p.Faults) > 0 {
		return 2
	}
	if s.to == "" {
		return 0
	}
	with := assetfile.Clone(a)
	p.Store(with, today, true)
	if err := assetfile.Write(s.to, with); err != nil {
		return fault(err)
	}
	fmt.Fprintf(stdout, "Asset file written: %s (readings added: %d)\n", s.to, len(with.Readings)-len(a.Readings))
	return 0
}

func (s *surveys) write(stdout io.Writer, a *hull.Asset, today hull.Date) error {
	if strings.EqualFold(filepath.Ext(s.out), ".csv") {
		if err := sheet.WriteCSV(s.out, a); err != nil {
			return err
		}
		fmt.Fprintf(stdout, "CSV file for readings written: %s\n", s.out)
		return nil
	}
	for _, d := range a.Ahead() {
		if d.Date < today {
			continue
		}
		if err := sheet.Write(s.out, a, sheet.Tie{}, d.Date); err != nil {
			return err
		}
		fmt.Fprintf(stdout, "Survey sheet for the docking of %s written: %s\n", d.Date, s.out)
		return nil
	}
	return fmt.Errorf("-survey: no docking from %s on is listed", today)
}

// printSurvey says what was understood, a line a reading.
func printSurvey(w io.Writer, a *hull.Asset, p *sheet.Preview) {
	for _, warning := range p.Warnings {
		fmt.Fprintln(w, warning)
	}
	for _, u := range p.Readings {
		r := &u.Reading
		name := r.Zone
		if z, ok := a.Zone(r.Zone); ok {
			name = z.Name
		}
		set := ""
		if r.Pattern != "" {
			set = ", " + strings.TrimSpace(r.Pattern+" fitted "+r.Fitted.String())
		}
		day := "without a date"
		if !r.Date.IsZero() {
			day = r.Date.String()
		}
		fmt.Fprintf(w, "%s, %s%s: %s (%s; from %s)\n", day, name, set, sheet.Describe(r), u.Status, boxesText(u.Boxes))
		for _, d := range u.Doubts {
			fmt.Fprintf(w, "  %s\n", d)
		}
	}
	if len(p.Readings) == 0 && len(p.Faults) == 0 {
		fmt.Fprintln(w, "Nothing is filled in.")
	}
}

// boxesText names the first cells that a reading comes from.
func boxesText(boxes []sheet.Box) string {
	const most = 3
	var names []string
	for i, b := range boxes {
		if i == most {
			names = append(names, "and "+strconv.Itoa(len(boxes)-most)+" more")
			break
		}
		names = append(names, b.String())
	}
	return strings.Join(names, ", ")
}
