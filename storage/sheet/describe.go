package sheet

import (
	"fmt"
	"strconv"
	"strings"

	"anodewright/anodes"
	"anodewright/hull"
)

// Describe says in words what a reading found: weighed 10 %, 20 %; 1 gone.
func Describe(r *hull.Reading) string {
	var parts []string
	add := func(format string, args ...any) { parts = append(parts, fmt.Sprintf(format, args...)) }
	figures := func(xs []float64, times float64) string {
		var list []string
		for _, x := range xs {
			list = append(list, strconv.FormatFloat(tidy(times*x), 'g', 4, 64)+" %")
		}
		return strings.Join(list, ", ")
	}
	if len(r.WeighedWastage) > 0 {
		add("weighed %s", figures(r.WeighedWastage, 100))
	}
	if len(r.Percent) > 0 {
		add("seen %s", figures(r.Percent, 1))
	}
	if len(r.Measured) > 0 {
		var list []string
		for _, m := range r.Measured {
			list = append(list, fmt.Sprintf("%.0f × %.0f mm", 1000*m.Girth, 1000*m.Length))
		}
		add("measured %s", strings.Join(list, ", "))
	}
	if g := r.Grades; g != nil {
		for i, n := range g.Counts {
			if n == 0 || i >= len(g.Bounds) {
				continue
			}
			if i+1 < len(g.Bounds) {
				add("%d of %.4g to %.4g %%", n, 100*g.Bounds[i], 100*g.Bounds[i+1])
			} else {
				add("%d above %.4g %%", n, 100*g.Bounds[i])
			}
		}
	}
	for i, n := range []int{r.Gone, r.NotWasted, r.Fallen, r.Painted, r.NotSeen} {
		if n > 0 {
			add("%d %s", n, countNames[i])
		}
	}
	if len(r.Potentials) > 0 {
		var list []string
		for _, m := range r.Potentials {
			list = append(list, fmt.Sprintf("%.3f V %s", m.Potential, anodes.ElectrodeName(m.Electrode)))
		}
		add("%s", strings.Join(list, ", "))
	}
	switch {
	case r.CoatingPercent != nil && r.CoatingWord != "":
		add("coating %.4g %% broken down, %s", *r.CoatingPercent, r.CoatingWord)
	case r.CoatingPercent != nil:
		add("coating %.4g %% broken down", *r.CoatingPercent)
	case r.CoatingWord != "":
		add("coating %s", r.CoatingWord)
	}
	if r.Resistivity != nil {
		add("water %.4g ohm m", *r.Resistivity)
	}
	if r.Note != "" {
		add("%q", r.Note)
	}
	return strings.Join(parts, "; ")
}
