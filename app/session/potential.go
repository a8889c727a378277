package session

import (
	"fmt"
	"strings"

	"anodewright/anodes"
	"anodewright/hull"
)

// electrodeNames are the names by which people enter a reference electrode,
// the one that is written first.
var electrodeNames = []struct {
	electrode hull.Electrode
	names     []string
}{
	{hull.SilverChloride, []string{"Ag/AgCl", "ag-agcl-seawater", "ag-agcl", "ssc"}},
	{hull.CopperSulphate, []string{"Cu/CuSO4", "cu-cuso4", "cse"}},
	{hull.Calomel, []string{"SCE", "calomel"}},
	{hull.ZincElectrode, []string{"zinc", "zn"}},
}

// PotentialsText writes potentials as they were entered, each with its
// electrode: "-0.92 Ag/AgCl; -0.85 Cu/CuSO4".
func PotentialsText(ms []hull.Measure) string {
	var parts []string
	for _, m := range ms {
		parts = append(parts, Number(m.Potential)+" "+anodes.ElectrodeName(m.Electrode))
	}
	return strings.Join(parts, "; ")
}

// ParsePotentials reads what PotentialsText writes. A potential in volts
// without an electrode is against Ag/AgCl/seawater. The potentials stay as
// entered; anodes.Potential converts them.
func ParsePotentials(text string) ([]hull.Measure, error) {
	var ms []hull.Measure
	for _, part := range strings.Split(text, ";") {
		words := strings.Fields(part)
		if len(words) == 0 {
			continue
		}
		x, err := ParseNumber(words[0])
		if err != nil {
			return nil, fmt.Errorf("want volts and an electrode, such as -0.85 Cu/CuSO4, got %q", strings.TrimSpace(part))
		}
		m := hull.Measure{Potential: x, Electrode: hull.SilverChloride}
		rest := words[1:]
		if len(rest) > 0 && strings.EqualFold(rest[0], "V") {
			rest = rest[1:]
		}
		if len(rest) > 0 {
			if m.Electrode, err = parseElectrode(strings.Join(rest, " ")); err != nil {
				return nil, err
			}
		}
		ms = append(ms, m)
	}
	return ms, nil
}

func parseElectrode(text string) (hull.Electrode, error) {
	var first []string
	for _, e := range electrodeNames {
		for _, name := range e.names {
			if strings.EqualFold(name, text) {
				return e.electrode, nil
			}
		}
		first = append(first, e.names[0])
	}
	return "", fmt.Errorf("want one of the electrodes %s, got %q", strings.Join(first, ", "), text)
}
