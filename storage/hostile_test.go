package storage

import (
	"errors"
	"fmt"
	"runtime"
	"strings"
	"testing"
)

// A register with anything in it that the program did not make is refused.
func TestForeignPartsAreRefused(t *testing.T) {
	for name, statement := range map[string]string{
		"view":             `CREATE VIEW spy AS SELECT * FROM asset`,
		"view for a table": `ALTER TABLE setting RENAME TO hidden; CREATE VIEW setting AS SELECT * FROM hidden`,
		"trigger on views": `CREATE VIEW v AS SELECT 1; CREATE TRIGGER w INSTEAD OF INSERT ON v BEGIN DELETE FROM history; END`,
		"index":            `CREATE INDEX slow ON asset (upper(name))`,
		"generated column": `ALTER TABLE asset ADD COLUMN twice TEXT AS (body || body) VIRTUAL`,
		"default column":   `ALTER TABLE draft ADD COLUMN more TEXT DEFAULT 'x'`,
		"search table":     `CREATE VIRTUAL TABLE words USING fts5(body)`,
		"tree table":       `CREATE VIRTUAL TABLE boxes USING rtree(id, x, y)`,
		"table":            `CREATE TABLE more (id TEXT)`,
		"recursive view":   `CREATE VIEW endless AS WITH RECURSIVE n(x) AS (SELECT 1 UNION ALL SELECT x + 1 FROM n) SELECT x FROM n`,
		"looser checks":    `DROP TABLE setting; CREATE TABLE setting (name TEXT, value TEXT)`,
	} {
		t.Run(name, func(t *testing.T) {
			path := newPath(t)
			r, _ := added(t, path)
			r.Close()
			raw(t, path, statement)
			before := content(t, path)
			if r, err := Open(path); !errors.Is(err, ErrDamaged) {
				t.Errorf("told %v", err)
				if err == nil {
					r.Close()
				}
			}
			if content(t, path) != before {
				t.Error("the file was changed")
			}
		})
	}
}

// Rows that no program of ours wrote give errors in words, never a panic nor
// much memory, and leave the other assets readable.
func TestHostileRows(t *testing.T) {
	asset := func(column, value string) string { return fmt.Sprintf(`UPDATE asset SET %s = %s`, column, value) }
	history := func(column, value string) string { return fmt.Sprintf(`UPDATE history SET %s = %s`, column, value) }
	nested := `'{"format":"anodewright-asset","version":1,"name":' || replace(hex(zeroblob(50000)), '00', '[[') || '}'`
	for name, statement := range map[string]string{
		"no asset":             asset("body", `'{}'`),
		"not JSON":             asset("body", `'x'`),
		"nothing":              asset("body", `''`),
		"bytes":                asset("body", `x'fffe00'`),
		"zeros":                asset("body", `zeroblob(1000000)`),
		"other encoding":       asset("body", `CAST(x'ff7b00227d' AS TEXT)`),
		"deep":                 asset("body", nested),
		"huge":                 asset("body", `replace(hex(zeroblob(20000000)), '0', ' ')`),
		"huge number":          asset("body", `replace(body, '2100', '1e999')`),
		"number for a name":    asset("name", `1e300`),
		"name of bytes":        asset("name", `x'00ff'`),
		"name of marks":        asset("name", `char(0x202e, 0, 7, 27) || 'x'`),
		"long name":            asset("name", `hex(zeroblob(500000))`),
		"no time":              asset("changed", `'yesterday'`),
		"unknown kind":         asset("kind", `'castle'`),
		"last revision":        asset("rev", `9223372036854775807`),
		"place":                asset("place", `'first'`),
		"splice outside":       history("keep_head", `9223372036854775807`),
		"splice of both":       history("keep_tail", `9223372036854775807`) + `;` + history("keep_head", `9223372036854775807`),
		"history of bytes":     history("body", `x'ff'`),
		"history without end":  `WITH RECURSIVE n(x) AS (SELECT 2 UNION ALL SELECT x + 1 FROM n WHERE x < 20000) INSERT INTO history SELECT asset_id, x, changed, who, 'changed', 'x', name, kind, 0, 0, '' FROM history, n WHERE rev = 1`,
		"unknown deed":         history("deed", `'sold'`),
		"draft of nowhere":     `INSERT INTO draft SELECT id, 'zones[99999999999].x', 'y' FROM asset`,
		"draft of marks":       `INSERT INTO draft SELECT id, char(0x202e), char(0) FROM asset`,
		"setting of any bytes": `INSERT INTO setting VALUES ('open asset', x'ff00')`,
	} {
		t.Run(name, func(t *testing.T) {
			path := newPath(t)
			r, id := added(t, path)
			other, err := r.Add(renamed(t, "Skua Rest"), "")
			if err != nil {
				t.Fatal(err)
			}
			r.Close()
			parts := strings.Split(statement, ";")
			for i, part := range parts {
				if strings.HasPrefix(part, "UPDATE asset") {
					parts[i] += fmt.Sprintf(` WHERE id = '%s'`, id)
				}
				if strings.HasPrefix(part, "UPDATE history") {
					parts[i] += fmt.Sprintf(` WHERE asset_id = '%s'`, id)
				}
			}
			raw(t, path, strings.Join(parts, ";"))

			var before, after runtime.MemStats
			runtime.ReadMemStats(&before)
			r, err = Open(path, User("Ines"), Clock(fixed))
			if err == nil {
				defer r.Close()
				// All that the app asks for; each may fail in words.
				var errs []error
				add := func(err error) { errs = append(errs, err) }
				list, err := r.List()
				add(err)
				_, rev, err := r.Load(id)
				add(err)
				_, err = r.History(id)
				add(err)
				_, err = r.At(id, 1)
				add(err)
				_, err = r.Drafts(id)
				add(err)
				_, err = r.Setting("open asset")
				add(err)
				_, err = r.Save(id, rev, renamed(t, "Tern again"), "")
				add(err)
				for _, err := range errs {
					if e := new(Error); err != nil && !errors.As(err, &e) && !errors.Is(err, ErrClash) || err != nil && len(err.Error()) > 2000 {
						t.Errorf("told %T %.300v", err, err)
					}
				}
				if a, _, err := r.Load(other); err != nil || a.Name != "Skua Rest" {
					t.Errorf("the other asset: %v", err)
				}
				if err == nil && len(list) > 2 {
					t.Errorf("%d assets", len(list))
				}
			} else if e := new(Error); !errors.As(err, &e) {
				t.Errorf("told %T %v", err, err)
			}
			runtime.ReadMemStats(&after)
			if used := after.TotalAlloc - before.TotalAlloc; used > 600<<20 {
				t.Errorf("%d MB were used", used>>20)
			}
		})
	}
}

// A register in another encoding of text is one like any other, or refused.
func TestRegisterInUTF16(t *testing.T) {
	path := newPath(t)
	raw(t, path, `PRAGMA encoding = 'UTF-16le'; CREATE TABLE x (y); DROP TABLE x`)
	raw(t, path, fmt.Sprintf(`PRAGMA application_id = %d; PRAGMA user_version = 1`, applicationID))
	for _, script := range scripts {
		raw(t, path, script)
	}
	r, err := Open(path, User("Ines"), Clock(fixed))
	if err != nil {
		if e := new(Error); !errors.As(err, &e) {
			t.Errorf("told %v", err)
		}
		return
	}
	defer r.Close()
	id, err := r.Add(renamed(t, "Ærø 船"), "")
	if err != nil {
		t.Fatal(err)
	}
	if a, _, err := r.Load(id); err != nil || a.Name != "Ærø 船" {
		t.Errorf("read back: %v", err)
	}
}
