package area

import (
	"fmt"
	"math"

	"anodewright/hull"
)

// Exposure is what surrounds a part of a member.
type Exposure string

// The exposures.
const (
	Air Exposure = "above water"
	Sea Exposure = "in the water"
	Mud Exposure = "in the sea bed"
)

// Bands are the depths in m at which the offshore code changes its current
// densities.
var Bands = [...]float64{30, 100, 300}

// Member is a straight tubular between two elevations in m, up positive and 0
// at the waterline. Length is along its axis; 0 means that it stands upright.
type Member struct {
	Diameter    float64
	Top, Bottom float64
	Length      float64
}

// Part is a piece of a member with one exposure and, in the water, within one
// depth band.
type Part struct {
	Exposure    Exposure
	Top, Bottom float64 // elevations, m
	Length      float64 // along the axis, m
	Area        float64 // m2
}

// Depth returns the depth of the part's middle in m.
func (p Part) Depth() float64 { return -(p.Top + p.Bottom) / 2 }

// Split divides a member at the waterline, at the code's depth bands down to
// the sea bed, and at the sea bed (an elevation, below 0), into parts from the
// top down. Lengths of an inclined member go by its length per metre of height:
// each part's area is pi D times its length along the axis, so the parts add up
// to the whole. A level member (top = bottom, with a length) is one part. The
// sea bed makes one part however deep the toe goes: the code asks the same of
// it at any depth.
func (m Member) Split(seaBed float64) ([]Part, error) {
	height := m.Top - m.Bottom
	length := m.Length
	if length == 0 {
		length = height
	}
	if _, err := made(Estimate{Inputs: []hull.Input{metres("diameter", m.Diameter)}}); err != nil {
		return nil, err
	}
	switch {
	case !finite(m.Top) || !finite(m.Bottom) || m.Bottom > m.Top:
		return nil, hull.Fault{Path: "bottom elevation", Want: fmt.Sprintf("a number not above the top's %g", m.Top), Got: fmt.Sprint(m.Bottom)}
	case !finite(length) || length <= 0 || length < height*(1-1e-9):
		return nil, hull.Fault{Path: "length", Want: fmt.Sprintf("a length above 0 and not below the height %g m", height), Got: fmt.Sprint(length)}
	case !finite(seaBed) || seaBed >= 0:
		return nil, hull.Fault{Path: "sea bed", Want: "an elevation below 0", Got: fmt.Sprint(seaBed)}
	}
	if height == 0 {
		return []Part{m.part(m.Top, m.Bottom, length, seaBed)}, nil
	}
	cuts := []float64{m.Top}
	for _, at := range cutsAbove(seaBed) {
		if at < m.Top && at > m.Bottom {
			cuts = append(cuts, at)
		}
	}
	cuts = append(cuts, m.Bottom)
	var parts []Part
	for i := 1; i < len(cuts); i++ {
		parts = append(parts, m.part(cuts[i-1], cuts[i], length*(cuts[i-1]-cuts[i])/height, seaBed))
	}
	return parts, nil
}

// cutsAbove lists where a member changes its exposure, from the top down: the
// waterline, the bands above the sea bed, the sea bed.
func cutsAbove(seaBed float64) []float64 {
	cuts := []float64{0}
	for _, b := range Bands {
		if -b > seaBed {
			cuts = append(cuts, -b)
		}
	}
	return append(cuts, seaBed)
}

func (m Member) part(top, bottom, length, seaBed float64) Part {
	p := Part{Exposure: Sea, Top: top, Bottom: bottom, Length: length, Area: math.Pi * m.Diameter * length}
	switch middle := (top + bottom) / 2; {
	case middle >= 0:
		p.Exposure = Air
	case middle <= seaBed:
		p.Exposure = Mud
	}
	return p
}

// Band returns the number of the depth band that the part lies in: 0 for the
// shallowest.
func (p Part) Band() int {
	for i, b := range Bands {
		if p.Depth() <= b {
			return i
		}
	}
	return len(Bands)
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }
