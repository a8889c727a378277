package pages

import (
	"anodewright/app/grid"
	"anodewright/app/say"
)

// remember keeps the widths of a table's columns in the settings, under a name
// of its own.
func (f *Frame) remember(name string, g *grid.Grid) {
	setting := "columns of " + name
	if text := f.s.Setting(setting); text != "" {
		g.SetWidths(text)
	}
	g.OnWidths = func(text string) { f.s.SetSetting(setting, text) }
	f.tables = append(f.tables, table{name, g})
}

// table is a table whose columns are remembered.
type table struct {
	name string
	grid *grid.Grid
}

// rememberAll keeps the columns of the tables of all pages.
func (f *Frame) rememberAll() {
	f.tables = nil
	for _, p := range f.pages {
		switch p := p.(type) {
		case *steel:
			f.remember("zones", p.zones)
			f.remember("demand", p.demand)
			for _, part := range partNames {
				f.remember("steel "+part, p.grids[part])
			}
		case *anodesPage:
			f.remember("patterns", p.patterns)
			f.remember("fitted sets", p.fitted.grid)
		case *readingsPage:
			f.remember("readings", p.list)
			f.remember("demand factors", p.table)
		case *forecastPage:
			f.remember("forecast by interval", p.table)
			f.remember("forecast in time", p.times)
		case *dockings:
			f.remember("plan", p.plan)
			f.remember("dockings", p.list)
		case *dockFloor:
			f.remember("dock floor", p.sets)
			f.remember("quay", p.quay)
			f.remember("docking as done", p.lines)
		case *orderPage:
			f.remember("order", p.lines)
			f.remember("order terms", p.terms)
			f.remember("staged purchase", p.staged.table)
			f.remember("orders of the fleet", p.fleet.months)
		case *basisPage:
			f.remember("figures", p.steps)
			f.remember("cautions", p.cautions)
		}
	}
}

// sayWhatToDo has tables without rows say how they get some.
func (f *Frame) sayWhatToDo() {
	for _, p := range f.pages {
		switch p := p.(type) {
		case *anodesPage:
			p.patterns.Empty = say.T("No patterns yet. From the library… adds one to choose from; they are what the plan may fit.")
			p.fitted.grid.Empty = say.T("No zone carries anodes of its own: see Held by on Steel.")
		case *readingsPage:
			p.list.Empty = say.T("No readings yet. Insert, or Add reading, takes what a surveyor found; Take in a survey… reads a filled sheet.")
		case *basisPage:
			p.steps.Empty = say.T("No figures yet: they are being computed.")
			p.cautions.Empty = say.T("This plan raises no cautions.")
		case *forecastPage:
			p.times.Empty = say.T("No circuit of anodes holds this zone, so nothing wastes.")
		}
	}
}

// resetColumns makes all columns as wide as they were made.
func (f *Frame) resetColumns() {
	for _, t := range f.tables {
		t.grid.SetWidths("")
		f.s.SetSetting("columns of "+t.name, "")
	}
	f.Update()
}

// copyTable puts the table that has the keyboard on the clipboard, else the
// first of the page, as text for a spreadsheet.
func (f *Frame) copyTable() {
	g, ok := f.win.Canvas().Focused().(*grid.Grid)
	if !ok {
		switch p := f.pages[f.current].(type) {
		case interface{ first() *grid.Grid }:
			g = p.first()
		case interface{ shownTable() *grid.Grid }:
			g = p.shownTable()
		default:
			return
		}
	}
	f.app.Clipboard().SetContent(g.CopyAll())
}
