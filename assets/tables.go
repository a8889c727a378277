// Package assets holds what the program carries inside itself: reference
// tables with their document, clause and confidence, and the demo fleet.
package assets

import (
	"embed"
	"encoding/json"
	"fmt"
	"sort"
	"sync"
)

//go:embed tables/*.json
var tableFiles embed.FS

// Table is one reference table.
type Table struct {
	ID         string   `json:"id"`
	Title      string   `json:"title"`
	Document   string   `json:"document"`
	Edition    string   `json:"edition"`
	Clause     string   `json:"clause"`
	Unit       string   `json:"unit"`
	Confidence string   `json:"confidence"` // of the rows that do not say otherwise
	Columns    []string `json:"columns"`
	Note       string   `json:"note"`
	Rows       []Row    `json:"rows"`
}

// Row is one row of a Table: a value for each column, nil where the source
// has none.
type Row struct {
	Name       string     `json:"row"`
	Values     []*float64 `json:"values"`
	Confidence string     `json:"confidence"`
	Note       string     `json:"note"`
}

var tables = sync.OnceValue(func() map[string]*Table {
	files, err := tableFiles.ReadDir("tables")
	if err != nil {
		panic("assets: " + err.Error())
	}
	m := map[string]*Table{}
	for _, f := range files {
		text, err := tableFiles.ReadFile("tables/" + f.Name())
		if err != nil {
			panic("assets: " + err.Error())
		}
		t := new(Table)
		if err := json.Unmarshal(text, t); err != nil {
			panic("assets: table " + f.Name() + ": " + err.Error())
		}
		for i := range t.Rows {
			if t.Rows[i].Confidence == "" {
				t.Rows[i].Confidence = t.Confidence
			}
		}
		m[t.ID] = t
	}
	return m
})

// Get returns the table with this id. It panics when there is none: table ids
// are the programmer's.
func Get(id string) *Table {
	t, ok := tables()[id]
	if !ok {
		panic("assets: no table " + id)
	}
	return t
}

// Tables returns all reference tables by id.
func Tables() []*Table {
	var ts []*Table
	for _, t := range tables() {
		ts = append(ts, t)
	}
	sort.Slice(ts, func(i, j int) bool { return ts[i].ID < ts[j].ID })
	return ts
}

// Row returns the row of this name and whether the table has it.
func (t *Table) Row(name string) (Row, bool) {
	for _, r := range t.Rows {
		if r.Name == name {
			return r, true
		}
	}
	return Row{}, false
}

// Value returns one figure. It panics when the table does not have it.
func (t *Table) Value(row, column string) float64 {
	r, ok := t.Row(row)
	if ok {
		for i, c := range t.Columns {
			if c == column && r.Values[i] != nil {
				return *r.Values[i]
			}
		}
	}
	panic(fmt.Sprintf("assets: table %s has no %s, %s", t.ID, row, column))
}

// Source names the table's document and clause.
func (t *Table) Source() string {
	s := t.Document
	if t.Edition != "" {
		s += " (" + t.Edition + ")"
	}
	if t.Clause != "" {
		s += ", " + t.Clause
	}
	return s
}
