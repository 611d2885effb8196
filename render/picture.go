package render

import (
	"fmt"
	"image"
	"image/color"
	"image/png"
	"io"
	"math"
	"strings"
)

// Sizes of a whole picture in pixels: smaller ones have no room for words, larger ones for memory.
const (
	LeastWidth, LeastHeight = 320, 240
	MostWidth, MostHeight   = 16384, 16384
	mostPixels              = 144_000_000
)

// WritePNG draws the whole picture (sentence, ladder, section, status, notes, caution) at w × h pixels.
func WritePNG(out io.Writer, s Scene, w, h int, st Style) error {
	if w < LeastWidth || h < LeastHeight {
		return fmt.Errorf("render: a picture of %d × %d pixels is too small; use at least %d × %d", w, h, LeastWidth, LeastHeight)
	}
	if w > MostWidth || h > MostHeight || w*h > mostPixels {
		return fmt.Errorf("render: a picture of %d × %d pixels is too large; use at most %d × %d and %d million in all", w, h, MostWidth, MostHeight, mostPixels/1_000_000)
	}
	img := image.NewRGBA(image.Rect(0, 0, w, h))
	Draw(NewRaster(img), s, st)
	if err := png.Encode(out, img); err != nil {
		return fmt.Errorf("render: write picture: %w", err)
	}
	return nil
}

// Draw puts the whole picture on a canvas of any kind.
func Draw(c Canvas, s Scene, st Style) {
	w, h := c.Size()
	k := min(st.k(), w/LeastWidth, h/LeastHeight) // a scale at which nothing would fit is not obeyed
	st.Scale = k
	p := &page{c: c, s: s, st: st, k: k, pal: st.Colors(), w: w, h: h}
	p.pad = 16 * k
	if w < 640*k {
		p.pad = 10 * k
	}
	rectangle(c, 0, 0, w, h)
	c.Fill(p.pal.Paper)
	top := p.header()
	bottom := p.footer()
	left, right := 0.0, w
	if len(s.Notes) > 0 {
		if w*(1-0.26)-215*k > 1.2*(bottom-top) && w >= 980*k && bottom-top > 240*k {
			right = p.notesBeside(top, bottom)
		} else {
			bottom = p.notesBelow(top, bottom)
		}
	}
	left = p.ladderPane(top, bottom)
	p.sectionPane(left, top, right, bottom)
}

// page lays out the whole picture. Lengths in pixels.
type page struct {
	c    Canvas
	s    Scene
	st   Style
	k    float64
	pal  Palette
	w, h float64
	pad  float64
}

func (p *page) font(size float64, bold bool, col color.NRGBA) Font {
	return Font{Size: size * p.k, Bold: bold, Color: col}
}

func (p *page) measure(f Font) func(string) float64 {
	return func(t string) float64 { return p.c.MeasureText(t, f) }
}

// lines writes lines of text downwards, the first baseline 0.8 em below y, and returns where the next block begins.
func (p *page) lines(text []string, x, y, lead float64, f Font) float64 {
	for _, t := range text {
		p.c.Text(t, x, y+0.8*lead, f)
		y += lead
	}
	return y
}

func (p *page) rule(x0, y0, x1, y1 float64) {
	line(p.c, x0, y0, x1, y1, Pen{Width: p.k, Color: p.pal.Rule})
}

// sentence is the answer with the state's word in front, or what stands in its place.
func (p *page) sentence() string {
	t := strings.TrimSpace(p.s.Answer)
	word := StateOf(p.s).Word()
	switch {
	case t == "" && !p.s.solved():
		return "Not solved."
	case t == "" && word != "":
		return word + "."
	case word != "" && !beginsWithWord(t, word): // something is over, and the sentence does not say so
		return word + ". " + t
	}
	return t
}

// header draws title, sentence and second line with the state's edge at their left, and returns where it ends.
func (p *page) header() float64 {
	x, room := p.pad+16*p.k, p.w-2*p.pad-16*p.k
	size, most := 18.0, 3
	if p.w < 640*p.k {
		size = 15
	}
	if p.h < 420*p.k {
		most = 2
	}
	title, head, sub := p.font(12, false, p.pal.Quiet), p.font(size, true, p.pal.Ink), p.font(13, false, p.pal.Quiet)
	answer := Wrap(p.sentence(), room, most, p.measure(head))
	var assumed, name []string
	if p.s.Assumed != "" {
		assumed = Wrap(p.s.Assumed, room, most, p.measure(sub))
	}
	if p.s.Title != "" {
		name = []string{Elide(p.s.Title, room, p.measure(title))}
	}
	y := 10 * p.k
	end := y + float64(len(name))*17*p.k + float64(len(answer))*1.32*size*p.k + float64(len(assumed))*18*p.k + 3*p.k
	rectangle(p.c, 0, 0, p.w, end+9*p.k)
	p.c.Fill(p.pal.Sheet)
	rounded(p.c, p.pad, y, 5*p.k, end-y, 2.5*p.k)
	p.c.Fill(p.pal.StateColor(StateOf(p.s)))
	y = p.lines(name, x, y, 17*p.k, title)
	y = p.lines(answer, x, y, 1.32*size*p.k, head)
	p.lines(assumed, x, y+3*p.k, 18*p.k, sub)
	p.rule(0, end+9*p.k, p.w, end+9*p.k)
	return math.Round(end + 10*p.k)
}

// footer draws the caution at the bottom and returns where it begins.
func (p *page) footer() float64 {
	if p.s.Caution == "" {
		return p.h
	}
	f := p.font(12, false, p.pal.Quiet)
	text := Wrap(p.s.Caution, p.w-2*p.pad, 0, p.measure(f))
	top := math.Round(p.h - float64(len(text))*16*p.k - 13*p.k)
	rectangle(p.c, 0, top, p.w, p.h-top)
	p.c.Fill(p.pal.Panel)
	p.rule(0, top, p.w, top)
	p.lines(text, p.pad, top+7*p.k, 16*p.k, f)
	return top
}

// noteLines wraps the notes into at most the rows given; what is left out is counted in the last row.
func (p *page) noteLines(room float64, rows int, f Font) (text []string, first []bool) {
	for i, n := range p.s.Notes {
		wrapped := Wrap(n, room, 0, p.measure(f))
		rest := len(p.s.Notes) - i
		if len(text)+len(wrapped) > rows || len(text)+len(wrapped) == rows && rest > 1 {
			if rows > len(text) {
				more := fmt.Sprintf("%d more notes", rest)
				if rest == 1 {
					more = Elide(n, room, p.measure(f))
				}
				text, first = append(text, more), append(first, true)
			}
			return text, first
		}
		for j, t := range wrapped {
			text, first = append(text, t), append(first, j == 0)
		}
	}
	return text, first
}

// notes writes wrapped notes, each with a mark in front.
func (p *page) notes(text []string, first []bool, x, y float64, f Font) {
	for i, t := range text {
		if first[i] {
			p.c.Circle(x+2.5*p.k, y+8.6*p.k, 1.6*p.k)
			p.c.Fill(p.pal.Accent)
		}
		p.c.Text(t, x+11*p.k, y+0.8*16*p.k, f)
		y += 16 * p.k
	}
}

// notesBeside draws the notes in a column at the right and returns where that begins.
func (p *page) notesBeside(top, bottom float64) float64 {
	wide := math.Round(min(300*p.k, 0.26*p.w))
	x := p.w - wide
	rectangle(p.c, x, top, wide, bottom-top)
	p.c.Fill(p.pal.Sheet)
	p.rule(x, top, x, bottom)
	p.c.Text("Assumed and left out", x+14*p.k, top+24*p.k, p.font(13, true, p.pal.Ink))
	f := p.font(12, false, p.pal.Ink)
	y := top + 36*p.k
	text, first := p.noteLines(wide-11*p.k-28*p.k, int((bottom-y-8*p.k)/(16*p.k)), f)
	p.notes(text, first, x+14*p.k, y, f)
	return x
}

// notesBelow draws the notes above the caution and returns where they begin.
func (p *page) notesBelow(top, bottom float64) float64 {
	rows := int(0.25 * (bottom - top) / (16 * p.k))
	f := p.font(12, false, p.pal.Ink)
	text, first := p.noteLines(p.w-2*p.pad-11*p.k, max(1, rows), f)
	y := math.Round(bottom - float64(len(text))*16*p.k - 12*p.k)
	rectangle(p.c, 0, y, p.w, bottom-y)
	p.c.Fill(p.pal.Sheet)
	p.rule(0, y, p.w, y)
	p.notes(text, first, p.pad, y+6*p.k, f)
	return y
}

// ladderPane draws the ladder at the left and returns where it ends.
func (p *page) ladderPane(top, bottom float64) float64 {
	wide := math.Round(max(132*p.k, min(215*p.k, 0.2*p.w)))
	rectangle(p.c, 0, top, wide, bottom-top)
	p.c.Fill(p.pal.Sheet)
	inner, done := Inset(p.c, 0, top, wide, bottom-top)
	Ladder(inner, p.s, ScaleOf(p.s), p.st)
	done()
	p.rule(wide, top, wide, bottom)
	return wide
}

// sectionPane draws the section and the quiet line below it.
func (p *page) sectionPane(left, top, right, bottom float64) {
	if p.s.Status != "" {
		f := p.font(12, false, p.pal.Quiet)
		room := right - left - 24*p.k
		text := Wrap(p.s.Status, room, 2, p.measure(f))
		bottom = math.Round(bottom - float64(len(text))*16*p.k - 8*p.k)
		f.AX = 1
		p.lines(text, right-12*p.k, bottom+2*p.k, 16*p.k, f)
	}
	w, h := right-left, bottom-top
	if w < 2 || h < 2 {
		return
	}
	inner, done := Inset(p.c, left, top, w, h)
	defer done()
	v := FitView(p.s.Shapes, int(w), int(h), p.st)
	sc := ScaleOf(p.s)
	if p.s.solved() {
		inner.Image(HeatLayer(p.s, v, sc, false), 0, 0)
	}
	SectionLayer(inner, p.s, v, sc, p.st)
}
