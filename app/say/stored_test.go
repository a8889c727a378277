package say_test

import (
	"go/ast"
	"go/token"
	"strconv"
	"testing"
)

// What an edit is called is stored, and so stays English: no translated text
// may name one.
func TestDeedsAreKeptInEnglish(t *testing.T) {
	deeds := 0
	source(t, "app/session", func(name string, fs *token.FileSet, f *ast.File) {
		ast.Inspect(f, func(n ast.Node) bool {
			c, ok := n.(*ast.CallExpr)
			if !ok {
				return true
			}
			if _, fn := callee(c); fn != "Do" && fn != "do" {
				return true
			}
			deeds++
			for _, a := range c.Args {
				if _, isFunc := a.(*ast.FuncLit); isFunc {
					continue
				}
				ast.Inspect(a, func(n ast.Node) bool {
					if inner, ok := n.(*ast.CallExpr); ok {
						if of, _ := callee(inner); of == "say" {
							t.Errorf("%s:%d: the name of an edit is translated before it is stored", name, fs.Position(inner.Pos()).Line)
						}
					}
					return true
				})
			}
			return true
		})
	})
	if deeds < 10 {
		t.Errorf("only %s edits were found", strconv.Itoa(deeds))
	}
}
