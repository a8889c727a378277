package session

import (
	"errors"
	"path/filepath"
	"strings"

	"anodewright/hull"
	"anodewright/storage/sheet"
)

// SurveyDockings are the dockings ahead that a survey sheet can be made for,
// the next one first; those before today are left out.
func (s *Session) SurveyDockings() (days []hull.Date) {
	a := s.Asset()
	if a == nil {
		return nil
	}
	today := s.today
	if !a.Today.IsZero() {
		today = a.Today
	}
	for _, d := range a.Ahead() {
		if d.Date >= today {
			days = append(days, d.Date)
		}
	}
	return days
}

// tie returns the open asset and what ties a survey sheet to it.
func (s *Session) tie() (*hull.Asset, sheet.Tie, error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return nil, sheet.Tie{}, errors.New("no asset is open")
	}
	return s.open.asset, sheet.Tie{ID: s.open.id, Revision: s.open.rev}, nil
}

// WriteSurveySheet writes the survey sheet of a docking of the open asset: a
// workbook, or a CSV file where the path ends so. expected shows what the
// forecast expects, which may lead the surveyor.
func (s *Session) WriteSurveySheet(path string, docking hull.Date, expected bool) error {
	a, tie, err := s.tie()
	if err != nil {
		return err
	}
	if strings.EqualFold(filepath.Ext(path), ".csv") {
		return sheet.WriteCSV(path, a)
	}
	var options []sheet.Option
	if expected {
		s.Wait() // the figures of the last edit
		options = append(options, sheet.WithForecast(s.Outcome()))
	}
	return sheet.Write(path, a, tie, docking, options...)
}

// Survey is what a filled survey sheet says of an asset of the fleet.
type Survey struct {
	*sheet.Preview
	asset string // id
}

// ReadSurveySheet reads a filled survey sheet, or a CSV file of readings, for
// the open asset. Nothing is stored.
func (s *Session) ReadSurveySheet(path string) (*Survey, error) {
	a, tie, err := s.tie()
	if err != nil {
		return nil, err
	}
	p, err := sheet.ReadFile(path, a, tie, s.today)
	if err != nil {
		return nil, err
	}
	return &Survey{p, tie.ID}, nil
}

// StoreSurvey stores what is not there yet of a survey, as one edit, and
// returns how many readings that were. correct lets those that differ from a
// reading of the same set and day take its place.
func (s *Session) StoreSurvey(v *Survey, correct bool) (n int, err error) {
	err = s.locked(func(e *entry) (bool, error) {
		if e.id != v.asset {
			return false, errors.New("another asset is open than the survey was read for")
		}
		return s.do(e, "take in a survey", func(a *hull.Asset) error {
			before := len(a.Readings)
			today := s.today
			if !a.Today.IsZero() {
				today = a.Today
			}
			v.Store(a, today, correct)
			if n = len(a.Readings) - before; n == 0 {
				return errors.New("there is nothing to store: all of it is there already, or cannot be stored")
			}
			return nil
		})
	})
	if err != nil {
		return 0, err
	}
	return n, nil
}
