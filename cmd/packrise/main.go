// Command packrise opens the window.
package main

import (
	"fyne.io/fyne/v2/app"
	"fyne.io/fyne/v2/widget"
)

func main() {
	a := app.NewWithID("app.packrise")
	w := a.NewWindow("Packrise")
	w.SetContent(widget.NewLabel(""))
	w.ShowAndRun()
}
