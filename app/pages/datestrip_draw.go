package pages

import (
	"fmt"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"anodewright/app/look"
	"anodewright/app/session"
	"anodewright/hull"
)

type stripRenderer struct{ s *dateStrip }

func (r *stripRenderer) Destroy()                     {}
func (r *stripRenderer) Objects() []fyne.CanvasObject { return r.s.objects }
func (r *stripRenderer) MinSize() fyne.Size           { return fyne.NewSize(look.Px(200), look.Px(44)) }
func (r *stripRenderer) Layout(fyne.Size)             { r.s.draw() }

func (r *stripRenderer) Refresh() {
	r.s.draw()
	canvas.Refresh(r.s)
}

// labelTop is where the labels begin.
func labelTop() float32 { return look.Px(2) }

// span is a stretch of a line that a text takes.
type span struct{ from, to float32 }

// draw makes the strip: labels above the line, years below it.
func (s *dateStrip) draw() {
	s.objects = nil
	size := s.Size()
	if s.to <= s.from || size.Width < 80 || size.Height < 20 {
		return
	}
	height := fyne.MeasureText("0", pictureText(), fyne.TextStyle{}).Height
	axis := labelTop() + height + look.Px(7)
	if s.focused {
		r := canvas.NewRectangle(look.Color(look.ColorSurface))
		r.StrokeColor, r.StrokeWidth, r.CornerRadius = look.Color(look.ColorAccent), look.Px(1.5), look.Px(4)
		r.Resize(size)
		s.objects = append(s.objects, r)
	}
	s.rule(s.x(s.from), axis, s.x(s.to), axis, look.Px(1.6), look.ColorInk)
	s.years(axis, height)
	for i := len(s.marks) - 1; i >= 0; i-- {
		s.mark1(s.marks[i], axis)
	}
	taken := []span{s.pill(axis, height)}
	for _, m := range s.marks {
		c := look.ColorMuted
		if m.kind == markOrder || m.kind == markToday {
			c = look.ColorAccent
		}
		t := canvas.NewText(m.label, look.Color(c))
		t.TextSize = pictureText()
		w, x, gap := t.MinSize().Width, s.x(m.date), look.Px(7)
		sides := []float32{x + gap, x - gap - w}
		if m.kind == markOrder { // its docking follows at the right
			sides[0], sides[1] = sides[1], sides[0]
		}
		for _, left := range sides {
			if free(taken, span{left - gap/2, left + w + gap/2}) && left >= 0 && left+w <= size.Width {
				s.text(t, left, labelTop())
				taken = append(taken, span{left, left + w})
				break
			}
		}
		if m.kind != markToday && m.kind != markSurvey {
			taken = append(taken, span{x - look.Px(4), x + look.Px(4)})
		}
	}
}

func free(taken []span, s span) bool {
	for _, t := range taken {
		if s.from < t.to && t.from < s.to {
			return false
		}
	}
	return true
}

func (s *dateStrip) text(t *canvas.Text, x, y float32) {
	t.Resize(t.MinSize())
	t.Move(fyne.NewPos(x, y))
	s.objects = append(s.objects, t)
}

func (s *dateStrip) rule(x1, y1, x2, y2, width float32, c fyne.ThemeColorName) {
	l := canvas.NewLine(look.Color(c))
	l.StrokeWidth = width
	l.Position1, l.Position2 = fyne.NewPos(x1, y1), fyne.NewPos(x2, y2)
	s.objects = append(s.objects, l)
}

// years writes the years' beginnings, as many as there is room for.
func (s *dateStrip) years(axis, height float32) {
	first, last := s.from.Time().Year()+1, s.to.Time().Year()
	room := s.Size().Width - 2*s.margin()
	step := 1
	for float32(last-first+1)/float32(step)*look.Px(46) > room {
		step++
	}
	for y := first; y <= last; y++ {
		x := s.x(hull.NewDate(y, 1, 1))
		s.rule(x, axis-look.Px(3), x, axis+look.Px(3), look.Px(1), look.ColorInk)
		if (y-first)%step != 0 {
			continue
		}
		t := canvas.NewText(fmt.Sprint(y), look.Color(look.ColorMuted))
		t.TextSize = pictureText()
		w := t.MinSize().Width
		s.text(t, min(max(x-w/2, 0), s.Size().Width-w), axis+look.Px(4))
	}
}

// mark1 draws one mark: a block for a docking, a line for an order-by date
// and for today, a ring for a survey.
func (s *dateStrip) mark1(m stripMark, axis float32) {
	x := s.x(m.date)
	switch m.kind {
	case markDocking:
		r := canvas.NewRectangle(look.Color(look.ColorInk))
		r.Resize(fyne.NewSize(look.Px(7), look.Px(12)))
		r.Move(fyne.NewPos(x-look.Px(3.5), axis-look.Px(12)))
		s.objects = append(s.objects, r)
	case markOrder:
		s.rule(x, axis-look.Px(14), x, axis+look.Px(2), look.Px(2), look.ColorAccent)
	case markToday:
		for d := float32(0); d < 4; d++ {
			s.rule(x, axis-look.Px(14-5*d), x, axis-look.Px(11.5-5*d), look.Px(1.5), look.ColorAccent)
		}
	case markSurvey:
		c := canvas.NewCircle(look.Color(look.ColorSurface))
		c.StrokeColor, c.StrokeWidth = look.Color(look.ColorInk), look.Px(1.5)
		c.Resize(fyne.NewSize(look.Px(9), look.Px(9)))
		c.Move(fyne.NewPos(x-look.Px(4.5), axis-look.Px(4.5)))
		s.objects = append(s.objects, c)
	}
}

// pill draws the cursor with its date, and returns what the date takes.
func (s *dateStrip) pill(axis, height float32) span {
	x := s.x(s.cursor)
	bar := canvas.NewRectangle(look.Color(look.ColorAccent))
	bar.CornerRadius = look.Px(1.5)
	bar.Resize(fyne.NewSize(look.Px(4), axis+look.Px(10)))
	bar.Move(fyne.NewPos(x-look.Px(2), labelTop()))
	t := canvas.NewText(session.Day(s.cursor), look.Color(look.ColorOnAccent))
	t.TextSize, t.TextStyle = pictureText(), fyne.TextStyle{Bold: true}
	w := t.MinSize().Width + look.Px(14)
	right, left := x+look.Px(5), x-look.Px(5)-w
	// the date goes where it hides less
	if right+w <= s.Size().Width && (left < 0 || s.hidden(right, right+w) <= s.hidden(left, left+w)) {
		left = right
	}
	box := canvas.NewRectangle(look.Color(look.ColorAccent))
	box.CornerRadius = (height + look.Px(1)) / 2
	box.Resize(fyne.NewSize(w, height+look.Px(1)))
	box.Move(fyne.NewPos(left, labelTop()))
	s.objects = append(s.objects, bar, box)
	s.text(t, left+look.Px(7), labelTop()+look.Px(0.5))
	return span{min(left, x) - look.Px(3), max(left+w, x) + look.Px(3)}
}

// hidden weighs the marks between two places.
func (s *dateStrip) hidden(from, to float32) (n int) {
	for _, m := range s.marks {
		if x := s.x(m.date); x > from && x < to {
			n += 1 + 2*int(markSurvey-m.kind)
		}
	}
	return n
}
