package look_test

import (
	"image/color"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
)

func use(t *testing.T, mode look.Mode, scale float32) fyne.App {
	t.Helper()
	a := test.NewTempApp(t)
	look.Apply(a, mode, scale)
	return a
}

func texts(o fyne.CanvasObject) (out []*canvas.Text) {
	for _, c := range test.LaidOutObjects(o) {
		if s, ok := c.(*canvas.Text); ok {
			out = append(out, s)
		}
	}
	return out
}

func TestBadgeSaysWordAndCause(t *testing.T) {
	use(t, look.Light, 1)
	b := look.StateBadge("short", "final current")
	b.Resize(b.MinSize())
	got := texts(b)
	if len(got) != 1 || got[0].Text != "short · final current" {
		t.Fatalf("badge shows %v", got)
	}
	before := b.MinSize().Width
	b.Set("sound", "")
	if got[0].Text != "sound" || b.MinSize().Width >= before {
		t.Errorf("after Set the badge says %q, %v wide", got[0].Text, b.MinSize().Width)
	}
}

// A chip with less room than it asks for keeps its text inside.
func TestBadgeShortensItsText(t *testing.T) {
	use(t, look.Light, 1)
	b := look.StateBadge("short", "no anodes are fitted, by Jun 2029")
	got := texts(b)[0]
	b.Resize(fyne.NewSize(120, b.MinSize().Height))
	if m := got.MinSize(); m.Width > 120 || !strings.HasPrefix(got.Text, "short · no") || !strings.HasSuffix(got.Text, "…") {
		t.Errorf("%q, %v wide", got.Text, m.Width)
	}
	b.Resize(b.MinSize())
	if got.Text != "short · no anodes are fitted, by Jun 2029" {
		t.Errorf("with room: %q", got.Text)
	}
}

func TestBadgeFollowsTheme(t *testing.T) {
	a := use(t, look.Light, 1)
	b := look.StateBadge("thin", "")
	test.NewTempWindow(t, b)
	light, size := texts(b)[0].Color, b.MinSize()
	look.Apply(a, look.Dark, 1.5)
	b.Refresh()
	if texts(b)[0].Color == light {
		t.Error("the badge's text kept its light colour in the dark theme")
	}
	if got := b.MinSize(); got.Height < 1.4*size.Height {
		t.Errorf("badge of height %v at scale 1.5, %v at scale 1", got.Height, size.Height)
	}
}

func TestHatchTellsStatesApart(t *testing.T) {
	count := func(word string) (n int) {
		for y := range 40 {
			for x := range 40 {
				if look.Hatched(word, float64(x), float64(y), 1) {
					n++
				}
			}
		}
		return n
	}
	thin, short := count("thin"), count("short")
	if count("sound") != 0 || count("spent") != 0 {
		t.Error("sound and spent are plain")
	}
	if thin == 0 || short <= thin {
		t.Errorf("thin has %d hatched points of 1600, short %d, want some and more", thin, short)
	}
}

func TestEllipsis(t *testing.T) {
	use(t, look.Light, 1)
	width := fyne.MeasureText("Vertical sides…", 13, fyne.TextStyle{}).Width
	if got := look.Ellipsis("Vertical sides, port and starboard", width, 13, fyne.TextStyle{}); got != "Vertical sides…" {
		t.Errorf("got %q", got)
	}
	if got := look.Ellipsis("Rudder", width, 13, fyne.TextStyle{}); got != "Rudder" {
		t.Errorf("a text that fits became %q", got)
	}
	if got := look.Ellipsis("Rudder", 0, 13, fyne.TextStyle{}); got != "…" {
		t.Errorf("without room got %q", got)
	}
}

func TestTextShrinks(t *testing.T) {
	use(t, look.Light, 1)
	s := look.Plain("held by the vertical sides")
	full := s.MinSize().Width
	s.Shrink = true
	s.Resize(fyne.NewSize(full/2, 20))
	shown := texts(s)[0]
	if w := shown.MinSize().Width; w > full/2+0.5 {
		t.Errorf("shown %q is %v wide in %v", shown.Text, w, full/2)
	}
	if s.String() != "held by the vertical sides" {
		t.Errorf("the text itself became %q", s.String())
	}
}

func TestCardKeepsContentInside(t *testing.T) {
	for _, scale := range []float32{1, 1.5} {
		use(t, look.Light, scale)
		inner := canvas.NewRectangle(color.White)
		inner.SetMinSize(fyne.NewSize(200, 100))
		c := look.Card("Zones by dockings", inner)
		c.SetExtra(look.Accented("12 640 EUR"))
		c.Resize(c.MinSize())
		test.WidgetRenderer(c).Layout(c.Size())
		p, s := inner.Position(), inner.Size()
		if s.Width < 200 || s.Height < 100 {
			t.Errorf("scale %v: content got %v", scale, s)
		}
		if p.X < look.Air(10) || p.X+s.Width > c.Size().Width-look.Air(10) || p.Y+s.Height > c.Size().Height-look.Air(10) {
			t.Errorf("scale %v: content at %v of %v in a card of %v", scale, p, s, c.Size())
		}
	}
}

func TestButtonTakesFocusOnMouseDown(t *testing.T) {
	use(t, look.Light, 1)
	field := widget.NewEntry()
	n := 0
	b := look.AccentButton("Plan", func() { n++ })
	w := test.NewTempWindow(t, container.NewVBox(field, b))
	w.Canvas().Focus(field)
	b.MouseDown(&desktop.MouseEvent{Button: desktop.MouseButtonPrimary})
	if w.Canvas().Focused() != fyne.Focusable(b) {
		t.Error("the field kept the focus")
	}
	test.Tap(b)
	if n != 1 {
		t.Errorf("tapped %d times", n)
	}
}

func TestCardGivesTheExtraALineOfItsOwn(t *testing.T) {
	use(t, look.Light, 1)
	extra := look.Accented("1 926 634 EUR · proven cheapest")
	c := look.Card("Zones by dockings", canvas.NewRectangle(color.White))
	c.SetExtra(extra)
	test.NewTempWindow(t, c)
	for _, width := range []float32{700, 300} {
		c.Resize(fyne.NewSize(width, 300))
		shown := texts(c)
		if shown[0].Text != "Zones by dockings" || shown[1].Text != extra.String() {
			t.Errorf("at %v: %q and %q", width, shown[0].Text, shown[1].Text)
		}
		if below := extra.Position().Y > 20; below != (width == 300) {
			t.Errorf("at %v the extra lies at %v", width, extra.Position())
		}
	}
}

func TestParagraphWrapsAndAsksForItsHeight(t *testing.T) {
	use(t, look.Light, 1)
	text := "With fewer than 40 new pieces the old set would be used up before the end."
	p := look.Note(text)
	test.NewTempWindow(t, p)
	p.Resize(fyne.NewSize(800, 20))
	one := p.MinSize().Height
	p.Resize(fyne.NewSize(200, 20))
	if many := p.MinSize().Height; many < 2.5*one || one > 20 {
		t.Errorf("%v high at 800, %v at 200", one, many)
	}
	got := ""
	for _, line := range texts(p) {
		got += line.Text
		if w := line.MinSize().Width; w > 200 {
			t.Errorf("the line %q is %v wide", line.Text, w)
		}
	}
	if strings.ReplaceAll(got, " ", "") != strings.ReplaceAll(text, " ", "") {
		t.Errorf("it shows %q", got)
	}
	p.SetText("")
	if p.MinSize().Height != 0 {
		t.Error("an empty paragraph takes room")
	}
}

func TestButtonActsOnKeys(t *testing.T) {
	use(t, look.Light, 1)
	n, escaped := 0, false
	b := look.Button("Close", func() { n++ })
	b.OnEscape = func() { escaped = true }
	test.NewTempWindow(t, b)
	for _, key := range []fyne.KeyName{fyne.KeyReturn, fyne.KeyEnter, fyne.KeySpace, fyne.KeyA} {
		b.TypedKey(&fyne.KeyEvent{Name: key})
	}
	if n != 3 {
		t.Errorf("pressed %d times by Return, Enter and Space", n)
	}
	if b.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape}); !escaped {
		t.Error("Escape went unheard")
	}
}
