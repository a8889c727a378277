package pages

import (
	"math"
	"testing"

	"anodewright/anodes"
	"anodewright/hull"
)

// Every casting of the library is drawn within its room, metal and dimensions
// included, whatever the room.
func TestSketchStaysInItsRoom(t *testing.T) {
	for _, p := range anodes.Library() {
		for _, room := range [][3]float64{{340, 150, 1}, {260, 120, 1}, {500, 240, 1.5}} {
			marks, word := sketchOf(&p, room[0], room[1], room[2])
			if p.Shape == hull.Stated {
				if word == "" || marks != nil {
					t.Errorf("%s: drawn without sizes", p.ID)
				}
				continue
			}
			figures, castings := 0, 0
			for _, m := range marks {
				if m.Form == formLabel {
					figures++
				}
				if m.Part == partMetal {
					castings++
				}
				if m.X < -0.5 || m.Y < -0.5 || m.X+m.W > room[0]+0.5 || m.Y+m.H > room[1]+0.5 || m.W < 0 || m.H < 0 || math.IsNaN(m.X+m.Y+m.W+m.H) {
					t.Errorf("%s in %v: %+v", p.ID, room, m)
				}
			}
			if word != "" || figures < 3 || castings != 2 {
				t.Errorf("%s: %d figures, %d castings, %q", p.ID, figures, castings, word)
			}
		}
	}
}

// The sketch is to scale: length to height as in the casting.
func TestSketchIsToScale(t *testing.T) {
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongFlush, Length: 1, Width: 0.15, Height: 0.12, NetMass: 45, InsertVolume: 0.0006, Utilisation: 0.85}
	marks, _ := sketchOf(p, 400, 160, 1)
	want := []float64{1 / 0.12, 0.15 / 0.12}
	var texts []string
	for _, m := range marks {
		if m.Part == partMetal {
			if got := m.W / m.H; math.Abs(got-want[0]) > 1e-9 {
				t.Errorf("%v wide for its height, want %v", got, want[0])
			}
			want = want[1:]
		}
		if m.Form == formLabel {
			texts = append(texts, m.Text)
		}
	}
	for i, text := range []string{"120", "1\u00a0000", "120", "150"} {
		if i >= len(texts) || texts[i] != text {
			t.Fatalf("dimensions %q", texts)
		}
	}
}

func TestSketchWithoutSizes(t *testing.T) {
	for _, p := range []hull.Pattern{
		{Shape: hull.ShortFlush, ExposedArea: 0.25, NetMass: 10, Utilisation: 0.8},
		{Shape: hull.Bracelet, ExposedArea: 0.5, NetMass: 10, Utilisation: 0.8},
	} {
		if marks, word := sketchOf(&p, 400, 160, 1); word == "" || marks != nil {
			t.Errorf("%s: %d marks, %q", p.Shape, len(marks), word)
		}
	}
}
