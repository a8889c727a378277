package storage

import (
	"errors"
	"os"
	"path/filepath"
	"syscall"
	"testing"

	"anodewright/hull"
	"anodewright/storage/sheet"
)

// A survey sheet that does not fit on the disk, or may not be written there,
// leaves the old one as it was, and nothing beside.
func TestFullDiskKeepsTheOldSurveySheet(t *testing.T) {
	dir := smallDisk(t, "64")
	path, list := filepath.Join(dir, "survey.xlsx"), filepath.Join(dir, "survey.csv")
	docking := hull.NewDate(2027, 3, 15)
	a := sample(t)
	if err := sheet.Write(path, a, sheet.Tie{}, docking); err != nil {
		t.Fatal(err)
	}
	if err := sheet.WriteCSV(list, a); err != nil {
		t.Fatal(err)
	}
	before, listed := content(t, path), content(t, list)
	big := withZones(t, 200)
	if err := sheet.Write(path, big, sheet.Tie{}, docking); !errors.Is(err, syscall.ENOSPC) || err.Error() != "the survey sheet was not written: "+path+" cannot be written: no space left on device" {
		t.Errorf("workbook: error %v", err)
	}
	if err := sheet.WriteCSV(list, withZones(t, 2000)); !errors.Is(err, syscall.ENOSPC) {
		t.Errorf("CSV: error %v", err)
	}
	if content(t, path) != before || content(t, list) != listed {
		t.Error("an old file is another one now")
	}
	wantFiles(t, path, "survey.csv", "survey.xlsx")
}

func TestWriteProtectedFolderKeepsTheOldSurveySheet(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "survey.xlsx")
	docking := hull.NewDate(2027, 3, 15)
	if err := sheet.Write(path, sample(t), sheet.Tie{}, docking); err != nil {
		t.Fatal(err)
	}
	before := content(t, path)
	if err := os.Chmod(dir, 0o555); err != nil {
		t.Fatal(err)
	}
	asNobody(t, dir)
	if err := sheet.Write(path, renamed(t, "Other"), sheet.Tie{}, docking); err == nil || err.Error() != "the survey sheet was not written: "+path+" cannot be written: permission denied" {
		t.Errorf("error %v", err)
	}
	if content(t, path) != before {
		t.Error("the old file is another one now")
	}
}
