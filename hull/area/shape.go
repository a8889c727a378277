package area

// Shape is a body whose area follows from a few sizes, for steel that has no
// estimate of its own.
type Shape struct {
	Name  string
	Sizes []Size

	of func(x []float64) ([]Estimate, error)
}

// Size is one size of a shape and what it is taken as where nobody says.
type Size struct {
	Title, Unit string
	Usual       float64
}

// Estimates estimates n equal shapes of the given sizes, in the order of Sizes:
// one area, or several of a shape whose parts lie in different surroundings. It
// panics when the number of sizes is wrong or n is below 1.
func (s Shape) Estimates(n int, sizes []float64) ([]Estimate, error) {
	if len(sizes) != len(s.Sizes) {
		panic("area: " + s.Name + " has other sizes")
	}
	es, err := s.of(sizes)
	if err != nil {
		return nil, err
	}
	for i := range es {
		es[i] = es[i].Times(n)
	}
	return es, nil
}

// Shapes lists the shapes that areas can be put together from.
func Shapes() []Shape {
	m := func(title string, usual float64) Size { return Size{title, "m", usual} }
	return []Shape{
		{"tubular", []Size{m("diameter", 1), m("length", 10)}, func(x []float64) ([]Estimate, error) { return one(Tubular(x[0], x[1])) }},
		{"tubular by depth", []Size{
			m("diameter", 1), m("top above water", 5), m("toe depth", 60), m("sea bed depth", 40), m("length, 0 upright", 0), m("growth", 0),
		}, func(x []float64) ([]Estimate, error) { return ByElevation(x[0], x[1], -x[2], -x[3], x[4], x[5]) }},
		{"cone", []Size{m("diameter", 2), m("to diameter", 1), m("height", 3)}, func(x []float64) ([]Estimate, error) { return one(Cone(x[0], x[1], x[2])) }},
		{"sphere", []Size{m("diameter", 2)}, func(x []float64) ([]Estimate, error) { return one(Sphere(x[0])) }},
		{"flat end", []Size{m("diameter", 1)}, func(x []float64) ([]Estimate, error) { return one(FlatEnd(x[0])) }},
		{"open pile top", []Size{m("inner diameter", 1), m("free length", 20)}, func(x []float64) ([]Estimate, error) { return one(OpenPileTop(x[0], x[1])) }},
		{"sheet piling", []Size{m("length", 100), m("depth", 10), {"developed area", "m²/m²", DevelopedU}}, func(x []float64) ([]Estimate, error) { return one(SheetPiling(x[0], x[1], x[2])) }},
		{"pontoon afloat", []Size{m("length", 30), m("breadth", 10), m("draught", 2)}, func(x []float64) ([]Estimate, error) { return one(Pontoon(x[0], x[1], x[2])) }},
		{"sunk pontoon", []Size{m("length", 80), m("breadth", 16), m("height", 8)}, func(x []float64) ([]Estimate, error) { return one(SunkPontoon(x[0], x[1], x[2])) }},
		{"chain", []Size{m("bar diameter", 0.1), m("length", ChainCounted)}, func(x []float64) ([]Estimate, error) { return one(Chain(x[0], x[1])) }},
		{"sea chest", []Size{m("width", 1), m("height", 1), m("depth", 1), {"grating's share", "", 0.5}}, func(x []float64) ([]Estimate, error) { return one(SeaChest(x[0], x[1], x[2], x[3])) }},
		{"tunnel", []Size{m("diameter", 1.6), m("length", 4)}, func(x []float64) ([]Estimate, error) { return one(ThrusterTunnel(x[0], x[1])) }},
		{"bilge keel", []Size{m("length", 40), m("height", 0.35)}, func(x []float64) ([]Estimate, error) { return one(BilgeKeels(1, x[0], x[1])) }},
		{"propeller", []Size{m("diameter", 5), {"blade area ratio", "", 0.55}, m("hub diameter", 0.9), m("hub length", 1)}, func(x []float64) ([]Estimate, error) { return one(Propeller(x[0], x[1], x[2], x[3])) }},
	}
}

// one is the estimates of a shape of one part.
func one(e Estimate, err error) ([]Estimate, error) { return []Estimate{e}, err }
