package say_test

import (
	"go/ast"
	"go/parser"
	"go/token"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"
)

// Where texts come from. In said, texts stand in calls of this package. In
// made, sentences are made in English and said later with Sentence: there
// every text that looks like words is a key.
var (
	said = []string{"app/chart", "app/grid", "app/look", "app/pages", "app/picture", "app/session", "cmd/anodewright"}
	made = []string{"hull", "hull/area", "hull/propose", "hull/water", "anodes", "anodes/forecast", "anodes/order", "anodes/plan", "anodes/protection",
		"anodes/renewal", "anodes/survey", "storage", "storage/assetfile", "storage/trade", "storage/sheet", "app/picture", "app/session"}
)

// unsaid are files whose texts no user of the window reads: formats of files
// for other programs.
var unsaid = map[string]bool{
	"anodes/renewal/lp.go": true, "anodes/plan/json.go": true, "storage/assetfile/schema.go": true, "storage/assetfile/encode.go": true, "storage/place.go": true,
	"storage/dialect.go": true,
	// The survey sheet itself is in English, as the workbook is.
	"storage/sheet/cover.go": true, "storage/sheet/write.go": true, "storage/sheet/page.go": true, "storage/sheet/layout.go": true, "storage/sheet/csvwrite.go": true,
}

// keys are the texts found, each with the place where it was.
type keys map[string]string

// source parses the Go files of a folder of this repository.
func source(t *testing.T, folder string, each func(name string, fs *token.FileSet, f *ast.File)) {
	t.Helper()
	files, err := filepath.Glob(filepath.Join("..", "..", filepath.FromSlash(folder), "*.go"))
	if err != nil || len(files) == 0 {
		t.Fatalf("no files in %s: %v", folder, err)
	}
	for _, path := range files {
		if strings.HasSuffix(path, "_test.go") {
			continue
		}
		fs := token.NewFileSet()
		f, err := parser.ParseFile(fs, path, nil, 0)
		if err != nil {
			t.Fatal(err)
		}
		each(folder+"/"+filepath.Base(path), fs, f)
	}
}

// literal returns the text of a string literal, or of several joined by +
// where other values become the verb %s.
func literal(e ast.Expr) (text string, found bool) {
	switch x := e.(type) {
	case *ast.BasicLit:
		if x.Kind == token.STRING {
			s, err := strconv.Unquote(x.Value)
			return s, err == nil
		}
	case *ast.ParenExpr:
		return literal(x.X)
	case *ast.BinaryExpr:
		if x.Op != token.ADD {
			return "", false
		}
		a, left := literal(x.X)
		b, right := literal(x.Y)
		part := func(e ast.Expr, s string, is bool) string {
			if !is {
				return "%s"
			}
			if _, ok := e.(*ast.BasicLit); ok {
				return strings.ReplaceAll(s, "%", "%%")
			}
			return s
		}
		if left || right {
			return part(x.X, a, left) + part(x.Y, b, right), true
		}
	}
	return "", false
}

func callee(c *ast.CallExpr) (of, name string) {
	switch f := c.Fun.(type) {
	case *ast.Ident:
		return "", f.Name
	case *ast.SelectorExpr:
		if x, ok := f.X.(*ast.Ident); ok {
			return x.Name, f.Sel.Name
		}
		return "", f.Sel.Name
	}
	return "", ""
}

// calls collects the keys that stand in calls of this package.
func (k keys) calls(t *testing.T, folder string) {
	source(t, folder, func(name string, fs *token.FileSet, f *ast.File) {
		ast.Inspect(f, func(n ast.Node) bool {
			c, ok := n.(*ast.CallExpr)
			if !ok {
				return true
			}
			of, fn := callee(c)
			if of != "say" {
				return true
			}
			at := name + ":" + strconv.Itoa(fs.Position(c.Pos()).Line)
			text := func(i int) string {
				s, err := "", error(nil)
				if l, ok := c.Args[i].(*ast.BasicLit); ok {
					s, err = strconv.Unquote(l.Value)
				}
				if err == nil {
					return s
				}
				return ""
			}
			switch fn {
			case "T", "Mark":
				if s := text(0); s != "" {
					k[s] = at
				}
			case "N":
				one, many := text(0), text(1)
				if one == "" || many == "" {
					t.Errorf("%s: the texts of N are to be written out", at)
				}
				k[one], k[many] = at, at
			case "In":
				k[text(1)+" | "+text(0)] = at
			}
			return true
		})
	})
}

var (
	word     = regexp.MustCompile(`\p{L}{3}|(?i:\b(?:as|at|by|in|is|no|of|on|or|to)\b)`)
	title    = regexp.MustCompile(`^\p{Lu}\p{Ll}[\p{Ll}-]*$`)
	database = regexp.MustCompile(`\$\d|^rev, |PRAGMA|SELECT|[A-Z]+ INTO|:memory:|SQLite format`)
	ownFault = regexp.MustCompile(`^[a-z]+: `)
)

// wordFiles hold lists of words that are shown, whatever they look like.
var wordFiles = map[string]bool{"hull/words.go": true, "hull/area/shape.go": true}

// lone are words that sentences of the domain are made with and that stand
// alone in the source, where they cannot be told from words of a file format.
var lone = []string{"initial", "mean", "final", "new", "worn", "reading", "readings", "anode", "anodes", "suggest", "suggests", "gone", "fallen",
	"mass", "current", "Back-EMF", "earlier", "later", "renew %d × %s", "add %d × %s", "keep %d × %s", "port", "starboard", "salinity", "temperature", "conductivity", "porosity",
	"anode suggests", "anodes suggest", "anodes suggests"}

// words tells whether a text is for people, and not a word of a file format.
func words(s string) bool {
	plain := verbs.ReplaceAllString(s, "")
	return word.MatchString(plain) && (strings.Contains(strings.TrimSpace(s), " ") || title.MatchString(s)) && !database.MatchString(s)
}

// sentences collects the texts of a folder whose sentences are said later.
func (k keys) sentences(t *testing.T, folder string) {
	pkg := folder[strings.LastIndex(folder, "/")+1:]
	source(t, folder, func(name string, fs *token.FileSet, f *ast.File) {
		if unsaid[name] {
			return
		}
		add := func(e ast.Expr, s string) {
			if own := ownFault.FindString(s); own == pkg+": " {
				return // a programmer's fault
			}
			k[strings.TrimSpace(s)] = name + ":" + strconv.Itoa(fs.Position(e.Pos()).Line)
		}
		var walk func(n ast.Node) bool
		walk = func(n ast.Node) bool {
			switch x := n.(type) {
			case *ast.ImportSpec:
				return false
			case *ast.Field:
				return x.Tag == nil
			case *ast.CallExpr:
				of, fn := callee(x)
				if fn == "panic" || of == "say" || fn == "MustCompile" || fn == "Exec" || fn == "Query" || fn == "Format" {
					return of == "say"
				}
				if strings.HasSuffix(fn, "Field") || fn == "particular" || fn == "size" {
					for _, a := range x.Args[min(1, len(x.Args)):] {
						if s, ok := literal(a); ok && word.MatchString(s) {
							add(a, s)
						}
					}
				}
			case *ast.CompositeLit:
				figure := strings.HasSuffix(typeName(x.Type), "Input") || strings.HasSuffix(typeName(x.Type), "Step")
				for _, e := range x.Elts {
					if inner, ok := e.(*ast.CompositeLit); ok && figure {
						e = inner.Elts[0]
					}
					if kv, ok := e.(*ast.KeyValueExpr); ok {
						if id, ok := kv.Key.(*ast.Ident); ok && (figure || id.Name == "Unit" || id.Name == "Title") {
							e = kv.Value
						}
					} else if !figure {
						continue
					}
					if s, ok := literal(e); ok && word.MatchString(s) {
						add(e, s)
					}
				}
			case *ast.BinaryExpr:
				if s, ok := literal(x); ok {
					if words(s) {
						add(x, s)
					}
					for _, part := range operands(x) {
						if _, ok := part.(*ast.BasicLit); !ok {
							ast.Inspect(part, walk)
						}
					}
					return false
				}
			case *ast.BasicLit:
				s, ok := literal(x)
				switch {
				case ok && wordFiles[name] && word.MatchString(s) && !strings.Contains(s, "_"):
					add(x, strings.ReplaceAll(s, "-", " "))
				case ok && words(s):
					add(x, s)
				}
			}
			return true
		}
		ast.Inspect(f, walk)
	})
}

func operands(e ast.Expr) []ast.Expr {
	if b, ok := e.(*ast.BinaryExpr); ok {
		return append(operands(b.X), operands(b.Y)...)
	}
	return []ast.Expr{e}
}

func typeName(e ast.Expr) string {
	switch x := e.(type) {
	case *ast.Ident:
		return x.Name
	case *ast.SelectorExpr:
		return x.Sel.Name
	case *ast.ArrayType:
		return typeName(x.Elt)
	}
	return ""
}

// constants collects the words that the domain's constants of text stand for.
func (k keys) constants(t *testing.T, folder string) {
	source(t, folder, func(name string, fs *token.FileSet, f *ast.File) {
		if unsaid[name] {
			return
		}
		ast.Inspect(f, func(n ast.Node) bool {
			g, ok := n.(*ast.GenDecl)
			if !ok || g.Tok != token.CONST {
				return true
			}
			ast.Inspect(g, func(n ast.Node) bool {
				if l, ok := n.(*ast.BasicLit); ok && l.Kind == token.STRING {
					s, _ := strconv.Unquote(l.Value)
					if s = strings.ReplaceAll(s, "-", " "); word.MatchString(s) && !strings.ContainsAny(s, "_/.=") && !database.MatchString(s) {
						k[strings.TrimSpace(s)] = name + ":" + strconv.Itoa(fs.Position(l.Pos()).Line)
					}
				}
				return true
			})
			return false
		})
	})
}

// found collects all keys.
func found(t *testing.T) keys {
	k := keys{}
	for _, folder := range made {
		k.sentences(t, folder)
	}
	for _, folder := range []string{"hull", "anodes", "anodes/plan", "anodes/renewal", "anodes/protection", "storage"} {
		k.constants(t, folder)
	}
	k.tables(t)
	for _, s := range lone {
		k[s] = "lone words"
	}
	for _, folder := range said {
		k.calls(t, folder)
	}
	return k
}

// writing holds the missing keys as a table to be filled, where the
// environment names a file for it.
const writing = "SAY_MISSING"

func writeMissing(t *testing.T, text string) {
	if path := os.Getenv(writing); path != "" {
		if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}
