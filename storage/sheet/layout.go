package sheet

import (
	"github.com/xuri/excelize/v2"
)

// The columns, counted from 0: the key, hidden; what a row is for; the boxes.
const (
	keyCol   = 0
	labelCol = 1
	firstBox = 2
	boxes    = 12
	lastCol  = firstBox + boxes - 1
)

// The places of boxes in rows that ask for several things.
const (
	potentialBoxes = 8
	electrodeBox   = 10
	brokenBox      = 2
	wordBox        = 5
	waterBox       = 10
	countBox       = 5
	toldBox        = 10 // a formula: of how many pieces something is told
)

// labels are the texts that stand between the boxes of a row.
var labels = map[part]map[int]string{
	potentialPart: {8: "against"},
	coatingPart:   {0: "broken down, %", 3: "or a word", 8: "water, ohm m"},
}

// cellName returns the name of a cell, its column counted from 0.
func cellName(col, row int) string {
	name, err := excelize.CoordinatesToCellName(col+1, row)
	if err != nil {
		panic("sheet: " + err.Error())
	}
	return name
}
