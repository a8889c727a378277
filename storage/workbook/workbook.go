// Package workbook writes the schedule as an Excel workbook.
package workbook

import "anodewright/anodes/plan"

// Write writes the workbook of an outcome to path.
func Write(path string, o *plan.Outcome) error { panic("workbook: not written yet") }
