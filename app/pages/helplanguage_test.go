package pages

import (
	"path"
	"strings"
	"testing"

	"anodewright/app/look"
	"anodewright/app/say"
)

// Each language has every help file, built as the English one: the same
// headings, paragraphs and points in the same order.
func TestHelpIsCompleteInEveryLanguage(t *testing.T) {
	files, err := helpFiles.ReadDir("help/en")
	must(t, err)
	if len(files) < 8 {
		t.Fatalf("only %d help files", len(files))
	}
	shape := func(language, name string) string {
		text, err := helpFiles.ReadFile(path.Join("help", language, name))
		if err != nil {
			t.Errorf("%s: %v", language, err)
			return ""
		}
		if missing := look.MissingRunes(string(text)); len(missing) > 0 {
			t.Errorf("%s/%s: the font lacks %q", language, name, string(missing))
		}
		var shape strings.Builder
		for line := range strings.SplitSeq(strings.TrimSpace(string(text)), "\n") {
			switch {
			case strings.HasPrefix(line, "# "):
				shape.WriteByte('#')
			case strings.HasPrefix(line, "- "):
				shape.WriteByte('-')
			case line != "":
				shape.WriteByte('p')
			}
		}
		return shape.String()
	}
	for _, language := range say.Languages()[1:] {
		for _, f := range files {
			if want, got := shape("en", f.Name()), shape(language.Code, f.Name()); want != got {
				t.Errorf("%s/%s is built as %q, the English one as %q", language.Code, f.Name(), got, want)
			}
		}
	}
}
