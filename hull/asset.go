// Package hull is what the steel asks for: an asset with its zones, waters,
// coatings and dockings, checked so that a value that passes Check can be
// computed with, and the current demand of every zone in every docking
// interval.
//
// Units are SI with amperes, ampere hours, degrees Celsius and years of 365
// days; potentials are volts against Ag/AgCl/seawater. Demand follows
// DNV-RP-B401 (coating breakdown and design current densities) and, where the
// user says so, a class rule by sea area, ship practice or the user's own
// figures.
//
// The field tags carry the vocabulary of the asset file: json is the field's
// name, need marks a required field, default the value of an absent one and
// want the numbers allowed.
package hull

// Asset is one ship, unit or structure with all that its anode plan needs.
type Asset struct {
	Name        string       `json:"name" need:"yes"`
	Kind        Kind         `json:"kind" need:"yes"`
	Today       Date         `json:"today"`
	Currency    string       `json:"currency"`
	InService   Date         `json:"in_service" need:"yes"`
	LastDocking Date         `json:"last_docking"`
	Horizon     Date         `json:"horizon" need:"yes"`
	Particulars *Particulars `json:"particulars"`
	Basis       Basis        `json:"basis"`
	Waters      []Water      `json:"waters" need:"yes"`
	Service     []Service    `json:"service"`
	Zones       []Zone       `json:"zones" need:"yes"`
	Patterns    []Pattern    `json:"patterns" need:"yes"`
	Stock       []Stock      `json:"stock"`
	Dockings    []Docking    `json:"dockings" need:"yes"`
	Costs       Costs        `json:"costs"`
	Readings    []Reading    `json:"readings"`
	Closed      []Closed     `json:"closed"` // dockings done, oldest first
	Ledger      []Fact       `json:"ledger"` // as built; empty: the zones' fitted sets are all that is known
}

// Particulars are a ship's main dimensions, in m and m3.
type Particulars struct {
	ShipType ShipType `json:"ship_type"`
	LengthPP float64  `json:"length_pp_m" want:"0..1000"`
	LengthWL float64  `json:"length_wl_m" want:"0..1000"`
	Beam     float64  `json:"beam_m" want:"0..200"`
	Draught  float64  `json:"draught_m" want:"0..60"`
	Volume   float64  `json:"volume_m3" want:"0..2000000"`
	// For Holtrop and Mennen's wetted surface; 0: not known.
	Midship    float64 `json:"midship_coefficient" want:"0..1"`
	Waterplane float64 `json:"waterplane_coefficient" want:"0..1"`
	BulbArea   float64 `json:"bulb_area_m2" want:"0..500"`
}

// Basis is the set of choices that the plan rests on.
type Basis struct {
	Densities       DensityRule `json:"densities" default:"offshore-code"`
	Sizing          Sizing      `json:"sizing" default:"code"`
	Confidence      *float64    `json:"confidence" want:"0.01..0.999"` // nil: 0.5, or 0.9 for forecast sizing
	Reserve         float64     `json:"reserve" default:"0.15" want:"0..0.9"`
	RenewAbove      float64     `json:"renew_above" default:"0.8" want:"0.01..1"`
	OutputWater     OutputWater `json:"output_water" default:"mean"`
	PracticeI0      float64     `json:"practice_i0_ma_m2" default:"10" want:"0..1000"`
	PracticePerYear float64     `json:"practice_per_year_ma_m2" default:"1.5" want:"0..1000"`
	// Of the forecast alone: how the steel takes current.
	SteelCurve SteelCurve `json:"steel_curve" default:"level"`
	CurvePeak  float64    `json:"curve_peak" default:"2.5" want:"2.5..3"` // of the sigmoid: its density at -0.80 V over that at -1.00 V
	Decay      DecayLaw   `json:"decay"`                                  // absent: the mean density does not change with time
	DecayC     *float64   `json:"decay_c" want:"0..6"`                    // wins over the law's
	DecayD     *float64   `json:"decay_d" want:"-0.95..0"`
}

// ConfidenceLevel returns the share of the demand factor's distribution that
// the plan covers.
func (b Basis) ConfidenceLevel() float64 {
	switch {
	case b.Confidence != nil:
		return *b.Confidence
	case b.Sizing == ForecastSizing:
		return 0.9
	}
	return 0.5
}

// Water is one water, sediment or soil that zones lie in.
type Water struct {
	ID                 string   `json:"id" need:"yes"`
	Name               string   `json:"name"`
	Medium             Medium   `json:"medium" default:"seawater"`
	Temperature        *float64 `json:"temperature_c" want:"-5..100"`
	SurfaceTemperature *float64 `json:"surface_temperature_c" want:"-5..50"` // nil: Temperature
	Salinity           *float64 `json:"salinity" want:"0..42"`               // practical salinity
	Resistivity        *float64 `json:"resistivity_ohm_m" want:"0.01..100000"`
	Conductivity25     *float64 `json:"conductivity_25c_us_cm" want:"0.1..200000"`
	// Porosity of a sediment whose resistivity is not measured: that of its
	// water times the formation factor.
	Porosity *float64 `json:"porosity" want:">0.1..1"`
}

// WaterShare is the share of the time that a zone spends in a water.
type WaterShare struct {
	Water string  `json:"water" need:"yes"`
	Share float64 `json:"share" default:"1" want:">0..1"`
}

// Service is a change of trade or lay-up from a date on.
type Service struct {
	From           Date         `json:"from" need:"yes"`
	Waters         []WaterShare `json:"waters"`
	UnderWayFactor *float64     `json:"under_way_factor" want:">0..10"`
}

// Zone is steel of one coating, one surface and one exposure.
type Zone struct {
	ID                string       `json:"id" need:"yes"`
	Name              string       `json:"name" need:"yes"`
	Region            Region       `json:"region" need:"yes"`
	Surface           Surface      `json:"surface" need:"yes"`
	WettedArea        float64      `json:"wetted_area_m2" need:"yes" want:"0.001..10000000"`
	BareArea          float64      `json:"bare_area_m2" want:"0..10000000"` // part of WettedArea
	Depth             float64      `json:"depth_m" need:"yes" want:"0..12000"`
	Circuit           string       `json:"circuit"`
	Coating           Coating      `json:"coating" need:"yes"`
	Waters            []WaterShare `json:"waters" need:"yes"`
	Patterns          []string     `json:"patterns"`
	MinCount          int          `json:"min_count" want:"0..1000000"`
	CountMultiple     int          `json:"count_multiple" default:"1" want:"1..10000"`
	MaxCount          *int         `json:"max_count" want:"1..1000000"`
	Fitted            []Fitted     `json:"fitted"`
	HeldBy            string       `json:"held_by"`
	Bonded            bool         `json:"bonded" default:"true"`
	MixAlloys         bool         `json:"mix_alloys"`
	Protection        *Protection  `json:"protection"`
	OwnDensities      *Densities   `json:"densities_ma_m2"`
	UnderWayFactor    float64      `json:"under_way_factor" default:"1" want:"0.001..10"`
	ImmersedShare     float64      `json:"immersed_share" default:"1" want:"0.001..1"`
	Shielding         float64      `json:"shielding" default:"1" want:"0.01..1"`
	Service           []Service    `json:"service"`
	FlashPoint        *float64     `json:"flash_point_c" want:"-60..400"`
	BesideFlashPoint  *float64     `json:"beside_flash_point_c" want:"-60..400"`
	DropHeight        *float64     `json:"drop_height_m" want:"0..100"`
	FuelBehind        bool         `json:"fuel_behind"`
	Yield             *float64     `json:"yield_mpa" want:"50..3000"`
	InsideTemperature *float64     `json:"inside_temperature_c" want:"-60..300"`
	Wells             int          `json:"wells" want:"0..1000"`
	Drains            float64      `json:"drains_a" want:"0..100000"`
	Compartment       Compartment  `json:"compartment"`
	Nobler            *Nobler      `json:"nobler"`
}

// Nobler is a nobler metal on or beside the zone's steel: a clad layer, a
// fitting, a coat of copper. It adds to the zone's demand as bare metal.
type Nobler struct {
	Metal     NobleMetal `json:"metal" need:"yes"`
	Area      float64    `json:"area_m2" need:"yes" want:">0..10000000"`
	BareSteel float64    `json:"bare_steel_m2" want:"0..10000000"` // at scratches and edges
}

// Densities are design current densities in mA/m2 of bare steel.
type Densities struct {
	Initial float64 `json:"initial" need:"yes" want:"0..10000"`
	Mean    float64 `json:"mean" need:"yes" want:"0..10000"`
	Final   float64 `json:"final" need:"yes" want:"0..10000"`
}

// Coating is a zone's paint. A and B, where given, win over the category's.
type Coating struct {
	Category Category `json:"category" need:"yes"`
	Applied  Date     `json:"applied"` // absent: the asset's in_service
	A        *float64 `json:"a" want:"0..1"`
	B        *float64 `json:"b" want:"0..1"` // per year
}

// Fitted is a set of equal anodes that the zone carries at the last docking.
type Fitted struct {
	Pattern string  `json:"pattern" need:"yes"`
	Count   int     `json:"count" need:"yes" want:"1..1000000"`
	Fitted  Date    `json:"fitted" need:"yes"`
	Wastage float64 `json:"wastage" want:"0..1"` // share of the net mass gone, at the last docking
}

// Protection is another way than anodes of holding a zone.
type Protection struct {
	Kind      ProtectionKind `json:"kind" need:"yes"`
	Anode     ImpressedAnode `json:"anode"`
	OffShare  float64        `json:"off_share" want:"0..1"`
	Thickness float64        `json:"thickness_um" want:"0..5000"`
	Class     ExposureClass  `json:"class"`
	// Of an impressed-current system; 0 or nil: not known.
	AnodeCount          int      `json:"anode_count" want:"0..100000"`
	AnodeMass           float64  `json:"anode_mass_kg" want:"0..100000"`
	AnodeRating         float64  `json:"anode_rating_a" want:"0..10000"` // most current of one anode
	AnodeLength         float64  `json:"anode_length_m" want:"0..1000"`
	AnodeDiameter       float64  `json:"anode_diameter_m" want:"0..10"`
	AnodeSpacing        float64  `json:"anode_spacing_m" want:"0..10000"`
	CableResistance     float64  `json:"cable_resistance_ohm" want:"0..1000"`
	StructureResistance float64  `json:"structure_resistance_ohm" want:"0..1000"`
	BackEMF             float64  `json:"back_emf_v" default:"2" want:"0..10"`
	LifeYears           *float64 `json:"life_years" want:">0..200"` // nil: to the horizon
}

// Pattern is one casting: what can be bought and fitted.
type Pattern struct {
	ID              string   `json:"id" need:"yes"`
	Name            string   `json:"name"`
	Alloy           Alloy    `json:"alloy" need:"yes"`
	Shape           Shape    `json:"shape" need:"yes"`
	Fixing          string   `json:"fixing"`
	Length          float64  `json:"length_m" want:"0..100"`
	Width           float64  `json:"width_m" want:"0..10"`
	Height          float64  `json:"height_m" want:"0..10"`
	Radius          float64  `json:"radius_m" want:"0..10"`
	Girth           float64  `json:"girth_m" want:"0..60"`
	Standoff        float64  `json:"standoff_m" default:"0.3" want:"0..10"`
	ExposedArea     float64  `json:"exposed_area_m2" want:"0..1000"`
	Diameter        float64  `json:"diameter_m" want:"0..10"`
	Spacing         float64  `json:"spacing_m" want:"0..10000"`
	ShapeFactor     float64  `json:"shape_factor_per_m" want:"0..10000"`
	ShapeFactorWorn float64  `json:"shape_factor_worn_per_m" want:"0..10000"`
	NetMass         float64  `json:"net_mass_kg" need:"yes" want:"0.001..100000"`
	GrossMass       float64  `json:"gross_mass_kg" want:"0..100000"`
	InsertVolume    float64  `json:"insert_volume_m3" want:"0..10"`
	SeriesResist    float64  `json:"series_resistance_ohm" want:"0..100"` // cable and connection of a pod or sled
	Utilisation     float64  `json:"utilisation" need:"yes" want:"0.05..1"`
	Capacity        *float64 `json:"capacity_ah_kg" want:"1..4000"` // nil: the alloy's
	Potential       *float64 `json:"potential_v" want:"-2..-0.5"`   // nil: the alloy's
	Price           float64  `json:"price" need:"yes" want:"0..1000000000"`
	FitPerPiece     *float64 `json:"fit_per_piece" want:"0..1000000000"` // nil: the costs' own
	OrderMultiple   int      `json:"order_multiple" default:"1" want:"1..100000"`
	LeadWeeks       float64  `json:"lead_weeks" default:"8" want:"0..520"`
	Afloat          bool     `json:"afloat"`
	ItemNo          string   `json:"item_no"`
	Specification   string   `json:"specification"`
	Certificate     string   `json:"certificate"`
	// Spares beside the pieces that are fitted: so many for a docking, else a
	// share of the pieces, rounded up; nil both: the costs' share.
	SpareCount *int     `json:"spare_count" want:"0..1000000"`
	SpareShare *float64 `json:"spare_share" want:"0..10"`
}

// Gross returns the mass of one piece with its insert, in kg: as given, or
// the net mass and the insert's volume in steel.
func (p Pattern) Gross() float64 {
	if p.GrossMass > 0 {
		return p.GrossMass
	}
	return p.NetMass + p.InsertVolume*SteelDensity
}

// SteelDensity is the density of an anode's steel insert, kg/m3.
const SteelDensity = 7850.0

// Stock is what lies on the shelf.
type Stock struct {
	Pattern string `json:"pattern" need:"yes"`
	Count   int    `json:"count" need:"yes" want:"0..1000000"`
}

// Docking is a coming chance to work on the steel.
type Docking struct {
	Date         Date        `json:"date" need:"yes"`
	Kind         DockingKind `json:"kind" default:"dry-dock"`
	FixedCost    float64     `json:"fixed_cost" want:"0..1000000000000"`
	Mobilisation float64     `json:"mobilisation" want:"0..1000000000000"`
	DayRate      float64     `json:"day_rate" want:"0..1000000000000"`
	PiecesPerDay float64     `json:"pieces_per_day" want:"0..100000"`
	Works        []Work      `json:"works"`
}

// Work is one coating work on a zone at a docking.
type Work struct {
	Zone      string      `json:"zone" need:"yes"`
	Coating   CoatingWork `json:"coating" need:"yes"`
	Share     *float64    `json:"share" want:"0..1"`
	Category  Category    `json:"category"`
	A         *float64    `json:"a" want:"0..1"`
	B         *float64    `json:"b" want:"0..1"`
	Breakdown *float64    `json:"breakdown" want:"0..1"`
}

// Costs are the asset's money, in its currency.
type Costs struct {
	FitPerPiece    float64 `json:"fit_per_piece" want:"0..1000000000"`
	RemovePerPiece float64 `json:"remove_per_piece" want:"0..1000000000"`
	PerZone        float64 `json:"per_zone" want:"0..1000000000"`
	DiscountRate   float64 `json:"discount_rate" want:"0..1"`
	FloatWeeks     float64 `json:"float_weeks" want:"0..520"`
	// Of orders. No part of the plan's cost.
	SpareShare      *float64 `json:"spare_share" want:"0..10"` // nil: 0.05
	FreightPerKg    float64  `json:"freight_per_kg" want:"0..1000000"`
	FreightPerOrder float64  `json:"freight_per_order" want:"0..1000000000"`
	// Of a staged purchase: a piece bought in a rush, once the old anodes have
	// been seen, costs so many times its price; of a piece too many this share
	// of the price comes back.
	RushFactor *float64 `json:"rush_factor" want:"1..100"` // nil: 3
	Recovered  float64  `json:"recovered_share" want:"0..1"`
}

// Reading is what a surveyor found on one set of anodes.
type Reading struct {
	Date           Date       `json:"date" need:"yes"`
	Zone           string     `json:"zone" need:"yes"`
	Pattern        string     `json:"pattern"`
	Fitted         Date       `json:"fitted"`
	By             string     `json:"by"`
	How            string     `json:"how"` // by which means, in the surveyor's words
	Note           string     `json:"note"`
	Withdrawn      Date       `json:"withdrawn"` // from then on it counts no more; absent: it stands
	WeighedWastage []float64  `json:"weighed_wastage" want:"0..1"`
	Measured       []Measured `json:"measured"`
	Percent        []float64  `json:"percent" want:"0..100"`
	Grades         *Grades    `json:"grades"`
	Gone           int        `json:"gone" want:"0..1000000"`
	NotWasted      int        `json:"not_wasted" want:"0..1000000"`
	Fallen         int        `json:"fallen" want:"0..1000000"`
	Painted        int        `json:"painted" want:"0..1000000"`
	NotSeen        int        `json:"not_seen" want:"0..1000000"`
	Potentials     []Measure  `json:"potentials"`
	CoatingPercent *float64   `json:"coating_percent" want:"0..100"` // of the area broken down
	CoatingWord    Condition  `json:"coating_word"`
	Resistivity    *float64   `json:"water_resistivity_ohm_m" want:">0..100000"`
}

// Measure is a measured potential of the steel and its reference electrode.
type Measure struct {
	Potential float64   `json:"potential_v" need:"yes" want:"-3..3"`
	Electrode Electrode `json:"electrode" default:"ag-agcl-seawater"`
}

// Measured is the girth and length of what is left of an anode, in m.
type Measured struct {
	Girth  float64 `json:"girth_m" need:"yes" want:">0..60"`
	Length float64 `json:"length_m" need:"yes" want:">0..100"`
}

// Grades counts anodes by class of wastage: class i lies from Bounds[i] to
// Bounds[i+1], the last is open above.
type Grades struct {
	Bounds []float64 `json:"bounds" need:"yes" want:"0..1"`
	Counts []int     `json:"counts" need:"yes" want:"0..1000000"`
}
