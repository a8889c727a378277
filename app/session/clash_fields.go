package session

import (
	"encoding/json"
	"fmt"
	"reflect"
	"strings"

	"anodewright/hull"
)

// Difference is a field that two versions of an asset have differently, as
// text; before is what it was when the edit here started.
type Difference struct {
	Item                 string // the zone, water and so on; empty: the asset's own
	Field                string
	Before, Theirs, Mine string
}

// absent is the text of an item that a version does not have.
const absent = "not there"

// differences lists what theirs and mine have differently, field by field in
// the order of the asset file.
func differences(before, theirs, mine *hull.Asset) []Difference {
	var all []Difference
	v := versions{before, theirs, mine}
	v.walk(&all, Whole, "", [3]int{}, v.values(func(a *hull.Asset) any { return *a }), "")
	for _, list := range []List{Waters, Zones, Patterns, Dockings, Readings} {
		v.list(&all, list)
	}
	return all
}

// versions are the asset before, theirs and mine.
type versions [3]*hull.Asset

func (v versions) values(of func(*hull.Asset) any) (values [3]reflect.Value) {
	for k, a := range v {
		values[k] = reflect.ValueOf(of(a))
	}
	return values
}

// list compares the items of a list by their ids.
func (v versions) list(all *[]Difference, list List) {
	var ids []string
	places := [3]map[string]int{}
	for _, k := range []int{1, 2, 0} { // in their order, then what only mine has
		places[k] = map[string]int{}
		for i := range lengthOf(v[k], list) {
			id := idOf(v[k], list, i)
			places[k][id] = i
			if _, theirs := places[1][id]; k == 1 || k == 2 && !theirs {
				ids = append(ids, id)
			}
		}
	}
	for _, id := range ids {
		var at [3]int
		var there [3]bool
		for k := range v {
			at[k], there[k] = places[k][id]
		}
		name := listNames[list] + " " + id
		if list == Zones {
			name = v.zoneName(places, id)
		}
		if !there[1] || !there[2] {
			word := func(k int) string {
				if there[k] {
					return "there"
				}
				return absent
			}
			*all = append(*all, Difference{name, "the whole " + listNames[list], word(0), word(1), word(2)})
			continue
		}
		if !there[0] {
			at[0] = -1
		}
		var values [3]reflect.Value
		for k, a := range v {
			if there[k] {
				values[k] = itemOf(a, list, at[k])
			}
		}
		if !there[0] {
			values[0] = reflect.Zero(values[1].Type())
		}
		v.walk(all, list, name, at, values, "")
	}
}

var listNames = map[List]string{Zones: "zone", Waters: "water", Dockings: "docking", Patterns: "pattern", Readings: "reading"}

// zoneName is what people call a zone: its name in the first version that has
// it, theirs before mine.
func (v versions) zoneName(places [3]map[string]int, id string) string {
	for _, k := range []int{1, 2} {
		if i, there := places[k][id]; there {
			return v[k].Zones[i].Name
		}
	}
	return id
}

// itemOf returns the i-th item of a list.
func itemOf(a *hull.Asset, list List, i int) reflect.Value {
	switch list {
	case Zones:
		return reflect.ValueOf(a.Zones[i])
	case Waters:
		return reflect.ValueOf(a.Waters[i])
	case Dockings:
		return reflect.ValueOf(a.Dockings[i])
	case Patterns:
		return reflect.ValueOf(a.Patterns[i])
	}
	return reflect.ValueOf(a.Readings[i])
}

// walk compares a part of the asset field by field. Fields that the app shows
// are named and written as it does, others as in the asset file.
func (v versions) walk(all *[]Difference, list List, item string, at [3]int, values [3]reflect.Value, path string) {
	for _, f := range hull.Fields(values[1].Type()) {
		key := strings.TrimPrefix(path+"."+f.Name, ".")
		if list == Whole && listNames[List(key)] != "" {
			continue // item by item
		}
		var part [3]reflect.Value
		for k := range part {
			part[k] = values[k].Field(f.Index)
		}
		if reflect.DeepEqual(part[1].Interface(), part[2].Interface()) {
			continue
		}
		n := len(*all)
		if shown, ok := fieldOf(list, key); ok {
			d := Difference{Item: item, Field: shown.Title}
			if shown.Unit != "" {
				d.Field += ", " + shown.Unit
			}
			for k, text := range []*string{&d.Before, &d.Theirs, &d.Mine} {
				if *text = absent; at[k] >= 0 {
					*text = shown.Get(v[k], at[k])
				}
			}
			if d.Theirs != d.Mine {
				*all = append(*all, d)
			}
		} else if structs, ok := within(part); ok {
			v.walk(all, list, item, at, structs, key)
		}
		if len(*all) == n { // no field of it that the app shows tells the two apart
			*all = append(*all, Difference{item, key, raw(part[0]), raw(part[1]), raw(part[2])})
		}
	}
}

func fieldOf(list List, key string) (Field, bool) {
	for _, f := range fieldsOf(list) {
		if f.Key == key {
			return f, true
		}
	}
	return Field{}, false
}

// within returns the structs that parts are or point to; nothing pointed to is
// an empty one.
func within(part [3]reflect.Value) (structs [3]reflect.Value, ok bool) {
	for k, p := range part {
		if p.Kind() == reflect.Pointer {
			if p.IsNil() {
				p = reflect.Zero(p.Type().Elem())
			} else {
				p = p.Elem()
			}
		}
		if p.Kind() != reflect.Struct {
			return structs, false
		}
		structs[k] = p
	}
	return structs, true
}

// raw writes a value as in the asset file, but not more than fits a cell: of
// facts and closed dockings, which are added at the end, how many and the last.
func raw(v reflect.Value) string {
	if facts, ok := v.Interface().([]hull.Fact); ok && len(facts) > 0 {
		last := facts[len(facts)-1]
		return fmt.Sprintf("%d facts, the last: %s %d × %s in %s on %s", len(facts), last.Deed, last.Count, last.Pattern, last.Zone, last.Date)
	}
	if closed, ok := v.Interface().([]hull.Closed); ok && len(closed) > 0 {
		return fmt.Sprintf("%d closed, the last on %s", len(closed), closed[len(closed)-1].Date)
	}
	text, err := json.Marshal(v.Interface())
	if err != nil {
		return "?"
	}
	if r := []rune(string(text)); len(r) > 120 {
		return string(r[:119]) + "…"
	}
	return string(text)
}
