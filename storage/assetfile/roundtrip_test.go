package assetfile

import (
	"os"
	"path/filepath"
	"reflect"
	"testing"

	"pgregory.net/rapid"

	"anodewright/hull"
)

// What is written is read back as the same asset, and written again as the
// same text.
func TestRandomAssetsKeepWhole(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawAsset(t)
		text := Encode(a)
		b, err := Decode(text)
		if err != nil {
			t.Fatalf("what was written is refused:\n%v\n%s", err, text)
		}
		if !reflect.DeepEqual(a, b) {
			t.Fatalf("read back as another asset:\n%s\n%s", text, Encode(b))
		}
		if again := Encode(b); string(again) != string(text) {
			t.Fatalf("written again as another text:\n%s\n%s", text, again)
		}
	})
}

// A copy is equal and shares nothing: emptying it leaves the asset as it was.
func TestRandomClones(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawAsset(t)
		before := string(Encode(a))
		b := Clone(a)
		if !reflect.DeepEqual(a, b) {
			t.Fatal("the copy is another asset")
		}
		blank(reflect.ValueOf(b).Elem())
		if string(Encode(a)) != before {
			t.Fatal("changing the copy changes the asset")
		}
	})
}

// blank sets everything that v reaches to nothing, in place.
func blank(v reflect.Value) {
	switch v.Kind() {
	case reflect.Pointer:
		if !v.IsNil() {
			blank(v.Elem())
		}
	case reflect.Struct:
		for i := range v.NumField() {
			blank(v.Field(i))
		}
	case reflect.Slice:
		for i := range v.Len() {
			blank(v.Index(i))
		}
	default:
		v.SetZero()
	}
}

// decodes reads a text. Whatever it is, that ends without a panic; what is
// accepted is valid and keeps whole, and what is refused says why.
func decodes(t interface{ Fatalf(string, ...any) }, text []byte) {
	a, err := Decode(text)
	if err != nil {
		if err.Error() == "" {
			t.Fatalf("refused without a word:\n%s", text)
		}
		if a != nil {
			Encode(a) // an editor shows what could be read
		}
		return
	}
	if faults := hull.Check(a); len(faults) > 0 {
		t.Fatalf("accepted with faults:\n%v\n%s", faults, text)
	}
	b, err := Decode(Encode(a))
	if err != nil || !reflect.DeepEqual(a, b) {
		t.Fatalf("accepted, but not kept whole: %v\n%s", err, text)
	}
}

// Texts with parts cut out, doubled or replaced by others.
func TestMutatedTextsDoNotPanic(t *testing.T) {
	texts := seeds()
	parts := []string{"", "null", "-1", "1e999", "0.5", `""`, `"x"`, "[]", "{}", "true", "\x00", "\xff", `\ud800`, ",", ":", "}", "]", `"zones": [],`, "\n"}
	rapid.Check(t, func(t *rapid.T) {
		text := append([]byte(nil), rapid.SampledFrom(texts).Draw(t, "text")...)
		for range rapid.IntRange(1, 4).Draw(t, "edits") {
			from := rapid.IntRange(0, len(text)).Draw(t, "from")
			to := min(len(text), from+rapid.IntRange(0, 12).Draw(t, "cut"))
			part := rapid.SampledFrom(parts).Draw(t, "part")
			text = append(append(append([]byte(nil), text[:from]...), part...), text[to:]...)
		}
		decodes(t, text)
	})
}

// FuzzDecode starts from the demo fleet and from every bad file.
func FuzzDecode(f *testing.F) {
	for _, text := range seeds() {
		f.Add(text)
	}
	for _, pattern := range []string{"../../testdata/assets/*.json", hostileDir + "/*.json"} {
		files, err := filepath.Glob(pattern)
		if err != nil || len(files) == 0 {
			f.Fatalf("no seeds at %s: %v", pattern, err)
		}
		for _, file := range files {
			text, err := os.ReadFile(file)
			if err != nil {
				f.Fatal(err)
			}
			f.Add(text)
		}
	}
	f.Fuzz(func(t *testing.T, text []byte) { decodes(t, text) })
}
