package plan

import (
	"fmt"

	"anodewright/anodes/forecast"
	"anodewright/assets"
	"anodewright/hull"
)

// steelCurve is the curve that the basis forecasts with.
func steelCurve(b hull.Basis) forecast.Curve {
	switch b.SteelCurve {
	case hull.StraightCurve:
		return forecast.Straight()
	case hull.SigmoidCurve:
		return forecast.Sigmoid(b.CurvePeak)
	}
	return forecast.Level()
}

// explainCurve says how the forecast's steel takes current.
func (o *Outcome) explainCurve(zone int) []hull.Step {
	z := &o.Zones[zone]
	if len(z.Intervals) == 0 || z.Intervals[0].State == "" {
		return nil
	}
	b := o.Asset.Basis
	curve := hull.Step{
		Figure: "steel curve of the forecast, share of the mean density at -1.05 V", Value: steelCurve(b).Share(-1.05),
		Formula: "straight from nothing at -0.65 V to the mean density at -0.80 V, level beyond",
		Source:  "model of the steel", Confidence: "common practice, no source",
	}
	switch b.SteelCurve {
	case hull.StraightCurve:
		curve.Formula = "straight from nothing at -0.65 V through the mean density at -0.80 V and straight on: the slope of the slope-parameter method"
	case hull.SigmoidCurve:
		curve.Formula = "from nothing at -0.65 V to the peak at -0.80 V, down to the mean density at -1.00 V as deposits form, up again by hydrogen, twice the mean density at -1.10 V"
		curve.Inputs = []hull.Input{{Name: "peak at -0.80 V", Value: b.CurvePeak, Unit: "of the mean density"}}
	}
	steps := []hull.Step{curve}
	course := hull.NewCourse(o.steel())
	if b.Decay == "" || !course.Decays(zone) {
		return steps
	}
	c, d, _ := b.DecayConstants()
	source, confidence := "the asset's own constants", "entered"
	if b.Decay != hull.OwnDecay && b.DecayC == nil && b.DecayD == nil {
		t := assets.Get("decay-law")
		row, _ := t.Row(string(b.Decay))
		source, confidence = t.Source()+", "+row.Name, row.Confidence
	}
	for k, iv := range o.Intervals {
		steps = append(steps, hull.Step{
			Figure: fmt.Sprintf("density of bare steel in the forecast, to %s", iv.To), Value: 1000 * course.Density(k, iv.Years()), Unit: "mA/m2",
			Formula: "10^c T^d, T hours since immersion, at the interval's end, in place of the mean density",
			Inputs:  []hull.Input{{Name: "c", Value: c}, {Name: "d", Value: d}, {Name: "T", Value: course.Immersed(k, iv.Years()), Unit: "h"}},
			Source:  source, Confidence: confidence,
		})
	}
	return steps
}
