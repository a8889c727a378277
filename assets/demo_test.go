package assets

import (
	"encoding/json"
	"slices"
	"testing"
)

func TestDemoFleetOrder(t *testing.T) {
	var names, kinds []string
	for i, text := range Demo() {
		var head struct{ Format, Name, Kind string }
		if err := json.Unmarshal(text, &head); err != nil {
			t.Fatalf("demo file %d: %v", i, err)
		}
		if head.Format != "anodewright-asset" {
			t.Errorf("demo file %d: format %q", i, head.Format)
		}
		names = append(names, head.Name)
		kinds = append(kinds, head.Kind)
	}
	wantNames := []string{"Tern Passage", "Turnstone Fairway", "Oxbird A", "Saltings Jetty", "Eider Sands sealine"}
	wantKinds := []string{"ship", "ship", "jacket", "harbour", "pipeline"}
	if !slices.Equal(names, wantNames) || !slices.Equal(kinds, wantKinds) {
		t.Errorf("fleet is %q of kinds %q, want %q of %q", names, kinds, wantNames, wantKinds)
	}
}
