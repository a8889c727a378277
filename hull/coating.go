package hull

// Breakdown is the share of a coated area that acts as bare steel: just after
// the docking that starts an interval, on average, and just before the next.
type Breakdown struct{ Initial, Mean, Final float64 }

// coat is a coating's state from a date on: the breakdown factor
// min(1, base + slope*years) and its age for the rule of ship practice.
type coat struct {
	from        Date
	base, slope float64
	age         float64 // years, at from
	none        bool    // bare metal: there is nothing to touch up
}

// at returns the breakdown factor on date d, not before the coat's date:
// fc = min(1, a + b*t) (DNV-RP-B401, 6.4).
func (c coat) at(d Date) float64 { return min(1, c.base+c.slope*d.Years(c.from)) }

func (c coat) ageAt(d Date) float64 { return c.age + d.Years(c.from) }

// stretch is a coating over a stretch of time: its breakdown and its age in
// years at both ends.
type stretch struct {
	Breakdown
	ageFirst, ageLast float64
}

// over sets s to the coating from t1 to t2 years after its date, the mean by
// exact integration of the capped law.
func (c *coat) over(t1, t2 float64, s *stretch) {
	s.Initial, s.Final = min(1, c.base+c.slope*t1), min(1, c.base+c.slope*t2)
	s.Mean = (s.Initial + s.Final) / 2
	if s.Final == 1 {
		s.Mean = meanBreakdown(c.base, c.slope, t1, t2)
	}
	s.ageFirst, s.ageLast = c.age+t1, c.age+t2
}

// meanBreakdown returns the mean of min(1, a + b*t) between ages t1 and t2 in
// years: (F(t2)-F(t1))/(t2-t1) with F(t) = a*t + b*t^2/2 up to tc = (1-a)/b
// and growing by 1 per year from there on.
func meanBreakdown(a, b, t1, t2 float64) float64 {
	x1, x2 := min(1, a+b*t1), min(1, a+b*t2)
	if x2 < 1 || b == 0 || x1 == 1 || t2 <= t1 {
		return (x1 + x2) / 2
	}
	tc := (1 - a) / b
	return ((x1+1)/2*(tc-t1) + (t2 - tc)) / (t2 - t1)
}

// constants returns a coating's breakdown constants a and b (per year): given
// ones, else those of its category at the zone's depth (DNV-RP-B401, Table
// 10-4), else those of no coating.
func constants(cat Category, a, b *float64, depth float64) (float64, float64) {
	ca, cb := 1.0, 0.0
	if k := paint(cat); k >= 0 {
		table := &tables().coating[k]
		ca, cb = table[0], table[1]
		if depth > 30 {
			cb = table[2]
		}
	}
	if a != nil {
		ca = *a
	}
	if b != nil {
		cb = *b
	}
	return ca, cb
}

// paint is the place of a category in the offshore code's table, -1 for
// others.
func paint(cat Category) int {
	switch cat {
	case CategoryI:
		return 0
	case CategoryII:
		return 1
	case CategoryIII:
		return 2
	}
	return -1
}

// BreakdownConstants returns the constants a and b (per year) of the zone's
// present coating.
func (z *Zone) BreakdownConstants() (a, b float64) {
	return constants(z.Coating.Category, z.Coating.A, z.Coating.B, z.Depth)
}

// Coated reports whether the zone has a coating.
func (z *Zone) Coated() bool { return z.Coating.Category != CategoryNone }

// coatAtStart returns the zone's coating at the plan's start: as applied, with
// the works of the dockings closed since.
func (a *Asset) coatAtStart(z *Zone, start Date) coat { return a.coatClosed(z, start, start) }

// coatClosed is the coating with the works of the dockings that were closed
// after it was applied, up to a date.
func (a *Asset) coatClosed(z *Zone, start, until Date) coat {
	c := a.coatApplied(z, start)
	applied := c.from
	for i := range a.Closed {
		if d := a.Closed[i].Date; d > applied && d <= until {
			c = c.afterWorks(z, a.Closed[i].Works, d)
		}
	}
	return c
}

// coatApplied is the coating as it was new.
func (a *Asset) coatApplied(z *Zone, start Date) coat {
	c := coat{from: z.Coating.Applied, none: !z.Coated()}
	if c.from.IsZero() {
		c.from = min(a.InService, start)
	}
	c.base, c.slope = z.BreakdownConstants()
	return c
}

// afterDocking returns the coating after the works of a docking on the zone,
// in their order.
func (c coat) afterDocking(z *Zone, d *Docking) coat { return c.afterWorks(z, d.Works, d.Date) }

func (c coat) afterWorks(z *Zone, works []Work, on Date) coat {
	for i := range works {
		if works[i].Zone == z.ID {
			c = c.after(works[i], z, on)
		}
	}
	return c
}

// after returns the coating after one work on date d.
func (c coat) after(w Work, z *Zone, d Date) coat {
	old, age := c.at(d), c.ageAt(d)
	// The new paint's constants: the work's own, else its category's, else
	// those of the zone's coating.
	newA, newB := z.BreakdownConstants()
	if w.Category != "" {
		newA, newB = constants(w.Category, nil, nil, z.Depth)
	}
	if w.A != nil {
		newA = *w.A
	}
	if w.B != nil {
		newB = *w.B
	}
	switch w.Coating {
	case TouchUp:
		if c.none {
			return c
		}
		return coat{from: d, base: (1 - *w.Share) * old, slope: c.slope, age: (1 - *w.Share) * age}
	case Recoat:
		return coat{from: d, base: newA, slope: newB}
	case PartRecoat:
		return coat{from: d, base: (1-*w.Share)*old + *w.Share*newA, slope: c.slope, age: (1 - *w.Share) * age}
	case Found:
		return coat{from: d, base: *w.Breakdown, slope: c.slope, age: age}
	}
	return c // cleaning changes no breakdown
}
