package main

import (
	"encoding/json"
	"fmt"
	"io"
	"reflect"
	"strconv"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// printSchema writes the asset file's form as a JSON Schema (draft 2020-12):
// every field with its type, words, range and the value that its absence
// means. What holds between fields, such as shares that add up to 1, is not in
// it: the program checks that.
func printSchema(w io.Writer) error {
	s := objectSchema(reflect.TypeFor[hull.Asset]())
	fields := s["properties"].(map[string]any)
	fields["format"] = map[string]any{"const": assetfile.Format}
	fields["version"] = map[string]any{"const": assetfile.Version}
	fields["minor"] = map[string]any{"type": "integer", "minimum": 0, "maximum": assetfile.Minor, "default": 0}
	s["required"] = append([]string{"format", "version"}, s["required"].([]string)...)
	s["$schema"] = "https://json-schema.org/draft/2020-12/schema"
	s["title"] = fmt.Sprintf("Asset file, version %d.%d", assetfile.Version, assetfile.Minor)
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(s)
}

// objectSchema describes a struct of the asset file.
func objectSchema(t reflect.Type) map[string]any {
	fields, needed := map[string]any{}, []string{}
	for _, f := range hull.Fields(t) {
		s := fieldSchema(t.Field(f.Index).Type, f)
		if v, ok := defaultValue(t.Field(f.Index).Type, f); ok {
			s["default"] = v
		}
		fields[f.Name] = s
		if f.Needed {
			needed = append(needed, f.Name)
		}
	}
	s := map[string]any{"type": "object", "properties": fields, "additionalProperties": false}
	if len(needed) > 0 {
		s["required"] = needed
	}
	return s
}

// fieldSchema describes the value of a field, or an item of a list that is
// one.
func fieldSchema(t reflect.Type, f hull.Field) map[string]any {
	if t == reflect.TypeFor[hull.Date]() {
		return map[string]any{"type": "string", "format": "date"}
	}
	if known, ok := reflect.Zero(t).Interface().(interface{ Words() []string }); ok {
		return map[string]any{"enum": known.Words()}
	}
	switch t.Kind() {
	case reflect.Pointer:
		return fieldSchema(t.Elem(), f)
	case reflect.Struct:
		return objectSchema(t)
	case reflect.Slice:
		item := f
		item.Needed = false
		s := map[string]any{"type": "array", "items": fieldSchema(t.Elem(), item)}
		if f.Needed {
			s["minItems"] = 1
		}
		return s
	case reflect.Bool:
		return map[string]any{"type": "boolean"}
	case reflect.Int:
		return ranged("integer", f.Range)
	case reflect.Float64:
		return ranged("number", f.Range)
	case reflect.String:
		s := map[string]any{"type": "string"}
		if f.Needed {
			s["pattern"] = `\S`
		}
		return s
	}
	panic("schedule: no schema for " + t.String())
}

func ranged(kind string, r hull.Range) map[string]any {
	s := map[string]any{"type": kind}
	if !r.Limited {
		return s
	}
	low := "minimum"
	if r.OpenLow {
		low = "exclusiveMinimum"
	}
	s[low], s["maximum"] = r.Low, r.High
	return s
}

// defaultValue returns what the absence of a field means, where that is one
// value for all assets.
func defaultValue(t reflect.Type, f hull.Field) (any, bool) {
	switch {
	case f.Needed:
		return nil, false
	case t.Kind() == reflect.Bool:
		return f.Default == "true", true
	case t.Kind() == reflect.Float64 || t.Kind() == reflect.Int:
		x, _ := strconv.ParseFloat(f.Default, 64) // none: 0
		return x, f.Default != "" || f.Range.Allows(0)
	}
	return f.Default, f.Default != ""
}
