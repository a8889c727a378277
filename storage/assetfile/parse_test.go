package assetfile

import (
	"bytes"
	"strings"
	"testing"

	"anodewright/assets"
)

// Half a surrogate pair is refused, never replaced unsaid; whole ones and
// backslashes before a u are texts.
func TestHalfCharacters(t *testing.T) {
	named := func(name string) []byte {
		return bytes.Replace(assets.Demo()[0], []byte(`"Tern Passage"`), []byte(`"`+name+`"`), 1)
	}
	for _, name := range []string{`\ud800`, `a\udc00b`, `\ud83d\u0041`, `\udc00\ud800`, `\\\ud800`, `\ud83d\ude00\ud83d`} {
		if _, err := Decode(named(name)); err == nil || !strings.Contains(err.Error(), "half a character") || !strings.HasPrefix(err.Error(), "line ") {
			t.Errorf("%s: %v", name, err)
		}
	}
	for name, want := range map[string]string{`\ud83d\ude00`: "😀", `\\ud800`: `\ud800`, `\u00e9\n`: "é\n"} {
		if a, err := Decode(named(name)); err != nil {
			t.Errorf("%s: %v", name, err)
		} else if a.Name != want {
			t.Errorf("%s is read as %q", name, a.Name)
		}
	}
}

// A fault takes one line, whatever the field is called.
func TestAFaultTakesOneLine(t *testing.T) {
	text := bytes.Replace(assets.Demo()[0], []byte(`"name"`), []byte(`"a\nb\u001b[31m": 1, "name"`), 1)
	_, err := Decode(text)
	if err == nil || strings.ContainsAny(err.Error(), "\n\x1b") || !strings.HasPrefix(err.Error(), `"a\nb`) {
		t.Errorf("%q", err)
	}
}
