package hull

// Step is one figure with where it comes from: the formula, what went into
// it, the document and clause, and how sure its source is.
type Step struct {
	Figure     string
	Value      float64
	Unit       string
	Formula    string
	Inputs     []Input
	Source     string
	Confidence string
}

// Input is a figure that went into another.
type Input struct {
	Name  string
	Value float64
	Unit  string
}

// Trace collects the steps of a computation in the order in which they were
// made. A nil Trace collects nothing.
type Trace struct{ Steps []Step }

// Add adds a step.
func (t *Trace) Add(s Step) {
	if t != nil {
		t.Steps = append(t.Steps, s)
	}
}
