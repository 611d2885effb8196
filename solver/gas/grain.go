package gas

import (
	"cmp"
	"math"
	"slices"
)

// Grain decides how long patches may be: a disc of radius r gets PerTurn, an outline Turn in all, and nowhere is a patch longer than about half the
// radius of a smaller disc beside it.
type Grain struct {
	PerTurn float64 // on a disc
	Turn    float64 // on an outline
	Discs   []Disc  // Cuts are not needed; strokes do for the patches of a Rim
}

// finest is the shortest patch as a share of the usual one.
const finest = 1.0 / 16

// Longest patch at z, m, where usual would do; skip is the disc that z lies on, −1 for the outline.
func (g *Grain) Longest(z complex128, usual float64, skip int) float64 {
	l := usual
	for j := range g.Discs {
		d := &g.Discs[j]
		if d.Rim != nil && j != skip {
			l = math.Min(l, d.beside(z, l))
			continue
		}
		if j == skip || d.R/2 >= l {
			continue
		}
		if v := d.C - z; math.Abs(real(v)) < d.R+2*l && math.Abs(imag(v)) < d.R+2*l {
			l = math.Min(l, (d.R+math.Max(0, size(v)-d.R))/2)
		}
	}
	return math.Max(l, finest*usual)
}

// beside is what a rim allows: about half of its half thickness and how far off it is.
func (d *Disc) beside(z complex128, most float64) float64 {
	v := z - d.C
	if size(v)-d.R > 2*most {
		return most
	}
	area, around := within(d.Rim)
	b := body{strokes: d.Rim}
	return (area/around + size(b.nearest(v)-v)) / 2
}

// Cuts divides disc i.
func (g *Grain) Cuts(i int) []float64 {
	d := &g.Discs[i]
	n := int(math.Ceil(g.PerTurn))
	usual := 2 * math.Pi * d.R / float64(n)
	cuts := make([]float64, 1, n+1)
	for k := range n {
		a, b := 2*math.Pi*float64(k)/float64(n), 2*math.Pi*float64(k+1)/float64(n)
		cuts = g.bisect(cuts, a, b, usual, i, d.C, d.R)
	}
	return cuts
}

// Between divides disc i where arcs of it, counterclockwise from one angle to another, are no surface: blank tells which patches these are.
func (g *Grain) Between(i int, arcs [][2]float64) (cuts []float64, blank []bool) {
	d := &g.Discs[i]
	if len(arcs) == 0 {
		return g.Cuts(i), nil
	}
	arcs = slices.Clone(arcs)
	slices.SortFunc(arcs, func(a, b [2]float64) int { return cmp.Compare(a[0], b[0]) })
	end := arcs[0][0] + 2*math.Pi
	cuts = append(cuts, arcs[0][0])
	for k, a := range arcs {
		if a[1]-a[0] > 0 {
			cuts, blank = append(cuts, math.Min(a[1], end)), append(blank, true)
		}
		to := end
		if k+1 < len(arcs) {
			to = arcs[k+1][0]
		}
		turn := to - cuts[len(cuts)-1]
		if turn <= 0 {
			continue
		}
		n := math.Ceil(turn/(2*math.Pi)*g.PerTurn - 1e-9)
		from := cuts[len(cuts)-1]
		for j := range int(n) {
			cuts = g.bisect(cuts, from+turn*float64(j)/n, from+turn*float64(j+1)/n, 2*math.Pi*d.R/g.PerTurn, i, d.C, d.R)
		}
		for len(blank) < len(cuts)-1 {
			blank = append(blank, false)
		}
	}
	return cuts, blank
}

// Around divides a circle of radius r about the origin that encloses the discs.
func (g *Grain) Around(r float64) []float64 {
	n := int(math.Ceil(g.Turn))
	usual := 2 * math.Pi * r / float64(n)
	cuts := make([]float64, 1, n+1)
	for k := range n {
		a, b := 2*math.Pi*float64(k)/float64(n), 2*math.Pi*float64(k+1)/float64(n)
		cuts = g.bisect(cuts, a, b, usual, -1, 0, r)
	}
	return cuts
}

// Ring is the outline of radius r about the origin with patches between cuts, which begin at 0 and end at 2π.
func Ring(r float64, cuts []float64) Outline {
	o := Outline{R: r, Segments: make([]Segment, len(cuts)-1)}
	first := complex(r, 0)
	last := first
	for k := range o.Segments {
		s, c := math.Sincos(cuts[k+1])
		next := complex(r*c, r*s)
		if k == len(o.Segments)-1 {
			next = first
		}
		o.Segments[k] = Segment{A: last, B: next}
		last = next
	}
	return o
}

// bisect appends the ends of the patches between a and b.
func (g *Grain) bisect(cuts []float64, a, b, usual float64, i int, c complex128, r float64) []float64 {
	m := (a + b) / 2
	s, o := math.Sincos(m)
	if l := r * (b - a); l > 1.01*g.Longest(c+complex(r*o, r*s), usual, i) {
		cuts = g.bisect(cuts, a, m, usual, i, c, r)
		return g.bisect(cuts, m, b, usual, i, c, r)
	}
	return append(cuts, b)
}
