package assetfile

import (
	"bytes"
	"os"
	"path/filepath"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"pgregory.net/rapid"

	"anodewright/assets"
)

// compiled is the schema in the hands of a library that knows nothing of us.
// The library also checks it against the schema of schemas.
func compiled(t testing.TB) *jsonschema.Schema {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(Schema()))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	c.AssertFormat()
	if err := c.AddResource("asset.json", doc); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile("asset.json")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// bySchema is what the schema says of a text.
func bySchema(s *jsonschema.Schema, text []byte) error {
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	if err != nil {
		return err
	}
	return s.Validate(doc)
}

func TestSchemaTakesEveryGoodFile(t *testing.T) {
	s := compiled(t)
	for i, text := range assets.Demo() {
		if err := bySchema(s, text); err != nil {
			t.Errorf("demo file %d: %v", i, err)
		}
	}
	files, err := filepath.Glob("../../testdata/assets/*.json")
	if err != nil || len(files) < 3 {
		t.Fatalf("%d files, %v", len(files), err)
	}
	for _, file := range files {
		text, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if err := bySchema(s, text); err != nil {
			t.Errorf("%s: %v", file, err)
		}
	}
}

func TestSchemaTakesWhateverIsWritten(t *testing.T) {
	s := compiled(t)
	rapid.Check(t, func(t *rapid.T) {
		if text := Encode(drawAsset(t)); bySchema(s, text) != nil {
			t.Fatalf("%v\n%s", bySchema(s, text), text)
		}
	})
}

// beyondSchema are the bad files whose fault no schema can tell: it lies
// between fields, or in a text that the library's JSON reader forgives.
var beyondSchema = map[string]bool{
	"duplicate-key.json": true, "bare-above-wetted.json": true, "water-missing.json": true,
	"water-unknown.json": true, "shares-short.json": true, "two-media.json": true,
	"pattern-unknown.json": true, "duplicate-id.json": true, "held-in-a-circle.json": true,
	"dockings-out-of-order.json": true, "horizon-too-early.json": true, "fitted-after-docking.json": true,
}

func TestSchemaRefusesTheBadFilesThatItCanTell(t *testing.T) {
	s := compiled(t)
	refused := 0
	for name := range hostileIndex(t) {
		text, err := os.ReadFile(filepath.Join(hostileDir, name))
		if err != nil {
			t.Fatal(err)
		}
		switch err := bySchema(s, text); {
		case err == nil && !beyondSchema[name]:
			t.Errorf("%s: accepted", name)
		case err != nil && beyondSchema[name]:
			t.Errorf("%s: refused, so it is not beyond a schema: %v", name, err)
		case err != nil:
			refused++
		}
	}
	if refused < 25 {
		t.Errorf("only %d of the bad files are refused", refused)
	}
}

func TestSchemaTakesOneReadingWithoutBrackets(t *testing.T) {
	s, text := compiled(t), string(assets.Demo()[0])
	with := func(wastage string) []byte {
		i := bytes.LastIndexByte([]byte(text), '}')
		doc := []byte(text[:i])
		return append(doc, []byte(`, "readings": [{"date": "2026-06-01", "zone": "side", "weighed_wastage": `+wastage+`}]}`)...)
	}
	for wastage, ok := range map[string]bool{"0.2": true, "[0.2, 0.3]": true, "1.2": false, "[1.2]": false, `"0.2"`: false} {
		if err := bySchema(s, with(wastage)); (err == nil) != ok {
			t.Errorf("weighed_wastage %s: %v", wastage, err)
		}
	}
}
