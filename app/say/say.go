// Package say speaks the user's language. The key of a text is the English
// text itself, a format string where it carries values; a table from English
// to the language is embedded for every other language. English needs none. A
// text that a table lacks is said in English: tests hold that none is lacking.
package say

import (
	"embed"
	"encoding/json"
	"fmt"
	"slices"
	"sync/atomic"
)

//go:embed *.json
var files embed.FS

// A Choice is a language that the program speaks.
type Choice struct {
	Code string // ISO 639-1
	Name string // in the language itself
}

// Languages lists the languages that the program speaks, English first.
func Languages() []Choice {
	return []Choice{{"en", "English"}, {"es", "Español"}}
}

// table is one language's texts by their English ones.
type table struct {
	code      string
	texts     map[string]string
	templates *templates
}

var current atomic.Pointer[table]

func init() { current.Store(&table{code: "en"}) }

// Use chooses the language by its code; one that the program does not speak
// means English. Texts on the screen have to be built anew afterwards.
func Use(code string) {
	if code == Language() {
		return
	}
	t := &table{code: "en"}
	if code != "en" && slices.ContainsFunc(Languages(), func(c Choice) bool { return c.Code == code }) {
		t = &table{code: code, texts: Table(code)}
		t.templates = newTemplates(t.texts)
	}
	current.Store(t)
}

// Language returns the code of the chosen language.
func Language() string { return current.Load().code }

// Table returns a language's texts by their English ones, for tests and tools.
// It panics where the embedded file is broken, which a test would find.
func Table(code string) map[string]string {
	data, err := files.ReadFile(code + ".json")
	if err != nil {
		panic("say: no table for " + code)
	}
	texts := map[string]string{}
	if err := json.Unmarshal(data, &texts); err != nil {
		panic("say: " + code + ".json: " + err.Error())
	}
	return texts
}

// T says an English text in the chosen language. With arguments the text is a
// format string as of package fmt; without, it is said as it stands, so that a
// lone per-cent sign needs no doubling.
func T(english string, args ...any) string {
	s := english
	if t, ok := current.Load().texts[english]; ok {
		s = t
	}
	if len(args) == 0 {
		return s
	}
	return fmt.Sprintf(s, decimals(args)...)
}

// N says one of two English texts, the first where n is 1. Without further
// arguments n is the only one.
func N(one, many string, n int, args ...any) string {
	if len(args) == 0 {
		args = []any{n}
	}
	if n == 1 {
		return T(one, args...)
	}
	return T(many, args...)
}

// In says an English text that stands for different things in different places:
// its key is the text with the place behind it, as "Open | state".
func In(place, english string, args ...any) string {
	key := english + " | " + place
	s, ok := current.Load().texts[key]
	if !ok {
		s = english
	}
	if len(args) == 0 {
		return s
	}
	return fmt.Sprintf(s, decimals(args)...)
}

// Mark returns an English text as it is, for one that is kept in a variable
// and said later with T: it tells the test of the tables that it is a key.
func Mark(english string) string { return english }
