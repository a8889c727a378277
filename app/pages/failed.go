package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/app/look"
	"anodewright/app/say"
)

// Failed says in an otherwise empty window why the register cannot be opened.
// Call it when the app has started.
func Failed(a fyne.App, win fyne.Window, err error) {
	look.Apply(a, look.System, 1)
	closes := look.AccentButton(say.T("Close"), win.Close)
	closes.OnEscape = win.Close
	text := newScrolled()
	win.SetContent(container.New(padded{}, look.Card(say.T("The register cannot be opened"),
		container.NewBorder(nil, container.NewHBox(closes), nil, nil, text.scroll))))
	text.set(
		look.Body(inWords(err)), lift(8),
		look.Body(say.T("The file was left as it is. To work with another register, start the program with -register and the name of its file; one that is not there yet is made.")))
	win.Canvas().Focus(closes)
}
