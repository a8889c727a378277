package main

import (
	"errors"
	"fmt"
	"io"
	"strings"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// unpackFleet writes the assets of a fleet file into a folder, or nothing when
// one of them is at fault.
func unpackFleet(w io.Writer, folder string, files []string) error {
	if len(files) != 1 {
		return errors.New("-unpack: want one fleet file after the flags")
	}
	fleet, err := assetfile.ReadFleetFile(files[0])
	if err != nil {
		return faultsOf(files[0], err)
	}
	paths, err := assetfile.UnpackFleet(folder, fleet)
	if err != nil {
		return err
	}
	for _, path := range paths {
		fmt.Fprintf(w, "Asset file written: %s\n", path)
	}
	return nil
}

// faultsOf puts a file's name before every fault of it, a line each.
func faultsOf(file string, err error) error {
	var faults hull.Faults
	if !errors.As(err, &faults) {
		return fmt.Errorf("%s: %w", file, err)
	}
	lines := strings.Split(err.Error(), "\n")
	return errors.New(file + ": " + strings.Join(lines, "\n"+file+": "))
}

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
			return faultsOf(file, err)
		}
		fleet = append(fleet, a)
	}
	if err := assetfile.WriteFleetFile(out, fleet); err != nil {
		return err
	}
	fmt.Fprintf(w, "Fleet written: %s (%d assets)\n", out, len(fleet))
	return nil
}
