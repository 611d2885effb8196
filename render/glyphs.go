package render

import (
	"fmt"
	"image"
	"math"
	"strings"
	"sync"

	"golang.org/x/image/font"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goregular"
	"golang.org/x/image/font/opentype"
	"golang.org/x/image/math/fixed"
)

// typeface keeps the two faces of the Go fonts at every size asked for, and each glyph's picture once it has been drawn.
type typeface struct {
	mu     sync.Mutex
	fonts  [2]*opentype.Font
	faces  map[faceKey]*sizedFace
	glyphs int // kept, to bound the memory
}

type faceKey struct {
	bold bool
	size int // in quarters of a pixel
}

type sizedFace struct {
	face    font.Face
	advance map[rune]float64
	glyph   map[glyphKey]*glyph
}

type glyphKey struct {
	r    rune
	sub  uint8 // quarters of a pixel to the right
	halo uint8 // quarters of a pixel of widening
}

// glyph is a coverage picture; Rect is relative to the pixel of the dot.
type glyph struct{ mask *image.Alpha }

// keptGlyphs bounds the store of glyph pictures.
const keptGlyphs = 20_000

var letters = &typeface{faces: map[faceKey]*sizedFace{}}

// lacking maps what the Go fonts have no glyph for to what they have.
var lacking = strings.NewReplacer("⌀", "Ø", "\t", " ", "\u202f", "\u00a0", "\u2009", " ")

func (t *typeface) face(f Font) *sizedFace {
	key := faceKey{f.Bold, max(4, int(math.Round(4*f.Size)))}
	if s := t.faces[key]; s != nil {
		return s
	}
	i, data := 0, goregular.TTF
	if f.Bold {
		i, data = 1, gobold.TTF
	}
	if t.fonts[i] == nil {
		parsed, err := opentype.Parse(data)
		if err != nil {
			panic(fmt.Sprintf("render: the embedded font does not parse: %v", err))
		}
		t.fonts[i] = parsed
	}
	face, err := opentype.NewFace(t.fonts[i], &opentype.FaceOptions{Size: float64(key.size) / 4, DPI: 72, Hinting: font.HintingNone})
	if err != nil {
		panic(fmt.Sprintf("render: the embedded font has no face: %v", err))
	}
	s := &sizedFace{face: face, advance: map[rune]float64{}, glyph: map[glyphKey]*glyph{}}
	t.faces[key] = s
	return s
}

func (s *sizedFace) adv(r rune) float64 {
	if a, ok := s.advance[r]; ok {
		return a
	}
	a, _ := s.face.GlyphAdvance(r)
	w := float64(a) / 64
	s.advance[r] = w
	return w
}

// measure returns the width of a line in pixels.
func (t *typeface) measure(text string, f Font) float64 {
	t.mu.Lock()
	defer t.mu.Unlock()
	s := t.face(f)
	w := 0.0
	for _, r := range lacking.Replace(text) {
		w += s.adv(r)
	}
	return w
}

// each calls draw with the picture of every glyph of the line, the dot of the first at (x, y), widened by halo pixels.
func (t *typeface) each(text string, x, y float64, f Font, halo float64, draw func(m *image.Alpha, x, y int)) {
	t.mu.Lock()
	defer t.mu.Unlock()
	s := t.face(f)
	row := int(math.Round(y))
	for _, r := range lacking.Replace(text) {
		q := math.Round(4 * x)
		col := math.Floor(q / 4)
		g := t.glyph(s, glyphKey{r, uint8(q - 4*col), uint8(max(0, min(40, math.Round(4*halo))))})
		if g.mask != nil {
			draw(g.mask, int(col), row)
		}
		x += s.adv(r)
	}
}

func (t *typeface) glyph(s *sizedFace, k glyphKey) *glyph {
	if g := s.glyph[k]; g != nil {
		return g
	}
	if t.glyphs++; t.glyphs > keptGlyphs {
		for _, f := range t.faces {
			clear(f.glyph)
		}
		t.glyphs = 1
	}
	g := &glyph{}
	dr, mask, mp, _, ok := s.face.Glyph(fixed.Point26_6{X: fixed.Int26_6(16 * int(k.sub))}, k.r)
	if m, isAlpha := mask.(*image.Alpha); ok && isAlpha && !dr.Empty() {
		own := image.NewAlpha(dr)
		for y := dr.Min.Y; y < dr.Max.Y; y++ {
			from := m.PixOffset(mp.X, mp.Y+y-dr.Min.Y)
			copy(own.Pix[own.PixOffset(dr.Min.X, y):][:dr.Dx()], m.Pix[from:from+dr.Dx()])
		}
		g.mask = widen(own, float64(k.halo)/4)
	}
	s.glyph[k] = g
	return g
}

// widen grows a coverage picture by d pixels in all directions.
func widen(m *image.Alpha, d float64) *image.Alpha {
	if d <= 0 {
		return m
	}
	n := int(math.Ceil(d))
	out := image.NewAlpha(m.Rect.Inset(-n))
	for dy := -n; dy <= n; dy++ {
		for dx := -n; dx <= n; dx++ {
			c := d + 0.5 - math.Hypot(float64(dx), float64(dy))
			if c <= 0 {
				continue
			}
			stamp(out, m, dx, dy, uint32(255*min(1, c)))
		}
	}
	return out
}

// stamp raises out to m moved by (dx, dy) and faded by c/255.
func stamp(out, m *image.Alpha, dx, dy int, c uint32) {
	w := m.Rect.Dx()
	for y := m.Rect.Min.Y; y < m.Rect.Max.Y; y++ {
		src := m.Pix[m.PixOffset(m.Rect.Min.X, y):][:w]
		dst := out.Pix[out.PixOffset(m.Rect.Min.X+dx, y+dy):][:w]
		for i, a := range src {
			dst[i] = max(dst[i], uint8(uint32(a)*c/255))
		}
	}
}
