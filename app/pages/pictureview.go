package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/look"
	"anodewright/app/picture"
	"anodewright/app/say"
	"anodewright/hull"
)

// pictureView paints an asset with its zones in their states and tells which
// zone the mouse is on and which is pressed.
type pictureView struct {
	widget.BaseWidget
	asset    *hull.Asset
	states   []plan.ZoneState
	selected int
	hovered  int // -1 for none

	picked func(zone int)
	hover  func(zone int) // -1 when the mouse leaves

	drawing *picture.Picture
	drawn   drawnFor
	raster  *canvas.Raster
	paint   paintCache
	objects []fyne.CanvasObject
	laid    fyne.Size // that the objects are for
}

// drawnFor is what a drawing depends on.
type drawnFor struct {
	asset *hull.Asset
	size  fyne.Size
	em    float32
}

func newPictureView(picked, hover func(zone int)) *pictureView {
	v := &pictureView{picked: picked, hover: hover, hovered: -1, selected: -1}
	v.raster = canvas.NewRaster(v.pixels)
	v.ExtendBaseWidget(v)
	return v
}

// set shows an asset, the states of its zones and the selected zone.
func (v *pictureView) set(a *hull.Asset, states []plan.ZoneState, selected int) {
	same := v.asset == a && v.selected == selected && len(v.states) == len(states)
	for i := range states {
		same = same && v.states[i] == states[i]
	}
	if same {
		return
	}
	if v.asset != a {
		v.hovered = -1
	}
	v.asset, v.states, v.selected = a, states, selected
	v.Refresh()
}

// state returns a zone's state.
func (v *pictureView) state(zone int) plan.ZoneState {
	if zone < 0 || zone >= len(v.states) {
		return plan.ZoneState{}
	}
	return v.states[zone]
}

// words are a zone's state in words, or what holds it where it has none.
func (v *pictureView) words(zone int) string {
	s := v.state(zone)
	switch {
	case s.State == "" && v.states == nil:
		return say.T("computing…")
	case s.State == "":
		return heldText(v.asset, &v.asset.Zones[zone])
	case s.Cause == "":
		return say.T(string(s.State))
	}
	return say.T(string(s.State)) + causeWords(s.Cause)
}

// causeWords joins a cause to its state: "of mass" follows it, a sentence
// comes after a colon.
func causeWords(cause string) string {
	if len(cause) > 3 && cause[:3] == "of " {
		return " " + say.Sentence(cause)
	}
	return ": " + say.Sentence(cause)
}

// MouseDown selects the zone under the mouse.
func (v *pictureView) MouseDown(e *desktop.MouseEvent) {
	if zone, ok := v.at(e.Position); ok {
		v.picked(zone)
	}
}

// MouseUp implements desktop.Mouseable.
func (v *pictureView) MouseUp(*desktop.MouseEvent) {}

// MouseIn implements desktop.Hoverable.
func (v *pictureView) MouseIn(e *desktop.MouseEvent) { v.MouseMoved(e) }

// MouseMoved names the zone under the mouse.
func (v *pictureView) MouseMoved(e *desktop.MouseEvent) {
	zone, _ := v.at(e.Position)
	v.point(zone)
}

// MouseOut implements desktop.Hoverable.
func (v *pictureView) MouseOut() { v.point(-1) }

func (v *pictureView) point(zone int) {
	if zone != v.hovered {
		v.hovered = zone
		v.Refresh()
		v.hover(zone)
	}
}

func (v *pictureView) at(p fyne.Position) (zone int, ok bool) {
	if v.drawing == nil {
		return -1, false
	}
	return v.drawing.Hit(picture.Point{X: p.X, Y: p.Y})
}

// Cursor shows that a zone can be pressed.
func (v *pictureView) Cursor() desktop.Cursor {
	if v.hovered >= 0 {
		return desktop.PointerCursor
	}
	return desktop.DefaultCursor
}

// CreateRenderer implements fyne.Widget.
func (v *pictureView) CreateRenderer() fyne.WidgetRenderer { return &pictureRenderer{v} }

type pictureRenderer struct{ v *pictureView }

func (r *pictureRenderer) Destroy()                     {}
func (r *pictureRenderer) Objects() []fyne.CanvasObject { return r.v.objects }
func (r *pictureRenderer) MinSize() fyne.Size           { return fyne.NewSize(look.Px(200), look.Px(60)) }

// Layout draws only for a new size: the driver lays out anew after each
// drawing that made texts, and drawing then would never end.
func (r *pictureRenderer) Layout(size fyne.Size) {
	if size != r.v.laid {
		r.v.draw()
	}
}

func (r *pictureRenderer) Refresh() {
	r.v.draw()
	canvas.Refresh(r.v)
}

// draw lays the picture out for the present size and makes its texts. The
// filled shapes are painted when the raster asks for its pixels.
func (v *pictureView) draw() {
	v.objects = nil
	size := v.Size()
	v.laid = size
	if v.asset == nil || size.Width < 40 || size.Height < 20 {
		return
	}
	em := fyne.MeasureText("Ag", pictureText(), fyne.TextStyle{}).Height
	if key := (drawnFor{v.asset, size, em}); v.drawn != key {
		v.drawing, v.drawn = picture.Of(v.asset, size.Width, size.Height, em), key
	}
	v.raster.Resize(size)
	v.raster.Refresh()
	v.objects = append(v.objects, v.raster)
	for _, n := range v.drawing.Notes {
		t := canvas.NewText(say.Sentence(n.Text), look.Color(look.ColorMuted))
		t.TextSize = pictureText()
		m := t.MinSize()
		v.place(t, n.X-n.Anchor*m.Width, n.Y-m.Height/2)
	}
	v.labels()
}

// place adds a text, moved so far that it lies within the picture.
func (v *pictureView) place(t *canvas.Text, x, y float32) {
	m, size := t.MinSize(), v.Size()
	t.Resize(m)
	t.Move(fyne.NewPos(min(max(x, 0), max(size.Width-m.Width, 0)), min(max(y, 0), max(size.Height-m.Height, 0))))
	v.objects = append(v.objects, t)
}

func pictureText() float32 { return look.TextSize(11) }
