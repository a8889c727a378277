// Command blank opens an empty window of the toolkit: what a start costs that
// is not the program's own.
package main

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/app"
)

func main() {
	win := app.NewWithID("blank").NewWindow("Blank")
	win.Resize(fyne.NewSize(1280, 800))
	win.ShowAndRun()
}
