package pages

import (
	"path/filepath"
	"strings"

	"anodewright/app/chart"
	"anodewright/app/chart/sheet"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/storage/assetfile"
)

// The size of the charts in a file, in pixels or points: a landscape page.
const (
	sheetWidth, sheetHeight = 1120, 760
	sheetText               = 12
	sheetHead               = 44
	sheetFoot               = 22
	sheetDots               = 2 // image pixels for each in a PNG
)

// save writes the charts as they are shown into a file; its ending says which
// kind.
func (p *forecastPage) save() {
	o := p.outcome
	if o == nil || p.zone.chosen >= len(o.Zones) {
		return
	}
	made := p.sheet() // here: the writing is done beside the window
	name := fileName(o.Asset.Name + " " + o.Zones[p.zone.chosen].Zone.Name + " forecast")
	p.f.exportAs(say.T("Save the charts as PDF, SVG or PNG"), name, []string{".pdf", ".svg", ".png"}, func(path string) error {
		data, err := file(made, strings.ToLower(filepath.Ext(path)))
		if err != nil {
			return err
		}
		return assetfile.WriteFile(path, data)
	})
}

// file returns a sheet as a file of a kind.
func file(s *sheet.Sheet, ending string) ([]byte, error) {
	switch ending {
	case ".svg":
		return s.SVG(), nil
	case ".png":
		return s.PNG(sheetDots)
	}
	return s.PDF(), nil
}

// sheet lays the charts out on a white page with a heading.
func (p *forecastPage) sheet() *sheet.Sheet {
	o := p.outcome
	ink := look.Palette(look.Light)
	s := sheet.New(sheetWidth, sheetHeight, sheetText, ink(look.ColorSurface))
	s.Write(12, 22, 17, o.Asset.Name+": "+o.Zones[p.zone.chosen].Zone.Name, ink(look.ColorInk))
	s.Write(12, 38, sheetText, p.read.String(), ink(look.ColorMuted))
	y := float32(sheetHead)
	for i, c := range p.made() {
		h := chartShares[i] * (sheetHeight - sheetHead - sheetFoot)
		s.Add(c.Lay(sheetWidth-24, h, sheetText), 12, y, func(r chart.Role) sheet.Ink {
			return sheet.Ink{Color: ink(roleName(r)), Width: roleWidth(r), Dash: roleDash(r)}
		})
		y += h
	}
	s.Write(12, sheetHeight-4, 9, say.T("Anodewright, plan as of %s", session.Day(o.Today)), ink(look.ColorMuted))
	return s
}
