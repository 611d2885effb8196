package ui

import (
	"context"
	"image"
	"image/color"
	"image/draw"

	"packrise/render"
	"packrise/ui/latest"
)

// painter makes the section's picture beside the window's goroutine, the newest request first, and keeps the heat map between pictures that differ in
// what lies over it only.
type painter struct {
	runner *latest.Runner[sheet, *picture]

	// touched on the runner's goroutine only
	heatOf     heatKey
	heat       *image.RGBA
	heatCoarse bool
}

// sheet is one picture to make.
type sheet struct {
	scene     render.Scene
	scale     render.Scale
	view      render.View
	style     render.Style
	paper     color.Color
	coarse    bool // quick: the heat map is sampled coarsely unless the whole one is there
	isotherms bool
	flow      bool
	serial    uint64 // of the desk's answer
}

// picture is a finished one.
type picture struct {
	img    *image.RGBA
	view   render.View
	coarse bool
	serial uint64
	scene  render.Scene
}

// heatKey tells heat maps apart. A field is a result's and a result never changes.
type heatKey struct {
	field render.Field
	scale render.Scale
	view  render.View
}

// newPainter starts a painter; show gets each picture on the window's goroutine.
func newPainter(hop func(func()), show func(*picture)) *painter {
	p := &painter{}
	p.runner = latest.New(p.paint, func(_ uint64, _ sheet, pic *picture) {
		hop(func() { show(pic) })
	})
	return p
}

// ask wants a picture. The one being painted is finished and shown first.
func (p *painter) ask(s sheet) { p.runner.Ask(s, false) }

func (p *painter) close() { p.runner.Close() }

func (p *painter) paint(_ context.Context, s sheet) *picture {
	img := image.NewRGBA(image.Rect(0, 0, s.view.W, s.view.H))
	draw.Draw(img, img.Rect, image.NewUniform(s.paper), image.Point{}, draw.Src)
	heat, coarse := p.heatLayer(s)
	if heat != nil {
		draw.Draw(img, img.Rect, heat, image.Point{}, draw.Over)
	}
	s.scene.Plain, s.scene.Flow = !s.isotherms, s.flow
	render.SectionLayer(render.NewRaster(img), s.scene, s.view, s.scale, s.style)
	return &picture{img: img, view: s.view, coarse: coarse, serial: s.serial, scene: s.scene}
}

// heatLayer returns the heat map, nil where nothing is solved, and whether it is a coarse one.
func (p *painter) heatLayer(s sheet) (heat *image.RGBA, coarse bool) {
	if s.scene.Field == nil {
		if len(s.scene.Readings) == 0 {
			return nil, false
		}
		return render.HeatLayer(s.scene, s.view, s.scale, false), false
	}
	key := heatKey{s.scene.Field, s.scale, s.view}
	if p.heat != nil && key == p.heatOf && (s.coarse || !p.heatCoarse) {
		return p.heat, p.heatCoarse
	}
	p.heat, p.heatOf, p.heatCoarse = render.HeatLayer(s.scene, s.view, s.scale, s.coarse), key, s.coarse
	return p.heat, p.heatCoarse
}

// seenFrom returns the picture as another view sees it, stretched by whole pixels, until a sharp one is there.
func (p *picture) seenFrom(v render.View, paper color.Color) *image.RGBA {
	out := image.NewRGBA(image.Rect(0, 0, v.W, v.H))
	draw.Draw(out, out.Rect, image.NewUniform(paper), image.Point{}, draw.Src)
	k := p.view.PxPerMM / v.PxPerMM
	column := make([]int, v.W)
	for x := range column {
		column[x] = int(float64(p.view.W)/2 + (v.CX-p.view.CX)*p.view.PxPerMM + (float64(x)+0.5-float64(v.W)/2)*k)
	}
	for y := range v.H {
		sy := int(float64(p.view.H)/2 - (v.CY-p.view.CY)*p.view.PxPerMM + (float64(y)+0.5-float64(v.H)/2)*k)
		if sy < 0 || sy >= p.view.H {
			continue
		}
		from, to := p.img.Pix[sy*p.img.Stride:], out.Pix[y*out.Stride:]
		for x, sx := range column {
			if sx >= 0 && sx < p.view.W {
				copy(to[4*x:4*x+4], from[4*sx:4*sx+4])
			}
		}
	}
	return out
}
