package assetfile

import (
	"encoding/json"
	"fmt"
	"math"
	"reflect"
	"strings"

	"anodewright/hull"
)

var dateType = reflect.TypeFor[hull.Date]()

// decodeStruct fills v from o, with the meaning of absent fields first.
func decodeStruct(o *object, v reflect.Value, path string, faults *hull.Faults) {
	hull.SetDefaults(v.Addr().Interface())
	known := map[string]hull.Field{}
	fields := hull.Fields(v.Type())
	for _, f := range fields {
		known[f.Name] = f
	}
	for _, key := range o.keys {
		f, ok := known[key]
		if !ok {
			*faults = append(*faults, hull.Fault{Path: joinPath(path, key), Want: "a field of the asset file: " + nearby(key, fields), Got: "an unknown field"})
			continue
		}
		decodeValue(o.values[key], v.Field(f.Index), f, joinPath(path, key), faults)
	}
	for _, f := range fields {
		if _, ok := o.get(f.Name); f.Needed && !ok {
			*faults = append(*faults, hull.Fault{Path: joinPath(path, f.Name), Want: wanted(v.Field(f.Index).Type(), f), Got: "nothing"})
		}
	}
}

func decodeValue(raw any, v reflect.Value, f hull.Field, path string, faults *hull.Faults) {
	wrong := func() {
		*faults = append(*faults, hull.Fault{Path: path, Want: wanted(v.Type(), f), Got: describe(raw)})
	}
	if v.Type() == dateType {
		s, ok := raw.(string)
		d, err := hull.ParseDate(s)
		if !ok || err != nil {
			wrong()
			return
		}
		v.Set(reflect.ValueOf(d))
		return
	}
	switch v.Kind() {
	case reflect.Pointer:
		p := reflect.New(v.Type().Elem())
		before := len(*faults)
		decodeValue(raw, p.Elem(), f, path, faults)
		if len(*faults) == before || p.Elem().Kind() == reflect.Struct {
			v.Set(p)
		}
	case reflect.Struct:
		o, ok := raw.(*object)
		if !ok {
			wrong()
			return
		}
		decodeStruct(o, v, path, faults)
	case reflect.Slice:
		list, ok := raw.([]any)
		if !ok {
			if _, number := raw.(json.Number); number && v.Type().Elem().Kind() == reflect.Float64 {
				list, ok = []any{raw}, true // one reading needs no brackets
			}
		}
		if !ok {
			wrong()
			return
		}
		if len(list) == 0 {
			return
		}
		s := reflect.MakeSlice(v.Type(), len(list), len(list))
		for i, item := range list {
			decodeValue(item, s.Index(i), f, fmt.Sprintf("%s[%d]", path, i), faults)
		}
		v.Set(s)
	case reflect.String:
		s, ok := raw.(string)
		if !ok {
			wrong()
			return
		}
		v.SetString(s)
	case reflect.Bool:
		b, ok := raw.(bool)
		if !ok {
			wrong()
			return
		}
		v.SetBool(b)
	case reflect.Float64:
		x, ok := toNumber(raw)
		if !ok {
			wrong()
			return
		}
		v.SetFloat(x)
	case reflect.Int:
		x, ok := toNumber(raw)
		if !ok || x != math.Trunc(x) || math.Abs(x) > 1e15 {
			wrong()
			return
		}
		v.SetInt(int64(x))
	default:
		panic("assetfile: no decoding for " + v.Type().String())
	}
}

func toNumber(raw any) (float64, bool) {
	n, ok := raw.(json.Number)
	if !ok {
		return 0, false
	}
	x, err := n.Float64() // fails on numbers that do not fit, such as 1e999
	return x, err == nil
}

// wanted says what a field of this type takes.
func wanted(t reflect.Type, f hull.Field) string {
	if t == dateType {
		return "a date as YYYY-MM-DD between 1800 and 2400"
	}
	if w, ok := reflect.Zero(t).Interface().(interface{ Words() []string }); ok {
		return "one of " + strings.Join(w.Words(), ", ")
	}
	switch t.Kind() {
	case reflect.Pointer:
		return wanted(t.Elem(), f)
	case reflect.Struct:
		return "an object"
	case reflect.Slice:
		return "a list"
	case reflect.Bool:
		return "true or false"
	case reflect.Float64:
		return f.Range.Want(false)
	case reflect.Int:
		return f.Range.Want(true)
	}
	return "a text"
}

// nearby names the fields that an unknown one may have meant: those that
// share its beginning, else all.
func nearby(key string, fields []hull.Field) string {
	var all, close []string
	for _, f := range fields {
		all = append(all, f.Name)
		if len(key) >= 3 && strings.HasPrefix(f.Name, key[:3]) {
			close = append(close, f.Name)
		}
	}
	if len(close) > 0 {
		return strings.Join(close, ", ")
	}
	return strings.Join(all, ", ")
}
