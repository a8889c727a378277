package say

import (
	"math"
	"regexp"
	"strconv"
	"strings"
	"sync/atomic"
)

// A Quantity is a kind of figure that has another unit in the US than in SI.
// The zero Quantity is the same in both. The program computes and stores in
// SI alone: a figure is converted where it is shown or typed.
type Quantity int

// The quantities with a unit of their own in the US.
const (
	Plain Quantity = iota
	Area
	Mass
	Length // of ships, depths
	Size   // of castings
	Thin   // of losses
	Film   // of coats
	Volume // of ships
	Bulk   // of inserts
	Density
	Temperature
	Resistivity
	Capacity
)

// A unit is how a quantity is shown: factor units make one SI unit, counted
// from an offset; finer is how many more decimals it wants than SI.
type unit struct {
	si, us         string
	factor, offset float64
	finer          int
}

const (
	foot  = 0.3048
	inch  = 0.0254
	pound = 0.45359237
)

var units = [...]unit{
	Plain:       {},
	Area:        {"m²", "ft²", 1 / (foot * foot), 0, 0},
	Mass:        {"kg", "lb", 1 / pound, 0, 0},
	Length:      {"m", "ft", 1 / foot, 0, 0},
	Size:        {"m", "in", 1 / inch, 0, -2},
	Thin:        {"mm", "in", 0.001 / inch, 0, 2},
	Film:        {"µm", "mil", 1e-6 / inch * 1000, 0, 1},
	Volume:      {"m³", "ft³", 1 / (foot * foot * foot), 0, 0},
	Bulk:        {"m³", "in³", 1 / (inch * inch * inch), 0, -4},
	Density:     {"mA/m²", "mA/ft²", foot * foot, 0, 1},
	Temperature: {"°C", "°F", 1.8, 32, 0},
	Resistivity: {"Ω m", "Ω cm", 100, 0, -2},
	Capacity:    {"Ah/kg", "Ah/lb", pound, 0, 0},
}

var us atomic.Bool

// UseUS chooses US units in place of SI.
func UseUS(on bool) { us.Store(on) }

// US tells whether figures are shown in US units.
func US() bool { return us.Load() }

// Of returns the quantity of an SI unit's name; a length is one of ships.
func Of(si string) Quantity {
	for q, u := range units {
		if u.si == si && q != int(Size) && q != int(Bulk) {
			return Quantity(q)
		}
	}
	return Plain
}

// Unit returns the name of the quantity's unit, "" for Plain.
func (q Quantity) Unit() string {
	if US() {
		return units[q].us
	}
	return units[q].si
}

// Names returns the names of the quantity's unit in SI and in the US.
func (q Quantity) Names() (si, us string) { return units[q].si, units[q].us }

// Unit returns how an SI unit is shown; one without a counterpart stays.
func Unit(si string) string {
	if q := Of(si); q != Plain {
		return q.Unit()
	}
	return si
}

// Show converts a figure from SI to the unit shown.
func (q Quantity) Show(x float64) float64 {
	if !US() || q == Plain {
		return x
	}
	return x*units[q].factor + units[q].offset
}

// Store converts a figure from the unit shown to SI.
func (q Quantity) Store(x float64) float64 {
	if !US() || q == Plain {
		return x
	}
	return (x - units[q].offset) / units[q].factor
}

// Decimals returns how many decimals a figure wants in the unit shown that
// wants so many in SI.
func (q Quantity) Decimals(si int) int {
	if !US() {
		return si
	}
	return max(0, si+units[q].finer)
}

// figures are a figure of a sentence with its SI unit, or two of a range.
var figures = regexp.MustCompile(`(?:(-?\d[\d\x{a0}]*(?:\.\d+)?)( | (?:up )?to | a | hasta |–|-))?(-?\d[\d\x{a0}]*(?:\.\d+)?)( |\x{a0})(mA/m²|m²|kg|mm|µm|°C|Ω m|Ah/kg|m³|m)($|[^\p{L}\d²³/·])`)

// quantities shows the figures of a sentence in the units chosen.
func quantities(s string) string {
	if !US() {
		return s
	}
	return figures.ReplaceAllStringFunc(s, func(found string) string {
		m := figures.FindStringSubmatch(found)
		q := Of(m[5])
		if m[2] == " " { // two figures side by side are no range
			return m[1] + m[2] + q.figure(m[3]) + m[4] + q.Unit() + m[6]
		}
		first := ""
		if m[1] != "" {
			first = q.figure(m[1]) + m[2]
		}
		return first + q.figure(m[3]) + m[4] + q.Unit() + m[6]
	})
}

// figure converts a written figure, with about as many significant digits.
func (q Quantity) figure(text string) string {
	x, err := strconv.ParseFloat(strings.ReplaceAll(text, "\u00a0", ""), 64)
	if err != nil {
		return text
	}
	digits := 0
	for _, r := range strings.TrimLeft(text, "-0.") {
		if r >= '0' && r <= '9' {
			digits++
		}
	}
	y := q.Show(x)
	decimals := max(2, digits) - 1
	if y != 0 {
		decimals -= int(math.Floor(math.Log10(math.Abs(y))))
	}
	s := strconv.FormatFloat(y, 'f', min(max(decimals, 0), 9), 64)
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return s
}
