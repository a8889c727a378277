package hull

import "strings"

// A word is a string of which only the listed values are known.
type word interface{ Words() []string }

// Kind is what the asset is.
type Kind string

// The kinds of asset.
const (
	Ship         Kind = "ship"
	FloatingUnit Kind = "floating-unit"
	Jacket       Kind = "jacket"
	Harbour      Kind = "harbour"
	Pipeline     Kind = "pipeline"
)

// Words lists the kinds of asset.
func (Kind) Words() []string {
	return []string{"ship", "floating-unit", "jacket", "harbour", "pipeline"}
}

// ShipType chooses the formula of the wetted surface.
type ShipType string

// Words lists the ship types.
func (ShipType) Words() []string {
	return []string{"general-cargo", "tanker", "bulk-carrier", "container", "ro-ro-twin-screw", "other"}
}

// Region is the part of the asset that a zone is, in the words of the trade.
type Region string

// Words lists the regions.
func (Region) Words() []string {
	return []string{
		"flat-bottom", "vertical-side", "boot-top", "bow", "stern", "rudder", "propeller",
		"sea-chest", "thruster-tunnel", "bilge-keel", "ballast-tank", "cargo-tank", "moon-pool",
		"jacket-leg", "brace", "node", "conductor", "pile", "mudmat",
		"sheet-piling", "tubular-pile", "caisson", "riser", "pipeline", "other",
	}
}

// Tank reports whether the region is the inside of a tank.
func (r Region) Tank() bool { return r == "ballast-tank" || r == "cargo-tank" }

// Surface is what the zone's metal is.
type Surface string

// The surfaces whose current demand the model knows.
const (
	CarbonSteel      Surface = "carbon-steel"
	HighStrength     Surface = "high-strength-steel"
	Galvanised       Surface = "galvanised-steel"
	SprayedAluminium Surface = "sprayed-aluminium"
	Stainless        Surface = "stainless-steel"
	CopperAlloy      Surface = "copper-alloy"
	Reinforcement    Surface = "concrete-reinforcement"
)

// Words lists the surfaces.
func (Surface) Words() []string {
	return []string{"carbon-steel", "high-strength-steel", "galvanised-steel", "sprayed-aluminium",
		"stainless-steel", "copper-alloy", "concrete-reinforcement"}
}

// Medium is what surrounds the metal.
type Medium string

// The media.
const (
	Seawater Medium = "seawater"
	Fresh    Medium = "fresh"
	Sediment Medium = "sediment"
	Soil     Medium = "soil"
)

// Words lists the media.
func (Medium) Words() []string { return []string{"seawater", "fresh", "sediment", "soil"} }

// Category is the coating category of the offshore code, or the owner's own
// constants, or no coating.
type Category string

// The coating categories.
const (
	CategoryI    Category = "I"
	CategoryII   Category = "II"
	CategoryIII  Category = "III"
	CategoryOwn  Category = "own"
	CategoryNone Category = "none"
)

// Words lists the coating categories.
func (Category) Words() []string { return []string{"I", "II", "III", "own", "none"} }

// DensityRule is where the design current densities come from.
type DensityRule string

// The rules for current densities.
const (
	OffshoreCode DensityRule = "offshore-code"
	SeaArea      DensityRule = "sea-area"
	HullPractice DensityRule = "hull-practice"
	OwnDensities DensityRule = "own"
)

// Words lists the density rules.
func (DensityRule) Words() []string {
	return []string{"offshore-code", "sea-area", "hull-practice", "own"}
}

// Sizing is how a set of anodes is sized.
type Sizing string

// The ways of sizing.
const (
	CodeSizing     Sizing = "code"
	ForecastSizing Sizing = "forecast"
)

// Words lists the ways of sizing.
func (Sizing) Words() []string { return []string{"code", "forecast"} }

// SteelCurve is how the forecast's steel takes current by its potential, in
// shares of the mean density.
type SteelCurve string

// The steel curves: all are straight from nothing at the corrosion potential
// to the protective potential, and go on from there.
const (
	LevelCurve    SteelCurve = "level"    // level
	StraightCurve SteelCurve = "straight" // straight on
	SigmoidCurve  SteelCurve = "sigmoid"  // down to -1.00 V, as deposits form, and up again by hydrogen
)

// Words lists the steel curves.
func (SteelCurve) Words() []string { return []string{"level", "straight", "sigmoid"} }

// DecayLaw is a measured law of the density of bare steel in time.
type DecayLaw string

// OwnDecay is a law of own constants.
const OwnDecay DecayLaw = "own"

// Words lists the decay laws.
func (DecayLaw) Words() []string { return []string{"warm-water", "cold-water", "own"} }

// OutputWater is which of a zone's waters sets the output of its anodes.
type OutputWater string

// The waters for output.
const (
	MeanWater  OutputWater = "mean"
	WorstWater OutputWater = "worst"
)

// Words lists the choices of water for output.
func (OutputWater) Words() []string { return []string{"mean", "worst"} }

// Alloy is the family of an anode's metal.
type Alloy string

// The alloy families.
const (
	Aluminium Alloy = "al-zn-in"
	Zinc      Alloy = "zinc"
	Magnesium Alloy = "magnesium"
)

// Words lists the alloys.
func (Alloy) Words() []string { return []string{"al-zn-in", "zinc", "magnesium"} }

// Shape is the family of an anode's geometry, which chooses its resistance
// formula.
type Shape string

// The anode shapes.
const (
	LongSlender  Shape = "long-slender"
	ShortSlender Shape = "short-slender"
	LongFlush    Shape = "long-flush"
	ShortFlush   Shape = "short-flush"
	Bracelet     Shape = "bracelet"
	SoilRod      Shape = "soil-rod"
	Stated       Shape = "stated"
)

// Words lists the shapes.
func (Shape) Words() []string {
	return []string{"long-slender", "short-slender", "long-flush", "short-flush", "bracelet", "soil-rod", "stated"}
}

// DockingKind is how the steel is reached.
type DockingKind string

// The kinds of docking.
const (
	DryDock  DockingKind = "dry-dock"
	InWater  DockingKind = "in-water"
	Campaign DockingKind = "campaign"
)

// Words lists the kinds of docking.
func (DockingKind) Words() []string { return []string{"dry-dock", "in-water", "campaign"} }

// CoatingWork is what is done to, or found on, a zone's coating at a docking.
type CoatingWork string

// The coating works.
const (
	TouchUp    CoatingWork = "touch-up"
	Recoat     CoatingWork = "recoat"
	PartRecoat CoatingWork = "part-recoat"
	Found      CoatingWork = "found"
	Clean      CoatingWork = "clean"
)

// Words lists the coating works.
func (CoatingWork) Words() []string {
	return []string{"touch-up", "recoat", "part-recoat", "found", "clean"}
}

// Deed is what a fact of the ledger says was done.
type Deed string

// The deeds.
const (
	WasFitted  Deed = "fitted"
	WasFound   Deed = "found"
	WasRemoved Deed = "removed"
)

// Words lists the deeds.
func (Deed) Words() []string { return []string{"fitted", "found", "removed"} }

// Evidence is how a wastage is known.
type Evidence string

// The kinds of evidence.
const (
	Surveyed   Evidence = "surveyed" // somebody looked
	Forecasted Evidence = "forecast" // nobody looked
)

// Words lists the kinds of evidence.
func (Evidence) Words() []string { return []string{"surveyed", "forecast"} }

// PlannedAction is what a plan wanted done with a zone's anodes.
type PlannedAction string

// Words lists the actions of a plan.
func (PlannedAction) Words() []string { return []string{"keep", "renew", "add"} }

// ProtectionKind is what holds a zone when it is not sacrificial anodes.
type ProtectionKind string

// The other protections.
const (
	ImpressedCurrent ProtectionKind = "impressed-current"
	ZincCoat         ProtectionKind = "zinc-coat"
)

// Words lists the other protections.
func (ProtectionKind) Words() []string { return []string{"impressed-current", "zinc-coat"} }

// ImpressedAnode is the material of an impressed-current anode.
type ImpressedAnode string

// Words lists the materials of impressed-current anodes.
func (ImpressedAnode) Words() []string {
	return []string{"scrap-steel", "silicon-iron", "graphite", "platinised", "mixed-oxide"}
}

// ExposureClass is what a metal coat is exposed to: an atmosphere of ISO 9223
// or the sea.
type ExposureClass string

// Words lists the exposures of a metal coat.
func (ExposureClass) Words() []string {
	return []string{"C1", "C2", "C3", "C4", "C5", "CX", "immersed-temperate", "immersed-tropical"}
}

// Immersed reports whether the coat lies in the sea and not in the air.
func (c ExposureClass) Immersed() bool { return strings.HasPrefix(string(c), "immersed") }

// Compartment is whether a zone is the inside of a flooded space.
type Compartment string

// The compartments.
const (
	FreeFlooded Compartment = "free-flooded" // also closed ones with free access to air
	Sealed      Compartment = "sealed"       // closed and flooded: no current is asked for
)

// Words lists the compartments.
func (Compartment) Words() []string { return []string{"free-flooded", "sealed"} }

// NobleMetal is a metal nobler than steel in seawater.
type NobleMetal string

// Words lists the nobler metals.
func (NobleMetal) Words() []string { return []string{"copper", "copper-alloy", "stainless-steel"} }

// Condition is a class surveyor's word for a coating.
type Condition string

// Words lists the condition words.
func (Condition) Words() []string { return []string{"GOOD", "FAIR", "POOR"} }

// Electrode is a reference electrode.
type Electrode string

// The reference electrodes.
const (
	SilverChloride Electrode = "ag-agcl-seawater"
	CopperSulphate Electrode = "cu-cuso4"
	Calomel        Electrode = "sce"
	ZincElectrode  Electrode = "zinc"
)

// Words lists the reference electrodes.
func (Electrode) Words() []string {
	return []string{"ag-agcl-seawater", "cu-cuso4", "sce", "zinc"}
}
