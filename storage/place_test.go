package storage

import (
	"path/filepath"
	"runtime"
	"testing"
)

func TestDataFolder(t *testing.T) {
	root := "/home/ines"
	if runtime.GOOS == "windows" {
		root = `C:\Users\ines` // absolute there
	}
	for _, c := range []struct {
		system string
		env    map[string]string
		want   []string // under root; nil: an error
	}{
		{"linux", map[string]string{"HOME": root}, []string{".local", "share", "anodewright"}},
		{"linux", map[string]string{"HOME": root, "XDG_DATA_HOME": "relative"}, []string{".local", "share", "anodewright"}},
		{"linux", map[string]string{"HOME": "elsewhere", "XDG_DATA_HOME": filepath.Join(root, "data")}, []string{"data", "anodewright"}},
		{"linux", nil, nil},
		{"darwin", map[string]string{"HOME": root}, []string{"Library", "Application Support", "Anodewright"}},
		{"windows", map[string]string{"LOCALAPPDATA": root}, []string{"Anodewright"}},
		{"windows", map[string]string{"USERPROFILE": root}, []string{"AppData", "Local", "Anodewright"}},
		{"windows", map[string]string{"HOME": root}, nil},
	} {
		got, err := dataFolder(c.system, func(name string) string { return c.env[name] })
		if c.want == nil {
			if err == nil {
				t.Errorf("%s with %v: %s, want an error", c.system, c.env, got)
			}
			continue
		}
		if want := filepath.Join(append([]string{root}, c.want...)...); err != nil || got != want {
			t.Errorf("%s with %v: %s, %v; want %s", c.system, c.env, got, err, want)
		}
	}
}

func TestDefaultPathIsInTheDataFolder(t *testing.T) {
	if runtime.GOOS != "linux" {
		t.Skip("XDG_DATA_HOME is for Linux")
	}
	data := t.TempDir()
	t.Setenv("XDG_DATA_HOME", data)
	if got, err := DefaultPath(); err != nil || got != filepath.Join(data, "anodewright", "register.anodewright") {
		t.Errorf("got %s, %v", got, err)
	}
}
