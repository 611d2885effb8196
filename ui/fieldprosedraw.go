package ui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
)

// CreateRenderer draws the pieces.
func (p *prose) CreateRenderer() fyne.WidgetRenderer {
	r := &proseRenderer{prose: p}
	r.Refresh()
	return r
}

// proseRenderer holds a text for every piece and a line under every input's piece.
type proseRenderer struct {
	prose   *prose
	texts   []*canvas.Text
	lines   []*canvas.Line
	objects []fyne.CanvasObject
}

func (r *proseRenderer) Destroy()                     {}
func (r *proseRenderer) Layout(fyne.Size)             {}
func (r *proseRenderer) MinSize() fyne.Size           { return r.prose.MinSize() }
func (r *proseRenderer) Objects() []fyne.CanvasObject { return r.objects }

func (r *proseRenderer) Refresh() {
	p := r.prose
	r.objects = r.objects[:0]
	lines := 0
	for i, w := range p.pieces {
		if w.run >= 0 && w.run == p.editing && p.entry != nil {
			p.entry.Move(w.at)
			p.entry.Resize(w.size)
			r.objects = append(r.objects, p.entry)
			continue
		}
		t := r.text(i)
		t.Text, t.TextSize = w.text, p.textSize()
		linked := p.dress(t, w.run)
		t.Move(w.at)
		t.Resize(w.size)
		r.objects = append(r.objects, t)
		if linked {
			r.objects = append(r.objects, r.line(lines, w, t.Color))
			lines++
		}
	}
	canvas.Refresh(p)
}

// dress gives a text the looks of its run and tells whether it is underlined.
func (p *prose) dress(t *canvas.Text, i int) bool {
	looks, linked := quiet, false
	switch {
	case i >= 0:
		looks, linked = p.runs[i].tone, p.runs[i].linked()
	case p.wrong:
		looks = alarm
	}
	t.TextStyle, t.Color = looks.style(), looks.colour(p)
	if i < 0 {
		t.TextStyle = fyne.TextStyle{}
	}
	if linked && looks != old && looks != alarm {
		t.Color = theme.CurrentForWidget(p).Color(theme.ColorNamePrimary, fyne.CurrentApp().Settings().ThemeVariant())
	}
	return linked
}

func (r *proseRenderer) text(i int) *canvas.Text {
	for len(r.texts) <= i {
		r.texts = append(r.texts, &canvas.Text{})
	}
	return r.texts[i]
}

func (r *proseRenderer) line(i int, w piece, c color.Color) *canvas.Line {
	for len(r.lines) <= i {
		r.lines = append(r.lines, &canvas.Line{})
	}
	l := r.lines[i]
	l.StrokeColor, l.StrokeWidth = c, 1
	if w.run == r.prose.hovered {
		l.StrokeWidth = 2
	}
	y := w.at.Y + w.size.Height - 1
	l.Position1, l.Position2 = fyne.NewPos(w.at.X, y), fyne.NewPos(w.at.X+w.size.Width, y)
	return l
}
