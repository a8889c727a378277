package pages

import (
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"anodewright/app/look"
	"anodewright/app/picture"
	"anodewright/app/say"
)

// labels writes names and states where the picture has room for them. What
// finds none is read in the line above the picture when the mouse is on it.
func (v *pictureView) labels() {
	var free []picture.Label
	var below []textLine // the texts beside zones, which free ones keep clear of
	for _, l := range v.drawing.Labels {
		if l.Free {
			free = append(free, l)
			continue
		}
		text := ""
		if texts := v.texts(l.Zone); l.Outside {
			text = v.shortened(l, texts[:len(texts)-2])
		} else {
			text = v.fitting(l.Zone, l.Box.W-look.Px(6), texts...)
		}
		if text == "" {
			continue
		}
		t := v.label(l, text)
		m := t.MinSize()
		if m.Height > l.Box.H+look.Px(3) {
			continue
		}
		x := l.Box.X
		if !l.Outside {
			x += (l.Box.W - m.Width) / 2
		}
		y := l.Box.Y + (l.Box.H-m.Height)/2
		v.place(t, x, y)
		if l.Outside {
			below = append(below, textLine{span{x, x + m.Width}, y, y + m.Height})
		}
	}
	v.freeLabels(free, below)
}

// textLine is the room that one line of text takes.
type textLine struct {
	span
	top, bottom float32
}

// texts are what may be written on a zone, from the most to the least.
func (v *pictureView) texts(zone int) []string {
	name, words := v.asset.Zones[zone].Name, v.words(zone)
	all := []string{name + " · " + words}
	if s := say.T(string(v.state(zone).State)); s != "" && s != words {
		all = append(all, name+" · "+s)
	}
	return append(all, name, words)
}

// fitting returns the first text that is no wider than given, or nothing.
func (v *pictureView) fitting(zone int, width float32, texts ...string) string {
	for _, s := range texts {
		if fyne.MeasureText(s, pictureText(), v.style(zone)).Width <= width {
			return s
		}
	}
	return ""
}

// shortened returns the first text that fits into a label, or the last with
// the zone's name cut: the state's word stays to be read.
func (v *pictureView) shortened(l picture.Label, texts []string) string {
	if s := v.fitting(l.Zone, l.Box.W, texts...); s != "" {
		return s
	}
	name := v.asset.Zones[l.Zone].Name
	end := strings.TrimPrefix(texts[len(texts)-1], name)
	size, style := pictureText(), v.style(l.Zone)
	room := l.Box.W - fyne.MeasureText(end, size, style).Width
	if room < look.Px(60) {
		return look.Ellipsis(name, l.Box.W, size, style)
	}
	return look.Ellipsis(name, room, size, style) + end
}

// style is bold for zones that are not sound.
func (v *pictureView) style(zone int) fyne.TextStyle {
	return fyne.TextStyle{Bold: v.state(zone).State.Rank() > 1}
}

func (v *pictureView) label(l picture.Label, text string) *canvas.Text {
	state := v.state(l.Zone).State
	t := canvas.NewText(text, look.Color(look.ColorInk))
	t.TextSize, t.TextStyle = pictureText(), v.style(l.Zone)
	if !l.Outside {
		_, _, t.Color = look.StateColors(string(state))
	} else if state.Rank() <= 1 {
		t.Color = look.Color(look.ColorMuted)
	}
	return t
}

// freeLabels writes the labels that share a line: the selected zone's and the
// worst states first, each as near its place as the others leave room.
func (v *pictureView) freeLabels(labels []picture.Label, below []textLine) {
	rank := func(l picture.Label) int {
		r := v.state(l.Zone).State.Rank()
		if l.Zone == v.selected {
			r += 10
		}
		return r
	}
	slices.SortStableFunc(labels, func(a, b picture.Label) int { return rank(b) - rank(a) })
	var taken []span
	gap := look.Px(10)
	for _, b := range below {
		if len(labels) > 0 && b.bottom > labels[0].Box.Y && b.top < labels[0].Box.Y+labels[0].Box.H {
			taken = append(taken, b.span)
		}
	}
	for _, l := range labels {
		for _, text := range v.texts(l.Zone)[:2] {
			t := v.label(l, text)
			m := t.MinSize()
			at := min(max(l.Box.X-m.Width/2, 0), v.Size().Width-m.Width)
			// try the place itself, then beside each text that is there
			places := []float32{at}
			for _, s := range taken {
				places = append(places, s.to+gap, s.from-gap-m.Width)
			}
			best, found := float32(0), false
			for _, x := range places {
				ok := x >= 0 && x+m.Width <= v.Size().Width && abs(x-at) <= look.Px(90)
				for _, s := range taken {
					ok = ok && (x >= s.to+gap-0.5 || x+m.Width <= s.from-gap+0.5)
				}
				if ok && (!found || abs(x-at) < abs(best-at)) {
					best, found = x, true
				}
			}
			if found {
				taken = append(taken, span{best, best + m.Width})
				v.place(t, best, l.Box.Y+(l.Box.H-m.Height)/2)
				break
			}
		}
	}
}
