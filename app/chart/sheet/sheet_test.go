package sheet

import (
	"bytes"
	"encoding/xml"
	"errors"
	"image/color"
	"image/png"
	"io"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"anodewright/app/chart"
)

var (
	white = color.NRGBA{255, 255, 255, 255}
	black = color.NRGBA{0, 0, 0, 255}
	red   = color.NRGBA{200, 20, 20, 255}
)

func sample() *Sheet {
	c := &chart.Chart{
		Title: "Current, A < 10 & more", From: 0, To: 100, Series: []chart.Series{{Name: "asks", Role: chart.First, X: []float64{0, 100}, Y: []float64{5, 5}}},
		XTicks: []chart.Tick{{At: 0, Text: "2024"}, {At: 100, Text: "2025"}},
	}
	s := New(400, 160, 12, white)
	s.Add(c.Lay(400, 140, 12), 0, 20, func(r chart.Role) Ink {
		if r == chart.First {
			return Ink{red, 4, 0}
		}
		return Ink{black, 1, 0}
	})
	s.Write(4, 14, 14, "Größe ≥ 3 Ω", black)
	return s
}

func TestSVGIsWellFormedAndHoldsItsTexts(t *testing.T) {
	svg := sample().SVG()
	d := xml.NewDecoder(bytes.NewReader(svg))
	var titles []string
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			t.Fatal(err)
		}
		if e, ok := token.(xml.StartElement); ok && e.Name.Local == "title" {
			next, _ := d.Token()
			titles = append(titles, string(next.(xml.CharData)))
		}
	}
	all := strings.Join(titles, "|")
	for _, want := range []string{"Current, A < 10 & more", "2024", "Größe ≥ 3 Ω"} {
		if !strings.Contains(all, want) {
			t.Errorf("%q is not among %q", want, all)
		}
	}
	if !bytes.Contains(svg, []byte(`stroke="#c81414" stroke-width="4"`)) {
		t.Error("the series' line is not there")
	}
}

// The offsets of the table of a PDF have to point at its objects.
func TestPDFTablePointsAtItsObjects(t *testing.T) {
	pdf := sample().PDF()
	if !bytes.HasPrefix(pdf, []byte("%PDF-1.4\n")) || !bytes.HasSuffix(pdf, []byte("%%EOF\n")) {
		t.Fatal("no PDF")
	}
	entries := regexp.MustCompile(`(?m)^(\d{10}) 00000 n $`).FindAllSubmatch(pdf, -1)
	if len(entries) != 4 {
		t.Fatalf("%d objects", len(entries))
	}
	for i, e := range entries {
		at, err := strconv.Atoi(string(e[1]))
		if want := strconv.Itoa(i+1) + " 0 obj"; err != nil || !bytes.HasPrefix(pdf[at:], []byte(want)) {
			t.Errorf("object %d is not at %d", i+1, at)
		}
	}
	start := regexp.MustCompile(`startxref\n(\d+)`).FindSubmatch(pdf)
	if at, _ := strconv.Atoi(string(start[1])); !bytes.HasPrefix(pdf[at:], []byte("xref\n")) {
		t.Error("startxref does not point at the table")
	}
}

func TestPNGHasTheLineWhereItIs(t *testing.T) {
	s := sample()
	for _, scale := range []float32{1, 2} {
		data, err := s.PNG(scale)
		if err != nil {
			t.Fatal(err)
		}
		img, err := png.Decode(bytes.NewReader(data))
		if err != nil {
			t.Fatal(err)
		}
		if got := img.Bounds().Dx(); got != int(400*scale) {
			t.Errorf("scale %g: %d wide", scale, got)
		}
		var line stroke
		for _, l := range s.lines {
			if l.ink.Width == 4 {
				line = l
			}
		}
		r, g, _, _ := img.At(int((line.x1+line.x2)/2*scale), int(line.y1*scale)).RGBA()
		if r>>8 != 200 || g>>8 != 20 {
			t.Errorf("scale %g: the line's middle is %d, %d", scale, r>>8, g>>8)
		}
	}
}

func TestWidthAddsUp(t *testing.T) {
	if a, b := width("ab", 20), width("a", 20)+width("b", 20); a != b || a < 15 || a > 30 {
		t.Errorf("%v, %v", a, b)
	}
	if width("Ω", 12) == 0 {
		t.Error("Ω has no width")
	}
}
