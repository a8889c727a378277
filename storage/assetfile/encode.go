package assetfile

import (
	"bytes"
	"encoding/json"
	"math"
	"reflect"
	"strconv"
	"strings"

	"anodewright/hull"
)

// encodeFields writes the fields of a struct that say something, each after a
// comma. Lists of objects are written one object a line, at depth.
func encodeFields(b *bytes.Buffer, v reflect.Value, depth int, comma bool) {
	sep := ", "
	if depth == 1 {
		sep = ",\n  "
	}
	for _, f := range hull.Fields(v.Type()) {
		fv := v.Field(f.Index)
		if !f.Needed && absent(fv, f) {
			continue
		}
		if comma {
			b.WriteString(sep)
		}
		comma = true
		b.WriteString(strconv.Quote(f.Name))
		b.WriteString(": ")
		encodeValue(b, fv, depth)
	}
}

// absent reports whether leaving the field out means the same.
func absent(v reflect.Value, f hull.Field) bool {
	switch v.Kind() {
	case reflect.Struct:
		for _, g := range hull.Fields(v.Type()) {
			if gv := v.Field(g.Index); g.Needed || !absent(gv, g) {
				return false
			}
		}
		return true
	case reflect.Slice:
		return v.Len() == 0
	case reflect.String:
		return v.String() == f.Default
	case reflect.Bool:
		return strconv.FormatBool(v.Bool()) == f.Default || f.Default == "" && !v.Bool()
	case reflect.Float64, reflect.Int:
		if f.Default == "" {
			return v.IsZero()
		}
		x, _ := strconv.ParseFloat(f.Default, 64)
		return v.Kind() == reflect.Float64 && v.Float() == x || v.Kind() == reflect.Int && float64(v.Int()) == x
	}
	return v.IsZero()
}

func encodeValue(b *bytes.Buffer, v reflect.Value, depth int) {
	if v.Type() == dateType {
		b.WriteString(strconv.Quote(v.Interface().(hull.Date).String()))
		return
	}
	switch v.Kind() {
	case reflect.Pointer:
		encodeValue(b, v.Elem(), depth)
	case reflect.Struct:
		b.WriteByte('{')
		encodeFields(b, v, depth+1, false)
		b.WriteByte('}')
	case reflect.Slice:
		lines := depth == 1 && v.Type().Elem().Kind() == reflect.Struct
		b.WriteByte('[')
		for i := range v.Len() {
			if i > 0 {
				b.WriteByte(',')
			}
			switch {
			case lines:
				b.WriteString("\n    ")
			case i > 0:
				b.WriteByte(' ')
			}
			encodeValue(b, v.Index(i), depth+1)
		}
		if lines && v.Len() > 0 {
			b.WriteString("\n  ")
		}
		b.WriteByte(']')
	case reflect.String:
		b.WriteString(quote(v.String()))
	case reflect.Bool:
		b.WriteString(strconv.FormatBool(v.Bool()))
	case reflect.Float64:
		x := v.Float()
		if math.IsNaN(x) || math.IsInf(x, 0) {
			panic("assetfile: a number that is not finite entered an asset")
		}
		text, _ := json.Marshal(x)
		b.Write(text)
	case reflect.Int:
		b.WriteString(strconv.FormatInt(v.Int(), 10))
	default:
		panic("assetfile: no encoding for " + v.Type().String())
	}
}

// quote writes a JSON string with letters of all scripts and <, >, & as they
// are.
func quote(s string) string {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(s); err != nil {
		panic("assetfile: " + err.Error())
	}
	return strings.TrimSuffix(b.String(), "\n")
}

func deepCopy(v reflect.Value) reflect.Value {
	switch v.Kind() {
	case reflect.Pointer:
		if v.IsNil() {
			return v
		}
		p := reflect.New(v.Type().Elem())
		p.Elem().Set(deepCopy(v.Elem()))
		return p
	case reflect.Struct:
		s := reflect.New(v.Type()).Elem()
		for i := range v.NumField() {
			s.Field(i).Set(deepCopy(v.Field(i)))
		}
		return s
	case reflect.Slice:
		if v.IsNil() {
			return v
		}
		s := reflect.MakeSlice(v.Type(), v.Len(), v.Len())
		for i := range v.Len() {
			s.Index(i).Set(deepCopy(v.Index(i)))
		}
		return s
	}
	return v
}
