package pages

import (
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/layout"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// The names under which the register keeps how things are said.
const (
	settingLanguage = "language" // ISO 639-1; empty: the machine's
	settingUnits    = "units"    // us; empty: SI
	settingDates    = "dates"    // as say.Dates
	settingDecimal  = "decimal"  // comma; empty: a point
)

// readWords takes over the language, units, dates and decimal sign that the
// register keeps. What it does not keep stays as it is.
func (f *Frame) readWords() {
	if code := f.s.Setting(settingLanguage); code != "" {
		say.Use(code)
	}
	say.UseUS(f.s.Setting(settingUnits) == "us")
	say.UseDates(say.Dates(f.s.Setting(settingDates)))
	say.UseComma(f.s.Setting(settingDecimal) == "comma")
	tellToolkit()
}

// An option is one of the ways that a setting may be set.
type option struct{ value, shown string }

// chosenOf is a select that Escape takes out of its dialog.
type chosenOf struct {
	widget.Select
	escape func()
}

// TypedKey implements fyne.Focusable.
func (c *chosenOf) TypedKey(key *fyne.KeyEvent) {
	if key.Name == fyne.KeyEscape {
		c.escape()
		return
	}
	c.Select.TypedKey(key)
}

// settings is the dialog of language, units and looks. Nothing changes before
// Use is pressed.
type settings struct {
	f       *Frame
	d       *dialog.CustomDialog
	form    *fyne.Container
	setters []func()
	options map[string]*chosenOf // by setting
}

func (f *Frame) newSettings() *settings {
	s := &settings{f: f, form: container.New(layout.NewFormLayout()), options: map[string]*chosenOf{}}
	keep := func(name string) func(string) { return func(value string) { f.s.SetSetting(name, value) } }
	var languages []option
	for _, l := range say.Languages() {
		languages = append(languages, option{l.Code, l.Name})
	}
	s.row(settingLanguage, say.T("Language"), languages, say.Language(), keep(settingLanguage))
	s.row(settingUnits, say.T("Units"), []option{{"", say.T("metric: m², kg, mA/m², °C, Ω m")}, {"us", say.T("US: ft², lb, mA/ft², °F, Ω cm")}},
		f.s.Setting(settingUnits), keep(settingUnits))
	s.row(settingDates, say.T("Dates"), []option{
		{string(say.InWords), say.T("15 Mar 2027, typed 2027-03-15")}, {string(say.ISO), "2027-03-15"},
		{string(say.DayMonthYear), "15.03.2027"}, {string(say.MonthDayYear), "03/15/2027"},
	}, f.s.Setting(settingDates), keep(settingDates))
	s.row(settingDecimal, say.T("Decimal sign"), []option{{"", say.T("point: 0.5")}, {"comma", say.T("comma: 0,5")}}, f.s.Setting(settingDecimal), keep(settingDecimal))
	mode, scale := f.mode, f.scale
	var modes, scales []option
	for _, m := range lookModes() {
		modes = append(modes, option{say.T(m.label), say.T(m.label)})
	}
	for _, x := range textScales {
		scales = append(scales, option{scaleText(x), scaleText(x)})
	}
	s.row("theme", say.T("Theme"), modes, modes[slices.IndexFunc(lookModes(), func(m lookMode) bool { return m.mode == f.mode })].value, func(value string) {
		mode = lookModes()[slices.IndexFunc(modes, func(o option) bool { return o.value == value })].mode
	})
	s.row("text scale", say.T("Text size"), scales, scaleText(f.scale), func(value string) {
		scale = textScales[slices.IndexFunc(scales, func(o option) bool { return o.value == value })]
	})
	s.setters = append(s.setters, func() { f.setLook(mode, scale) })
	note := look.Note(say.T("Figures are computed and stored in SI units; asset files and workbooks keep them, and English. A decimal comma and ISO dates can be typed at any time."))
	s.d = dialog.NewCustomWithoutButtons(say.T("Settings"), container.NewBorder(nil, note, nil, nil, s.form), f.win)
	cancel := look.Button(say.T("Cancel"), func() { f.hide(s.d) })
	use := look.AccentButton(say.T("Use"), s.use)
	cancel.OnEscape, use.OnEscape = cancel.OnTapped, cancel.OnTapped
	s.d.SetButtons([]fyne.CanvasObject{cancel, use})
	return s
}

func scaleText(x float32) string { return session.Number(float64(x)) }

// row adds a setting with its options, the present one chosen.
func (s *settings) row(name, title string, options []option, present string, set func(value string)) {
	var shown []string
	at := 0
	for i, o := range options {
		shown = append(shown, o.shown)
		if o.value == present {
			at = i
		}
	}
	choice := &chosenOf{escape: func() { s.f.hide(s.d) }}
	choice.ExtendBaseWidget(choice)
	choice.Options = shown
	choice.SetSelectedIndex(at)
	s.options[name] = choice
	s.form.Add(look.Plain(title))
	s.form.Add(choice)
	s.setters = append(s.setters, func() { set(options[max(choice.SelectedIndex(), 0)].value) })
}

// use keeps the settings and builds the window anew in their words.
func (s *settings) use() {
	s.f.hide(s.d)
	for _, set := range s.setters {
		set()
	}
	s.f.readWords()
	s.f.rebuild()
}

// settings shows the dialog.
func (f *Frame) settings() {
	s := f.newSettings()
	s.d.Resize(dialogSize(f.win, 560, 360))
	s.d.Show()
	f.win.Canvas().Focus(s.options[settingLanguage])
}

// keepNames leaves an asset's own names as they are in every sentence.
func (f *Frame) keepNames(a *hull.Asset) {
	if a == nil || a == f.named {
		return
	}
	f.named = a
	names := map[string]bool{a.Name: true}
	for i := range a.Zones {
		z := &a.Zones[i]
		names[z.Name], names[z.ID], names[z.Circuit] = true, true, true
	}
	for i := range a.Waters {
		names[a.Waters[i].Name], names[a.Waters[i].ID] = true, true
	}
	for i := range a.Patterns {
		names[a.Patterns[i].Name], names[a.Patterns[i].ID] = true, true
	}
	say.KeepNames(names)
}

// rebuild makes all of the window anew, as after a change of language, and
// keeps what is open in it.
func (f *Frame) rebuild() {
	grid.CommitOpen()
	picture, rail := f.band.choice, f.rail.choice
	f.build()
	f.band.choice, f.rail.choice = picture, rail
	f.Update()
	zone := f.zone
	f.zone = -1
	f.selectZone(zone)
	f.root.Refresh()
	f.focusPage()
}
