package ui

import (
	"math"
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"

	"packrise/solver/section"
)

// placeLines puts the ring that follows the pointer over the picture: it is where the part is wanted, in the colour of what is over where it can't be.
func (v *SectionView) placeLines() {
	d := &v.drag
	if d.mode != dragParts {
		v.wanted.Hide()
		return
	}
	w := d.wantedDisc()
	v.wanted.StrokeColor = themeColor(theme.ColorNamePrimary)
	if !v.desk.Solving() && d.off(v.desk.shownShapes()) {
		v.wanted.StrokeColor = themeColor(theme.ColorNameError)
	}
	place(v.wanted, w, v.camera, v.Size())
	v.wanted.Show()
	v.wanted.Refresh()
}

// off tells whether the first part is shown elsewhere than where it is wanted.
func (d *dragState) off(shown []section.Shape) bool {
	w := d.wantedDisc()
	i := slices.IndexFunc(shown, func(s section.Shape) bool { return s.ID == d.parts[0].ID })
	return i >= 0 && math.Hypot(shown[i].At.X-w.at.X, shown[i].At.Y-w.at.Y) > 0.05*w.r
}

// place puts a circle where the camera sees a disc.
func place(c *canvas.Circle, d disc, cam camera, size fyne.Size) {
	at, r := cam.toUnits(d.at, size), float32(d.r*cam.scale)
	put(c, at.X-r, at.Y-r, 2*r, 2*r)
}
