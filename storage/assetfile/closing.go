package assetfile

import (
	"bytes"
	"io"
	"os"
	"reflect"

	"anodewright/hull"
)

// DecodeClosing reads what was found and done at a docking, written as one
// JSON object of the fields of [hull.Closing], as strictly as an asset file.
// Whether it fits an asset is for [hull.Close] to say.
func DecodeClosing(text []byte) (hull.Closing, error) {
	var c hull.Closing
	if len(text) > MaxSize {
		return c, tooLarge(int64(len(text)))
	}
	tree, err := parse(text)
	if err != nil {
		return c, err
	}
	object, ok := tree.(*object)
	if !ok {
		return c, hull.Faults{{Want: "a closing: one JSON object", Got: describe(tree)}}
	}
	var faults hull.Faults
	decodeStruct(object, reflect.ValueOf(&c).Elem(), "", &faults)
	return c, faults.Err()
}

// ReadClosing reads the closing in the file at path.
func ReadClosing(path string) (hull.Closing, error) {
	f, err := os.Open(path)
	if err != nil {
		return hull.Closing{}, sentence(err, "cannot be opened")
	}
	defer f.Close()
	text, err := io.ReadAll(io.LimitReader(f, MaxSize+1))
	if err != nil {
		return hull.Closing{}, sentence(err, "cannot be read")
	}
	return DecodeClosing(text)
}

// EncodeClosing writes a closing so that [DecodeClosing] reads it back.
func EncodeClosing(c hull.Closing) []byte {
	var b bytes.Buffer
	b.WriteString("{\n  ")
	encodeFields(&b, reflect.ValueOf(c), 1, false)
	b.WriteString("\n}\n")
	return b.Bytes()
}
