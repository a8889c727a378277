package protection

import (
	"fmt"
	"math"
	"strings"

	"anodewright/hull"
)

// Heading names the protections of a result.
func (r *Result) Heading() string {
	var names []string
	if r.Coat != nil {
		names = append(names, "zinc coat")
	}
	if r.Impressed != nil {
		names = append(names, "impressed current")
	}
	if r.Rods != nil {
		names = append(names, "rods in soil")
	}
	if r.Couple != nil {
		names = append(names, "nobler metal")
	}
	if r.Unbonded != "" {
		names = append(names, "not bonded")
	}
	return strings.Join(names, ", ")
}

// Words returns the result in sentences for people.
func (r *Result) Words() []string {
	var lines []string
	add := func(format string, args ...any) { lines = append(lines, fmt.Sprintf(format, args...)) }
	if r.Coat != nil {
		r.Coat.words(add)
	}
	if r.Impressed != nil {
		r.Impressed.words(add)
	}
	if r.Rods != nil {
		r.Rods.words(add)
	}
	if r.Couple != nil {
		r.Couple.words(add)
	}
	if r.Unbonded != "" {
		add("%s", r.Unbonded)
	}
	return lines
}

func (z *ZincCoat) words(add func(string, ...any)) {
	most := "more"
	if z.YearsMost != nil {
		most = figure(*z.YearsMost)
	}
	add("Zinc of %s µm in class %s loses %s to %s µm a year: bare %s to %s years after %s.",
		figure(z.Thickness), z.Class, figure(z.LossLow), figure(z.Loss), figure(z.Years), most, z.Applied)
	if z.Bare == nil {
		add("It outlasts the plan by far.")
		return
	}
	latest := ""
	if z.BareLatest != nil {
		latest = ", at the latest on " + z.BareLatest.String()
	}
	add("The plan counts with the upper loss: bare from %s%s.", *z.Bare, latest)
	for _, iv := range z.Intervals {
		if iv.Demand != nil {
			loss := ""
			if iv.SteelLoss != nil {
				loss = fmt.Sprintf("; left unheld it may lose %s mm", figure(*iv.SteelLoss))
			}
			add("From %s to %s the steel asks for %s A and nobody holds it%s.", iv.BareFrom, iv.To, triple(*iv.Demand), loss)
		}
	}
}

func (c *Couple) words(add func(string, ...any)) {
	add("%s m² of %s beside the steel of %s: %s to %s V apart when free.",
		figure(c.Area), strings.ReplaceAll(c.Metal, "-", " "), c.Steel, figure(c.DrivingLeast), figure(c.DrivingMost))
	if len(c.Intervals) > 0 {
		first, last := c.Intervals[0], c.Intervals[len(c.Intervals)-1]
		if c.HeldBy != nil {
			add("It drains %s A of the protection of %s now, %s A in the last interval (mean).", figure(first.Drain.Mean), *c.HeldBy, figure(last.Drain.Mean))
		} else {
			add("Nothing carries its %s A: the bare steel that it touches pays.", figure(first.Drain.Mean))
		}
	}
	worst := -1
	for k, iv := range c.Intervals {
		if iv.Loss != nil && (worst < 0 || *iv.Loss > *c.Intervals[worst].Loss) {
			worst = k
		}
	}
	if worst < 0 {
		add("No bare steel is entered and the paint is whole: enter bare_steel_m2 for the loss at a scratch.")
		return
	}
	iv := c.Intervals[worst]
	ratio := figure(c.Area / *iv.BareSteel)
	from := "entered"
	if c.BareFrom == "breakdown" {
		from = "by the paint's breakdown"
	}
	alone := ""
	if c.FreeLoss != nil {
		alone = fmt.Sprintf("; steel alone loses at most %s", figure(*c.FreeLoss))
	}
	add("Area ratio %s to 1 on %s m² of bare steel (%s): where nothing holds it, it loses %s µm a year to the couple%s.",
		ratio, figure(*iv.BareSteel), from, figure(*iv.Loss), alone)
}

func (p *Impressed) words(add func(string, ...any)) {
	if p.Refused != "" {
		add("Refused: %s. Nothing holds the zone: choose anodes.", p.Refused)
		return
	}
	holds := ""
	if len(p.Holds) > 0 {
		holds = " with " + strings.Join(p.Holds, ", ")
	}
	add("Current %s A: the largest demand%s, %s A, and %s %% on top. Mean %s A over %s years.",
		figure(*p.Current), holds, figure(p.Largest), figure(100*p.Margin), figure(p.Mean), figure(p.Years))
	name := strings.ReplaceAll(string(p.Anode), "-", " ")
	if p.Mass != nil {
		add("Anodes of %s lose %s at %s a year.", name, mass(*p.Mass), mass(*p.Rate)+" per A")
	} else {
		add("Anodes of %s.", name)
	}
	for _, n := range []struct {
		by string
		x  *float64
	}{{"output", p.ByOutput}, {"mass or charge", p.ByMass}} {
		if n.x != nil {
			add("Anodes by %s: %s.", n.by, figure(*n.x))
		}
	}
	if p.Count != nil {
		add("Anodes needed: %d.", *p.Count)
	}
	if s := p.Short(); s != "" {
		add("Too few: %s.", s)
	}
	if p.LifeYears != nil {
		n, _ := p.pieces()
		add("%d of them last %s years by mass or charge.", n, years(*p.LifeYears))
	}
	if p.Voltage != nil {
		add("Anode group %s Ω, circuit %s Ω: %s V and %s W of direct current.", figure(*p.Group), figure(*p.Circuit), figure(*p.Voltage), figure(*p.Power))
	}
	if p.OffShare > 0 {
		charge, loss := 0.0, 0.0
		known := false
		for _, iv := range p.Intervals {
			charge += iv.Charge
			if iv.SteelLoss != nil {
				known, loss = true, loss+*iv.SteelLoss
			}
		}
		text := fmt.Sprintf("Off for %s %% of the time it leaves %s Ah undelivered up to the horizon, and nobody holds the steel meanwhile", figure(100*p.OffShare), figure(charge))
		if known {
			text += fmt.Sprintf(": bare steel may lose %s mm", figure(loss))
		}
		add("%s.", text)
	}
	if len(p.Local) > 0 {
		add("Zones that keep anodes of their own: %s.", strings.Join(p.Local, ", "))
	}
	for _, m := range p.Missing {
		add("%s%s.", strings.ToUpper(m[:1]), m[1:])
	}
}

func (r *Rods) words(add func(string, ...any)) {
	add("Soil of %s Ω m at most; the zone asks for %s A at first, %s A at last, %s A on average over %s years.",
		figure(r.Resistivity), figure(r.Initial), figure(r.Final), figure(r.Mean), figure(r.Years))
	for _, p := range r.Patterns {
		if p.ByCurrent == nil {
			add("%s: not more negative than protected steel, it gives no current.", p.Pattern)
			continue
		}
		text := fmt.Sprintf("%s: one rod %s Ω, %s A alone; by mass %s, by current %s", p.Pattern, figure(p.One), figure(p.Output), figure(p.ByMass), figure(*p.ByCurrent))
		if p.Count == nil {
			add("%s; no row of them gives the current.", text)
			continue
		}
		text += fmt.Sprintf(", in a row %d: %s", *p.ByRow, rods(*p.Count))
		if p.RowLength != nil && *p.Count > 1 {
			text += fmt.Sprintf(" over %s m", figure(*p.RowLength))
		}
		text += fmt.Sprintf(", %s A together", figure(*p.RowOutput))
		if p.Life != nil {
			text += fmt.Sprintf(", %s years by mass", years(*p.Life))
		}
		add("%s.", text)
		if h := p.Handbook; h != nil {
			add("%s by the handbook (as %s): %s A each, %s rods by current.", p.Pattern, h.Casting, figure(h.Output), figure(h.Count))
		}
	}
}

func rods(n int) string {
	if n == 1 {
		return "1 rod"
	}
	return fmt.Sprintf("%d rods", n)
}

func triple(t Triple) string {
	return figure(t.Initial) + " / " + figure(t.Mean) + " / " + figure(t.Final)
}

// years writes a life; beyond a hundred years nothing is known.
func years(x float64) string {
	if x > 100 {
		return "more than 100"
	}
	return figure(x)
}

// mass writes a mass in the unit that suits it.
func mass(kg float64) string {
	switch {
	case kg < 0.001:
		return figure(kg*1e6) + " mg"
	case kg < 1:
		return figure(kg*1e3) + " g"
	}
	return figure(kg) + " kg"
}

// figure writes a number with three digits, or whole where it has more.
func figure(x float64) string {
	if x == 0 {
		return "0"
	}
	digits := max(0, 2-int(math.Floor(math.Log10(math.Abs(x)))))
	s := fmt.Sprintf("%.*f", digits, x)
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return s
}

// BareBefore reports whether a zinc coat is gone before a date.
func (z *ZincCoat) BareBefore(d hull.Date) bool { return z.Bare != nil && *z.Bare < d }
