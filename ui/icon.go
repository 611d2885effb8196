package ui

import "fyne.io/fyne/v2"

// Icon returns the program's icon, nil if the program carries none.
func Icon() fyne.Resource { return nil }
