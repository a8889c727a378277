package say_test

import (
	"encoding/json"
	"regexp"
	"slices"
	"sort"
	"strings"
	"testing"
	"unicode"

	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/assets"
)

var verbs = regexp.MustCompile(`%(?:\[\d+\])?[-+#0]*\d*(?:\.\d+)?[a-zA-Z%]`)

// tables collects the words of the reference tables: titles, how sure a table
// is, units and documents that are no proper names.
func (k keys) tables(t *testing.T) {
	t.Helper()
	add := func(s, at string) {
		if word.MatchString(s) {
			k[s] = "assets/tables/" + at
		}
	}
	all := assets.Tables()
	if len(all) == 0 {
		t.Fatal("no reference tables")
	}
	for _, table := range all {
		add(table.Title, table.ID)
		add(table.Confidence, table.ID)
		for _, row := range table.Rows {
			add(row.Confidence, table.ID)
		}
		for _, s := range []string{table.Unit, table.Document} {
			if s != "" && unicode.IsLower([]rune(s)[0]) && strings.Contains(s, " ") {
				add(s, table.ID)
			}
		}
	}
}

// Every text that the program can show is in each table, and no other.
func TestTablesAreCompleteAndCurrent(t *testing.T) {
	k := found(t)
	if len(k) < 500 {
		t.Fatalf("only %d texts were found in the source", len(k))
	}
	for _, language := range say.Languages()[1:] {
		table := say.Table(language.Code)
		missing := map[string]string{}
		for key, at := range k {
			if table[key] == "" {
				missing[key] = at
				if len(missing) <= 40 {
					t.Errorf("%s lacks %q (%s)", language.Code, key, at)
				}
			}
		}
		if len(missing) > 0 {
			t.Errorf("%s lacks %d of %d texts", language.Code, len(missing), len(k))
			text, _ := json.MarshalIndent(missing, "", "  ")
			writeMissing(t, string(text))
		}
		for key := range table {
			if _, used := k[key]; !used {
				t.Errorf("%s has %q, which nothing says", language.Code, key)
			}
		}
	}
}

// A translation carries the same values as its key, and only runes that the
// shipped font has.
func TestTranslationsFitTheirKeys(t *testing.T) {
	for _, language := range say.Languages()[1:] {
		for key, text := range say.Table(language.Code) {
			want, got := verbsOf(key), verbsOf(text)
			if !slices.Equal(want, got) {
				t.Errorf("%s: %q has the verbs %q, its translation %q", language.Code, key, want, got)
			}
			if missing := look.MissingRunes(text); len(missing) > 0 {
				t.Errorf("%s: %q has runes that the font lacks: %q", language.Code, text, missing)
			}
			if strings.TrimSpace(text) == "" || blanks(key) != blanks(text) {
				t.Errorf("%s: the translation of %q is empty or has other blanks at its ends: %q", language.Code, key, text)
			}
		}
	}
}

// blanks are those that a text begins and ends with.
func blanks(s string) [2]string {
	core := strings.TrimSpace(s)
	before, after, _ := strings.Cut(s, core)
	return [2]string{before, after}
}

// verbsOf returns the verbs of a format string, sorted, without their places.
func verbsOf(s string) []string {
	all := verbs.FindAllString(s, -1)
	for i, v := range all {
		all[i] = regexp.MustCompile(`\[\d+\]`).ReplaceAllString(v, "")
	}
	sort.Strings(all)
	return all
}
