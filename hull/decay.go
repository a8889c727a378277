package hull

import (
	"math"

	"anodewright/assets"
)

// decay is the law of the basis by which the density of bare steel falls with
// the time under water: i = 10^c T^d mA/m2, T hours since immersion.
type decay struct{ c, d float64 }

// firstHours is the time after immersion in which the law is held at its value
// at the end of it: it has none at its start.
const firstHours = 24

// decay returns the law of the basis, if it has one.
func (b *Basis) decay() (l decay, ok bool) {
	if b.Decay == "" {
		return l, false
	}
	if b.Decay != OwnDecay {
		t := assets.Get("decay-law")
		l = decay{t.Value(string(b.Decay), "c"), t.Value(string(b.Decay), "d")}
	}
	if b.DecayC != nil {
		l.c = *b.DecayC
	}
	if b.DecayD != nil {
		l.d = *b.DecayD
	}
	return l, true
}

// DecayConstants returns the constants c and d of the basis's decay law, if it
// has one.
func (b *Basis) DecayConstants() (c, d float64, ok bool) {
	l, ok := b.decay()
	return l.c, l.d, ok
}

// density is the law's in mA/m2 after so many hours.
func (l decay) density(hours float64) float64 {
	return math.Pow(10, l.c) * math.Pow(max(firstHours, hours), l.d)
}

// decays reports whether a decay law replaces the zone's mean density: that of
// carbon and high-strength steel in seawater where it comes from the offshore
// code or the class rule.
func (c *calculation) decays(z *Zone) bool {
	if c.a.Basis.Decay == "" || z.Surface != CarbonSteel && z.Surface != HighStrength || c.a.Medium(z) != Seawater {
		return false
	}
	for _, s := range z.Waters {
		for i := range c.waters {
			if c.waters[i].w.ID != s.Water {
				continue
			}
			if b := z.basis(c.rule, c.waters[i]); b != fromCode && b != fromArea {
				return false
			}
		}
	}
	return true
}

// immersed returns the day on which the steel of interval k came under water:
// a ship or floating unit with the last dry-docking, others in service.
func (a *Asset) immersed(k int) Date {
	if a.Kind != Ship && a.Kind != FloatingUnit {
		return a.InService
	}
	for ahead := a.Ahead(); k > 0; k-- {
		if d := ahead[k-1]; d.Kind == DryDock {
			return d.Date
		}
	}
	return a.Start()
}
