package heat_test

import (
	"math"
	"math/rand/v2"
	"os"

	"packrise/solver/heat"
)

// soak is the number of random sections of a kind: few, or many under PACKRISE_SOAK=1.
func soak(few, many int) int {
	if os.Getenv("PACKRISE_SOAK") != "" {
		return many
	}
	return few
}

// kinds of random section.
type wish struct {
	parts    int
	rect     bool
	cables   bool
	air      bool // else a solid
	conducts bool // the medium may conduct better than the insulation
	held     bool // some bores are held
	loose    bool // gaps; else dropped into contact
}

// randomSection makes a section of round parts in a solid or in air taken as a solid, with a fixed film and open sides.
func randomSection(r *rand.Rand, w wish) heat.Problem {
	p := heat.Problem{MediumK: 0.026}
	if !w.air {
		p.MediumK = 0.1 + 0.2*r.Float64()
	}
	if w.conducts {
		p.MediumK = 0.3 + 2*r.Float64()
	}
	p.Wall = heat.Wall{Film: 5 + 10*r.Float64(), Ambient: 20 + 20*r.Float64()}
	for range r.IntN(3) {
		p.Wall.Rings = append(p.Wall.Rings, ring(r, 1.5))
	}
	box := newBox(r, w)
	for len(p.Parts) < w.parts {
		q := randomPart(r, w)
		if !box.drop(r, &q, w.loose) {
			break
		}
		p.Parts = append(p.Parts, q)
		if q.Core == heat.Inside {
			fillCable(r, &p, len(p.Parts)-1)
		}
	}
	if w.rect {
		p.Wall.Shape, p.Wall.W, p.Wall.H = heat.Rect, box.w, box.h
	} else {
		p.Wall.R = box.w / 2
	}
	return p
}

func ring(r *rand.Rand, most float64) heat.Ring {
	k := []float64{0.17, 0.2, 0.25, 0.3, 0.4}[r.IntN(5)]
	if r.IntN(12) == 0 {
		return heat.Ring{K: 50, Thickness: 0.1 * mm}
	}
	return heat.Ring{K: k, Thickness: (0.2 + most*r.Float64()) * mm}
}

func randomPart(r *rand.Rand, w wish) heat.Part {
	q := heat.Part{In: -1, Radius: (0.4 + 2.5*r.Float64()*r.Float64()) * mm, Heat: 3 * r.Float64()}
	switch k := r.IntN(8); {
	case k == 0:
		q.Core, q.K, q.Heat = heat.Body, 0.1+0.3*r.Float64(), 0
	case k == 1:
		q.Core, q.K, q.Heat = heat.Bore, 0.026, 0
	case k == 2 && w.held:
		q.Core, q.Fixed, q.Heat = heat.FixedBore, 10+60*r.Float64(), 0
	case k < 4 && w.cables:
		q.Core, q.K, q.Heat, q.Radius = heat.Inside, 0.15+0.1*r.Float64(), 0, (2.5+2*r.Float64())*mm
	}
	q.Rings = append(q.Rings, ring(r, 1))
	if last := &q.Rings[0]; last.K > 5 {
		q.Rings = append(q.Rings, heat.Ring{K: 0.2, Thickness: 0.5 * mm})
	}
	return q
}

func outer(q *heat.Part) float64 {
	a := q.Radius
	for _, g := range q.Rings {
		a += g.Thickness
	}
	return a
}

// fillCable puts up to three cores into cable i.
func fillCable(r *rand.Rand, p *heat.Problem, i int) {
	b := p.Parts[i].Radius
	n := 1 + r.IntN(3)
	a := b / (1 + 2/math.Sqrt(3)) * (0.7 + 0.3*r.Float64())
	for k := range n {
		s, c := math.Sincos(2 * math.Pi * (float64(k)/3 + 0.1))
		at := (b - a) * (1 - 0.2*r.Float64()*float64(k&1))
		p.Parts = append(p.Parts, heat.Part{In: i, X: at * c, Y: at * s, Core: heat.Metal, Radius: 0.6 * a, Rings: []heat.Ring{{K: 0.2, Thickness: 0.4 * a}}, Heat: 2 * r.Float64()})
	}
}

// box places discs: at random with gaps, or pushed straight down until they touch something.
type box struct {
	w, h  float64
	round bool
	discs [][3]float64
}

func newBox(r *rand.Rand, w wish) *box {
	d := (8 + 5*math.Sqrt(float64(w.parts))*(1+r.Float64())) * mm
	return &box{w: d, h: d * (0.6 + 0.8*r.Float64()), round: !w.rect}
}

func (b *box) free(x, y, a float64) bool {
	if b.round {
		if math.Hypot(x, y)+a > b.w/2 {
			return false
		}
	} else if x < a || y < a || x+a > b.w || y+a > b.h {
		return false
	}
	for _, d := range b.discs {
		if math.Hypot(x-d[0], y-d[1]) < a+d[2] {
			return false
		}
	}
	return true
}

func (b *box) drop(r *rand.Rand, q *heat.Part, loose bool) bool {
	a := outer(q)
	for range 200 {
		x, y := b.w*r.Float64(), b.h*r.Float64()
		if b.round {
			x, y = b.w*(r.Float64()-0.5), b.w*(r.Float64()-0.5)
		}
		if !b.free(x, y, a) {
			continue
		}
		if !loose {
			y = b.fall(x, y, a)
		}
		q.X, q.Y = x, y
		b.discs = append(b.discs, [3]float64{x, y, a})
		return true
	}
	return false
}

// fall lowers a disc until it touches.
func (b *box) fall(x, y, a float64) float64 {
	lo, hi := y-b.w-b.h, y
	step := 0.01 * mm
	for b.free(x, hi-step, a) && hi > lo {
		hi -= step
	}
	lo = hi - step
	for range 60 {
		if m := (lo + hi) / 2; b.free(x, m, a) {
			hi = m
		} else {
			lo = m
		}
	}
	return hi
}
