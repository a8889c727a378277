package plan

import (
	"fmt"
	"strings"

	"anodewright/anodes/protection"
	"anodewright/hull"
)

// protect finds the other protections of every zone: coats of zinc, nobler
// metal, impressed current, rods in soil.
func (o *Outcome) protect(demand []hull.ZoneDemand) {
	for i := range o.Zones {
		z := &o.Zones[i]
		z.Protection = protection.Of(o.steel(), demand, z.Factor.Used, i)
	}
}

// protections raises what the other protections ask people to mind.
func (c *raiser) protections() {
	for i := range c.o.Zones {
		r := c.o.Zones[i].Protection
		if r == nil {
			continue
		}
		if r.Coat != nil {
			c.coat(i, r.Coat)
		}
		if r.Impressed != nil {
			c.impressed(i, r.Impressed)
		}
		if c.o.Zones[i].Zone.Nobler != nil {
			c.nobler(i, r.Couple)
		}
	}
}

// coat: zinc that is gone before the next docking, or before the horizon.
func (c *raiser) coat(i int, coat *protection.ZincCoat) {
	_, _, source, confidence := protection.ZincLoss(coat.Class)
	zone := c.o.Zones[i].Zone
	if !coat.Class.Immersed() && zone.ImmersedShare == 1 && c.o.Asset.Medium(zone) == hull.Seawater {
		low, high, source, confidence := protection.ZincLoss("immersed-temperate")
		c.add("coat-class", i, fmt.Sprintf("The zone lies in seawater all the time (immersed share 1), but class %s is one of the atmosphere: under water zinc loses %g to %g µm a year, in warm water more. Choose an immersed class, or enter the immersed share.", coat.Class, low, high), source, confidence)
	}
	if d, ok := c.o.NextDocking(); ok && coat.BareBefore(d.Date) {
		c.add("coat-spent", i, fmt.Sprintf("By the upper loss of class %s the zinc is gone from %s on, before the docking of %s: look at it, and renew it or fit anodes then.", coat.Class, coat.Bare, d.Date), source, confidence)
	}
	for _, iv := range coat.Intervals {
		if iv.Demand != nil {
			c.add("coat-unheld", i, fmt.Sprintf("Once the zinc is gone, from %s on, the steel asks for %.2f A and nobody holds it: a zone with a protection of its own has no host. Enter held_by or anodes in its place.", iv.BareFrom, iv.Demand.Mean), source, confidence)
			break
		}
	}
}

// impressed: refused in tanks; off for a share of the time; too few anodes.
func (c *raiser) impressed(i int, p *protection.Impressed) {
	if p.Refused != "" {
		c.add("impressed-in-tank", i, "Refused: "+p.Refused+". Nothing holds this zone in the plan: give it anodes.", "LR Rules for Ships, Pt 3 Ch 2, 3.3.1; IACS Common Structural Rules, Pt 2 Ch 2 Sec 2", "read")
		return
	}
	if p.OffShare > 0 {
		charge := 0.0
		for _, iv := range p.Intervals {
			charge += iv.Charge
		}
		c.add("off-share", i, fmt.Sprintf("Off for %.0f %% of the time, the impressed current leaves %.0f Ah undelivered up to the horizon, and nobody holds the steel meanwhile: it corrodes.", 100*p.OffShare, charge), "DNV-RP-B401 figures", "computed")
	}
	if short := p.Short(); short != "" {
		c.add("impressed-short", i, "Impressed current: "+short+".", "rates of the anode's material", "computed")
	}
}

// nobler: bare steel beside a nobler metal.
func (c *raiser) nobler(i int, couple *protection.Couple) {
	worst, bare := 0.0, 0.0
	for _, iv := range couple.Intervals {
		if iv.Loss != nil && *iv.Loss > worst {
			worst, bare = *iv.Loss, *iv.BareSteel
		}
	}
	text := fmt.Sprintf("%.3g m² of %s beside the steel: at a scratch the bare steel is a small anode to a large cathode.", couple.Area, strings.ReplaceAll(couple.Metal, "-", " "))
	if worst > 0 {
		text += fmt.Sprintf(" Where nothing holds it, %.3g m² of bare steel lose %.2g mm a year.", bare, worst/1000)
	}
	c.add("nobler-scratch", i, text+" Paint the nobler metal, never the steel alone.", "galvanic couple; Faraday's law", "computed")
}
