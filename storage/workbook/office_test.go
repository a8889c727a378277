package workbook_test

import (
	"encoding/csv"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

// An office suite reads the workbook and calculates the same totals.
func TestAnOfficeSuiteAgrees(t *testing.T) {
	soffice, err := exec.LookPath("soffice")
	if err != nil {
		t.Skip("LibreOffice (soffice) is not on the PATH")
	}
	a, err := assetfile.Decode(assets.Demo()[1])
	if err != nil {
		t.Fatal(err)
	}
	o := plan.Compute(a, today)
	dir := t.TempDir()
	path := filepath.Join(dir, "plan.xlsx")
	if err := workbook.Write(path, o); err != nil {
		t.Fatal(err)
	}
	// Comma, quote, UTF-8, all sheets, values as they are and not as shown.
	const filter = "csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,false,false,false,false,-1"
	cmd := exec.Command(soffice, "-env:UserInstallation=file://"+filepath.ToSlash(filepath.Join(dir, "profile")),
		"--headless", "--convert-to", filter, "--outdir", dir, path)
	if out, err := cmd.CombinedOutput(); err != nil {
		t.Fatalf("soffice: %v\n%s", err, out)
	}
	totals := func(sheet string) []string {
		f, err := os.Open(filepath.Join(dir, "plan-"+sheet+".csv"))
		if err != nil {
			t.Fatal(err)
		}
		defer f.Close()
		r := csv.NewReader(f)
		r.FieldsPerRecord = -1
		rows, err := r.ReadAll()
		if err != nil {
			t.Fatal(err)
		}
		for _, row := range rows {
			for _, v := range row {
				if strings.HasPrefix(v, "#") || strings.HasPrefix(v, "Err:") {
					t.Errorf("%s shows %q", sheet, v)
				}
			}
		}
		for _, row := range rows {
			if row[0] == "Total" {
				return row
			}
		}
		t.Fatalf("%s has no totals", sheet)
		return nil
	}
	same := func(got string, want float64) {
		t.Helper()
		if x, err := strconv.ParseFloat(got, 64); err != nil || math.Abs(x-want) > 1e-6*max(1, want) {
			t.Errorf("got %q, want %v", got, want)
		}
	}
	price, net := 0.0, 0.0
	for _, l := range o.Order {
		price += l.Price
		net += l.Net
	}
	wetted := 0.0
	for _, z := range a.Zones {
		wetted += z.WettedArea
	}
	same(totals("Schedule")[11], o.Money.Total)
	same(totals("Order")[12], net)
	same(totals("Order")[15], price)
	same(totals("Zones")[4], wetted)
}
