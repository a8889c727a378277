package assetfile

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf16"
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
	if bytes.HasPrefix(text, []byte("PK\x03\x04")) {
		return nil, errors.New("not an asset file: it is a zip, as fleet files and workbooks are")
	}
	if !utf8.Valid(text) {
		return nil, errors.New("not an asset file: it is not text in UTF-8")
	}
	if at := halfCharacter(text); at >= 0 {
		return nil, fmt.Errorf("line %d: not JSON: %s is half a character", 1+bytes.Count(text[:at], []byte("\n")), text[at:at+6])
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

// halfCharacter returns where an escape stands that is one half of a surrogate
// pair without the other, which encoding/json would replace unsaid; -1 where
// there is none. A backslash stands in texts only.
func halfCharacter(text []byte) int {
	escape := func(i int) rune {
		if i+6 > len(text) || text[i] != '\\' || text[i+1] != 'u' {
			return -1
		}
		n, err := strconv.ParseUint(string(text[i+2:i+6]), 16, 16)
		if err != nil {
			return -1
		}
		return rune(n)
	}
	for i := 0; i < len(text); i++ {
		if text[i] != '\\' {
			continue
		}
		r := escape(i)
		switch {
		case !utf16.IsSurrogate(r):
			i++ // what is escaped
		case utf16.DecodeRune(r, escape(i+6)) == unicode.ReplacementChar:
			return i
		default:
			i += 11
		}
	}
	return -1
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

// joinPath is the path of a field. A name that no field can have is quoted, so
// that a fault stays on one line.
func joinPath(path, name string) string {
	if strings.ContainsFunc(name, func(r rune) bool { return !unicode.IsPrint(r) }) {
		name = strconv.Quote(name)
	}
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
