package ui

import (
	"fyne.io/fyne/v2"

	"packrise/assets"
)

// Icon returns the program's icon.
func Icon() fyne.Resource { return fyne.NewStaticResource("icon.png", assets.Icon) }
