package storage

import (
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"reflect"
	"regexp"
	"strings"
	"testing"
	"unicode/utf8"

	"pgregory.net/rapid"

	"anodewright/hull"
)

func TestHistoryHoldsEveryEditWhole(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	want := []*hull.Asset{sample(t)}
	for n := range 2*wholeEvery + 5 {
		a := sample(t)
		a.Name = fmt.Sprintf("Tern %c%d", 'à'+n, n)
		a.Zones[0].WettedArea = 2000 + float64(n*n)
		save(t, r, id, int64(len(want)), a, fmt.Sprintf("edit %d", n))
		want = append(want, a)
	}
	r.Close()

	r = opened(t, path)
	history, err := r.History(id)
	if err != nil || len(history) != len(want) {
		t.Fatalf("%d revisions, error %v, want %d", len(history), err, len(want))
	}
	for i, v := range history {
		deed, what := Changed, fmt.Sprintf("edit %d", i-1)
		if i == 0 {
			deed, what = Added, "imported from tern-passage.json"
		}
		if wanted := (Revision{int64(i + 1), day, "Ines", deed, what, want[i].Name, hull.Ship}); v != wanted {
			t.Errorf("got %+v, want %+v", v, wanted)
		}
		if a, err := r.At(id, v.Rev); err != nil || !reflect.DeepEqual(a, want[i]) {
			t.Errorf("revision %d: got %+v, error %v", v.Rev, a, err)
		}
	}
	if _, err := r.At(id, int64(len(want)+1)); !errors.Is(err, ErrNoRevision) {
		t.Errorf("revision that never was: %v", err)
	}
	if _, err := r.History("nobody"); !errors.Is(err, ErrNoAsset) {
		t.Errorf("asset that never was: %v", err)
	}
}

// Whatever is done to an asset adds rows to its history and leaves those that
// are there as they are, and the last one always holds what is stored.
func TestHistoryOnlyGrows(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	before := historyRows(t, r)
	step := func(deed string, err error) {
		t.Helper()
		if err != nil {
			t.Fatalf("%s: %v", deed, err)
		}
		rows := historyRows(t, r)
		if len(rows) != len(before)+1 || !reflect.DeepEqual(rows[:len(before)], before) {
			t.Fatalf("%s: history was %q, is %q", deed, before, rows)
		}
		before = rows
	}
	_, err := r.Save(id, 1, renamed(t, "Tern"), "")
	step("save", err)
	step("remove", r.Remove(id, 2))
	_, err = r.Restore(id)
	step("restore", err)
	_, err = r.Save(id, 4, sample(t), "")
	step("save again", err)

	now, rev, err := r.Load(id)
	if err != nil {
		t.Fatal(err)
	}
	if last, err := r.At(id, rev); err != nil || !reflect.DeepEqual(last, now) {
		t.Errorf("the last revision is %+v, error %v; stored is %+v", last, err, now)
	}
}

func historyRows(t *testing.T, r *Register) []string {
	t.Helper()
	rows, err := r.db.Query(`SELECT asset_id || rev || changed || who || deed || what || name || kind || keep_head || keep_tail || body
		FROM history ORDER BY rowid`)
	if err != nil {
		t.Fatal(err)
	}
	defer rows.Close()
	var all []string
	for rows.Next() {
		var s string
		if err := rows.Scan(&s); err != nil {
			t.Fatal(err)
		}
		all = append(all, s)
	}
	return all
}

// No statement of the package changes or deletes history.
func TestNoStatementChangesHistory(t *testing.T) {
	forbidden := regexp.MustCompile(`(?i)(update|delete\s+from|replace\s+into|drop\s+table|alter\s+table)\s+history`)
	files, err := filepath.Glob("*.go")
	if err != nil || len(files) == 0 {
		t.Fatal("no source files", err)
	}
	for _, file := range files {
		if strings.HasSuffix(file, "_test.go") {
			continue
		}
		text, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if found := forbidden.Find(text); found != nil {
			t.Errorf("%s: %s", file, found)
		}
	}
}

func TestHistoryThatDoesNotFollowIsDamage(t *testing.T) {
	for name, damage := range map[string]string{
		"keeps too much": `UPDATE history SET keep_head = 1000000 WHERE rev = 2`,
		"row missing":    `DELETE FROM history WHERE rev = 2`,
		"not an asset":   `UPDATE history SET keep_head = 1, keep_tail = 1 WHERE rev = 3`,
	} {
		t.Run(name, func(t *testing.T) {
			path := newPath(t)
			r, id := added(t, path)
			save(t, r, id, 1, renamed(t, "Tern"), "")
			save(t, r, id, 2, renamed(t, "Skua"), "")
			raw(t, path, damage)
			if _, err := r.At(id, 3); !errors.Is(err, ErrDamaged) {
				t.Errorf("got %v", err)
			}
		})
	}
}

func TestSplice(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		text := rapid.StringMatching(`[ab€à]{0,12}`)
		old, new := text.Draw(t, "old"), text.Draw(t, "new")
		s := spliceOf(old, new)
		if got, ok := s.apply(old); !ok || got != new {
			t.Fatalf("%+v on %q makes %q, %v; want %q", s, old, got, ok, new)
		}
		if !utf8.ValidString(s.middle) {
			t.Fatalf("the middle %q is no text", s.middle)
		}
	})
}

func TestEditTakesLittleHistory(t *testing.T) {
	old, err := encode(sample(t))
	if err != nil {
		t.Fatal(err)
	}
	changed := sample(t)
	changed.Zones[0].WettedArea = 2104
	new, err := encode(changed)
	if err != nil {
		t.Fatal(err)
	}
	if s := follow(2, old, new); s.middle != "4" {
		t.Errorf("2100 to 2104 m2 is kept as %q, want the digit", s.middle)
	}
	if s := follow(wholeEvery, old, new); s != (splice{middle: new}) {
		t.Errorf("revision %d is not whole: %+v", wholeEvery, s)
	}
}
