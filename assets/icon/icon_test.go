package icon

import (
	"bytes"
	"flag"
	"fmt"
	"image"
	"image/png"
	"math"
	"os"
	"testing"

	"github.com/fyne-io/oksvg"
	"github.com/srwiley/rasterx"
)

var update = flag.Bool("update", false, "write the PNG files anew from icon.svg")

// render draws the source larger and averages it down to a size.
func render(t *testing.T, size int) *image.RGBA {
	t.Helper()
	const finer = 8
	big := draw(t, size*finer)
	img := image.NewRGBA(image.Rect(0, 0, size, size))
	for y := range size {
		for x := range size {
			for c := range 4 {
				sum := 0
				for v := range finer {
					for u := range finer {
						sum += int(big.Pix[big.PixOffset(x*finer+u, y*finer+v)+c])
					}
				}
				img.Pix[img.PixOffset(x, y)+c] = uint8((sum + finer*finer/2) / (finer * finer))
			}
		}
	}
	return img
}

func draw(t *testing.T, size int) *image.RGBA {
	t.Helper()
	svg, err := os.ReadFile("icon.svg")
	if err != nil {
		t.Fatal(err)
	}
	drawing, err := oksvg.ReadIconStream(bytes.NewReader(svg))
	if err != nil {
		t.Fatal(err)
	}
	drawing.SetTarget(0, 0, float64(size), float64(size))
	img := image.NewRGBA(image.Rect(0, 0, size, size))
	drawing.Draw(rasterx.NewDasher(size, size, rasterx.NewScannerGV(size, size, img, img.Bounds())), 1)
	return img
}

// Every PNG is the source drawn at its size.
func TestPNGsAreTheSourceDrawn(t *testing.T) {
	for _, size := range Sizes {
		want := render(t, size)
		if *update {
			var b bytes.Buffer
			if err := png.Encode(&b, want); err != nil {
				t.Fatal(err)
			}
			if err := os.WriteFile(fmt.Sprintf("icon-%d.png", size), b.Bytes(), 0o644); err != nil {
				t.Fatal(err)
			}
			continue
		}
		got, err := png.Decode(bytes.NewReader(PNG(size)))
		if err != nil {
			t.Fatal(err)
		}
		if got.Bounds() != want.Bounds() {
			t.Fatalf("%d: it is %v", size, got.Bounds())
		}
		worst, opaque := 0.0, 0
		for y := range size {
			for x := range size {
				r, g, b, a := got.At(x, y).RGBA()
				R, G, B, A := want.At(x, y).RGBA()
				for _, d := range [][2]uint32{{r, R}, {g, G}, {b, B}, {a, A}} {
					worst = max(worst, math.Abs(float64(d[0])-float64(d[1]))/0xffff)
				}
				if a > 0x8000 {
					opaque++
				}
			}
		}
		// Other processors round the edges otherwise.
		if worst > 0.02 {
			t.Errorf("%d: a pixel differs by %.3f from the source; run go test ./assets/icon -update", size, worst)
		}
		if share := float64(opaque) / float64(size*size); share < 0.6 || share > 0.95 {
			t.Errorf("%d: %.0f %% of it is drawn", size, 100*share)
		}
	}
}
