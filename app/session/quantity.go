package session

import (
	"math"
	"strconv"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
)

// shownNumber writes a figure of SI in the unit shown, for editing: in full in
// SI, else with as many figures as tell it well.
func shownNumber(q say.Quantity, x float64) string {
	if !say.US() || q == say.Plain {
		return Number(x)
	}
	y := q.Show(x)
	if y == 0 || math.IsNaN(y) || math.IsInf(y, 0) {
		return Number(y)
	}
	const figures = 7
	decimals := figures - 1 - int(math.Floor(math.Log10(math.Abs(y))))
	s := strconv.FormatFloat(y, 'f', min(max(decimals, 0), 12), 64)
	if strings.Contains(s, ".") {
		s = strings.TrimSuffix(strings.TrimRight(s, "0"), ".")
	}
	return say.Decimal(s)
}

// parseShown reads a figure in the unit shown. A text that is how the present
// value is shown means that value, for what is shown is rounded.
func parseShown(q say.Quantity, text string, present float64) (float64, error) {
	x, err := ParseNumber(text)
	if err != nil {
		return 0, err
	}
	if !math.IsNaN(present) && text == shownNumber(q, present) {
		return present, nil
	}
	return q.Store(x), nil
}

// Shown writes a figure of SI in the unit shown, for reading; decimals are
// those that it wants in SI.
func Shown(q say.Quantity, x float64, decimals int) string {
	return Figure(q.Show(x), q.Decimals(decimals))
}

// ShownWith is Shown with the unit behind it.
func ShownWith(q say.Quantity, x float64, decimals int) string {
	return Shown(q, x, decimals) + " " + q.Unit()
}

// ShownNumber is a figure of SI in the unit shown, in full.
func ShownNumber(q say.Quantity, x float64) string { return shownNumber(q, x) }

// ParseShown reads a figure in the unit shown as one of SI.
func ParseShown(q say.Quantity, text string) (float64, error) {
	return parseShown(q, text, math.NaN())
}

// ShownUnit is a field's unit as it is shown.
func (f Field) ShownUnit() string {
	text := say.T(f.Unit)
	if f.Quantity == say.Plain || !say.US() {
		return text
	}
	si, _ := f.Quantity.Names()
	return strings.TrimSuffix(text, si) + f.Quantity.Unit()
}

// money are the fields that hold an amount in the asset's currency.
var money = map[string]bool{
	"costs.fit_per_piece": true, "costs.remove_per_piece": true, "costs.per_zone": true, "costs.freight_per_kg": true, "costs.freight_per_order": true,
	"fixed_cost": true, "mobilisation": true, "day_rate": true, "price": true, "fit_per_piece": true,
}

// UnitIn is a field's unit as it is shown in an asset: money has its currency.
func (f Field) UnitIn(a *hull.Asset) string {
	if a == nil || !money[f.Key] {
		return f.ShownUnit()
	}
	return strings.TrimSpace(a.Currency + " " + f.ShownUnit())
}

// dayToType writes a date for editing.
func dayToType(d hull.Date) string {
	if d.IsZero() {
		return d.String()
	}
	return say.DayToType(d.Time())
}
