package pages

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// casting shows the selected pattern: its sketch, and what a piece does in a
// zone.
type casting struct {
	page    *anodesPage
	sketch  *sketch
	list    *scrolled
	current *formEntry // A of one piece, for its life
	life    *look.Text
	a       *hull.Asset
	p       *hull.Pattern
	zone    int
}

func newCasting(page *anodesPage) *casting {
	c := &casting{page: page, sketch: newSketch(136), list: newScrolled(), life: look.Plain(""), zone: -1}
	c.current = &formEntry{}
	c.current.ExtendBaseWidget(c.current)
	c.current.OnChanged = func(string) { c.showLife() }
	return c
}

// show shows a pattern in the waters of a zone, -1 for none.
func (c *casting) show(a *hull.Asset, p *hull.Pattern, zone int) {
	c.a, c.p, c.zone = a, p, zone
	c.sketch.show(p)
	if p == nil {
		c.list.set()
		return
	}
	lines := []fyne.CanvasObject{c.sketch}
	add := func(o fyne.CanvasObject) { lines = append(lines, o) }
	if why := anodes.CastingFault(p); why != "" {
		add(look.Wrong("⚠ " + capitalised(say.Sentence(why)) + "."))
	}
	if zone < 0 {
		add(look.Note(say.T("Select a zone below to see what a piece gives in its water.")))
	} else {
		c.inZone(add, &a.Zones[zone])
	}
	if mass, ok := anodes.GeometryMass(p); ok {
		add(figureLine(say.T("By sizes; net"), kilograms(mass)+"; "+kilograms(p.NetMass)+" "+say.Mass.Unit()))
	}
	add(figureLine(say.T("With insert"), kilograms(p.Gross())+" "+say.Mass.Unit()))
	add(look.Note(say.T("Order: %s.", say.Sentence(anodes.SpecificationText(p)))))
	c.list.set(lines...)
	c.showLife()
}

// inZone adds what a piece gives in a zone, and what speaks against it there.
func (c *casting) inZone(add func(fyne.CanvasObject), z *hull.Zone) {
	a, p := c.a, c.p
	medium, rho := a.Medium(z), a.Resistivity(z, a.Start())
	metal := anodes.MetalOf(p, medium)
	add(look.Note(say.T("In %s, %s of %s:", z.Name, session.Words(medium), session.ShownWith(say.Resistivity, rho, 3))))
	if why := anodes.Refused(a, z, p); why != "" {
		add(look.Wrong(say.T("⚠ Not offered here: %s.", say.Sentence(why))))
	}
	ohms := func(x float64) string { return session.Figure(x, 4) }
	resistance := ohms(anodes.ResistanceNew(p, rho)) + " / " + ohms(anodes.ResistanceWorn(p, rho)) + " Ω"
	add(figureLine(say.T("R new / worn"), resistance))
	if p.SeriesResist > 0 {
		add(figureLine(say.T("Cable"), ohms(p.SeriesResist)+" Ω"))
	}
	isNew, worn := anodes.OutputNew(p, medium, rho, z.Shielding), anodes.OutputWorn(p, medium, rho, z.Shielding)
	add(figureLine(say.T("Output new / worn"), amperes(isNew)+" / "+amperes(worn)+" A"))
	add(figureLine(say.T("Capacity; E"), say.T("%s; %s V", session.ShownWith(say.Capacity, metal.Capacity, 0), session.Figure(metal.Potential, 2))))
	c.current.SetPlaceHolder(amperes(c.usualCurrent(isNew)))
	entry := container.New(fixedWidth{76}, c.current)
	add(container.NewBorder(nil, nil, container.NewHBox(look.Plain(say.T("Life at")), entry, look.Plain("A")), nil, c.life.Right()))
	for _, x := range anodes.Concerns(a, z, p) {
		add(look.Note("⚠ " + say.Sentence(x.Text)))
	}
}

// usualCurrent is what one piece gives in the zone on average: the mean demand
// over the pieces that the zone carries until the next docking, else half of
// its output.
func (c *casting) usualCurrent(output float64) float64 {
	if o := c.page.f.s.Outcome(); o != nil && c.zone < len(o.Zones) {
		iv := o.Zones[c.zone].Intervals[0]
		n := 0
		for _, g := range iv.Fitted {
			n += g.Count
		}
		if n > 0 && iv.Total.Mean > 0 {
			return min(output, iv.Total.Mean*o.Zones[c.zone].Factor.Median/float64(n))
		}
	}
	return output / 2
}

// showLife says how long a new piece lasts at the current that was typed, or
// at the usual one.
func (c *casting) showLife() {
	if c.p == nil || c.zone < 0 {
		return
	}
	text := strings.TrimSpace(c.current.Text)
	if text == "" {
		text = c.current.PlaceHolder
	}
	x, err := session.ParseNumber(text)
	if err != nil || x <= 0 {
		c.life.SetText(say.T("want a current above 0"))
		return
	}
	years := anodes.LifeYears(c.p, c.a.Medium(&c.a.Zones[c.zone]), x, 0)
	c.life.SetText(say.T("%s years", session.Figure(years, 1)))
}

// figureLine is a name at the left and a figure at the right.
func figureLine(name, figure string) fyne.CanvasObject {
	label := look.Plain(name)
	label.Shrink = true
	return container.NewBorder(nil, nil, nil, look.Plain(figure), label)
}

// kilograms writes a mass of kg in the unit shown, with one decimal below 100.
func kilograms(x float64) string {
	if say.Mass.Show(x) < 100 {
		return session.Shown(say.Mass, x, 1)
	}
	return session.Shown(say.Mass, x, 0)
}
