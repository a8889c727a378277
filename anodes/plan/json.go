package plan

import (
	"encoding/json"
	"math"

	"anodewright/anodes/order"
	"anodewright/anodes/protection"
	"anodewright/hull"
)

// The form in which the command prints an outcome for other programs. A field
// whose figure does not exist is null.
type (
	outcomeJSON struct {
		Asset    string        `json:"asset"`
		Zones    []zoneJSON    `json:"zones"`
		Schedule []lineJSON    `json:"schedule"`
		Order    []orderJSON   `json:"order"`
		Totals   []totalJSON   `json:"order_totals"` // by docking
		Staged   []stagedJSON  `json:"staged,omitempty"`
		Cost     costJSON      `json:"cost"`
		Pins     []pinJSON     `json:"pins,omitempty"`
		Limits   *limitsJSON   `json:"limits,omitempty"` // that the plan keeps to
		Unmet    []unmetJSON   `json:"unmet"`
		Cautions []cautionJSON `json:"cautions"`
	}
	zoneJSON struct {
		ID        string         `json:"id"`
		Factor    factorJSON     `json:"demand_factor"` // that the plan uses
		Learned   *learnedJSON   `json:"learned_factor,omitempty"`
		Coating   *coatingJSON   `json:"learned_coating,omitempty"`
		Intervals []intervalJSON `json:"intervals"`
		// Only where there is one; its form is that of protection.Result.
		Protection *protection.Result `json:"protection,omitempty"`
	}
	factorJSON struct {
		Median float64 `json:"median"`
		Low    float64 `json:"low"`
		High   float64 `json:"high"`
	}
	learnedJSON struct {
		factorJSON
		Readings int `json:"readings"`
	}
	coatingJSON struct {
		Surveys int        `json:"surveys"`
		Times   factorJSON `json:"factor"` // constants by the readings over the design's
		Before  lawJSON    `json:"before"`
		After   lawJSON    `json:"after"`
	}
	lawJSON struct {
		A float64 `json:"a"`
		B float64 `json:"b"`
	}
	tripleJSON struct {
		Initial float64 `json:"initial"`
		Mean    float64 `json:"mean"`
		Final   float64 `json:"final"`
	}
	intervalJSON struct {
		From             hull.Date   `json:"from"`
		To               hull.Date   `json:"to"`
		Breakdown        tripleJSON  `json:"breakdown"`
		Demand           tripleJSON  `json:"demand_a"`
		ByRule           rulesJSON   `json:"demand_by_rule_a"` // what each rule would give; null where it has no figure
		Fitted           []groupJSON `json:"fitted"`
		PotentialEnd     *float64    `json:"potential_end_v"`
		State            *State      `json:"state"`
		SpentProbability *float64    `json:"spent_probability"`
		SteelLoss        *float64    `json:"steel_loss_mm"`

		Repolarise *repolariseJSON `json:"repolarise,omitempty"` // what the circuit could give, and what it would take

		ShortWaters []shortWaterJSON `json:"short_waters,omitempty"`
	}
	repolariseJSON struct {
		Gives float64 `json:"gives_a"`
		Asks  float64 `json:"asks_a"`
		Could bool    `json:"could"`
	}
	shortWaterJSON struct {
		Water  string  `json:"water"`
		Share  float64 `json:"share"`
		Output float64 `json:"output_a"`
		Demand float64 `json:"demand_a"` // at the interval's end
		Mean   float64 `json:"mean_demand_a"`
	}
	rulesJSON struct {
		Code     tripleJSON  `json:"offshore_code"`
		Practice *tripleJSON `json:"hull_practice"`
		Area     *tripleJSON `json:"sea_area"`
	}
	groupJSON struct {
		Pattern    string  `json:"pattern"`
		Count      int     `json:"count"`
		WastageEnd float64 `json:"wastage_end"`
		// 90 % of what a survey just before the docking may find lies between.
		Low     float64 `json:"wastage_end_low"`
		High    float64 `json:"wastage_end_high"`
		Current float64 `json:"current_end_a"` // of one piece
		Painted bool    `json:"painted,omitempty"`
	}
	lineJSON struct {
		Docking hull.Date `json:"docking"`
		Zone    string    `json:"zone"`
		Action  string    `json:"action"`
		Pattern string    `json:"pattern"`
		Count   int       `json:"count"`
		Governs *string   `json:"governs"`
		Need    needJSON  `json:"need"`
		Until   hull.Date `json:"until"`
		Cost    float64   `json:"cost"`
	}
	needJSON struct {
		Mass         float64 `json:"mass_kg"`
		ByMass       float64 `json:"by_mass"`
		ByRenewAbove float64 `json:"by_renew_above"`
		ByInitial    float64 `json:"by_initial"`
		ByFinal      float64 `json:"by_final"`
	}
	orderJSON struct {
		Docking hull.Date `json:"docking"`
		OrderBy hull.Date `json:"order_by"`
		Pattern string    `json:"pattern"`
		Pieces  int       `json:"pieces"`
		Spares  int       `json:"spares"`
		Stock   int       `json:"from_stock"`
		Ordered int       `json:"ordered"`
		Net     float64   `json:"net_kg"`
		Gross   float64   `json:"gross_kg"`
		Price   float64   `json:"price"`
		Late    int       `json:"late_days"`
		Freight float64   `json:"freight"` // by mass
	}
	totalJSON struct {
		Docking hull.Date `json:"docking"`
		Pieces  int       `json:"pieces"`
		Spares  int       `json:"spares"`
		Stock   int       `json:"from_stock"`
		Ordered int       `json:"ordered"`
		Net     float64   `json:"net_kg"`
		Gross   float64   `json:"gross_kg"`
		Price   float64   `json:"price"`
		Freight float64   `json:"freight"` // by mass and once for the order
	}
	stagedJSON struct {
		Docking  hull.Date  `json:"docking"`
		OrderBy  hull.Date  `json:"order_by"`
		Pattern  string     `json:"pattern"`
		Planned  int        `json:"planned"`
		Surely   int        `json:"surely"`
		Now      int        `json:"now"`
		AtMost   int        `json:"at_most"`
		Stock    int        `json:"from_stock"`
		Ordered  int        `json:"ordered"`
		TooMany  float64    `json:"cost_too_many"`
		TooFew   float64    `json:"cost_too_few"`
		Fractile float64    `json:"fractile"`
		Enough   float64    `json:"probability_enough"`
		Expected float64    `json:"expected_cost"`
		Worn     float64    `json:"probability_too_worn"`
		Need     []needPart `json:"need"`
	}
	needPart struct {
		Pieces      int     `json:"pieces"`
		Probability float64 `json:"probability"`
	}
	costJSON struct {
		Total      *float64 `json:"total"` // null where a zone cannot be held
		LowerBound *float64 `json:"lower_bound"`
		RenewAll   *float64 `json:"renew_all_every_docking"`
		AsLate     *float64 `json:"as_late_as_possible"`
	}
	unmetJSON struct {
		Zone      string    `json:"zone"`
		Docking   hull.Date `json:"docking"`
		Criterion string    `json:"criterion"`
	}
	cautionJSON struct {
		ID         string  `json:"id"`
		Zone       *string `json:"zone"`
		Text       string  `json:"text"`
		Source     string  `json:"source"`
		Confidence string  `json:"confidence"`
	}
)

// MarshalJSON writes the outcome for other programs.
func (o *Outcome) MarshalJSON() ([]byte, error) {
	a := o.Asset
	j := outcomeJSON{
		Pins: o.pinsJSON(), Limits: o.limitsJSON(),
		Asset: a.Name, Zones: []zoneJSON{}, Schedule: []lineJSON{}, Order: []orderJSON{}, Totals: []totalJSON{}, Unmet: []unmetJSON{}, Cautions: []cautionJSON{},
		Cost: costJSON{total(o), known(o.Money.LowerBound), known(o.Money.RenewAll), known(o.Money.AsLate)},
	}
	for _, z := range o.Zones {
		zj := zoneJSON{ID: z.Zone.ID, Factor: factorJSON{z.Factor.Median, z.Factor.Low, z.Factor.High}, Protection: z.Protection}
		if l := z.Learned; l != nil {
			zj.Learned = &learnedJSON{factorJSON{l.Median, l.Low, l.High}, l.Readings}
		}
		if c := z.Coating; c != nil {
			zj.Coating = &coatingJSON{c.Surveys, factorJSON{c.Times.Median, c.Times.Low, c.Times.High}, lawJSON{c.WasA, c.WasB}, lawJSON{c.A, c.B}}
		}
		for _, iv := range z.Intervals {
			ij := intervalJSON{
				From: iv.From, To: iv.To, Breakdown: tripleJSON(iv.Breakdown), Demand: tripleJSON(iv.Demand), Fitted: []groupJSON{},
				ByRule: rulesJSON{tripleJSON(iv.ByCode), (*tripleJSON)(iv.ByPractice), (*tripleJSON)(iv.BySeaArea)},
			}
			for _, g := range iv.Fitted {
				ij.Fitted = append(ij.Fitted, groupJSON{g.Pattern.ID, g.Count, g.Wastage, g.Low, g.High, g.Current, g.Painted})
			}
			if iv.State != "" {
				ij.State, ij.SteelLoss = &iv.State, &iv.SteelLoss
				ij.Repolarise = &repolariseJSON{iv.Repolarise.Gives, iv.Repolarise.Asks, iv.Repolarise.Could()}
			}
			ij.PotentialEnd, ij.SpentProbability = known(iv.Potential), iv.SpentProbability
			for _, w := range iv.ShortWaters {
				ij.ShortWaters = append(ij.ShortWaters, shortWaterJSON{w.Water.ID, w.Share, w.Output, w.Final, w.Mean})
			}
			zj.Intervals = append(zj.Intervals, ij)
		}
		j.Zones = append(j.Zones, zj)
	}
	for _, l := range o.Schedule {
		lj := lineJSON{
			Docking: l.Date, Zone: a.Zones[l.Zone].ID, Action: string(l.Action), Count: l.Count,
			Need: needJSON(l.Need), Until: l.Until, Cost: l.Cost,
		}
		if l.Pattern != nil {
			lj.Pattern = l.Pattern.ID
		}
		if l.Governs != "" {
			lj.Governs = &l.Governs
		}
		j.Schedule = append(j.Schedule, lj)
	}
	for _, l := range o.Order {
		j.Order = append(j.Order, orderJSON{
			l.Docking, l.OrderBy, l.Pattern.ID, l.Pieces, l.Spares, l.FromStock, l.Ordered, l.Net, l.Gross, l.Price, l.LateDays, l.Freight,
		})
	}
	for _, t := range order.Totals(a, o.Order) {
		j.Totals = append(j.Totals, totalJSON{t.Docking, t.Pieces, t.Spares, t.FromStock, t.Bought, t.Net, t.Gross, t.Price, t.Freight})
	}
	for _, s := range o.Staged {
		j.Staged = append(j.Staged, stagedLine(s))
	}
	for _, u := range o.Unmet {
		j.Unmet = append(j.Unmet, unmetJSON{a.Zones[u.Zone].ID, u.Date, u.Criterion})
	}
	for _, c := range o.AllCautions() {
		cj := cautionJSON{c.ID, nil, c.Text, c.Source, c.Confidence}
		if c.Zone >= 0 {
			cj.Zone = &a.Zones[c.Zone].ID
		}
		j.Cautions = append(j.Cautions, cj)
	}
	return json.MarshalIndent(j, "", "  ")
}

func stagedLine(s order.Staged) stagedJSON {
	j := stagedJSON{
		s.Docking, s.OrderBy, s.Pattern.ID, s.Planned, s.Surely, s.Now, s.AtMost, s.FromStock, s.Ordered,
		s.Wrong.TooMany, s.Wrong.TooFew, s.Wrong.Fractile(), s.Enough(), s.Expected, s.Worn, []needPart{},
	}
	for k, p := range s.Need.P {
		if p > 0 {
			j.Need = append(j.Need, needPart{s.Need.From + k, p})
		}
	}
	return j
}

// total is the plan's cost, nil where some zone cannot be held.
func total(o *Outcome) *float64 {
	if len(o.Unmet) > 0 {
		return nil
	}
	return &o.Money.Total
}

// known returns nil for a figure that does not exist.
func known(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	return &x
}
