package main

import (
	"os/exec"
	"strings"
	"testing"
)

// Imports point one way: hull, anodes, storage, app, cmd; assets is a leaf.
func TestImportsPointOneWay(t *testing.T) {
	list := exec.Command("go", "list", "-tags", "ci", "-f", `{{.ImportPath}} {{join .Imports " "}}`, "anodewright/...")
	list.Env = append(list.Environ(), "CGO_ENABLED=0")
	out, err := list.Output()
	if err != nil {
		t.Fatalf("go list: %v", err)
	}
	may := map[string][]string{
		"assets":  {"assets"},
		"hull":    {"assets", "hull"},
		"anodes":  {"assets", "hull", "anodes"},
		"storage": {"assets", "hull", "anodes", "storage"},
		"app":     {"assets", "hull", "anodes", "storage", "app"},
		"cmd":     {"assets", "hull", "anodes", "storage", "app", "cmd"},
	}
	packages := 0
	for _, line := range strings.Split(strings.TrimSpace(string(out)), "\n") {
		words := strings.Fields(line)
		from, ours := strings.CutPrefix(words[0], "anodewright/")
		if !ours {
			t.Errorf("package %s is in no folder", words[0])
			continue
		}
		packages++
		top, _, _ := strings.Cut(from, "/")
		for _, to := range words[1:] {
			if rest, ours := strings.CutPrefix(to, "anodewright/"); ours {
				target, _, _ := strings.Cut(rest, "/")
				allowed := false
				for _, m := range may[top] {
					allowed = allowed || m == target
				}
				if !allowed {
					t.Errorf("%s imports %s", from, rest)
				}
			}
			fyne := strings.HasPrefix(to, "fyne.io/fyne/v2")
			if fyne && (top != "app" && top != "cmd" || from == "app/session") {
				t.Errorf("%s imports %s", from, to)
			}
			if to == "fyne.io/fyne/v2/app" && top != "cmd" {
				t.Errorf("%s imports %s, which only cmd may", from, to)
			}
			if (from == "app/grid" || from == "app/look") && strings.HasPrefix(to, "anodewright/") && !strings.HasPrefix(to, "anodewright/app/look") && to != "anodewright/app/say" && !strings.HasPrefix(to, "anodewright/assets") {
				t.Errorf("%s knows the domain: %s", from, to)
			}
		}
	}
	if packages < 10 {
		t.Errorf("only %d packages were listed", packages)
	}
}
