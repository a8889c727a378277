package session

import (
	"cmp"
	"errors"
	"fmt"
	"maps"
	"math"
	"slices"
	"strconv"
	"strings"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/app/say"
	"anodewright/hull"
)

var errNoDocking = errors.New("no docking lies ahead that could be closed")

// floorMaker makes a floor from the plan and the texts typed.
type floorMaker struct {
	Floor
	texts map[FloorField]string
	pins  []renewal.Pin
	a     *hull.Asset
	zones map[string]*FloorZone
	hand  struct { // typed of what was done
		on  map[string][]hull.PutOn // by zone
		off map[hull.SetKey]int
	}
	quay map[string]int
}

func (m *floorMaker) make() *Floor {
	m.a, m.Wrong, m.zones, m.quay = m.of.Asset, map[FloorField]string{}, map[string]*FloorZone{}, map[string]int{}
	m.hand.on, m.hand.off = map[string][]hull.PutOn{}, map[hull.SetKey]int{}
	m.Docking = m.a.Ahead()[0]
	date := m.day(FloorDate, 0)
	if !date.IsZero() && date <= m.a.Start() {
		m.Wrong[FloorDate] = fmt.Sprintf("want a date after the last docking %s", m.a.Start())
		date = 0
	}
	m.Drafted = m.of.DraftClosing(m.Docking.Date, date)
	m.Closing = m.Drafted
	m.Closing.Sets = slices.Clone(m.Drafted.Sets)
	m.whole()
	m.works()
	m.sets()
	m.readOn()
	m.onQuay()
	m.plan()
	m.rows()
	m.ordered()
	f := m.Floor
	return &f
}

// whole reads the fields of the docking as a whole.
func (m *floorMaker) whole() {
	c := &m.Closing
	c.By, c.Note = m.texts[FloorBy], m.texts[FloorNote]
	c.Next, c.Horizon = m.day(FloorNext, c.Next), m.day(FloorHorizon, c.Horizon)
	if c.Next != m.Drafted.Next && m.texts[FloorHorizon] == "" {
		c.Horizon = 0
		if m.a.Horizon <= c.Next {
			c.Horizon = c.Next.AddMonths(30)
		}
	}
	m.Only = true
	if text, typed := m.texts[FloorOnly]; typed {
		yes, err := parseYes(text)
		m.wrong(FloorOnly, err)
		m.Only = yes || err != nil
	}
}

func (m *floorMaker) wrong(field FloorField, err error) {
	if err != nil {
		m.Wrong[field] = err.Error()
	}
}

// day reads a date typed, else returns another.
func (m *floorMaker) day(field FloorField, or hull.Date) hull.Date {
	text, typed := m.texts[field]
	if !typed {
		return or
	}
	d, err := ParseDay(text)
	m.wrong(field, err)
	if err != nil {
		return or
	}
	return d
}

// works reads which coating works were done, and which zones were cleaned.
func (m *floorMaker) works() {
	m.Closing.Works = nil
	for _, w := range m.Drafted.Works {
		done := true
		if text, typed := m.texts[FloorWorkDone(w)]; typed {
			share, yes, err := parseWork(text)
			m.wrong(FloorWorkDone(w), err)
			if err == nil {
				done = yes
				if share != nil && w.Share != nil {
					w.Share = share
				}
			}
		}
		m.Works = append(m.Works, FloorWork{w, done})
		if done {
			m.Closing.Works = append(m.Closing.Works, w)
		}
	}
	for i := range m.a.Zones {
		z := &m.a.Zones[i]
		painted := 0
		for set := range z.Fitted {
			painted += survey.Count(m.a, z, set, m.Closing.Date).Painted
		}
		w := hull.Work{Zone: z.ID}
		text, typed := m.texts[FloorWorkDone(w)]
		if painted == 0 && !typed {
			continue
		}
		yes, err := false, error(nil)
		if typed {
			yes, err = parseYes(text)
			m.wrong(FloorWorkDone(w), err)
		}
		m.Works = append(m.Works, FloorWork{w, yes})
		if yes {
			m.Closing.Cleaned = append(m.Closing.Cleaned, z.ID)
		}
	}
}

// sets reads what was found of each set, and taken off.
func (m *floorMaker) sets() {
	for i := range m.Closing.Sets {
		s := &m.Closing.Sets[i]
		key := keyOf(*s)
		if text, typed := m.texts[FloorWastage(key)]; typed {
			w, err := parseWastage(text)
			if m.wrong(FloorWastage(key), err); err == nil {
				s.Wastage, s.How = w, hull.Surveyed
			}
		}
		if text, typed := m.texts[FloorFound(key)]; typed {
			n, err := parseCount(text)
			if m.wrong(FloorFound(key), err); err == nil {
				s.Found = n
			}
		}
		if text, typed := m.texts[FloorOff(key)]; typed {
			n, err := parseCount(text)
			if err == nil && n > s.Found {
				err = fmt.Errorf("want at most the %d pieces found, got %d", s.Found, n)
			}
			if m.wrong(FloorOff(key), err); err == nil {
				m.hand.off[key] = n
			}
		}
	}
}

func keyOf(s hull.ClosingSet) hull.SetKey {
	return hull.SetKey{Zone: s.Zone, Pattern: s.Pattern, Fitted: s.Fitted}
}

// readOn reads what was put on.
func (m *floorMaker) readOn() {
	for _, z := range m.a.Zones {
		if text, typed := m.texts[FloorOn(z.ID)]; typed {
			on, err := m.parseOn(z, text)
			if m.wrong(FloorOn(z.ID), err); err == nil {
				m.hand.on[z.ID] = on
			}
		}
	}
}

// parseOn reads 14, 14 al-45 or 14 × al-45 + 2 × zn-7. Without a pattern it is
// that of the plan, else that of what is fitted.
func (m *floorMaker) parseOn(z hull.Zone, text string) (on []hull.PutOn, err error) {
	for part := range strings.SplitSeq(text, "+") {
		part = strings.TrimSpace(part)
		end := 0
		for end < len(part) && part[end] >= '0' && part[end] <= '9' {
			end++
		}
		n, err := strconv.Atoi(part[:end])
		if err != nil || n > 1_000_000 {
			return nil, fmt.Errorf("want pieces, and a pattern if not the planned one, as in 14 × al-45; got %q", text)
		}
		id := strings.TrimSpace(part[end:])
		for _, times := range []string{"×", "x ", "X "} {
			id = strings.TrimSpace(strings.TrimPrefix(id, times))
		}
		if id == "" {
			id = m.usual(z)
		}
		if _, ok := m.a.Pattern(id); !ok {
			return nil, fmt.Errorf("want one of the asset's patterns, got %q", id)
		}
		if n > 0 {
			on = append(on, hull.PutOn{Zone: z.ID, Pattern: id, Count: n})
		}
	}
	return on, nil
}

// usual is the pattern that a zone gets where none is named.
func (m *floorMaker) usual(z hull.Zone) string {
	for _, p := range m.Drafted.On {
		if p.Zone == z.ID {
			return p.Pattern
		}
	}
	switch {
	case len(z.Fitted) > 0:
		return z.Fitted[0].Pattern
	case len(z.Patterns) > 0:
		return z.Patterns[0]
	case len(m.a.Patterns) > 0:
		return m.a.Patterns[0].ID
	}
	return ""
}

// onQuay is what lies on the quay: the stock, what is ordered for the docking,
// or as typed.
func (m *floorMaker) onQuay() {
	for _, s := range slices.Concat(m.a.Stock, m.Drafted.Ordered) {
		m.quay[s.Pattern] += s.Count
	}
	for _, p := range m.a.Patterns {
		if text, typed := m.texts[FloorStock(p.ID)]; typed {
			n, err := parseCount(text)
			if m.wrong(FloorStock(p.ID), err); err == nil {
				m.quay[p.ID] = n
			}
		}
	}
}

// plan plans the docking anew: first by what was found, then, where something
// was done otherwise than by the plan, with that as it is.
func (m *floorMaker) plan() {
	c := m.Closing
	done := map[string]bool{}
	for zone := range m.hand.on {
		done[zone] = true
	}
	for key := range m.hand.off {
		done[key.Zone] = true
	}
	if !m.replan(&c, m.pinsBut(done)) {
		return
	}
	m.override(&c)
	var pins []renewal.Pin
	for zone := range done {
		if p, ok := m.pinOf(&c, zone); ok {
			pins = append(pins, p)
		}
	}
	if len(pins) > 0 {
		slices.SortFunc(pins, func(x, y renewal.Pin) int { return strings.Compare(x.Zone, y.Zone) })
		was := c
		m.replan(&c, append(m.pinsBut(done), pins...))
		m.override(&c)
		m.keep(&c, was, done)
	}
	m.Closing = c
	m.decide(done)
	m.cost()
}

// replan plans with pins and writes what the plan does into the closing.
func (m *floorMaker) replan(c *hull.Closing, pins []renewal.Pin) bool {
	quay := m.quay
	if !m.Only {
		quay = nil
	}
	o, faults := m.of.InDock(*c, quay, plan.WithPins(pins))
	if len(faults) > 0 {
		m.Faults = faults
		return false
	}
	m.Plan, m.Short = o, o.OverLimits
	if len(o.Lacks) > 0 {
		more := maps.Clone(quay)
		for _, l := range o.Lacks {
			if l.Criterion == renewal.OnQuay {
				more[l.Pattern] += l.Pieces
			}
		}
		if least, _ := m.of.InDock(*c, more, plan.WithPins(pins)); least != nil && least.OverLimits == "" {
			o, m.Plan = least, least
		}
	}
	o.FollowIn(c)
	return true
}

// pinsBut are the pins of the plan, moved to the day in dock, without those of
// zones where something was done.
func (m *floorMaker) pinsBut(done map[string]bool) (pins []renewal.Pin) {
	for _, p := range m.pins {
		if p.Docking == m.Docking.Date {
			p.Docking = m.Closing.Date
			if done[p.Zone] {
				continue
			}
		}
		pins = append(pins, p)
	}
	return pins
}

// override writes what was typed of pieces put on and taken off.
func (m *floorMaker) override(c *hull.Closing) {
	c.On = slices.DeleteFunc(c.On, func(p hull.PutOn) bool { _, typed := m.hand.on[p.Zone]; return typed })
	for _, z := range m.a.Zones {
		c.On = append(c.On, m.hand.on[z.ID]...)
	}
	for i := range c.Sets {
		if n, typed := m.hand.off[keyOf(c.Sets[i])]; typed {
			c.Sets[i].Off = n
		}
	}
}

// keep leaves zones where something was done as they were before.
func (m *floorMaker) keep(c *hull.Closing, was hull.Closing, done map[string]bool) {
	c.On = slices.DeleteFunc(c.On, func(p hull.PutOn) bool { return done[p.Zone] })
	for _, p := range was.On {
		if done[p.Zone] {
			c.On = append(c.On, p)
		}
	}
	for i := range c.Sets {
		if done[c.Sets[i].Zone] {
			c.Sets[i].Off = was.Sets[i].Off
		}
	}
}

// pinOf is the pin that stands for what is done in a zone, if one can.
func (m *floorMaker) pinOf(c *hull.Closing, zone string) (renewal.Pin, bool) {
	found, off := 0, 0
	for _, s := range c.Sets {
		if s.Zone == zone {
			found, off = found+s.Found, off+s.Off
		}
	}
	p := renewal.Pin{Zone: zone, Docking: c.Date, Action: renewal.Keep}
	for _, o := range c.On {
		if o.Zone != zone {
			continue
		}
		if p.Count > 0 {
			return p, false // two patterns
		}
		p.Pattern, p.Count, p.Action = o.Pattern, o.Count, renewal.Add
	}
	switch {
	case off == 0:
		return p, found > 0 || p.Count > 0
	case off < found || p.Count == 0:
		return p, false
	}
	p.Action = renewal.Renew
	return p, true
}

// decide says of each zone what is done with it.
func (m *floorMaker) decide(done map[string]bool) {
	for i := range m.a.Zones {
		z := &FloorZone{Done: done[m.a.Zones[i].ID]}
		m.zones[m.a.Zones[i].ID] = z
		if l, ok := m.Plan.Action(i, 0); ok {
			z.Line = Planned{Known: true, Action: hull.PlannedAction(l.Action), Governs: l.Governs, Until: l.Until}
		}
		for _, u := range m.Plan.Unmet {
			if u.Zone == i && u.Date <= m.Closing.Date {
				z.Line.Unmet = u.Criterion
			}
		}
		if p, ok := m.Plan.PinAt(i, 0); ok && z.Done {
			z.Refused = p.Refused
		}
	}
	for _, p := range m.Closing.On {
		m.zones[p.Zone].On = append(m.zones[p.Zone].On, p)
	}
	for _, s := range m.Closing.Sets {
		m.zones[s.Zone].Off += s.Off
	}
}

// cost is what the docking costs as it is done, unless typed.
func (m *floorMaker) cost() {
	cost := math.Round(100*m.money()) / 100
	if text, typed := m.texts[FloorCost]; typed {
		x, err := ParseNumber(text)
		if err == nil && x < 0 {
			err = fmt.Errorf("want a number of at least 0, got %s", text)
		}
		if m.wrong(FloorCost, err); err == nil {
			cost = x
		}
	}
	m.Closing.Cost = &cost
}

// money is the price of pieces and work as done, undiscounted.
func (m *floorMaker) money() (sum float64) {
	costs, pieces := m.a.Costs, 0
	for i := range m.a.Zones {
		z := m.zones[m.a.Zones[i].ID]
		for _, p := range z.On {
			pattern, _ := m.a.Pattern(p.Pattern)
			fit := costs.FitPerPiece
			if pattern.FitPerPiece != nil {
				fit = *pattern.FitPerPiece
			}
			sum += float64(p.Count) * (pattern.Price + fit)
			pieces += p.Count
		}
		sum += float64(z.Off) * costs.RemovePerPiece
		if len(z.On) > 0 {
			sum += costs.PerZone
		}
	}
	if pieces > 0 {
		sum += m.Docking.FixedCost + renewal.DayCost(m.Docking, pieces)
		if m.Docking.Kind == hull.Campaign {
			sum += m.Docking.Mobilisation
		}
	}
	return sum
}

// rows lists the fitted sets by zone, and zones that may be given some.
func (m *floorMaker) rows() {
	for i := range m.a.Zones {
		z := &m.a.Zones[i]
		if _, own := z.Hold().(hull.ByAnodes); !own {
			continue
		}
		zoned := cmp.Or(m.zones[z.ID], &FloorZone{})
		first := true
		for k, s := range m.Closing.Sets {
			if s.Zone != z.ID {
				continue
			}
			r := FloorRow{Zone: i, First: first, Key: keyOf(s), Set: s, Zoned: zoned}
			if k < len(m.Closing.Expected) {
				r.Expected = &m.Closing.Expected[k]
			}
			m.Rows, first = append(m.Rows, r), false
		}
		if first {
			m.Rows = append(m.Rows, FloorRow{Zone: i, First: true, Key: hull.SetKey{Zone: z.ID}, Zoned: zoned})
		}
	}
}

// ordered lists the quay, and what of it was bought for this docking.
func (m *floorMaker) ordered() {
	used, stock := map[string]int{}, map[string]int{}
	for _, p := range m.Closing.On {
		used[p.Pattern] += p.Count
	}
	for _, s := range m.a.Stock {
		stock[s.Pattern] += s.Count
	}
	m.Closing.Ordered = nil
	for i := range m.a.Patterns {
		p := &m.a.Patterns[i]
		q := FloorQuay{Pattern: p, There: m.quay[p.ID], Used: used[p.ID]}
		if q.Ordered = max(q.There, q.Used) - stock[p.ID]; q.Ordered > 0 {
			m.Closing.Ordered = append(m.Closing.Ordered, hull.Stock{Pattern: p.ID, Count: q.Ordered})
		}
		m.Quay = append(m.Quay, q)
	}
	slices.SortStableFunc(m.Quay, func(x, y FloorQuay) int {
		there := func(q FloorQuay) int { return min(q.There+q.Used, 1) }
		return there(y) - there(x)
	})
}

// Name is what a field of the dock floor is called, in English.
func (f *Floor) Name(field FloorField) string {
	zone := func(id string) string {
		if z, ok := f.of.Asset.Zone(id); ok {
			return z.Name
		}
		return id
	}
	switch field {
	case FloorDate:
		return "Date in dock"
	case FloorCost:
		return "Cost"
	case FloorNext:
		return "Next docking"
	case FloorHorizon:
		return "Horizon"
	case FloorOnly:
		return "Only what lies on the quay"
	}
	for _, r := range f.Rows {
		for what, of := range map[string]FloorField{"Found %": FloorWastage(r.Key), "Pieces": FloorFound(r.Key), "Taken off": FloorOff(r.Key), "Put on": FloorOn(r.Key.Zone)} {
			if of == field {
				return zone(r.Key.Zone) + ": " + what
			}
		}
	}
	for _, w := range f.Works {
		if FloorWorkDone(w.Work) == field {
			return zone(w.Work.Zone) + ": " + strings.ReplaceAll(string(w.Work.Coating), "-", " ")
		}
	}
	for _, q := range f.Quay {
		if FloorStock(q.Pattern.ID) == field {
			return "Quay: " + q.Pattern.ID
		}
	}
	return string(field)
}

// Named gives faults of a closing the names of its zones in place of their
// numbers.
func (f *Floor) Named(err error) error {
	var faults hull.Faults
	if !errors.As(err, &faults) {
		return err
	}
	named := slices.Clone(faults)
	for i, fault := range named {
		for k, s := range f.Closing.Sets {
			if rest, own := strings.CutPrefix(fault.Path, fmt.Sprintf("sets[%d]", k)); own {
				named[i].Path = f.Name(FloorWastage(keyOf(s))) + rest
			}
		}
		for field, path := range map[FloorField]string{FloorDate: "date", FloorNext: "next", FloorHorizon: "horizon", FloorCost: "cost"} {
			if fault.Path == path {
				named[i].Path = f.Name(field)
			}
		}
	}
	return named
}

// parseWastage reads per cents, with or without the sign, and averages them.
func parseWastage(text string) (float64, error) {
	parts := strings.FieldsFunc(text, func(r rune) bool { return r == ' ' || r == ';' || r == '%' })
	sum := 0.0
	for _, part := range parts {
		x, err := ParseNumber(part)
		if err != nil || x < 0 || x > 100 {
			return 0, fmt.Errorf("want the per cent gone, from 0 to 100, got %q", part)
		}
		sum += x / 100
	}
	if len(parts) == 0 {
		return 0, fmt.Errorf("want the per cent gone, from 0 to 100, got %q", text)
	}
	return sum / float64(len(parts)), nil
}

// parseYes reads yes or no.
func parseYes(text string) (bool, error) {
	switch s := strings.ToLower(strings.TrimSpace(text)); s {
	case "yes", "y", strings.ToLower(say.T("yes")):
		return true, nil
	case "no", "n", strings.ToLower(say.T("no")):
		return false, nil
	}
	return false, fmt.Errorf("want yes or no, got %q", text)
}

// parseWork reads yes, no, or the share that was done.
func parseWork(text string) (share *float64, done bool, err error) {
	if yes, err := parseYes(text); err == nil {
		return nil, yes, nil
	}
	x, err := ParseNumber(strings.TrimSuffix(strings.TrimSpace(text), "%"))
	if err != nil || x < 0 || x > 100 {
		return nil, false, fmt.Errorf("want yes, no, or the per cent done, got %q", text)
	}
	x /= 100
	return &x, x > 0, nil
}
