package survey

import (
	"math"
	"slices"

	"anodewright/hull"
)

// CoatingModel is what is believed of coatings before any reading of them: the
// breakdown constants of a zone's coating, a and b together, are those of the
// design times a factor whose logarithm is normal about 0. What a surveyor
// finds broken down is lognormal about the model's figure on that day. Both
// spreads are our own judgement: no source tells them.
type CoatingModel struct {
	Scatter float64 // sd of ln(factor)
	Reading float64 // sd of ln(share found broken down) of one survey
}

// StandardCoating is the model of coatings: 90 % of them break down at 0.32 to
// 3.2 times the design's rate, and 90 % of the estimates of a survey lie
// within 0.61 and 1.64 times what there is.
func StandardCoating() CoatingModel { return CoatingModel{Scatter: 0.7, Reading: 0.3} }

// leastBroken is the least share broken down that an eye can tell from none.
const leastBroken = 0.001

// CoatingFound is what one survey found of a zone's coating: a share broken
// down between two bounds, which are equal where a percentage was given.
type CoatingFound struct {
	Date        hull.Date
	Above, UpTo float64 // +Inf: no upper bound
	// Predicted is the model's share on that day by the factor.
	Predicted func(factor float64) float64
}

// CoatingReadings returns what the readings up to today found of a zone's
// present coating, one for each day: the mean of the logarithms of the day's
// percentages, else its first word. Readings of a coating that has since been
// renewed are left out, and so is everything after today; a zero today is not
// looked at.
func CoatingReadings(a *hull.Asset, z *hull.Zone, today hull.Date) (all []CoatingFound) {
	type day struct {
		sum, n float64
		word   hull.Condition

		predicted func(factor float64) float64
	}
	days := map[hull.Date]*day{}
	for i := range a.Readings {
		r := &a.Readings[i]
		if r.Zone != z.ID || !Stands(r) || r.CoatingPercent == nil && r.CoatingWord == "" || !today.IsZero() && r.Date > today {
			continue
		}
		predicted, ok := a.BreakdownFound(z, r.Date)
		if !ok || predicted(2) <= predicted(0.5) {
			continue // of another coat, or none
		}
		d := days[r.Date]
		if d == nil {
			d = &day{predicted: predicted}
			days[r.Date] = d
		}
		if r.CoatingPercent != nil {
			d.sum, d.n = d.sum+math.Log(max(*r.CoatingPercent/100, leastBroken)), d.n+1
		} else if d.word == "" {
			d.word = r.CoatingWord
		}
	}
	for date, d := range days {
		f := CoatingFound{Date: date, Predicted: d.predicted}
		switch found := math.Exp(d.sum / d.n); {
		case d.n == 0:
			f.Above, f.UpTo, _, _ = d.word.Range()
			if f.UpTo >= 1 {
				f.UpTo = math.Inf(1)
			}
		case found <= leastBroken*(1+1e-9):
			f.UpTo = leastBroken
		default:
			f.Above, f.UpTo = found, found
		}
		all = append(all, f)
	}
	slices.SortFunc(all, func(x, y CoatingFound) int { return int(x.Date - y.Date) })
	return all
}

// LearnCoating infers the factor of a coating's breakdown constants.
func LearnCoating(m CoatingModel, found []CoatingFound) Posterior {
	const points, reach = 241, 5.0
	from, step := -reach*m.Scatter, 2*reach*m.Scatter/(points-1)
	logs, density := make([]float64, points), make([]float64, points)
	top := math.Inf(-1)
	for i := range logs {
		x := from + step*float64(i)
		logs[i] = -x * x / (2 * m.Scatter * m.Scatter)
		for _, f := range found {
			p := math.Log(max(f.Predicted(math.Exp(x)), leastWastage))
			if f.Above == f.UpTo {
				z := (math.Log(f.Above) - p) / m.Reading
				logs[i] -= z * z / 2
			} else {
				logs[i] += logBetween((math.Log(f.Above)-p)/m.Reading, (math.Log(f.UpTo)-p)/m.Reading)
			}
		}
		top = max(top, logs[i])
	}
	for i, l := range logs {
		density[i] = math.Exp(l - top)
	}
	return newPosterior(from, step, density)
}
