package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/app/look"
	"anodewright/app/say"
)

// newWelcome is what a window without any asset shows: what the program is for
// and the ways to begin, the first of which gets the keyboard.
func newWelcome(f *Frame) (content fyne.CanvasObject, first *look.PushButton) {
	first = look.AccentButton(say.T("Open the demo fleet"), f.addDemo)
	buttons := container.NewHBox(first, look.Button(say.T("New asset…"), f.newAsset), look.Button(say.T("Import…"), f.importAsset))
	text := []fyne.CanvasObject{
		look.Lead(say.T("Plan which anodes to fit in which zone at which docking, and by when to order them.")),
		lift(4),
		look.Body(say.T("The demo fleet is invented: five assets to look around in and to change as you like. A new asset needs only its kind and a few dimensions; the program proposes its zones. Import reads an asset file or a zip of them; dropping one on this window does, too.")),
		lift(4), buttons, lift(4),
		look.Note(say.T("No asset yet. Everything you enter is saved at once, in the register file in your data folder, and can be taken back with Ctrl+Z. F1 tells about the page that is open.")),
	}
	return look.Card(say.T("Welcome"), container.New(column{}, text...)), first
}
