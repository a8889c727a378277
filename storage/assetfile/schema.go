package assetfile

import (
	"bytes"
	"encoding/json"
	"fmt"
	"reflect"
	"strconv"

	"anodewright/hull"
)

// SchemaDraft names the kind of JSON Schema that Schema writes.
const SchemaDraft = "https://json-schema.org/draft/2020-12/schema"

// datePattern is a date as the asset file writes it, from 1800 to 2400; which
// days a month has is left to the format "date".
const datePattern = `^((1[89]|2[0-3])[0-9]{2}|2400)-(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$`

// Schema returns the asset file's form as a JSON Schema, made from the fields'
// own tags: every field with its type, words, range and the value that its
// absence means. What holds between fields, such as shares that add up to 1,
// is not in it: Decode checks that too.
func Schema() []byte {
	s := objectSchema(reflect.TypeFor[hull.Asset]())
	fields := s["properties"].(map[string]any)
	fields["format"] = map[string]any{"const": Format}
	fields["version"] = map[string]any{"const": Version}
	fields["minor"] = map[string]any{"type": "integer", "minimum": 0, "maximum": Minor, "default": 0}
	s["required"] = append([]string{"format", "version"}, s["required"].([]string)...)
	s["$schema"] = SchemaDraft
	s["title"] = fmt.Sprintf("Asset file, version %d.%d", Version, Minor)
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	if err := e.Encode(s); err != nil {
		panic("assetfile: " + err.Error()) // only texts, numbers, lists and objects
	}
	return b.Bytes()
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
	if t == dateType {
		return map[string]any{"type": "string", "format": "date", "pattern": datePattern}
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
		if t.Elem().Kind() == reflect.Float64 { // one reading needs no brackets
			s["type"] = []string{"array", "number"}
			for limit, x := range ranged("number", f.Range) {
				if limit != "type" {
					s[limit] = x
				}
			}
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
	panic("assetfile: no schema for " + t.String())
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
