package sheet

import (
	"math"
	"regexp"
	"strconv"
	"strings"
	"time"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes"
	"anodewright/hull"
)

// content is what stands in a box.
type content struct {
	Box
	text    string
	number  bool // the file holds a number, not a text that looks like one
	percent bool // a number that is shown in per cent: 0.12 is 12 %
	odd     bool // a truth value or an error, which no box wants
}

// empty reports whether nothing is said: a dash is how people leave a box out.
func (c content) empty() bool {
	switch strings.TrimSpace(c.text) {
	case "", "-", "–", "—":
		return true
	}
	return false
}

// form is a number with a unit as people write it: a sign, whole digits that
// may be grouped in threes, decimals behind a point or comma, the unit.
var form = regexp.MustCompile(`^([+-]?) ?(\d{1,3}(?: \d{3})+|\d{1,3}(?:,\d{3})+|\d{1,3}(?:\.\d{3})+|\d{0,15})(?:([.,])(\d{0,15}))? ?([%a-zA-ZΩ·/ ]*)$`)

// number reads a figure with its unit, which is empty where none is written.
// why is what was wanted, where it is no number or could mean two.
func (c content) figure() (x float64, unit, why string) {
	const want = "want a number"
	if c.odd {
		return 0, "", want
	}
	if c.number {
		x, err := strconv.ParseFloat(strings.TrimSpace(c.text), 64)
		if err != nil || math.IsInf(x, 0) || math.IsNaN(x) {
			return 0, "", want
		}
		if c.percent {
			return tidy(100 * x), "%", ""
		}
		return x, "", ""
	}
	s := strings.TrimSpace(strings.Map(func(r rune) rune {
		switch r {
		case '\u00a0', '\u2009', '\u202f', '\'', '\u2019', '\t':
			return ' '
		case '\u2212', '–':
			return '-'
		}
		return r
	}, c.text))
	m := form.FindStringSubmatch(s)
	if m == nil {
		return 0, "", want
	}
	sign, whole, point, decimals := m[1], m[2], m[3], m[4]
	if first := strings.IndexAny(whole, " ,."); first >= 0 {
		group := whole[first : first+1]
		plain := strings.ReplaceAll(whole, group, "")
		once := strings.Count(whole, group) == 1 && point == ""
		switch {
		case group == point:
			return 0, "", want
		case once && group == "," && whole[:first] != "0":
			return 0, "", "want " + whole[:first] + "." + whole[first+1:] + " or " + plain + ": a comma before three figures can mean both"
		case once && group != " ":
			whole, decimals = whole[:first], whole[first+1:]
		default:
			whole = plain
		}
	}
	if whole+decimals == "" {
		return 0, "", want
	}
	x, err := strconv.ParseFloat(sign+whole+"."+decimals, 64)
	if err != nil {
		return 0, "", want
	}
	return x, strings.Join(strings.Fields(m[5]), " "), ""
}

// tidy takes off what a change of unit leaves in the last decimals.
func tidy(x float64) float64 { return math.Round(x*1e9) / 1e9 }

// perCent reads per cent from 0 to 100. A bare figure between 0 and 1 may be
// meant as a share and is refused, as is a share of a box for shares that is
// above 1.
func (c content) perCent() (float64, string) {
	const want = "want per cent from 0 to 100"
	x, unit, why := c.figure()
	switch {
	case why != "" && strings.Contains(why, "both"):
		return 0, why
	case why != "" || unit != "" && unit != "%" || x < 0 || x > 100:
		return 0, want
	case unit == "" && x > 0 && x < 1:
		return 0, "want per cent with its sign: " + plain(x) + " alone can mean " + plain(x) + " % or " + plain(tidy(100*x)) + " %"
	}
	return x, ""
}

// share reads a share from 0 to 1, or per cent with the sign.
func (c content) share() (float64, string) {
	x, unit, why := c.figure()
	switch {
	case why == "" && unit == "%" && x >= 0 && x <= 100:
		return tidy(x / 100), ""
	case why == "" && unit == "" && x >= 0 && x <= 1:
		return x, ""
	}
	return 0, "want a share from 0 to 1, or per cent with its sign"
}

// pieces reads a whole number of anodes.
func (c content) pieces() (int, string) {
	x, unit, why := c.figure()
	if unit = strings.ToLower(unit); why != "" || unit != "" && unit != "pcs" && unit != "pieces" || x != math.Trunc(x) || x < 0 || x > 1e6 {
		return 0, "want a whole number of pieces"
	}
	return int(x), ""
}

// kilograms reads a mass.
func (c content) kilograms() (float64, string) {
	x, unit, why := c.figure()
	switch {
	case why != "" && strings.Contains(why, "both"):
		return 0, why
	case why != "" || x < 0:
		return 0, "want a mass in kg"
	}
	switch strings.ToLower(unit) {
	case "", "kg":
		return x, ""
	case "g":
		return tidy(x / 1000), ""
	}
	return 0, "want a mass in kg"
}

// metres reads a length: bare in the unit given, so many to the metre.
func (c content) metres(perMetre float64) (float64, string) {
	want := "want a length in mm"
	if perMetre == 1 {
		want = "want a length in m"
	}
	x, unit, why := c.figure()
	switch {
	case why != "" && strings.Contains(why, "both"):
		return 0, why
	case why != "" || !(x > 0):
		return 0, want
	}
	switch strings.ToLower(unit) {
	case "":
		if perMetre == 1000 && x < 5 {
			return 0, want + ": " + plain(x) + " mm is too little; write the unit if metres are meant"
		}
		x /= perMetre
	case "mm":
		x /= 1000
	case "cm":
		x /= 100
	case "m":
	default:
		return 0, want
	}
	if x > 60 {
		return 0, want + " of at most 60 m"
	}
	return tidy(x), ""
}

// volts reads a potential against the electrode that is named with it, else
// against the one given.
func (c content) volts(e hull.Electrode) (hull.Measure, string) {
	const want = "want volts from -3 to 3, such as -0.92"
	if named, rest := cutElectrode(c.text); named != "" && !c.number {
		e, c.text = named, rest
	}
	x, unit, why := c.figure()
	if why != "" {
		return hull.Measure{}, want
	}
	switch unit {
	case "", "V":
		if math.Abs(x) >= 100 && math.Abs(x) <= 3000 && unit == "" {
			return hull.Measure{}, want + "; write the unit if mV are meant"
		}
	case "mV":
		x = tidy(x / 1000)
	default:
		return hull.Measure{}, want
	}
	switch {
	case math.Abs(x) > 3:
		return hull.Measure{}, want
	case e == hull.ZincElectrode && x < -0.5:
		return hull.Measure{}, "want volts against zinc, where steel reads about 0.25: is another electrode meant?"
	case e != hull.ZincElectrode && x > 0.5:
		return hull.Measure{}, "want the minus of a potential of steel against " + anodes.ElectrodeName(e)
	}
	return hull.Measure{Potential: x, Electrode: e}, ""
}

// electrode reads the name of a reference electrode.
func (c content) electrode() (hull.Electrode, string) {
	if e, rest := cutElectrode(c.text); e != "" && strings.TrimSpace(rest) == "" && !c.number {
		return e, ""
	}
	return "", "want one of " + strings.Join(electrodeNames(), ", ")
}

// cutElectrode takes the name of an electrode off the end of a text.
func cutElectrode(text string) (hull.Electrode, string) {
	s := strings.TrimSpace(text)
	for _, word := range hull.Electrode("").Words() {
		e := hull.Electrode(word)
		for _, name := range []string{word, anodes.ElectrodeName(e)} {
			n := len(s) - len(name)
			if n >= 0 && strings.EqualFold(s[n:], name) && (n == 0 || strings.HasSuffix(s[:n], " ")) {
				return e, s[:n]
			}
		}
	}
	return "", text
}

func electrodeNames() (names []string) {
	for _, word := range hull.Electrode("").Words() {
		names = append(names, anodes.ElectrodeName(hull.Electrode(word)))
	}
	return names
}

// condition reads a surveyor's word for a coating.
func (c content) condition() (hull.Condition, string) {
	for _, word := range hull.Condition("").Words() {
		if strings.EqualFold(strings.TrimSpace(c.text), word) {
			return hull.Condition(word), ""
		}
	}
	return "", "want one of " + strings.Join(hull.Condition("").Words(), ", ")
}

// resistivity reads ohm m.
func (c content) resistivity() (float64, string) {
	const want = "want a resistivity in ohm m, above 0"
	x, unit, why := c.figure()
	if why != "" && strings.Contains(why, "both") {
		return 0, why
	}
	switch strings.ToLower(strings.NewReplacer(" ", "", "·", "", "Ω", "ohm").Replace(unit)) {
	case "", "ohmm":
		if why == "" && x > 0 && x <= 100000 {
			return x, ""
		}
	case "ohmcm":
		if why == "" && x > 0 && x <= 1e7 {
			return tidy(x / 100), ""
		}
	}
	return 0, want
}

// day reads a date: a spreadsheet's own, or a text in which day and month
// cannot be taken for each other.
func (c content) day(from1904 bool) (hull.Date, string) {
	const want = "want a date such as 2027-03-15 or 15 Mar 2027"
	if c.odd {
		return 0, want
	}
	if c.number {
		x, err := strconv.ParseFloat(strings.TrimSpace(c.text), 64)
		if err != nil || x < 1 || x > 200000 {
			return 0, want
		}
		t, err := excelize.ExcelDateToTime(x, from1904)
		if err != nil {
			return 0, want
		}
		return hull.DateOf(t), ""
	}
	s := strings.Join(strings.Fields(c.text), " ")
	for _, layout := range []string{time.DateOnly, "2 Jan 2006", "2 January 2006", "2.1.2006"} {
		if t, err := time.Parse(layout, s); err == nil {
			if d, err := hull.ParseDate(t.Format(time.DateOnly)); err == nil {
				return d, ""
			}
		}
	}
	return 0, want
}

// plain writes a number in full.
func plain(x float64) string { return strconv.FormatFloat(x, 'f', -1, 64) }
