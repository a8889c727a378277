package assetfile

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"strconv"
	"unicode/utf8"

	"anodewright/hull"
)

// object is a JSON object with its fields in the order of the file.
type object struct {
	keys   []string
	values map[string]any
}

func (o *object) get(key string) (any, bool) {
	v, ok := o.values[key]
	return v, ok
}

// split parts the object into the named fields and the others.
func (o *object) split(names ...string) (named, rest *object) {
	named, rest = newObject(), newObject()
	isNamed := map[string]bool{}
	for _, n := range names {
		isNamed[n] = true
	}
	for _, k := range o.keys {
		if isNamed[k] {
			named.set(k, o.values[k])
		} else {
			rest.set(k, o.values[k])
		}
	}
	return named, rest
}

func newObject() *object { return &object{values: map[string]any{}} }

func (o *object) set(key string, v any) {
	o.keys = append(o.keys, key)
	o.values[key] = v
}

const maxDepth = 16 // an asset file nests six deep

// parse reads JSON text into *object, []any, string, json.Number, bool or nil.
func parse(text []byte) (any, error) {
	text = bytes.TrimPrefix(text, []byte("\xef\xbb\xbf"))
	if len(bytes.TrimSpace(text)) == 0 {
		return nil, errors.New("the file is empty")
	}
	if !utf8.Valid(text) {
		return nil, errors.New("not an asset file: it is not text in UTF-8")
	}
	d := json.NewDecoder(bytes.NewReader(text))
	d.UseNumber()
	v, err := parseValue(d, "", 0)
	if err == nil {
		if _, more := d.Token(); more != io.EOF {
			err = errors.New("text after the end of the asset")
		}
	}
	var faults hull.Faults
	if err == nil || errors.As(err, &faults) {
		return v, err
	}
	at := min(int(d.InputOffset()), len(text))
	line := 1 + bytes.Count(text[:at], []byte("\n"))
	if errors.Is(err, io.EOF) || errors.Is(err, io.ErrUnexpectedEOF) {
		return nil, fmt.Errorf("line %d: the file ends in the middle; it is cut off", line)
	}
	return nil, fmt.Errorf("line %d: not JSON: %v", line, err)
}

func parseValue(d *json.Decoder, path string, depth int) (any, error) {
	if depth > maxDepth {
		return nil, hull.Faults{{Path: path, Want: "an asset file, which does not nest so deep", Got: fmt.Sprintf("%d levels", depth)}}
	}
	tok, err := d.Token()
	if err != nil {
		return nil, err
	}
	switch tok {
	case json.Delim('{'):
		o := newObject()
		for d.More() {
			keyTok, err := d.Token()
			if err != nil {
				return nil, err
			}
			key := keyTok.(string)
			fieldPath := joinPath(path, key)
			if _, twice := o.values[key]; twice {
				return nil, hull.Faults{{Path: fieldPath, Want: "each field once", Got: "it twice"}}
			}
			v, err := parseValue(d, fieldPath, depth+1)
			if err != nil {
				return nil, err
			}
			o.set(key, v)
		}
		_, err = d.Token()
		return o, err
	case json.Delim('['):
		list := []any{}
		for d.More() {
			v, err := parseValue(d, fmt.Sprintf("%s[%d]", path, len(list)), depth+1)
			if err != nil {
				return nil, err
			}
			list = append(list, v)
		}
		_, err = d.Token()
		return list, err
	}
	return tok, nil
}

func joinPath(path, name string) string {
	if path == "" {
		return name
	}
	return path + "." + name
}

// describe says in a few words what was got.
func describe(v any) string {
	switch v := v.(type) {
	case nil:
		return "null"
	case *object:
		return "an object"
	case []any:
		return "a list"
	case string:
		if len(v) > 60 {
			v = v[:57] + "..."
		}
		return strconv.Quote(v)
	}
	return fmt.Sprint(v)
}

func describeField(o *object, name string) string {
	v, ok := o.get(name)
	if !ok {
		return "nothing"
	}
	return describe(v)
}
