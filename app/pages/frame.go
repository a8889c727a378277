// Package pages is the app's window: the fleet at the left, the open asset's
// pages at the right, menus and dialogs. It shows what a session holds and
// turns what a person does into the session's commands; it computes nothing.
package pages

import (
	"strconv"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// page is one of the pages of the open asset.
type page interface {
	title() string
	content() fyne.CanvasObject
	update() // shows the session as it is now
}

// Frame is the window's content and what belongs to the whole window.
type Frame struct {
	app     fyne.App
	win     fyne.Window
	s       *session.Session
	pages   []page
	current int
	fleet   *fleetList
	title   *look.Text
	next    *look.Text
	saved   *look.Text
	tabs    *tabs
	button  *look.PushButton // exports
	all     *fyne.Container  // all but the fleet
	root    *fyne.Container  // all, made anew by rebuild
	named   *hull.Asset      // whose names keepNames kept
	body    *fyne.Container
	band    *band
	zone    int               // the selected one, everywhere
	cursor  hull.Date         // the day that is looked at
	shown   string            // id of the asset that the cursor was set for
	welcome fyne.CanvasObject // what a window without assets shows
	begin   *look.PushButton  // its first button
	mode    look.Mode
	scale   float32
	queued  bool
	undo    *fyne.MenuItem
	redo    *fyne.MenuItem
	ticks   []func() bool

	coursesOf *plan.Outcome         // whose courses these are
	courses   map[int][]plan.Sample // by zone
	rail      *rail
	tables    []table // whose columns are remembered

	watching chan struct{} // closed to end watch
	noticed  string        // what last went wrong in notice

	// Quit is called by the menu to close the window.
	Quit func()
	// OpenRegister opens another register beside this one.
	OpenRegister func(path string) error
	opened       string // the register's path
}

// New fills a window with the session. Call it before the window is shown,
// and Restore once the app runs.
func New(a fyne.App, win fyne.Window, s *session.Session) *Frame {
	f := &Frame{app: a, win: win, s: s, scale: 1, Quit: win.Close, root: container.NewStack()}
	win.SetPadded(false)
	win.SetContent(f.root)
	f.readWords()
	f.build()
	win.Canvas().SetOnTypedKey(func(key *fyne.KeyEvent) {
		f.windowKey(key.Name)
	})
	win.SetOnDropped(func(_ fyne.Position, uris []fyne.URI) {
		for _, u := range uris {
			f.importFile(u.Path())
		}
	})
	s.Notify(func() { fyne.Do(f.refreshSoon) })
	f.Update()
	return f
}

// build makes the window's content and menu, in the language in force.
func (f *Frame) build() {
	f.ticks = nil
	f.band = newBand(f)
	f.rail = newRail(f)
	readings := newReadings(f)
	readings.follow()
	f.pages = []page{newSteel(f), newAnodes(f), readings, newForecast(f), newDockings(f), newDockFloor(f), newOrder(f), newBasis(f)}
	f.rememberAll()
	f.sayWhatToDo()
	f.fleet = newFleetList(f)
	f.title = look.Title("")
	f.next = look.Accented("")
	f.saved = look.Muted("")
	f.welcome, f.begin = newWelcome(f)
	f.body = container.NewStack()
	var titles []string
	for _, p := range f.pages {
		titles = append(titles, p.title())
	}
	f.tabs = newTabs(titles, f.show)
	f.button = look.AccentButton(say.T("Export schedule…"), f.exportWorkbook)
	f.all = container.New(headed{f.band}, f.title, f.next, container.NewHBox(f.saved, spacer(8), f.button), f.tabs.row, f.body, f.band.all, f.rail.show, f.band.side)
	f.root.Objects = []fyne.CanvasObject{container.New(f.rail, f.fleet.content(), container.New(padded{}, f.all))}
	f.win.SetMainMenu(f.menu())
}

// Restore puts back the theme, text size and page of last time. Call it when
// the app has started.
func (f *Frame) Restore() {
	if n, err := strconv.Atoi(f.s.Setting("theme")); err == nil {
		f.mode = look.Mode(n)
	}
	if x, err := strconv.ParseFloat(f.s.Setting("text scale"), 32); err == nil {
		f.scale = float32(x)
	}
	look.Apply(f.app, f.mode, f.scale)
	f.band.choice = f.s.Setting("picture")
	f.rail.choice = f.s.Setting("fleet list")
	if n, err := strconv.Atoi(f.s.Setting("page")); err == nil && n >= 0 && n < len(f.pages) {
		f.current = n
	}
	f.Update()
	f.win.Content().Refresh()
	f.focusPage()
	f.backupDaily()
	f.watch()
	if why := f.s.ReadOnly(); why != "" {
		f.tell(say.T("This register is only read"), say.T("Nothing can be changed or kept, because %s. Exports work as usual.", why))
	}
}

// refreshSoon updates the window once for all changes of one turn.
func (f *Frame) refreshSoon() {
	if f.queued {
		return
	}
	f.queued = true
	fyne.Do(func() {
		f.queued = false
		f.Update()
	})
}

// Update shows the session as it is now.
func (f *Frame) Update() {
	f.fleet.update()
	f.updateMenu()
	a := f.s.Asset()
	// The headline's new texts may need another place.
	defer func() { f.all.Layout.Layout(f.all.Objects, f.all.Size()) }()
	f.keepCursor(a)
	f.keepNames(a)
	f.band.update()
	if a == nil {
		f.button.Disable()
		f.title.SetText("Anodewright")
		f.next.SetText("")
		f.saved.SetText("")
		f.tabs.row.Hide()
		if len(f.body.Objects) != 1 || f.body.Objects[0] != f.welcome {
			f.body.Objects = []fyne.CanvasObject{f.welcome}
		}
		f.body.Refresh()
		return
	}
	f.title.SetText(a.Name)
	f.next.SetText(f.nextText(a))
	f.saved.SetText(f.savedText())
	f.button.Enable()
	f.tabs.row.Show()
	f.tabs.mark(f.current)
	p := f.pages[f.current]
	p.update()
	if len(f.body.Objects) != 1 || f.body.Objects[0] != p.content() {
		f.body.Objects = []fyne.CanvasObject{p.content()}
		f.body.Refresh()
	}
}

func (f *Frame) nextText(a *hull.Asset) string {
	o := f.s.Outcome()
	if o == nil {
		return say.T("computing…")
	}
	d, ok := o.NextDocking()
	if !ok {
		return say.T("no docking ahead")
	}
	s := say.T("next docking %s", session.Day(d.Date))
	if by, ok := o.OrderBy(); ok {
		s += " " + say.T("· order by %s · %s", session.Day(by), inDays(int(by-o.Today)))
	}
	return s
}

func (f *Frame) savedText() string {
	if f.s.ReadOnly() != "" {
		return say.T("read only")
	}
	if n := f.s.Drafts(); n == 1 {
		return say.T("⚠ 1 field at fault, not in the plan")
	} else if n > 1 {
		return say.T("⚠ %d fields at fault, not in the plan", n)
	}
	return say.T("✓ saved")
}

// inDays says how far a date lies from today.
func inDays(n int) string {
	switch {
	case n == 1:
		return say.T("tomorrow")
	case n > 0:
		return say.T("in %d days", n)
	case n == 0:
		return say.T("today")
	case n == -1:
		return say.T("late by 1 day")
	}
	return say.T("late by %d days", -n)
}

// show opens a page and gives its first table the keyboard: what is typed next
// must not land on the page that is no longer to be seen.
func (f *Frame) show(page int) {
	grid.CommitOpen()
	f.current = page
	f.s.SetSetting("page", strconv.Itoa(page))
	f.Update()
	f.focusPage()
}

func (f *Frame) focusPage() {
	if f.s.Asset() == nil {
		f.win.Canvas().Focus(f.begin)
		return
	}
	switch p := f.pages[f.current].(type) {
	case interface{ first() *grid.Grid }:
		// Not g.Focus: the driver does not know the canvas of a page never drawn.
		f.win.Canvas().Focus(p.first())
	case interface{ focus() fyne.Focusable }:
		f.win.Canvas().Focus(p.focus())
	default:
		f.win.Canvas().Unfocus()
	}
}

func (f *Frame) setLook(mode look.Mode, scale float32) {
	f.mode, f.scale = mode, scale
	f.s.SetSetting("theme", strconv.Itoa(int(mode)))
	f.s.SetSetting("text scale", strconv.FormatFloat(float64(scale), 'f', 2, 32))
	look.Apply(f.app, mode, scale)
	f.Update()
	f.win.Content().Refresh()
}

// Close commits what is being typed and ends what runs beside. From then on
// outcomes are not shown any more: the toolkit, once its window is gone, would
// do that on the goroutine that computed them.
func (f *Frame) Close() {
	f.unwatch()
	grid.CommitOpen()
	f.s.Notify(func() {})
}
