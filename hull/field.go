package hull

import (
	"fmt"
	"math"
	"reflect"
	"strconv"
	"strings"
	"sync"
)

// Field is one field of the asset's vocabulary as its tags describe it.
type Field struct {
	Name    string // in the asset file
	Index   int    // in the Go struct
	Needed  bool
	Default string // the value of an absent field, in JSON's words without quotes
	Range   Range
}

// Fields returns the fields of a struct type of this package, in order.
func Fields(t reflect.Type) []Field {
	if fs, ok := fieldCache.Load(t); ok {
		return fs.([]Field)
	}
	var fs []Field
	for i := range t.NumField() {
		tag := t.Field(i).Tag
		fs = append(fs, Field{
			Name:    tag.Get("json"),
			Index:   i,
			Needed:  tag.Get("need") == "yes",
			Default: tag.Get("default"),
			Range:   parseRange(tag.Get("want")),
		})
	}
	fieldCache.Store(t, fs)
	return fs
}

var fieldCache sync.Map // reflect.Type -> []Field

// Range is the numbers that a field allows. The zero Range allows all finite
// numbers.
type Range struct {
	Low, High float64
	OpenLow   bool // Low itself is not allowed
	Limited   bool
}

// parseRange reads "low..high" or ">low..high".
func parseRange(s string) Range {
	if s == "" {
		return Range{}
	}
	low, high, ok := strings.Cut(strings.TrimPrefix(s, ">"), "..")
	l, err1 := strconv.ParseFloat(low, 64)
	h, err2 := strconv.ParseFloat(high, 64)
	if !ok || err1 != nil || err2 != nil {
		panic("hull: bad range tag " + s)
	}
	return Range{Low: l, High: h, OpenLow: strings.HasPrefix(s, ">"), Limited: true}
}

// Allows reports whether x lies in the range; NaN and infinities never do.
func (r Range) Allows(x float64) bool {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return false
	}
	return !r.Limited || (x >= r.Low && x <= r.High && !(r.OpenLow && x == r.Low))
}

// Want says in words which numbers are allowed.
func (r Range) Want(whole bool) string {
	n := "a number"
	if whole {
		n = "a whole number"
	}
	switch {
	case !r.Limited:
		return n
	case r.OpenLow:
		return fmt.Sprintf("%s above %s and up to %s", n, number(r.Low), number(r.High))
	}
	return fmt.Sprintf("%s from %s to %s", n, number(r.Low), number(r.High))
}

func number(x float64) string { return strconv.FormatFloat(x, 'f', -1, 64) }

// SetDefaults gives every field of the struct that ptr points to the value
// that its absence means. It does not go into lists or optional parts.
func SetDefaults(ptr any) {
	v := reflect.ValueOf(ptr).Elem()
	for _, f := range Fields(v.Type()) {
		fv := v.Field(f.Index)
		switch {
		case f.Default != "":
			setText(fv, f.Default)
		case fv.Kind() == reflect.Struct:
			SetDefaults(fv.Addr().Interface())
		}
	}
}

func setText(v reflect.Value, s string) {
	var err error
	switch v.Kind() {
	case reflect.String:
		v.SetString(s)
	case reflect.Bool:
		var b bool
		b, err = strconv.ParseBool(s)
		v.SetBool(b)
	case reflect.Float64:
		var x float64
		x, err = strconv.ParseFloat(s, 64)
		v.SetFloat(x)
	case reflect.Int:
		var n int64
		n, err = strconv.ParseInt(s, 10, 64)
		v.SetInt(n)
	default:
		panic("hull: no default for " + v.Type().String())
	}
	if err != nil {
		panic("hull: bad default tag " + s)
	}
}

// checkFields looks for numbers outside their range, words that are not
// known, and needed fields that are empty.
func checkFields(v reflect.Value, path string, fs *Faults) {
	for _, f := range Fields(v.Type()) {
		checkValue(v.Field(f.Index), f, join(path, f.Name), fs)
	}
}

func checkValue(v reflect.Value, f Field, path string, fs *Faults) {
	if w, ok := v.Interface().(word); ok {
		s := v.String()
		if s == "" && !f.Needed {
			return
		}
		for _, known := range w.Words() {
			if s == known {
				return
			}
		}
		fs.add(path, "one of "+strings.Join(w.Words(), ", "), "%s", quoteGot(s))
		return
	}
	switch v.Kind() {
	case reflect.Pointer:
		if !v.IsNil() {
			f.Needed = false
			checkValue(v.Elem(), f, path, fs)
		}
	case reflect.Struct:
		checkFields(v, path, fs)
	case reflect.Slice:
		if f.Needed && v.Len() == 0 {
			fs.add(path, "at least one", "none")
		}
		f.Needed = false
		for i := range v.Len() {
			checkValue(v.Index(i), f, fmt.Sprintf("%s[%d]", path, i), fs)
		}
	case reflect.Float64:
		if !f.Range.Allows(v.Float()) {
			fs.add(path, f.Range.Want(false), "%v", v.Float())
		}
	case reflect.Int:
		if !f.Range.Allows(float64(v.Int())) {
			fs.add(path, f.Range.Want(true), "%d", v.Int())
		}
	case reflect.String:
		if f.Needed && strings.TrimSpace(v.String()) == "" {
			fs.add(path, "a text that is not empty", "%s", quoteGot(v.String()))
		}
	case reflect.Int32: // Date
		if f.Needed && v.Int() == 0 {
			fs.add(path, "a date as YYYY-MM-DD", "nothing")
		}
	}
}

func quoteGot(s string) string {
	if s == "" {
		return "nothing"
	}
	if len(s) > 60 {
		s = s[:57] + "..."
	}
	return strconv.Quote(s)
}

func join(path, name string) string {
	if path == "" {
		return name
	}
	return path + "." + name
}
