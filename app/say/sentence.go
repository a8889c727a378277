package say

import (
	"regexp"
	"slices"
	"sort"
	"strconv"
	"strings"
	"sync"
	"unicode"
)

// verb is a verb of a format string, or a doubled per-cent sign.
var verb = regexp.MustCompile(`%(?:%|(?:\[(\d+)\])?[-+#0]*\d*(?:\.\d+)?([a-zA-Z]))`)

// A template is a key that carries verbs, as what it may have become.
type template struct {
	english string
	form    *regexp.Regexp
	longest string // its longest run of plain text: a cheap first test
	plain   int    // how many letters and marks of it are plain
	places  []int  // which argument each verb takes
}

// templates finds the key that a sentence was made from. Sentences are kept
// with their translation, for a screen asks for the same ones again and again.
type templates struct {
	all  []template
	mu   sync.Mutex
	kept map[string]string
}

// mostKept bounds the sentences kept; beyond it they are forgotten together.
const mostKept = 4096

func newTemplates(texts map[string]string) *templates {
	ts := &templates{kept: map[string]string{}}
	for english := range texts {
		if t, ok := newTemplate(english); ok {
			ts.all = append(ts.all, t)
		}
	}
	// the most telling first; then by name, for the same answer in every run
	sort.Slice(ts.all, func(i, j int) bool {
		a, b := ts.all[i], ts.all[j]
		if a.plain != b.plain {
			return a.plain > b.plain
		}
		return a.english < b.english
	})
	return ts
}

// newTemplate makes a key's template; not ok where it carries no verb, or too
// little plain text to be known by.
func newTemplate(english string) (template, bool) {
	t := template{english: english}
	form := strings.Builder{}
	form.WriteString(`(?s)^`)
	plain := func(s string) {
		form.WriteString(regexp.QuoteMeta(s))
		if len(s) > len(t.longest) {
			t.longest = s
		}
		for _, r := range s {
			if unicode.IsLetter(r) || unicode.IsPunct(r) {
				t.plain++
			}
		}
	}
	verbs, end := 0, 0
	for _, m := range verb.FindAllStringSubmatchIndex(english, -1) {
		plain(english[end:m[0]])
		end = m[1]
		if m[4] < 0 {
			plain("%")
			continue
		}
		place := verbs
		if m[2] >= 0 {
			place, _ = strconv.Atoi(english[m[2]:m[3]])
			place--
		}
		t.places = append(t.places, place)
		verbs++
		switch english[m[4]:m[5]] {
		case "d":
			form.WriteString(`([-−+]?[\d\x{a0}]+)`)
		case "f", "g", "e":
			form.WriteString(`([-−+]?[\d\x{a0}]*[.,]?\d+(?:e[-+]?\d+)?|NaN|[-+]?Inf)`)
		case "q":
			form.WriteString(`("(?:[^"\\]|\\.)*")`)
		default:
			form.WriteString(`(.*?)`)
		}
	}
	plain(english[end:])
	form.WriteString(`$`)
	if verbs == 0 || t.plain < 2 {
		return template{}, false
	}
	t.form = regexp.MustCompile(form.String())
	return t, true
}

// Sentence says an English sentence that was made elsewhere, with its values
// already in it: it finds the key that the sentence was made from and says
// that with the same values. Values that are known words or sentences
// themselves are said too. A sentence that no key fits is returned as it is.
func Sentence(english string) string {
	t := current.Load()
	if t.templates == nil {
		return shown(english)
	}
	ts := t.templates
	ts.mu.Lock()
	said, ok := ts.kept[english]
	ts.mu.Unlock()
	if !ok {
		said, ok = t.sentence(english, 0)
		if !ok {
			said = english
		}
		ts.mu.Lock()
		if len(ts.kept) >= mostKept {
			clear(ts.kept)
		}
		ts.kept[english] = said
		ts.mu.Unlock()
	}
	return shown(said)
}

// deepest is how far sentences may stand in sentences.
const deepest = 6

func (t *table) sentence(s string, depth int) (string, bool) {
	if core := strings.TrimSpace(s); core != s {
		said, ok := t.sentence(core, depth)
		at := strings.Index(s, core)
		return s[:at] + said + s[at+len(core):], ok
	}
	if depth > 0 && isName(s) {
		return s, true
	}
	if said, ok := t.texts[s]; ok {
		return said, true
	}
	if depth > deepest || s == "" {
		return "", false
	}
	if said, ok := t.filled(s, depth, true); ok {
		return said, true
	}
	if said, ok := t.parts(s, depth); ok {
		return said, true
	}
	return t.filled(s, depth, false)
}

// whole says a text that is one key, not several strung together.
func (t *table) whole(s string, depth int) (string, bool) {
	if said, ok := t.texts[s]; ok {
		return said, true
	}
	if said, ok := t.filled(s, depth, true); ok {
		return said, true
	}
	return t.filled(s, depth, false)
}

// telling is how many plain letters and marks make a template's match sure; with fewer,
// as "%s to %s", it may match by chance, and is tried last and on single
// sentences alone.
const telling = 7

// filled says a sentence by the key that it was made from.
func (t *table) filled(s string, depth int, sure bool) (string, bool) {
	for _, k := range t.templates.all {
		if sure != (k.plain >= telling) || !strings.Contains(s, k.longest) || !sure && strings.Contains(s, ". ") {
			continue
		}
		if m := k.form.FindStringSubmatch(s); m != nil {
			values := make([]string, slices.Max(k.places)+1)
			for i, v := range m[1:] {
				if said, ok := t.sentence(v, depth+1); ok {
					v = said
				}
				values[k.places[i]] = v
			}
			return fill(t.texts[k.english], values), true
		}
	}
	return "", false
}

// joins are what sentences are strung together with, the loosest first.
var joins = []string{"\n", ". ", "; ", ": ", ", "}

// counted is a number and what there are so many of.
var counted = regexp.MustCompile(`^(\d+) ([^\d].*)$`)

// parts says a string of sentences one by one; not ok where none is known.
func (t *table) parts(s string, depth int) (string, bool) {
	for _, join := range joins {
		if !strings.Contains(s, join) {
			continue
		}
		parts, any := strings.Split(s, join), false
		for i, p := range parts {
			if i > 0 && t.texts[strings.TrimSpace(join)+" "+p] != "" {
				parts[i], any = strings.TrimPrefix(t.texts[strings.TrimSpace(join)+" "+p], join), true
				continue
			}
			if end := strings.TrimSpace(join); (end == "." || end == ":") && i < len(parts)-1 {
				if said, ok := t.whole(p+end, depth); ok {
					parts[i], any = strings.TrimSuffix(said, end), true
					continue
				}
			}
			if said, ok := t.sentence(p, depth+1); ok {
				parts[i], any = said, true
			}
		}
		if any {
			return strings.Join(parts, join), true
		}
	}
	if at := strings.Index(s, " ("); at > 0 && strings.HasSuffix(s, ")") {
		before, ok1 := t.sentence(s[:at], depth+1)
		within, ok2 := t.sentence(s[at+1:], depth+1)
		if !ok1 {
			before = s[:at]
		}
		if !ok2 {
			within, ok2 = t.sentence(s[at+2:len(s)-1], depth+1)
			if !ok2 {
				within = s[at+2 : len(s)-1]
			}
			within = "(" + within + ")"
		}
		return before + " " + within, ok1 || ok2
	}
	if m := counted.FindStringSubmatch(s); m != nil {
		if said, ok := t.sentence(m[2], depth+1); ok {
			return m[1] + " " + said, true
		}
	}
	return "", false
}

// fill puts texts into a format string in place of its verbs.
func fill(format string, values []string) string {
	next := 0
	return verb.ReplaceAllStringFunc(format, func(v string) string {
		m := verb.FindStringSubmatch(v)
		if m[2] == "" {
			return "%"
		}
		i := next
		if m[1] != "" {
			i = 0
			for _, r := range m[1] {
				i = i*10 + int(r-'0')
			}
			i--
		}
		next = i + 1
		if i < 0 || i >= len(values) {
			return v
		}
		return values[i]
	})
}

// shown writes the dates, quantities and numbers of a sentence as chosen.
func shown(s string) string { return numbers(quantities(days(s))) }

// point is a decimal point between figures, which no further point, letter or
// hyphen joins: a clause such as 6.3.4 or a word such as M1.5 stays as it is.
var point = regexp.MustCompile(`(^|[^\p{L}\d.,_-])(\d[\d\x{a0}]*)\.(\d+)($|[^\d.]|\.($|\D))`)

// numbers puts the chosen decimal sign into a sentence that was made with
// decimal points.
func numbers(s string) string {
	if !Comma() || !strings.Contains(s, ".") {
		return s
	}
	var out strings.Builder
	for {
		m := point.FindStringSubmatchIndex(s)
		if m == nil {
			return out.String() + s
		}
		// what stands behind the figure may stand before the next one
		end := m[7]
		out.WriteString(s[:m[4]])
		if clause.MatchString(out.String()) {
			out.WriteString(s[m[4]:end])
		} else {
			out.WriteString(s[m[4]:m[5]] + "," + s[m[6]:end])
		}
		s = s[end:]
	}
}

// clause is what stands before the number of a clause, which is no figure.
var clause = regexp.MustCompile(`(?:B401|F103|12473|15589-2|/10|Ch \d|Pt \d|Linkspans|Ships|buques|Table|[Tt]abla|clause),? $`)
