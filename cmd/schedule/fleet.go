package main

import (
	"errors"
	"fmt"
	"io"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// packFleet writes asset files into one fleet file, or nothing when one of
// them is at fault.
func packFleet(w io.Writer, out string, files []string) error {
	if len(files) == 0 {
		return errors.New("-fleet: want at least one asset file after the flags")
	}
	var fleet []*hull.Asset
	for _, file := range files {
		if sameFile(out, file) {
			return fmt.Errorf("-fleet: want another file than the asset files themselves, got %s", out)
		}
		a, err := assetfile.Read(file)
		if err != nil {
			return fmt.Errorf("%s: %w", file, err)
		}
		fleet = append(fleet, a)
	}
	if err := assetfile.WriteFleetFile(out, fleet); err != nil {
		return err
	}
	fmt.Fprintf(w, "Fleet written: %s (%d assets)\n", out, len(fleet))
	return nil
}
