package pages

import (
	"errors"
	"fmt"
	"path/filepath"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	files "fyne.io/fyne/v2/storage"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/hull/water"
	"anodewright/storage/trade"
)

// importTrade asks for the file of a trading pattern.
func (f *Frame) importTrade() {
	grid.CommitOpen()
	browse := func(e *widget.Entry) {
		d := dialog.NewFileOpen(func(r fyne.URIReadCloser, err error) {
			if r != nil {
				e.SetText(r.URI().Path())
				r.Close()
			}
		}, f.win)
		d.SetFilter(files.NewExtensionFileFilter([]string{".csv", ".txt", ".tsv"}))
		d.Resize(f.win.Canvas().Size())
		d.Show()
	}
	f.ask(say.T("Import a trading pattern"), say.T("CSV file of port or area, and days or from and to; or drop it on the window"),
		f.folder()+string(filepath.Separator), say.T("Read"), browse, func(path string) (string, error) { return "", f.readTrade(path) })
}

// isTrade reports whether a file dropped on the window is a trading pattern.
func isTrade(path string) bool {
	switch strings.ToLower(filepath.Ext(path)) {
	case ".csv", ".tsv":
		return true
	}
	return false
}

// readTrade reads a trading pattern and asks what it is for.
func (f *Frame) readTrade(path string) error {
	a := f.s.Asset()
	if a == nil {
		return errors.New("open the asset first whose trade this is")
	}
	if !filepath.IsAbs(path) {
		path = filepath.Join(f.folder(), path)
	}
	p, err := trade.ReadFile(path)
	if err != nil {
		return err
	}
	f.s.SetSetting("folder", filepath.Dir(path))
	// When the dialog that asked for the file is gone.
	fyne.Do(func() {
		t := newTradeForm(f, a, p, filepath.Base(path))
		t.d.Show()
		t.selectUnknown()
		t.list.Focus()
	})
	return nil
}

const (
	leaveOut  = "leave out"
	fromTable = "table: "
)

// tradeForm is the dialog in which every place of a trading pattern becomes a
// water of the asset, an entry of the table, or is left out.
type tradeForm struct {
	f      *Frame
	a      *hull.Asset
	d      *dialog.CustomDialog
	places []session.TradePlace
	faults map[int]string // of typed waters, by place
	typed  map[int]string
	total  float64
	uses   []bool // by zone
	list   *grid.Grid
	zones  *grid.Grid
	from   *formEntry
	result *look.Paragraph
	wrong  *look.Paragraph
}

func newTradeForm(f *Frame, a *hull.Asset, p trade.Pattern, file string) *tradeForm {
	t := &tradeForm{
		f: f, a: a, places: session.Places(p, a), faults: map[int]string{}, typed: map[int]string{},
		result: look.Body(""), wrong: look.Wrong(""),
	}
	for _, place := range t.places {
		t.total += place.Days
	}
	for i := range a.Zones {
		z := &a.Zones[i]
		t.uses = append(t.uses, a.Medium(z) == t.medium() && !z.Region.Tank())
	}
	choices := t.waterChoices()
	t.list = grid.New([]grid.Column{
		{Title: say.T("Place in the file"), Width: 170, Fill: true},
		{Title: say.T("Days"), Width: 70, Right: true},
		{Title: say.T("Share"), Width: 66, Right: true},
		{Title: say.T("Water"), Width: 210, Edit: true, Fill: true, Choices: func(int) []string { return choices }},
	}, tradePlaces{t}, grid.Dense())
	t.zones = grid.New([]grid.Column{
		{Title: say.T("Zone"), Width: 140, Fill: true},
		{Title: say.T("Use"), Width: 60, Edit: true, Choices: func(int) []string { return []string{say.T("yes"), say.T("no")} }},
	}, tradeZones{t}, grid.Dense())
	t.from = &formEntry{escape: func() { f.hide(t.d) }}
	t.from.ExtendBaseWidget(t.from)
	t.from.SetPlaceHolder(say.T("empty: always"))
	t.from.OnChanged = func(string) { t.update() }
	t.from.OnSubmitted = func(string) { t.apply() }
	head := say.T("%s: %s days at %d places.", file, session.Figure(t.total, 1), len(t.places))
	if p.Ignored != nil {
		head += " " + say.T("Columns not used: %s.", strings.Join(p.Ignored, ", "))
	}
	right := container.NewBorder(nil, container.NewVBox(
		look.Strong(say.T("From a date on")), t.from,
		look.Note(say.T("With a date, such as 2027-06-01, it becomes a change of service. Without, it replaces the zones' waters."))), nil, nil, t.zones)
	body := container.NewBorder(look.Note(head), container.NewVBox(t.result, t.wrong), nil, nil, container.New(beside{290}, t.list, right))
	t.d = dialog.NewCustomWithoutButtons(say.T("Trading pattern"), body, f.win)
	cancel, use := look.Button(say.T("Cancel"), func() { f.hide(t.d) }), look.AccentButton(say.T("Use it"), t.apply)
	cancel.OnEscape, use.OnEscape = cancel.OnTapped, cancel.OnTapped
	t.d.SetButtons([]fyne.CanvasObject{cancel, use})
	t.d.Resize(dialogSize(f.win, 980, 620))
	t.update()
	return t
}

// medium is that of the first place found among the asset's waters, else
// seawater.
func (t *tradeForm) medium() hull.Medium {
	for _, p := range t.places {
		if w, ok := t.a.Water(p.Water); ok {
			return w.Medium
		}
	}
	return hull.Seawater
}

// waterChoices are the asset's waters, then the table's with a temperature.
func (t *tradeForm) waterChoices() []string {
	choices := []string{leaveOut}
	for _, w := range t.a.Waters {
		choices = append(choices, w.ID)
	}
	for _, e := range water.Entries() {
		if m := hull.Medium(e.Medium); (m == hull.Seawater || m == hull.Fresh) && !session.NeedsTemperature(e) {
			choices = append(choices, fromTable+e.Name)
		}
	}
	return choices
}

// trade is the pattern as it would be used.
func (t *tradeForm) trade() (session.Trade, error) {
	use := session.Trade{Places: t.places}
	for i, yes := range t.uses {
		if yes {
			use.Zones = append(use.Zones, t.a.Zones[i].ID)
		}
	}
	if text := strings.TrimSpace(t.from.Text); text != "" {
		d, err := session.ParseDay(text)
		if err != nil {
			return use, err
		}
		use.From = d
	}
	for i, fault := range t.faults {
		return use, fmt.Errorf("%s: %s", t.places[i].Name, fault)
	}
	return use, nil
}

// update shows what would become of the zones, or what is missing.
func (t *tradeForm) update() {
	use, err := t.trade()
	text := ""
	if err == nil {
		text, err = use.Preview(t.a)
	}
	if err != nil {
		t.result.SetText("")
		t.wrong.SetText(capitalised(inWords(err)))
		return
	}
	t.wrong.SetText("")
	when := say.T("always")
	if !use.From.IsZero() {
		when = say.T("from %s on", session.Day(use.From))
	}
	t.result.SetText(say.T("%d zones, %s: %s", len(use.Zones), when, text))
}

func (t *tradeForm) apply() {
	grid.CommitOpen()
	use, err := t.trade()
	if err == nil {
		err = t.f.s.ApplyTrade(use)
	}
	if err != nil {
		t.result.SetText("")
		t.wrong.SetText(capitalised(inWords(err)))
		return
	}
	t.f.hide(t.d)
}

// selectUnknown selects the water of the first place that is not known, else of
// the first.
func (t *tradeForm) selectUnknown() {
	row := max(0, slices.IndexFunc(t.places, func(p session.TradePlace) bool { return !p.Decided() }))
	t.list.Select(row, 3)
	t.list.ScrollTo(row, 3)
}

// tradePlaces is the table of the places.
type tradePlaces struct{ t *tradeForm }

func (r tradePlaces) Rows() int { return len(r.t.places) }

func (r tradePlaces) Cell(row, col int) grid.Cell {
	p := r.t.places[row]
	switch col {
	case 0:
		return grid.Cell{Text: p.Name, Bold: true}
	case 1:
		return grid.Cell{Text: session.Figure(p.Days, 1)}
	case 2:
		return grid.Cell{Text: session.Figure(100*p.Days/r.t.total, 1) + " %"}
	}
	if fault := r.t.faults[row]; fault != "" {
		return grid.Cell{Text: r.t.typed[row], Fault: fault}
	}
	switch {
	case p.LeftOut:
		return grid.Cell{Text: leaveOut, Muted: true}
	case p.Water != "":
		return grid.Cell{Text: p.Water}
	case p.Entry != "":
		e, _ := water.Find(p.Entry)
		return grid.Cell{Text: fromTable + e.Name}
	}
	return grid.Cell{Fault: say.T("not known: choose the water that it is, or leave it out")}
}

// Commit takes the water typed for a place, by its exact name or id.
func (r tradePlaces) Commit(row, _ int, text string) {
	t := r.t
	p := &t.places[row]
	delete(t.faults, row)
	p.Water, p.Entry, p.LeftOut = "", "", false
	text = strings.TrimSpace(text)
	name, table := strings.CutPrefix(text, fromTable)
	switch w, own := t.a.Water(text); {
	case text == "":
	case text == leaveOut:
		p.LeftOut = true
	case own && !table:
		p.Water = w.ID
	default:
		if e, ok := water.Find(name); ok {
			p.Entry = e.ID
		} else {
			t.typed[row], t.faults[row] = text, say.T("want one of the waters listed, or %s, got %q", leaveOut, text)
		}
	}
	t.update()
}

// tradeZones is the table of the zones.
type tradeZones struct{ t *tradeForm }

func (r tradeZones) Rows() int { return len(r.t.a.Zones) }

func (r tradeZones) Cell(row, col int) grid.Cell {
	if col == 0 {
		return grid.Cell{Text: r.t.a.Zones[row].Name, Bold: r.t.uses[row]}
	}
	if r.t.uses[row] {
		return grid.Cell{Text: say.T("yes")}
	}
	return grid.Cell{Text: say.T("no"), Muted: true}
}

// Commit takes yes or no.
func (r tradeZones) Commit(row, _ int, text string) {
	r.t.uses[row] = strings.HasPrefix(strings.ToLower(strings.TrimSpace(text)), "y")
	r.t.update()
}
