package session

import (
	"errors"
	"fmt"
	"strings"

	"anodewright/anodes/order"
	"anodewright/hull"
)

// OrderFields are the fields of the asset that only its orders depend on.
func OrderFields() []Field {
	costs := func(a *hull.Asset) *hull.Costs { return &a.Costs }
	return []Field{
		{
			Key: "costs.spare_share", Title: "Spares", Unit: "of the pieces",
			Hint: "Share of the pieces ordered beside those to fit, rounded up, where the pattern does not say otherwise. Empty: 5 %, common practice, no source.",
			Get: func(a *hull.Asset, _ int) string {
				if s := a.Costs.SpareShare; s != nil {
					return percentText(*s)
				}
				return ""
			},
			Set: func(a *hull.Asset, _ int, text string) error {
				share, err := parseOptionalPercent(text)
				if err == nil {
					a.Costs.SpareShare = share
				}
				return err
			},
		},
		numberField("costs.float_weeks", "Float before docking", "weeks", whole(func(a *hull.Asset) *float64 { return &costs(a).FloatWeeks })),
		numberField("costs.freight_per_kg", "Freight", "per kg", whole(func(a *hull.Asset) *float64 { return &costs(a).FreightPerKg })).
			hint("In the asset's currency, for each kg of gross mass bought. Shown beside the price; no part of the plan's cost."),
		numberField("costs.freight_per_order", "Freight, per docking", "", whole(func(a *hull.Asset) *float64 { return &costs(a).FreightPerOrder })).
			hint("In the asset's currency, once for all that is bought for one docking."),
		optionalField("costs.rush_factor", "Rush price", "times", whole(func(a *hull.Asset) **float64 { return &costs(a).RushFactor })).
			hint("What a piece costs that is bought once the old anodes have been seen, air freight and lost time included, over its usual price. Empty: 3, our own choice; edit it."),
		numberField("costs.recovered_share", "Recovered", "of the price", whole(func(a *hull.Asset) *float64 { return &costs(a).Recovered })).
			hint("Share of the price that comes back for a piece too many: returned, or kept for the next docking less its holding."),
	}
}

// sparesField is a pattern's own spares: a count, or a share in per cent.
func sparesField() Field {
	return Field{
		Key: "spare_share", Title: "Spares",
		Hint: "Spares with each docking's pieces: a count, as 3, or a share of the pieces, as 10 %. Empty: the asset's own share.",
		Get: func(a *hull.Asset, i int) string {
			switch p := &a.Patterns[i]; {
			case p.SpareCount != nil:
				return fmt.Sprint(*p.SpareCount)
			case p.SpareShare != nil:
				return percentText(*p.SpareShare)
			}
			return ""
		},
		Set: func(a *hull.Asset, i int, text string) error {
			p := &a.Patterns[i]
			if strings.HasSuffix(strings.TrimSpace(text), "%") || strings.TrimSpace(text) == "" {
				share, err := parseOptionalPercent(text)
				if err == nil {
					p.SpareShare, p.SpareCount = share, nil
				}
				return err
			}
			n, err := parseCount(text)
			if err != nil || n < 0 {
				return fmt.Errorf("want a count or a share in %%, got %q", strings.TrimSpace(text))
			}
			p.SpareCount, p.SpareShare = &n, nil
			return nil
		},
	}
}

// parseOptionalPercent reads a share; empty is none.
func parseOptionalPercent(text string) (*float64, error) {
	if strings.TrimSpace(text) == "" {
		return nil, nil
	}
	x, err := parsePercent(text)
	if err != nil {
		return nil, err
	}
	return &x, nil
}

// StockOf returns how many pieces of a pattern of the open asset lie in stock.
func (s *Session) StockOf(pattern string) int {
	a := s.Asset()
	if a == nil {
		return 0
	}
	return order.InStock(a)[pattern]
}

// SetStock sets how many pieces of a pattern lie in stock.
func (s *Session) SetStock(pattern, text string) error {
	n, err := parseCount(strings.TrimSpace(text))
	if err != nil {
		return err
	}
	return s.Do(pattern+": in stock", func(a *hull.Asset) error {
		if _, ok := a.Pattern(pattern); !ok {
			return errors.New("no such pattern")
		}
		var rest []hull.Stock
		placed := false
		for _, k := range a.Stock {
			switch {
			case k.Pattern != pattern:
				rest = append(rest, k)
			case !placed && n != 0:
				rest, placed = append(rest, hull.Stock{Pattern: pattern, Count: n}), true
			}
		}
		if !placed && n != 0 {
			rest = append(rest, hull.Stock{Pattern: pattern, Count: n})
		}
		a.Stock = rest
		return nil
	})
}
