package plan

// LP returns the outcome's choice of sets as a mixed-integer problem in CPLEX
// LP text: see [renewal.Problem.LP].
func (o *Outcome) LP() []byte { return o.problem().LP() }
