package session

import (
	"cmp"
	"errors"
	"fmt"
	"strings"

	"anodewright/anodes/plan"
	"anodewright/anodes/survey"
	"anodewright/app/say"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Readings is the list of what surveyors found.
const Readings List = "readings"

func reading[T any](v func(r *hull.Reading) *T) at[T] {
	return func(a *hull.Asset, i int) *T { return v(&a.Readings[i]) }
}

// ReadingFields are the fields of a reading.
func ReadingFields() []Field {
	return []Field{
		dateField("date", "Date", reading(func(r *hull.Reading) *hull.Date { return &r.Date })),
		{
			Key: "zone", Title: "Zone",
			Get: func(a *hull.Asset, i int) string {
				if z, ok := a.Zone(a.Readings[i].Zone); ok {
					return z.Name
				}
				return a.Readings[i].Zone
			},
			Set: func(a *hull.Asset, i int, text string) error {
				a.Readings[i].Zone = strings.TrimSpace(text)
				for _, z := range a.Zones {
					if strings.EqualFold(z.Name, a.Readings[i].Zone) {
						a.Readings[i].Zone = z.ID
						break
					}
				}
				return nil
			},
			Choices: func(a *hull.Asset) (names []string) {
				for _, z := range a.Zones {
					names = append(names, z.Name)
				}
				return names
			},
		},
		{
			Key: "pattern", Title: "Pattern", Hint: "Which of the zone's fitted sets was looked at. Empty: the first.",
			Get: func(a *hull.Asset, i int) string { return a.Readings[i].Pattern },
			Set: func(a *hull.Asset, i int, text string) error {
				a.Readings[i].Pattern = strings.TrimSpace(text)
				return nil
			},
			Choices: func(a *hull.Asset) []string {
				ids := []string{""}
				for _, p := range a.Patterns {
					ids = append(ids, p.ID)
				}
				return ids
			},
		},
		dateField("fitted", "Fitted", reading(func(r *hull.Reading) *hull.Date { return &r.Fitted })).
			hint("When the set was fitted, where the zone has several of one pattern."),
		textField("by", "By", reading(func(r *hull.Reading) *string { return &r.By })),
		valuesField("weighed_wastage", "Weighed", "% wasted", "Wastage of each anode weighed, in per cent of its net mass: 11 14 9.5. One kind only: weighed, measured, seen or graded.",
			0.01, reading(func(r *hull.Reading) *[]float64 { return &r.WeighedWastage })),
		valuesField("percent", "Seen", "% wasted", "Wastage of each anode by eye, in per cent: 20 25 30.",
			1, reading(func(r *hull.Reading) *[]float64 { return &r.Percent })),
		{
			Key: "grades", Title: "Graded", Unit: "% bounds: pieces", Hint: "Pieces by class of wastage, the last class open above: 0-25-50-75: 0 5 3 0. Four counts alone are of these classes.",
			Get: func(a *hull.Asset, i int) string { return gradesText(a.Readings[i].Grades) },
			Set: func(a *hull.Asset, i int, text string) (err error) {
				a.Readings[i].Grades, err = parseGrades(text)
				return err
			},
		},
		{
			Key: "measured", Title: "Measured", Unit: "girth × length, m", Quantity: say.Size, Hint: "Girth and length left of each anode, in m: 0.585 × 2.34; 0.605 × 2.36.",
			Get: func(a *hull.Asset, i int) string { return measuredText(a.Readings[i].Measured) },
			Set: func(a *hull.Asset, i int, text string) (err error) {
				a.Readings[i].Measured, err = parseMeasured(text, a.Readings[i].Measured)
				return err
			},
		},
		piecesField("gone", "Gone", "Pieces of which only the insert is left, beside those above.", reading(func(r *hull.Reading) *int { return &r.Gone })),
		piecesField("not_wasted", "Not wasted", "Pieces that look as new: less than 5 % gone.", reading(func(r *hull.Reading) *int { return &r.NotWasted })),
		piecesField("fallen", "Fallen", "Pieces lost whole, insert and all: they tell nothing of wastage.", reading(func(r *hull.Reading) *int { return &r.Fallen })),
		piecesField("painted", "Painted", "Pieces painted over: they give no current until cleaned.", reading(func(r *hull.Reading) *int { return &r.Painted })),
		piecesField("not_seen", "Not seen", "Pieces that could not be looked at.", reading(func(r *hull.Reading) *int { return &r.NotSeen })),
		{
			Key: "potentials", Title: "Potentials", Unit: "V, electrode", Hint: "Volts and reference electrode, several with a semicolon: -0.92 Ag/AgCl; -0.85 Cu/CuSO4; 0.20 zinc. They tell of current, not of mass left.",
			Get: func(a *hull.Asset, i int) string { return PotentialsText(a.Readings[i].Potentials) },
			Set: func(a *hull.Asset, i int, text string) (err error) {
				a.Readings[i].Potentials, err = ParsePotentials(text)
				return err
			},
		},
		{
			Key: "coating_percent", Title: "Coating", Unit: "% or word", Hint: "Share of the coating broken down, in per cent, or the class surveyor's word: GOOD below 3 %, FAIR, POOR above 20 %.",
			Get:     func(a *hull.Asset, i int) string { return coatingText(&a.Readings[i]) },
			Set:     func(a *hull.Asset, i int, text string) error { return parseCoating(&a.Readings[i], text) },
			Choices: func(*hull.Asset) []string { return append([]string{""}, hull.Condition("").Words()...) },
		},
		optionalField("water_resistivity_ohm_m", "Water", "Ω m", reading(func(r *hull.Reading) **float64 { return &r.Resistivity })).
			hint("Resistivity of the water as measured on the day."),
		textField("how", "How", reading(func(r *hull.Reading) *string { return &r.How })).
			hint("By which means: scales, tape, by eye, camera."),
		textField("note", "Note", reading(func(r *hull.Reading) *string { return &r.Note })),
	}
}

// piecesField is a count of pieces whose 0 is left empty.
func piecesField(key, title, hint string, v at[int]) Field {
	f := countField(key, title, v).hint(hint)
	get, set := f.Get, f.Set
	f.Get = func(a *hull.Asset, i int) string {
		if *v(a, i) == 0 {
			return ""
		}
		return get(a, i)
	}
	f.Set = func(a *hull.Asset, i int, text string) error {
		if strings.TrimSpace(text) == "" {
			*v(a, i) = 0
			return nil
		}
		return set(a, i, text)
	}
	return f
}

// AddReading adds a reading like the i-th, or the last where there is none:
// of the same day and surveyor, of the next fitted set that has none of that
// day. It returns its place.
func (s *Session) AddReading(i int) (int, error) {
	at := -1
	err := s.Do("add a reading", func(a *hull.Asset) error {
		r, err := s.nextReading(a, i)
		if err != nil {
			return err
		}
		at = len(a.Readings)
		a.Readings = append(a.Readings, r)
		return nil
	})
	if err != nil {
		return -1, err
	}
	return at, nil
}

func (s *Session) nextReading(a *hull.Asset, i int) (hull.Reading, error) {
	type set struct{ zone, set int }
	var sets []set
	for z := range a.Zones {
		for n := range a.Zones[z].Fitted {
			sets = append(sets, set{z, n})
		}
	}
	if len(sets) == 0 {
		return hull.Reading{}, errors.New("no zone carries anodes yet: enter what is fitted on the Anodes page first")
	}
	r := hull.Reading{Date: s.today}
	if !a.Today.IsZero() {
		r.Date = a.Today
	}
	next := 0
	if n := len(a.Readings); n > 0 {
		if i < 0 || i >= n {
			i = n - 1
		}
		r.Date, r.By = a.Readings[i].Date, a.Readings[i].By
		for k, c := range sets {
			if ofSet(a, &a.Readings[i], c.zone, c.set) {
				next = k + 1
			}
		}
	}
	read := func(c set) bool {
		for k := range a.Readings {
			if a.Readings[k].Date == r.Date && survey.Stands(&a.Readings[k]) && ofSet(a, &a.Readings[k], c.zone, c.set) {
				return true
			}
		}
		return false
	}
	chosen := sets[next%len(sets)]
	for k := range sets {
		if c := sets[(next+k)%len(sets)]; !read(c) {
			chosen = c
			break
		}
	}
	f := a.Zones[chosen.zone].Fitted[chosen.set]
	r.Zone, r.Pattern, r.Fitted = a.Zones[chosen.zone].ID, f.Pattern, f.Fitted
	return r, nil
}

// ofSet reports whether a reading is of a zone's fitted set.
func ofSet(a *hull.Asset, r *hull.Reading, zone, set int) bool {
	z := &a.Zones[zone]
	f := z.Fitted[set]
	return r.Zone == z.ID && (r.Pattern == "" || r.Pattern == f.Pattern) && (r.Fitted.IsZero() || r.Fitted == f.Fitted)
}

// CorrectReading withdraws the i-th reading as of today, so that it stays as it
// was and counts no more, and adds a copy to be put right. It returns the
// copy's place.
func (s *Session) CorrectReading(i int) (int, error) {
	at := -1
	err := s.Do("correct a reading", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Readings) {
			return errors.New("no reading is selected")
		}
		if !survey.Stands(&a.Readings[i]) {
			return errors.New("this reading was withdrawn already: correct the one that stands in its place")
		}
		right := assetfile.Clone(a).Readings[i]
		a.Readings[i].Withdrawn = max(cmp.Or(a.Today, s.today), right.Date)
		at = len(a.Readings)
		a.Readings = append(a.Readings, right)
		return nil
	})
	if err != nil {
		return -1, err
	}
	return at, nil
}

// RemoveReading removes the i-th reading. It stays in the register's history.
func (s *Session) RemoveReading(i int) error {
	return s.Do("remove a reading", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Readings) {
			return errors.New("no reading is selected")
		}
		a.Readings = remove(a.Readings, i)
		return nil
	})
}

// readingID names a reading for its drafts: by day and zone, and by a number
// where several are of the same.
func readingID(a *hull.Asset, i int) string {
	r, same := &a.Readings[i], 1
	for k := range i {
		if a.Readings[k].Date == r.Date && a.Readings[k].Zone == r.Zone {
			same++
		}
	}
	id := fmt.Sprintf("%s %s", r.Date, r.Zone)
	if same > 1 {
		id += fmt.Sprintf(" %d", same)
	}
	return id
}

// learns is the register's setting that says whether an asset is planned with
// what its readings teach.
func learns(id string) string { return "plan with readings: " + id }

// Learns reports whether the open asset is planned with the demand factors
// that its readings teach.
func (s *Session) Learns() bool {
	s.mu.Lock()
	defer s.mu.Unlock()
	return s.open != nil && s.open.learns
}

// SetLearns plans the open asset with what its readings teach, or without. It
// is kept in the register beside the asset, not in the asset file.
func (s *Session) SetLearns(on bool) error {
	return s.locked(func(e *entry) (bool, error) {
		if e.learns == on {
			return false, nil
		}
		e.learns = on
		if s.store.ReadOnly() != "" {
			return true, nil // for as long as the window is open
		}
		value := ""
		if on {
			value = "yes"
		}
		return true, s.store.SetSetting(learns(e.id), value)
	})
}

// how is how an entry is planned.
func (e *entry) how() []plan.Option {
	how := []plan.Option{plan.WithPins(e.pins), plan.WithLimits(e.limits), plan.WithMemo(e.memo)}
	if e.learns {
		how = append(how, plan.WithReadings())
	}
	return how
}
