package pages

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// estimateAreas shows the estimates of the open asset's areas side by side, and
// enters the chosen one as the area of a zone.
func (f *Frame) estimateAreas(zone int) {
	grid.CommitOpen()
	if f.s.Asset() == nil {
		return
	}
	e := &estimator{f: f, zone: zone, list: &fixed{}, targets: &fixed{}}
	e.build()
	e.d.Show()
	f.win.Canvas().Focus(e.estimates)
	e.pick(max(e.first(zone), 0))
}

// estimator is the dialog of the estimates.
type estimator struct {
	f         *Frame
	d         *dialog.CustomDialog
	all       []session.AreaEstimate
	missing   error
	row       int // of the estimates
	zone      int // of the asset
	list      *fixed
	targets   *fixed
	estimates *grid.Grid
	zones     *grid.Grid
	draught   *formEntry
	shape     *shapeForm
	body      *fyne.Container
	about     *look.Paragraph
	said      *look.Paragraph
	use       *look.PushButton
}

func (e *estimator) build() {
	e.estimates = grid.New([]grid.Column{
		{ID: "estimate", Title: say.T("Estimate"), Unit: say.T("source"), Width: 250, Fill: true},
		{ID: "area", Title: say.T("Area"), Unit: say.Area.Unit(), Width: 66, Right: true},
		{ID: "formula", Title: say.T("Formula"), Width: 210},
		{ID: "off", Title: say.T("Off on benchmark hulls"), Width: 250},
	}, e.list)
	e.zones = grid.New([]grid.Column{
		{ID: "zone", Title: say.T("Zone"), Width: 150, Fill: true},
		{ID: "now", Title: say.T("Now"), Unit: say.Area.Unit(), Width: 76, Right: true},
	}, e.targets)
	e.about, e.said = look.Note(""), look.Note("")
	e.use = look.AccentButton(say.T("Use"), e.enter)
	e.estimates.OnSelect = func(row, _ int) { e.pick(row) }
	e.estimates.OnOpen = func(int, int) { e.enter() }
	e.zones.OnSelect = func(row, _ int) { e.zone = row; e.show() }
	e.zones.OnOpen = func(int, int) { e.enter() }
	escape := func(_, _ int, key *fyne.KeyEvent) bool {
		if key.Name == fyne.KeyEscape {
			e.hide()
			return true
		}
		return false
	}
	e.estimates.OnKey, e.zones.OnKey = escape, escape

	e.draught = &formEntry{escape: e.hide}
	e.draught.ExtendBaseWidget(e.draught)
	e.draught.OnChanged = func(string) { e.again(e.row) }
	e.shape = newShapeForm(func() {
		e.again(0)
		e.body.Refresh() // the sizes may have come
	}, e.hide)
	head := container.NewVBox(e.about)
	if p := e.f.s.Asset().Particulars; p != nil {
		e.draught.SetPlaceHolder(whole(say.Length, p.Draught))
		head.Add(container.NewHBox(look.Plain(say.T("Lies at a draught of")), container.New(wide{90}, e.draught), look.Muted(say.T("%s; empty: the particulars' own", say.Length.Unit()))))
	}
	head.Add(e.shape.box)
	below := container.New(tall{66}, container.NewVScroll(e.said))
	e.body = topDown(head, container.New(beside{260}, e.estimates, e.zones), below)
	e.d = dialog.NewCustomWithoutButtons(say.T("Wetted areas"), e.body, e.f.win)
	closes := look.Button(say.T("Close"), e.hide)
	closes.OnEscape, e.use.OnEscape = e.hide, e.hide
	e.d.SetButtons([]fyne.CanvasObject{closes, e.use})
	e.d.Resize(dialogSize(e.f.win, 1240, 720))
	e.read()
}

// again makes the estimates anew and chooses one.
func (e *estimator) again(row int) {
	e.read()
	e.pick(min(row, max(len(e.all)-1, 0)))
}

func (e *estimator) hide() { e.f.hide(e.d) }

// read makes the estimates for the draught and the shape that were entered, the
// shape's first.
func (e *estimator) read() {
	draught := 0.0
	e.all, e.missing = nil, nil
	if text := strings.TrimSpace(e.draught.Text); text != "" {
		draught, e.missing = session.ParseShown(say.Length, text)
	}
	if e.missing == nil {
		e.all, e.missing = e.f.s.AreaEstimates(draught)
	}
	parts, err := e.shape.estimates()
	if err != nil {
		e.all, e.missing = nil, err
		return
	}
	var all []session.AreaEstimate
	for _, x := range parts {
		all = append(all, session.AreaEstimate{Estimate: x, Zone: -1})
	}
	e.all = append(all, e.all...)
}

// first returns the estimate for a zone, -1 if none is.
func (e *estimator) first(zone int) int {
	a := e.f.s.Asset()
	for i, x := range e.all {
		if x.Zone == zone || x.Zone >= 0 && zone >= 0 && zone < len(a.Zones) && a.Zones[x.Zone].Region == a.Zones[zone].Region {
			return i
		}
	}
	return -1
}

// pick chooses an estimate, and with it the zone that it suggests unless one of
// the same region is chosen already.
func (e *estimator) pick(row int) {
	e.row = row
	if row < len(e.all) {
		a := e.f.s.Asset()
		if z := e.all[row].Zone; z >= 0 && (e.zone < 0 || a.Zones[z].Region != a.Zones[e.zone].Region) {
			e.zone = z
		}
	}
	e.show()
	e.estimates.Select(row, 0)
}

func (e *estimator) show() {
	a := e.f.s.Asset()
	e.about.SetText(aboutAreas(a, e.missing))
	e.list.cells = nil
	for _, x := range e.all {
		e.list.cells = append(e.list.cells, []grid.Cell{
			{Text: say.Sentence(x.Name), Sub: say.Sentence(x.Source)}, {Text: strings.TrimSuffix(areaText(x.Area), " "+say.Area.Unit()), Bold: true}, {Text: say.Sentence(x.Formula)}, {Text: say.Sentence(x.Benchmark), Muted: true},
		})
	}
	e.targets.cells = nil
	for _, z := range a.Zones {
		e.targets.cells = append(e.targets.cells, []grid.Cell{{Text: z.Name}, {Text: whole(say.Area, z.WettedArea)}})
	}
	e.estimates.Refresh()
	e.zones.Refresh()
	e.use.Disable()
	e.use.SetText(say.T("Use"))
	e.said.SetText("")
	if e.row >= len(e.all) {
		return
	}
	x := e.all[e.row]
	e.said.SetText(say.T("%s = %s\n%s.\nSource: %s (%s). Off: %s.", say.Sentence(x.Formula), areaText(x.Area), inputsText(x.Inputs), say.Sentence(x.Source), say.Sentence(x.Confidence), say.Sentence(x.Benchmark)))
	if e.zone >= 0 && e.zone < len(a.Zones) {
		e.zones.Select(e.zone, 0)
		e.use.SetText(say.T("Use %s for %s", areaText(x.Area), a.Zones[e.zone].Name))
		if e.f.s.ReadOnly() == "" {
			e.use.Enable()
		}
	}
}

// enter makes the chosen estimate the chosen zone's area. The dialog stays for
// the next.
func (e *estimator) enter() {
	if e.use.Disabled() {
		return
	}
	e.f.report(e.f.s.UseArea(e.zone, e.all[e.row].Estimate))
	e.show()
}

// aboutAreas says what the estimates rest on.
func aboutAreas(a *hull.Asset, missing error) string {
	s := say.T("Areas as proposed when the asset was made. Correct them from drawings and surveys.")
	if p := a.Particulars; p != nil {
		s = say.T("From particulars: %s, length %s between perpendiculars and %s on the waterline, beam %s, design draught %s, volume %s. They are edited on the Steel page, part Asset. Appendages are of usual size where the particulars say nothing.",
			orWord(session.Words(p.ShipType), say.T("no ship type")), number(say.Length, p.LengthPP), number(say.Length, p.LengthWL), number(say.Length, p.Beam), number(say.Length, p.Draught), number(say.Volume, p.Volume))
	}
	if missing != nil {
		s += " " + say.T("Missing: %s.", strings.ReplaceAll(inWords(missing), "\n", "; "))
	}
	return s
}

// number writes a figure of SI in full, in the unit shown.
func number(q say.Quantity, x float64) string {
	if x == 0 {
		return "–"
	}
	return whole(q, x) + " " + q.Unit()
}

func orWord(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

// proposedText says how many of the open asset's areas nobody has corrected.
func (f *Frame) proposedText() string {
	switch n := len(f.s.Proposed()); n {
	case 0:
		return ""
	case 1:
		return say.T("1 area still as proposed: correct it")
	default:
		return say.T("%d areas still as proposed: correct them", n)
	}
}

// tall lays out one object at a height given at text scale 1.
type tall struct{ height float32 }

func (t tall) MinSize(objects []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(objects[0].MinSize().Width, look.Px(t.height))
}

func (t tall) Layout(objects []fyne.CanvasObject, size fyne.Size) { objects[0].Resize(size) }

// wide lays out one object at a width given at text scale 1.
type wide struct{ width float32 }

func (w wide) MinSize(objects []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(look.Px(w.width), objects[0].MinSize().Height)
}

func (w wide) Layout(objects []fyne.CanvasObject, size fyne.Size) { objects[0].Resize(size) }
