// Package chart turns figures over time into shapes: lines, texts and marks
// at places of a drawing, with roles in place of colours. It knows neither
// Fyne nor the domain; a painter gives the roles their colours.
//
// Times are days on any scale, places are pixels from the upper left corner.
package chart

import (
	"fmt"
	"math"
	"strconv"

	"anodewright/app/say"
)

// Role is what a shape means; the painter chooses its colour and dash.
type Role int

// The roles.
const (
	Frame  Role = iota // axes
	Rule               // fine lines of the grid
	First              // the first series
	Second             // the second
	Third              // the third
	Limit              // a limit, dashed
	Event              // a docking
	Today              // the date today
	Label              // text
	Found              // what a survey found, as marks
)

// Series is a line through points.
type Series struct {
	Name string
	Role Role
	X, Y []float64
}

// Steps is a series that keeps each value from one time to the next: one value
// less than times.
func Steps(name string, role Role, times, values []float64) Series {
	s := Series{Name: name, Role: role}
	for i, v := range values {
		s.X = append(s.X, times[i], times[i+1])
		s.Y = append(s.Y, v, v)
	}
	return s
}

// Dot is one point that stands for itself, as a reading, with the range that it
// allows; Low and High are Y where it allows none.
type Dot struct {
	X, Y, Low, High float64
	Text            string // read when it is pointed at
}

// Mark is a vertical line with a word.
type Mark struct {
	X    float64
	Text string
	Role Role
}

// Level is a horizontal line with a word.
type Level struct {
	Y    float64
	Text string
}

// Chart is one drawing.
type Chart struct {
	Title    string // with the unit
	Series   []Series
	Levels   []Level
	Marks    []Mark
	Dots     []Dot
	From, To float64 // what is shown: points outside are cut off
	Least    float64 // the axis reaches down to this at least
	Most     float64 // and up to this
	Letters  int     // room for so many at the left at least, to line charts up
	// XTicks are the places of labels on the time axis.
	XTicks []Tick
}

// Tick is a labelled place on an axis.
type Tick struct {
	At   float64
	Text string
}

// Line is a straight line of a drawing.
type Line struct {
	X1, Y1, X2, Y2 float32
	Role           Role
}

// Text is a word of a drawing. Anchor is where X lies in it: 0 its left, 0.5
// its middle, 1 its right end. Y is its middle.
type Text struct {
	X, Y   float32
	Anchor float32
	Text   string
	Role   Role
}

// Drawing is a chart laid out in a size.
type Drawing struct {
	Lines []Line
	Texts []Text
	plot  rect
	chart *Chart
	low   float64
	high  float64
}

type rect struct{ x, y, w, h float32 }

// Lay draws the chart in a size; em is the height of its text.
func (c *Chart) Lay(width, height, em float32) *Drawing {
	d := &Drawing{chart: c}
	d.low, d.high = c.span()
	n := max(2, int(height/(3.2*em)))
	ticks := Ticks(d.low, d.high, n)
	for len(ticks) < 2 && n < 12 {
		n++
		ticks = Ticks(d.low, d.high, n)
	}
	left := float32(c.Letters)
	for _, t := range ticks {
		left = max(left, float32(len([]rune(t.Text))))
	}
	d.plot = rect{x: (left*0.62 + 1) * em, y: 2.1 * em, w: 0, h: 0}
	d.plot.w, d.plot.h = width-d.plot.x-0.8*em, height-d.plot.y-1.8*em
	if d.plot.w < 2*em || d.plot.h < em {
		return d
	}
	d.text(0.4*em, 1.1*em, 0, c.Title, Label)
	for _, t := range ticks {
		y := d.y(t.At)
		d.line(d.plot.x, y, d.plot.x+d.plot.w, y, Rule)
		d.text(d.plot.x-0.5*em, y, 1, t.Text, Label)
	}
	for _, t := range c.XTicks {
		if t.At >= c.From && t.At <= c.To {
			x := d.x(t.At)
			d.line(x, d.plot.y+d.plot.h, x, d.plot.y+d.plot.h+0.3*em, Frame)
			d.text(x, d.plot.y+d.plot.h+0.9*em, 0.5, t.Text, Label)
		}
	}
	d.line(d.plot.x, d.plot.y+d.plot.h, d.plot.x+d.plot.w, d.plot.y+d.plot.h, Frame)
	for _, m := range c.Marks {
		if m.X < c.From || m.X > c.To {
			continue
		}
		x := d.x(m.X)
		d.line(x, d.plot.y, x, d.plot.y+d.plot.h, m.Role)
		if m.Text != "" {
			// Left of its line, but not over the figures of the axis.
			at, anchor := x-0.3*em, float32(1)
			if at-0.62*em*float32(len([]rune(m.Text))) < d.plot.x {
				at, anchor = x+0.3*em, 0
			}
			d.text(at, d.plot.y+0.7*em, anchor, m.Text, m.Role)
		}
	}
	for _, l := range c.Levels {
		y := d.y(l.Y)
		d.line(d.plot.x, y, d.plot.x+d.plot.w, y, Limit)
		d.text(d.plot.x+d.plot.w, y-0.8*em, 1, l.Text, Limit)
	}
	for _, s := range c.Series {
		d.series(s, 0.7*em)
	}
	for _, dot := range c.Dots {
		d.dot(dot, 0.32*em)
	}
	return d
}

// dot draws a cross, with a line over its range.
func (d *Drawing) dot(p Dot, r float32) {
	if p.X < d.chart.From || p.X > d.chart.To {
		return
	}
	x, y := d.x(p.X), d.y(p.Y)
	d.line(x-r, y-r, x+r, y+r, Found)
	d.line(x-r, y+r, x+r, y-r, Found)
	if p.High > p.Low {
		d.line(x, d.y(p.High), x, d.y(p.Low), Found)
	}
}

// series draws one line; the second of a chart in dashes, so that colour alone
// does not tell it from the first.
func (d *Drawing) series(s Series, dash float32) {
	along := float32(0)
	for i := 1; i < len(s.X); i++ {
		a, b, ok := d.chart.within(s, i)
		if !ok {
			continue
		}
		x1, y1, x2, y2 := d.x(a.At), d.y(a.Y), d.x(b.At), d.y(b.Y)
		length := float32(math.Hypot(float64(x2-x1), float64(y2-y1)))
		if s.Role != Second || length == 0 {
			d.line(x1, y1, x2, y2, s.Role)
			continue
		}
		for at := float32(0); at < length; {
			step := dash - float32(math.Mod(float64(along), float64(dash)))
			step = min(max(step, 0.01*dash), length-at)
			if int(along/dash)%2 == 0 {
				a, b := at/length, (at+step)/length
				d.line(x1+a*(x2-x1), y1+a*(y2-y1), x1+b*(x2-x1), y1+b*(y2-y1), s.Role)
			}
			at, along = at+step, along+step
			if length-at < 1e-3 {
				break
			}
		}
	}
}

// place is a point in the chart's own figures.
type place struct{ At, Y float64 }

// within returns the part of a series' i-th stretch that lies in the times
// shown.
func (c *Chart) within(s Series, i int) (a, b place, ok bool) {
	a, b = place{s.X[i-1], s.Y[i-1]}, place{s.X[i], s.Y[i]}
	if b.At < c.From || a.At > c.To {
		return a, b, false
	}
	at := func(x float64) place {
		return place{x, a.Y + (b.Y-a.Y)*(x-a.At)/(b.At-a.At)}
	}
	from, to := a, b
	if a.At < c.From {
		from = at(c.From)
	}
	if b.At > c.To {
		to = at(c.To)
	}
	return from, to, true
}

// span is the range of the vertical axis.
func (c *Chart) span() (low, high float64) {
	low, high = c.Least, c.Most
	for _, s := range c.Series {
		for _, y := range s.Y {
			low, high = min(low, y), max(high, y)
		}
	}
	for _, l := range c.Levels {
		low, high = min(low, l.Y), max(high, l.Y)
	}
	for _, p := range c.Dots {
		low, high = min(low, p.Y, p.Low), max(high, p.Y, p.High)
	}
	if high <= low {
		high = low + 1
	}
	return low, high + 0.06*(high-low)
}

func (d *Drawing) x(at float64) float32 {
	c := d.chart
	return d.plot.x + d.plot.w*float32((at-c.From)/(c.To-c.From))
}

func (d *Drawing) y(at float64) float32 {
	return d.plot.y + d.plot.h*float32(1-(at-d.low)/(d.high-d.low))
}

// At returns the time at a place of the drawing, and whether it lies in the
// plot.
func (d *Drawing) At(x float32) (float64, bool) {
	if d.plot.w <= 0 || x < d.plot.x || x > d.plot.x+d.plot.w {
		return 0, false
	}
	c := d.chart
	return c.From + (c.To-c.From)*float64((x-d.plot.x)/d.plot.w), true
}

// Cursor is the vertical line at a time.
func (d *Drawing) Cursor(at float64) Line {
	x := d.x(at)
	return Line{x, d.plot.y, x, d.plot.y + d.plot.h, Today}
}

func (d *Drawing) line(x1, y1, x2, y2 float32, role Role) {
	d.Lines = append(d.Lines, Line{x1, y1, x2, y2, role})
}

func (d *Drawing) text(x, y, anchor float32, text string, role Role) {
	d.Texts = append(d.Texts, Text{x, y, anchor, text, role})
}

// Ticks returns places at 1, 2 or 5 times a power of ten between low and high,
// about n of them.
func Ticks(low, high float64, n int) []Tick {
	if !(high > low) || n < 1 {
		return nil
	}
	rough := (high - low) / float64(n)
	power := math.Pow(10, math.Floor(math.Log10(rough)))
	step := 10 * power
	for _, m := range []float64{1, 2, 5} {
		if m*power >= rough {
			step = m * power
			break
		}
	}
	decimals := max(0, int(-math.Floor(math.Log10(step)+1e-9)))
	var ticks []Tick
	for i := math.Ceil(low/step - 1e-9); i*step <= high*(1+1e-12)+1e-12; i++ {
		x := i * step
		if x == 0 {
			x = 0 // no minus zero
		}
		ticks = append(ticks, Tick{x, say.Decimal(strconv.FormatFloat(x, 'f', decimals, 64))})
	}
	return ticks
}

// Read returns each series' value at a time, by the nearest point, as words.
func (c *Chart) Read(at float64) []string {
	var words []string
	for _, s := range c.Series {
		best := -1
		for i := range s.X {
			if best < 0 || math.Abs(s.X[i]-at) < math.Abs(s.X[best]-at) {
				best = i
			}
		}
		if best >= 0 {
			words = append(words, s.Name+" "+say.Decimal(fmt.Sprintf("%.3g", s.Y[best])))
		}
	}
	return words
}
