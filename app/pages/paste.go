package pages

import (
	"anodewright/app/grid"
	"anodewright/app/session"
)

// pasteBlocks makes one step of a block pasted into a table of fields. Into
// the table of zones a block may bring more zones than there are.
func (r fieldRows) pasteBlocks(g *grid.Grid) {
	g.OnPaste = func(row, col int, block [][]string) bool {
		if len(block) == 1 && len(block[0]) == 1 {
			return false // one cell is committed as if typed
		}
		var cells []session.Cell
		for i, texts := range block {
			if row+i >= r.Rows() && r.list != session.Zones {
				break
			}
			for j, text := range texts {
				if col+j < len(r.fields) {
					cells = append(cells, session.Cell{Item: row + i, Field: r.fields[col+j], Text: text})
				}
			}
		}
		faults, err := r.f.s.SetBlock(r.list, cells)
		r.f.report(err)
		if err == nil && faults > 0 {
			r.f.Update()
		}
		return true
	}
}
