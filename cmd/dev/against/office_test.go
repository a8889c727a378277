package against

import (
	"os"
	"os/exec"
	"path/filepath"
	"testing"
	"time"

	"anodewright/anodes/plan"
	"anodewright/storage/workbook"
)

// BenchmarkRecalculation is a change in the program to all figures anew,
// against LibreOffice opening the exported workbook, calculating it and saving
// it; what LibreOffice takes for an empty table is taken off.
func BenchmarkRecalculation(b *testing.B) {
	soffice, err := exec.LookPath("soffice")
	if err != nil {
		b.Skip("no LibreOffice on this machine: Debian's package libreoffice-calc-nogui has it")
	}
	a := demo(b, 0)
	dir := b.TempDir()
	if err := workbook.Write(filepath.Join(dir, "plan.xlsx"), plan.Compute(a, today)); err != nil {
		b.Fatal(err)
	}
	if err := os.WriteFile(filepath.Join(dir, "empty.csv"), []byte("1\n"), 0o600); err != nil {
		b.Fatal(err)
	}
	convert := func(name string) time.Duration {
		return timed(func() {
			cmd := exec.Command(soffice, "-env:UserInstallation=file://"+filepath.Join(dir, "profile"), "--headless",
				"--convert-to", "ods", "--outdir", filepath.Join(dir, "out"), filepath.Join(dir, name))
			if out, err := cmd.CombinedOutput(); err != nil {
				b.Fatalf("soffice: %v\n%s", err, out)
			}
		})
	}
	convert("empty.csv") // makes the profile
	for b.Loop() {
		x, y := best(3, func() time.Duration {
			return once(3, func() {
				a.Zones[0].WettedArea++
				plan.Compute(a, today)
			})
		}, func() time.Duration {
			start := convert("empty.csv")
			return max(convert("plan.xlsx")-start, time.Millisecond)
		})
		faster(b, x, y)
	}
}
