package pages

import (
	"path/filepath"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// exportFleet writes all assets as one zip of asset files.
func (f *Frame) exportFleet() {
	f.export(say.T("Export the fleet as a zip of asset files"), "fleet.zip", func(path string) error {
		var fleet []*hull.Asset
		for _, x := range f.s.Fleet() {
			fleet = append(fleet, x.Asset)
		}
		return assetfile.WriteFleetFile(path, fleet)
	})
}

// isFleet reports whether a file is to be read as a fleet.
func isFleet(path string) bool { return strings.EqualFold(filepath.Ext(path), ".zip") }

// readFleet imports all assets of a fleet file, or none of them when one is at
// fault.
func (f *Frame) readFleet(path string, stopped func() bool) error {
	fleet, err := assetfile.ReadFleetFile(path)
	if err != nil {
		return err
	}
	f.s.SetSetting("folder", filepath.Dir(path))
	return f.s.AddFleet(fleet, "imported from "+filepath.Base(path), stopped)
}
