package main

import (
	"errors"
	"flag"
	"fmt"
	"io"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// closings is what the flags ask for about closing a docking.
type closings struct {
	draft string // file for the closing as it would be if all went as planned
	with  string // file of what was found and done
}

func (c *closings) flags(f *flag.FlagSet) {
	f.StringVar(&c.draft, "draft-closing", "", "write the closing of the next docking, as it would be if all goes as planned, to this `file`, to be corrected; plan nothing")
	f.StringVar(&c.with, "close", "", "close a docking with what this `file` says was found and done, and write the asset file after it with -o; plan nothing")
}

func (c *closings) asked() bool { return c.draft != "" || c.with != "" }

// run drafts the closing of an asset, which was read from the file named, or
// closes a docking and writes the asset to the file out. Faults are one line
// each on standard error; then nothing is written.
func (c *closings) run(stdout, stderr io.Writer, a *hull.Asset, file, out string, today hull.Date, learn bool) int {
	fault := func(err error) int {
		fmt.Fprintln(stderr, err)
		return 2
	}
	switch {
	case c.draft != "" && c.with != "":
		return fault(errors.New("want either -draft-closing or -close"))
	case c.draft != "" && file != "" && sameFile(c.draft, file):
		return fault(fmt.Errorf("-draft-closing: want another file than the asset file itself, got %s", c.draft))
	case c.with != "" && out == "":
		return fault(errors.New("-close: want -o too, which says where the asset file after the docking goes"))
	case c.with != "" && sameFile(out, c.with):
		return fault(fmt.Errorf("-o: want another file than that of -close, got %s", out))
	case c.draft != "":
		var how []plan.Option
		if learn {
			how = append(how, plan.WithReadings())
		}
		ahead := a.Ahead()
		if len(ahead) == 0 {
			return fault(errors.New("-draft-closing: want a docking ahead, got none"))
		}
		draft := plan.Compute(a, today, how...).DraftClosing(ahead[0].Date, 0)
		if err := assetfile.WriteFile(c.draft, assetfile.EncodeClosing(draft)); err != nil {
			return fault(err)
		}
		fmt.Fprintf(stdout, "Draft of the closing of %s written: %s\n", draft.Date, c.draft)
		return 0
	}
	closing, err := assetfile.ReadClosing(c.with)
	if err != nil {
		return fault(err)
	}
	next, faults := hull.Close(a, closing)
	if err := faults.Err(); err != nil {
		return fault(err)
	}
	if err := assetfile.Write(out, next); err != nil {
		return fault(err)
	}
	printAsBuilt(stdout, next, len(next.Closed)-1)
	fmt.Fprintf(stdout, "Asset file written: %s\n", out)
	return 0
}
