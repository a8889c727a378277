//go:build e2e && !ci && linux

package main_test

import (
	"bytes"
	"encoding/binary"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"anodewright/storage"
)

// refuses starts the app on a file that is no sound register and holds that
// it says so, leaves the file alone and ends with status 2.
func refuses(t *testing.T, content []byte, why string) {
	t.Helper()
	home := t.TempDir()
	path := filepath.Join(home, "fleet.anodewright")
	if err := os.WriteFile(path, content, 0o644); err != nil {
		t.Fatal(err)
	}
	w := openIn(t, home)
	w.still()
	if out := w.stderr.String(); !strings.Contains(out, why) {
		t.Errorf("standard error: %s", out)
	}
	w.key("Return")
	w.endsWith(2)
	if now, err := os.ReadFile(path); err != nil || !bytes.Equal(now, content) {
		t.Errorf("the file was changed (%v)", err)
	}
	if others, _ := filepath.Glob(path + "*"); len(others) != 1 {
		t.Errorf("there are more files now: %v", others)
	}
}

func TestForeignFileIsRefused(t *testing.T) {
	refuses(t, []byte("Dear yard, please find enclosed the anodes."), "it is not a register")
}

func TestDamagedRegisterIsRefused(t *testing.T) {
	refuses(t, damaged(t), "it is damaged")
}

// damaged returns a register with a page overwritten.
func damaged(t *testing.T) []byte {
	t.Helper()
	text := sound(t)
	for i := len(text) / 2; i < len(text)/2+6000 && i < len(text); i++ {
		text[i] = 0xa5
	}
	return text
}

// sound returns a register with one asset.
func sound(t *testing.T) []byte {
	t.Helper()
	path := filepath.Join(t.TempDir(), "r.anodewright")
	r, err := storage.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	if _, err := r.Add(demo(t)[0], "test"); err != nil {
		t.Fatal(err)
	}
	if err := r.Close(); err != nil {
		t.Fatal(err)
	}
	text, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return text
}

// TestNewerRegisterIsOnlyRead uses a register whose head says that a later
// program wrote it.
func TestNewerRegisterIsOnlyRead(t *testing.T) {
	content := sound(t)
	const userVersion = 60 // where SQLite's file format has it
	binary.BigEndian.PutUint32(content[userVersion:], 1000)
	home := t.TempDir()
	path := filepath.Join(home, "fleet.anodewright")
	if err := os.WriteFile(path, content, 0o644); err != nil {
		t.Fatal(err)
	}
	w := openIn(t, home, "-today", day)
	w.still()
	said, err := w.picture()
	if err != nil {
		t.Fatal(err)
	}
	w.key("Return") // closes the dialog that says so
	w.still()
	quiet, err := w.picture()
	if err != nil {
		t.Fatal(err)
	}
	if n := len(changed(said, quiet)); n < 10000 {
		t.Errorf("no dialog said that the register is only read: %d points changed", n)
	}
	w.toArea()
	w.still()
	if quiet, err = w.picture(); err != nil {
		t.Fatal(err)
	}
	w.enter("1750")
	w.still()
	if said, err = w.picture(); err != nil {
		t.Fatal(err)
	}
	if n := len(changed(said, quiet)); n < 10000 {
		t.Errorf("no dialog refused the edit: %d points changed", n)
	}
	w.key("Return")
	w.close()
	if now, err := os.ReadFile(path); err != nil || !bytes.Equal(now, content) {
		t.Errorf("the file was changed (%v)", err)
	}
}
