package main

import (
	"fmt"
	"io"
	"reflect"
	"strings"

	"anodewright/hull"
)

// printWords lists every field of the asset file that takes one of a set of
// words, with those words.
func printWords(w io.Writer) {
	seen := map[string]bool{}
	var walk func(t reflect.Type, path string)
	walk = func(t reflect.Type, path string) {
		for t.Kind() == reflect.Pointer || t.Kind() == reflect.Slice {
			t = t.Elem()
		}
		if known, ok := reflect.Zero(t).Interface().(interface{ Words() []string }); ok {
			if !seen[path] {
				fmt.Fprintf(w, "%s: %s\n", path, strings.Join(known.Words(), ", "))
				seen[path] = true
			}
			return
		}
		if t.Kind() != reflect.Struct {
			return
		}
		for _, f := range hull.Fields(t) {
			walk(t.Field(f.Index).Type, strings.TrimPrefix(path+"."+f.Name, "."))
		}
	}
	walk(reflect.TypeFor[hull.Asset](), "")
}
