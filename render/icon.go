package render

import (
	"image"
	"image/color"
	"math"
)

// IconSize is the side of the committed icon in pixels.
const IconSize = 512

// Icon draws the program's icon: seven conductors in a jacket on warm paper, coloured by the heat map from a cool edge to a
// hot middle, with a rising row of rungs at the side.
func Icon(size int) *image.RGBA {
	img := image.NewRGBA(image.Rect(0, 0, size, size))
	c := NewRaster(img)
	u := float64(size) / 512
	ink := lightPalette.Line
	rounded(c, 16*u, 16*u, 480*u, 480*u, 96*u)
	c.Fill(rgb(0xf4f0e4))
	rounded(c, 16*u, 16*u, 480*u, 480*u, 96*u)
	c.Stroke(Pen{Width: 4 * u, Color: rgb(0xd2cab6)})

	const x, y = 286, 262
	heat := Scale{0, 1}
	disk := func(dx, dy, r float64, fill color.NRGBA, edge float64) {
		c.Circle((x+dx)*u, (y+dy)*u, r*u)
		c.Fill(fill)
		c.Circle((x+dx)*u, (y+dy)*u, r*u)
		c.Stroke(Pen{Width: edge * u, Color: ink})
	}
	disk(0, 0, 178, heat.Color(0.12), 9)
	disk(0, 0, 153, heat.Color(0.38), 6)
	for i, t := range []float64{0.52, 0.6, 0.72, 0.66, 0.56, 0.48} {
		sin, cos := math.Sincos(float64(i)*pi/3 + pi/6)
		disk(98*cos, 98*sin, 49, heat.Color(t), 6)
		disk(98*cos, 98*sin, 27, heat.Color(t+0.12), 4)
	}
	disk(0, 0, 49, heat.Color(0.97), 6)
	disk(0, 0, 27, heat.Color(1), 4)

	// the ladder
	for i := range 64 {
		t := 1 - float64(i)/63
		rectangle(c, 60*u, (96+320*float64(i)/64)*u, 30*u, (320.0/64+0.6)*u)
		c.Fill(heat.Color(t))
	}
	rounded(c, 57*u, 93*u, 36*u, 326*u, 8*u)
	c.Stroke(Pen{Width: 7 * u, Color: ink})
	return img
}
