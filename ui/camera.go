package ui

import (
	"math"

	"fyne.io/fyne/v2"

	"packrise/render"
	"packrise/solver/section"
)

// camera is where the canvas looks: the place in the middle in millimetres and the toolkit's units per millimetre. The zero camera looks nowhere.
type camera struct {
	cx, cy float64
	scale  float64
}

// Zoom is limited so that nobody gets lost.
const (
	leastScale = 0.05 // units per mm
	mostScale  = 3000
)

// view is the camera as render's transform for a picture of w × h pixels with density pixels a unit.
func (c camera) view(w, h int, density float64) render.View {
	return render.View{CX: c.cx, CY: c.cy, PxPerMM: c.scale * density, W: w, H: h}
}

// cameraOf is the camera that sees what the view sees.
func cameraOf(v render.View, density float64) camera {
	return camera{cx: v.CX, cy: v.CY, scale: v.PxPerMM / density}
}

// toMM returns the place under a position on a canvas of the given size.
func (c camera) toMM(p fyne.Position, size fyne.Size) section.Point {
	return section.Point{
		X: c.cx + (float64(p.X)-float64(size.Width)/2)/c.scale,
		Y: c.cy - (float64(p.Y)-float64(size.Height)/2)/c.scale,
	}
}

// toUnits is the inverse of toMM.
func (c camera) toUnits(p section.Point, size fyne.Size) fyne.Position {
	return fyne.NewPos(
		float32((p.X-c.cx)*c.scale+float64(size.Width)/2),
		float32((c.cy-p.Y)*c.scale+float64(size.Height)/2),
	)
}

// zoomed magnifies by the factor and keeps the place under the position where it is.
func (c camera) zoomed(factor float64, about fyne.Position, size fyne.Size) camera {
	before := c.toMM(about, size)
	c.scale = math.Min(math.Max(c.scale*factor, leastScale), mostScale)
	after := c.toMM(about, size)
	c.cx += before.X - after.X
	c.cy += before.Y - after.Y
	return c
}

// panned shifts what is seen by so many units.
func (c camera) panned(dx, dy float32) camera {
	c.cx -= float64(dx) / c.scale
	c.cy += float64(dy) / c.scale
	return c
}
