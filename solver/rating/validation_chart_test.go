package rating_test

import (
	"bytes"
	"fmt"
	"image"
	"image/color"
	"image/draw"
	"image/png"
	"math"
	"testing"

	"packrise/render"
)

// Measures of the chart, in pixels.
const (
	chartWide, rowTall    = 1240, 30
	labelWide, marginTall = 400, 64
	dot                   = 4.5
)

// axis maps a ratio to a pixel, linear.
type axis struct{ from, to, x0, x1 float64 }

func (a axis) at(v float64) float64 {
	return a.x0 + (a.x1-a.x0)*(min(max(v, a.from), a.to)-a.from)/(a.to-a.from)
}

var (
	ink    = color.NRGBA{0x22, 0x22, 0x22, 0xff}
	pale   = color.NRGBA{0xd0, 0xd4, 0xd8, 0xff}
	shade  = color.NRGBA{0x00, 0x72, 0xb2, 0x28}
	filled = color.NRGBA{0x00, 0x4c, 0x80, 0xb0}
	hollow = color.NRGBA{0xd5, 0x5e, 0x00, 0xff}
)

// chart draws every ratio by family, with the band shaded, as PNG.
func chart(t *testing.T, all []family, rows []outcome) []byte {
	t.Helper()
	img := image.NewRGBA(image.Rect(0, 0, chartWide, marginTall*2+rowTall*len(all)))
	draw.Draw(img, img.Bounds(), image.White, image.Point{}, draw.Src)
	c := render.NewRaster(img)
	a := scaleFor(rows)
	a.x0, a.x1 = labelWide, chartWide-40
	chartAxis(c, a, float64(img.Bounds().Dy()))
	for i := range all {
		chartRow(c, a, &all[i], rows, float64(marginTall+i*rowTall))
	}
	chartKey(c, float64(img.Bounds().Dy())-14)
	var b bytes.Buffer
	if err := (&png.Encoder{CompressionLevel: png.BestCompression}).Encode(&b, img); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// scaleFor spans all ratios, in whole tenths.
func scaleFor(rows []outcome) axis {
	s := spreadOf(append(pick(rows, outcome.ratio, everyone), pick(rows, outcome.ratioEverywhere, everyone)...))
	return axis{from: min(0.8, math.Floor(s.low*10)/10), to: max(1.3, math.Ceil(s.high*10)/10)}
}

func everyone(outcome) bool { return true }

func chartAxis(c render.Canvas, a axis, tall float64) {
	c.Text("Computed over published", labelWide, 22, render.Font{Size: 17, Bold: true, Color: ink})
	for v := a.from; v < a.to+0.001; v += 0.05 {
		x := math.Round(a.at(v)) + 0.5
		pen := render.Pen{Width: 1, Color: pale}
		if math.Abs(v-1) < 0.001 {
			pen = render.Pen{Width: 1.5, Color: ink}
		}
		c.MoveTo(x, marginTall-6)
		c.LineTo(x, tall-marginTall+6)
		c.Stroke(pen)
		if n := math.Round(v * 20); int(n)%2 == 0 {
			c.Text(fmt.Sprintf("%.1f", v), x, marginTall-12, render.Font{Size: 14, Color: ink, AX: 0.5})
			c.Text(fmt.Sprintf("%.1f", v), x, tall-marginTall+22, render.Font{Size: 14, Color: ink, AX: 0.5})
		}
	}
}

func chartRow(c render.Canvas, a axis, f *family, rows []outcome, top float64) {
	mid := top + rowTall/2
	c.Text(f.name, labelWide-14, mid, render.Font{Size: 14, Color: ink, AX: 1, AY: 0.5})
	if f.banded() {
		x0, x1 := a.at(f.low), a.at(f.high)
		c.MoveTo(x0, top+2)
		c.LineTo(x1, top+2)
		c.LineTo(x1, top+rowTall-2)
		c.LineTo(x0, top+rowTall-2)
		c.Close()
		c.Fill(shade)
	}
	any := false
	for _, o := range rows {
		if o.family != f || o.missing != "" {
			continue
		}
		any = true
		if v := o.ratioEverywhere(); o.loose && !math.IsNaN(v) {
			c.Circle(a.at(v), mid+dot, dot-0.5)
			c.Stroke(render.Pen{Width: 1.2, Color: hollow})
		}
		if v := o.ratio(); !math.IsNaN(v) {
			c.Circle(a.at(v), mid-dot+1, dot)
			c.Fill(filled)
		}
	}
	if !any {
		c.Text(errNotDrawn.Error(), a.x0+8, mid, render.Font{Size: 13, Color: ink, AY: 0.5})
	}
}

func chartKey(c render.Canvas, y float64) {
	text := func(s string, x float64) { c.Text(s, x, y, render.Font{Size: 14, Color: ink, AY: 0.5}) }
	c.Circle(labelWide+8, y, dot)
	c.Fill(filled)
	text("clearance by the defaults' rule", labelWide+20)
	c.Circle(labelWide+258, y, dot-0.5)
	c.Stroke(render.Pen{Width: 1.2, Color: hollow})
	text("0.2 mm everywhere (parts loose in a gas)", labelWide+270)
	c.MoveTo(labelWide+590, y-8)
	c.LineTo(labelWide+618, y-8)
	c.LineTo(labelWide+618, y+8)
	c.LineTo(labelWide+590, y+8)
	c.Close()
	c.Fill(shade)
	text("band that the tests hold", labelWide+626)
}
