package assetfile

import (
	"archive/zip"
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"reflect"
	"runtime"
	"strings"
	"testing"

	"anodewright/assets"
	"anodewright/hull"
)

// zipped makes a zip of names and contents in turn.
func zipped(t testing.TB, parts ...string) []byte {
	t.Helper()
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for i := 0; i < len(parts); i += 2 {
		w, err := z.Create(parts[i])
		if err == nil {
			_, err = w.Write([]byte(parts[i+1]))
		}
		if err != nil {
			t.Fatal(err)
		}
	}
	if err := z.Close(); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func readFleet(b []byte) ([]*hull.Asset, error) { return ReadFleet(bytes.NewReader(b), int64(len(b))) }

func TestFleetKeepsWhole(t *testing.T) {
	fleet := demoFleet(t)
	twin := Clone(fleet[0]) // two assets may have one name, and any
	odd := Clone(fleet[1])
	odd.Name = "../" + strings.Repeat("長", 200) + `\:*?`
	fleet = append(fleet, twin, odd)
	path := filepath.Join(t.TempDir(), "fleet.zip")
	if err := WriteFleetFile(path, fleet); err != nil {
		t.Fatal(err)
	}
	got, err := ReadFleetFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if !reflect.DeepEqual(got, fleet) {
		t.Error("written and read again, it is another fleet")
	}
	first, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	var again bytes.Buffer
	if err := WriteFleet(&again, fleet); err != nil || !bytes.Equal(again.Bytes(), first) {
		t.Errorf("written twice, the bytes differ, error %v", err)
	}
}

func TestHostileFleets(t *testing.T) {
	good := string(assets.Demo()[0])
	many := make([]string, 0, 2*(MaxFleet+1))
	for i := range MaxFleet + 1 {
		many = append(many, fmt.Sprintf("%d.json", i), "{}")
	}
	ship := zipped(t, "ship.json", good)
	encrypted := bytes.Clone(ship)
	encrypted[6] |= 1 // the flag in the file's own head
	dir := bytes.Index(encrypted, []byte("PK\x01\x02"))
	encrypted[dir+8] |= 1 // and in the directory
	for _, c := range []struct {
		name string
		text []byte
		want string
	}{
		{"empty file", nil, "not a fleet file: it is no zip"},
		{"an asset file", []byte(good), "not a fleet file: it is no zip"},
		{"cut off", ship[:len(ship)/2], "the fleet file is damaged or cut off"},
		{"no entries", zipped(t), "holds no asset file"},
		{"a folder", zipped(t, "ships/", ""), `"ships/" in the fleet file lies in a folder`},
		{"in a folder", zipped(t, "a/ship.json", good), `"a/ship.json" in the fleet file lies in a folder`},
		{"climbing out", zipped(t, "../../ship.json", good), "lies in a folder"},
		{"a Windows path", zipped(t, `C:\ship.json`, good), "lies in a folder"},
		{"control characters", zipped(t, "a\x1b[2J.json", good), `"a\x1b[2J.json" in the fleet file has a name that is no text`},
		{"a zip in the zip", zipped(t, "fleet.zip", string(ship)), "no zip in the zip"},
		{"a program", zipped(t, "setup.exe", "MZ"), "is no asset file"},
		{"one name twice", zipped(t, "ship.json", good, "Ship.json", good), `"Ship.json" is in the fleet file twice`},
		{"too many", zipped(t, many...), "holds 2001 files; one holds at most 2000"},
		{"encrypted", encrypted, `"ship.json" in the fleet file is encrypted`},
		{"a bad asset", zipped(t, "ship.json", good, "bad.json", `{"format": "other"}`), `"bad.json" in the fleet file: format: want "anodewright-asset"`},
		{"a bomb", zipped(t, "bomb.json", strings.Repeat(" ", MaxSize+1)), `"bomb.json" in the fleet file: the file has 32 MB`},
	} {
		t.Run(c.name, func(t *testing.T) {
			fleet, err := readFleet(c.text)
			if err == nil || !strings.Contains(err.Error(), c.want) || fleet != nil {
				t.Errorf("%d assets, error %v\nwant %s", len(fleet), err, c.want)
			}
		})
	}
}

// A zip whose directory understates what its files unpack to is cut off.
func TestFleetThatLiesAboutItsSize(t *testing.T) {
	b := zipped(t, "bomb.json", strings.Repeat(" ", 4*MaxSize))
	dir := bytes.Index(b, []byte("PK\x01\x02"))
	copy(b[dir+24:dir+28], []byte{100, 0, 0, 0}) // unpacked size
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	_, err := readFleet(b)
	runtime.ReadMemStats(&after)
	if err == nil || !strings.HasPrefix(err.Error(), `"bomb.json" in the fleet file: `) {
		t.Errorf("error %v", err)
	}
	if used := after.TotalAlloc - before.TotalAlloc; used > 8*MaxSize {
		t.Errorf("%d MB were allocated to refuse it", used>>20)
	}
}

func TestHugeFleetIsRefusedUnread(t *testing.T) {
	path := filepath.Join(t.TempDir(), "fleet.zip")
	if err := os.WriteFile(path, zipped(t), 0o644); err != nil {
		t.Fatal(err)
	}
	if err := os.Truncate(path, MaxFleetSize+1<<20); err != nil {
		t.Fatal(err)
	}
	if _, err := ReadFleetFile(path); err == nil || !strings.Contains(err.Error(), "has 65 MB; one has at most 64 MB") {
		t.Errorf("error %v", err)
	}
	if _, err := ReadFleetFile(filepath.Dir(path)); err == nil || !strings.Contains(err.Error(), "no ordinary file") {
		t.Errorf("a folder gives %v", err)
	}
	if _, err := ReadFleetFile(path + ".absent"); err == nil || !strings.Contains(err.Error(), "cannot be opened") {
		t.Errorf("an absent file gives %v", err)
	}
}

// FuzzFleet asks that whatever is read ends without a panic, and that what is
// taken keeps whole.
func FuzzFleet(f *testing.F) {
	var b bytes.Buffer
	a, err := Decode(assets.Demo()[0])
	if err != nil {
		f.Fatal(err)
	}
	if err := WriteFleet(&b, []*hull.Asset{a}); err != nil {
		f.Fatal(err)
	}
	f.Add(b.Bytes())
	f.Add(zipped(f))
	f.Add(zipped(f, "../a.json", "{}"))
	f.Fuzz(func(t *testing.T, text []byte) {
		fleet, err := readFleet(text)
		if err != nil {
			return
		}
		var again bytes.Buffer
		if err := WriteFleet(&again, fleet); err != nil {
			t.Fatal(err)
		}
		if got, err := readFleet(again.Bytes()); err != nil || !reflect.DeepEqual(got, fleet) {
			t.Fatalf("not kept whole: %v", err)
		}
	})
}
