// Command schedule plans the anodes of one asset file without a display: it
// prints the schedule by zone, and writes the result as JSON or the schedule
// as a workbook.
//
// Exit status: 0 the plan is met, 1 no set can hold some zone or no plan is
// within the limits, 2 the input or an output file is at fault.
package main

import (
	"encoding/json"
	"errors"
	"flag"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"time"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

func main() {
	os.Exit(run(os.Args[1:], os.Stdout, os.Stderr, hull.DateOf(time.Now())))
}

const usage = `usage: schedule [flags] [FILE]

Plans the anodes of the asset file FILE, or of the demo ship.

`

// run is the command without its process: arguments, streams and the
// machine's date in, exit status out. What cannot be printed, as on a full
// disk, is a fault.
func run(args []string, stdout, stderr io.Writer, today hull.Date) int {
	out := &printer{to: stdout}
	status := obey(args, out, stderr, today)
	if out.err != nil {
		fmt.Fprintf(stderr, "standard output cannot be written: %v\n", out.err)
		return 2
	}
	return status
}

// printer writes on and keeps the first error.
type printer struct {
	to  io.Writer
	err error
}

func (p *printer) Write(text []byte) (n int, err error) {
	if n, err = p.to.Write(text); p.err == nil {
		p.err = err
	}
	return n, err
}

// obey does what the arguments ask for.
func obey(args []string, stdout, stderr io.Writer, today hull.Date) int {
	flags := flag.NewFlagSet("schedule", flag.ContinueOnError)
	flags.SetOutput(stderr)
	flags.Usage = func() {
		fmt.Fprint(stderr, usage)
		flags.PrintDefaults()
	}
	asJSON := flags.Bool("json", false, "print the result as JSON, and nothing else on standard output")
	xlsx := flags.String("xlsx", "", "write the workbook to this `file`")
	date := flags.String("today", "", "plan as of this `date` (YYYY-MM-DD) where the file does not say")
	lp := flags.String("lp", "", "write the choice of sets to this `file` as an LP problem for any solver")
	explain := flags.String("explain", "", "print where the figures of the zone with this `id` come from")
	learn := flags.Bool("learn", false, "plan with the demand factors that the asset's readings teach")
	staged := flags.Bool("staged", false, "also say how many pieces to order before anyone has seen the old anodes, and what can wait")
	decisions := flags.Bool("decisions", false, "print what each decision of the plan is worth")
	var pins []renewal.Pin
	flags.Func("pin", "keep an action as it is, as `zone:docking:action:pattern`, and plan the rest anew; may be given several times", func(text string) error {
		p, err := parsePin(text)
		pins = append(pins, p)
		return err
	})
	var limits renewal.Limits
	flags.IntVar(&limits.Pieces, "most-pieces", 0, "fit at most so many `pieces` at a docking; 0 is no limit")
	flags.Float64Var(&limits.Budget, "budget", 0, "spend at most so much `money` at a docking, undiscounted; 0 is no limit")
	flags.IntVar(&limits.Patterns, "most-patterns", 0, "order at most so many `patterns` for a docking; 0 is no limit")
	var quay map[string]int
	flags.Func("quay", "at the first docking ahead fit only what lies on the quay, as `pattern:pieces,...`; a pattern that is not named has none", func(text string) (err error) {
		quay, err = parseQuay(text)
		return err
	})
	closed := flags.Bool("closed", false, "print what was planned against what was found at every closed docking; plan nothing")
	var survey surveys
	survey.flags(flags)
	var closing closings
	closing.flags(flags)
	words := flags.Bool("words", false, "list the words that the asset file knows")
	schema := flags.Bool("schema", false, "print the form of the asset file as a JSON Schema")
	fleet := flags.String("fleet", "", "write the asset files given, one or more, into this `file`, a zip of them; plan nothing")
	unpack := flags.String("unpack", "", "write the assets of the fleet file given into this `folder`, an asset file each; plan nothing")
	if err := flags.Parse(args); err != nil {
		if errors.Is(err, flag.ErrHelp) {
			return 0
		}
		return 2
	}
	if limits.Pieces < 0 || limits.Patterns < 0 || !(limits.Budget >= 0) {
		fmt.Fprintln(stderr, "-most-pieces, -budget, -most-patterns: want 0 or more")
		return 2
	}
	if *words {
		printWords(stdout)
		return 0
	}
	fault := func(err error) int {
		fmt.Fprintln(stderr, err)
		return 2
	}
	if *schema {
		if err := printSchema(stdout); err != nil {
			return fault(err)
		}
		return 0
	}
	// A forgotten name must not cost an asset file.
	for _, out := range []struct{ flag, path string }{{"-xlsx", *xlsx}, {"-lp", *lp}, {"-survey", survey.out}, {"-fleet", *fleet}} {
		if strings.EqualFold(filepath.Ext(out.path), ".json") {
			return fault(fmt.Errorf("%s: want the name of a file to write that does not end in .json, as asset files do, got %s", out.flag, out.path))
		}
	}
	if *unpack != "" {
		if err := unpackFleet(stdout, *unpack, flags.Args()); err != nil {
			return fault(err)
		}
		return 0
	}
	if *fleet != "" {
		if err := packFleet(stdout, *fleet, flags.Args()); err != nil {
			return fault(err)
		}
		return 0
	}
	if flags.NArg() > 1 {
		return fault(fmt.Errorf("want one asset file after the flags, got %s", strings.Join(flags.Args(), ", ")))
	}
	if *date != "" {
		d, err := hull.ParseDate(*date)
		if err != nil {
			return fault(fmt.Errorf("-today: %w", err))
		}
		today = d
	}
	for _, out := range []struct{ flag, path string }{{"-xlsx", *xlsx}, {"-lp", *lp}} {
		if out.path != "" && flags.NArg() == 1 && sameFile(out.path, flags.Arg(0)) {
			return fault(fmt.Errorf("%s: want another file than the asset file itself, got %s", out.flag, out.path))
		}
	}
	if *lp != "" && *xlsx != "" && sameFile(*lp, *xlsx) {
		return fault(fmt.Errorf("-lp: want another file than that of -xlsx, got %s", *lp))
	}
	a, err := load(flags.Arg(0))
	if err != nil {
		return fault(err)
	}
	if closing.asked() {
		return closing.run(stdout, stderr, a, flags.Arg(0), survey.to, today, *learn)
	}
	if survey.asked() {
		return survey.run(stdout, stderr, a, flags.Arg(0), today)
	}
	for id := range quay {
		if _, ok := a.Pattern(id); !ok {
			return fault(fmt.Errorf("-quay: the asset has no pattern %q", id))
		}
	}
	if *closed {
		printClosed(stdout, a)
		return 0
	}
	var how []plan.Option
	if *learn {
		how = append(how, plan.WithReadings())
	}
	if *staged {
		how = append(how, plan.WithStaging())
	}
	how = append(how, plan.WithPins(pins), plan.WithLimits(limits), plan.WithQuay(quay))
	o := plan.Compute(a, today, how...)
	if o.OverLimits != "" {
		fmt.Fprintln(stderr, o.OverLimits)
		return 1
	}
	for _, p := range o.Pins {
		if p.Refused != "" {
			return fault(fmt.Errorf("-pin: zone %s cannot have %s on %s: %s", p.Zone, strings.TrimSpace(string(p.Action)+" "+p.Pattern), p.Docking, p.Refused))
		}
	}
	zone := -1
	if *explain != "" {
		zone = slices.IndexFunc(a.Zones, func(z hull.Zone) bool { return z.ID == *explain })
		if zone < 0 {
			return fault(fmt.Errorf("-explain: want the id of one of the asset's zones, got %q", *explain))
		}
	}
	if *lp != "" {
		if err := assetfile.WriteFile(*lp, o.LP()); err != nil {
			return fault(err)
		}
	}
	if *xlsx != "" {
		if err := workbook.Write(*xlsx, o); err != nil {
			return fault(err)
		}
	}
	switch {
	case *asJSON:
		text, err := json.MarshalIndent(o, "", "  ")
		if err != nil {
			return fault(err)
		}
		fmt.Fprintf(stdout, "%s\n", text)
	case *decisions:
		printPins(stdout, o)
		printDecisions(stdout, o)
	case zone >= 0:
		printSteps(stdout, o.Explain(zone))
	default:
		printPins(stdout, o)
		print(stdout, o)
		if *xlsx != "" {
			fmt.Fprintf(stdout, "\nWorkbook written: %s\n", *xlsx)
		}
	}
	for _, u := range o.Unmet {
		fmt.Fprintf(stderr, "zone %s cannot be held from %s on: %s\n", a.Zones[u.Zone].ID, u.Date, u.Criterion)
	}
	if len(o.Unmet) > 0 {
		return 1
	}
	return 0
}

// sameFile reports whether two paths are one file, or would be.
func sameFile(a, b string) bool {
	x, err1 := filepath.Abs(a)
	y, err2 := filepath.Abs(b)
	if err1 == nil && err2 == nil && x == y {
		return true
	}
	there, err1 := os.Stat(a)
	other, err2 := os.Stat(b)
	return err1 == nil && err2 == nil && os.SameFile(there, other)
}

// load reads the named asset file, or the demo ship where no name is given.
func load(path string) (*hull.Asset, error) {
	if path == "" {
		return assetfile.Decode(assets.Demo()[0])
	}
	return assetfile.Read(path)
}
