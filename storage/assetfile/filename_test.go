package assetfile

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode/utf8"
)

func TestFileName(t *testing.T) {
	for name, want := range map[string]string{
		"Tern Passage":                      "Tern Passage",
		"Tern Passage 2.0":                  "Tern Passage 2.0",
		"../../etc/passwd":                  "-..-etc-passwd",
		`..\..\x`:                           `-..-x`,
		"/":                                 "-",
		"..":                                "asset",
		"":                                  "asset",
		" . ":                               "asset",
		"C:\\fleet":                         "C--fleet",
		"a\x00b\nc\x7f\u0085d\u2028e\u2029": "a-b-c--d-e-",
		"ship\u202egnp.exe":                 "shipgnp.exe", // shown, it would have been shipexe.png
		"\u2066ship\u2069\u200f":            "ship",
		"خزان 👩🏽\u200d🔧 \u0e16\u0e31\u0e07": "خزان 👩🏽\u200d🔧 \u0e16\u0e31\u0e07",
		"CON":           "_CON",
		"com1.old":      "_com1.old",
		"Connie":        "Connie",
		"bad \xff utf8": "bad - utf8",
		"-rf":           "-rf",
	} {
		if got := FileName(name); got != want {
			t.Errorf("%q becomes %q, want %q", name, got, want)
		}
	}
	if got := FileName(strings.Repeat("長", 200)); len(got) > maxFileName || !utf8.ValidString(got) {
		t.Errorf("a long name has %d bytes", len(got))
	}
}

// An asset of any name is written where its file was to be, and nowhere else.
func TestFilesOfHostileNamesStayInTheirFolder(t *testing.T) {
	outer := t.TempDir()
	folder := filepath.Join(outer, "a", "b", "exports")
	if err := os.MkdirAll(folder, 0o755); err != nil {
		t.Fatal(err)
	}
	names := []string{"../../up", "/etc/x", `..\..\up`, "\u202e../up", "a\x00b", strings.Repeat("é", 300), "..", "\u202e", "~/x", "$HOME"}
	for _, name := range names {
		a := demoFleet(t)[0]
		a.Name = name
		path := filepath.Join(folder, FileName(name)+".json")
		if err := Write(path, a); err != nil {
			t.Errorf("%q: %v", name, err)
		} else if got, err := Read(path); err != nil || got.Name != name {
			t.Errorf("%q: read back %v", name, err)
		}
	}
	inside := 0
	filepath.WalkDir(outer, func(path string, d os.DirEntry, err error) error {
		if err == nil && !d.IsDir() {
			if filepath.Dir(path) != folder {
				t.Errorf("%s was written", path)
			}
			inside++
		}
		return nil
	})
	if inside != len(names)-2 { // twice two names become one
		t.Errorf("%d files", inside)
	}
}
