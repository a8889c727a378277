package assetfile

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"syscall"
	"testing"
)

func TestWriteFileFollowsALink(t *testing.T) {
	dir := t.TempDir()
	file, link := filepath.Join(dir, "file"), filepath.Join(dir, "link")
	if err := os.WriteFile(file, []byte("old"), 0o600); err != nil {
		t.Fatal(err)
	}
	if err := os.Symlink(file, link); err != nil {
		t.Skip("no links here:", err)
	}
	if err := WriteFile(link, []byte("new")); err != nil {
		t.Fatal(err)
	}
	if info, err := os.Lstat(link); err != nil || info.Mode()&os.ModeSymlink == 0 {
		t.Errorf("the link is gone: %v", err)
	}
	text, err := os.ReadFile(file)
	if err != nil || string(text) != "new" {
		t.Errorf("the file holds %q, %v", text, err)
	}
	if info, err := os.Stat(file); err != nil || info.Mode().Perm() != 0o600 {
		t.Errorf("the file's mode is now %v, %v", info.Mode(), err)
	}
}

// A device or a folder is never replaced by a file.
func TestWriteFileLeavesWhatIsNoFile(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "folder")
	if err := os.Mkdir(dir, 0o755); err != nil {
		t.Fatal(err)
	}
	err := WriteFile(dir, []byte("new"))
	if err == nil || !strings.Contains(err.Error(), dir+" cannot be written: it is no ordinary file") {
		t.Errorf("a folder gives %v", err)
	}
	if info, err := os.Stat(dir); err != nil || !info.IsDir() {
		t.Errorf("the folder is gone: %v", err)
	}
}

func TestWriteFileNamesThePathItWasGiven(t *testing.T) {
	path := filepath.Join(t.TempDir(), "absent", "out.xlsx")
	err := WriteFile(path, nil)
	if err == nil || !strings.HasPrefix(err.Error(), path+" cannot be written: ") {
		t.Errorf("the error is %v", err)
	}
}

// Windows tells of a file that another program has open by three numbers; on
// other systems they mean something else, and an open file can be replaced.
func TestHeldOpen(t *testing.T) {
	for code, want := range map[syscall.Errno]bool{5: true, 32: true, 33: true, 2: false, 112: false} {
		err := fmt.Errorf("rename: %w", code)
		if heldOpen("windows", err) != want || heldOpen("linux", err) {
			t.Errorf("%d: %v on Windows, %v elsewhere", code, heldOpen("windows", err), heldOpen("linux", err))
		}
	}
}
