package workbook

// whereFrom writes the trace of every zone: each figure with its formula, what
// went into it, its source and how sure that is.
func (b *book) whereFrom() {
	s := b.sheet("Where from", "where the figures come from", 8)
	s.line(lead, "The trace of the plan as issued, in the order of the computation. What stands from memory has to be checked against the document.")
	head := s.header(column{head: "Zone", most: 20}, column{head: "Figure", most: 50}, column{head: "Value", format: four}, column{head: "Unit", most: 10},
		column{head: "Formula", most: 52}, column{head: "Inputs", most: 60}, column{head: "Source", most: 32}, column{head: "Confidence", most: 20})
	for i := range b.o.Zones {
		for _, step := range b.o.Explain(i) {
			s.row(b.names[i], upperFirst(step.Figure), or(step.Value, "-"), step.Unit, step.Formula, inputs(step), step.Source, sure(step.Confidence))
		}
	}
	s.finish(page{frozenRows: head, frozenCols: 2, firstTitle: head, lastTitle: head})
}
