package film

import (
	"cmp"
	"math"
	"slices"
)

// Disc is a round thing in the plane of a section, m. R may be 0: a corner.
type Disc struct{ X, Y, R float64 }

// exactDiscs bounds the discs whose common tangents are all found; sampledPieces is how many directions stand for them beyond it, with an
// error below 1e-4 of a perimeter.
const (
	exactDiscs    = 32
	sampledPieces = 1024
)

// Views returns what convex bodies see of each other: perimeter × view factor (m, symmetric) of each pair, and the width (m) of each that the
// sky straight above sees. A body is the hull of its discs; bodies must not overlap. Straight lines carry the radiation of diffuse surfaces:
// in a plane perimeter × view factor is half the measure of the lines from one surface to the next (Hottel's crossed strings; Crofton's measure).
// Between two common tangents the lines of a direction change in closed form, so the sum over directions is exact, third bodies in the way
// included.
func Views(bodies [][]Disc) (between [][]float64, lit []float64) {
	n := len(bodies)
	v := sight{bodies: bodies, between: make([][]float64, n), ends: make([]end, 0, 2*n), spans: make([]span, n)}
	for i := range v.between {
		v.between[i] = make([]float64, n)
	}
	at := tangents(bodies)
	for k := 1; k < len(at); k++ {
		if at[k]-at[k-1] > 1e-14 {
			v.look(at[k-1], at[k])
		}
	}
	return v.between, v.above()
}

// tangents lists, rising over half a turn, the directions at which the edges of what is seen change places.
func tangents(bodies [][]Disc) []float64 {
	var all []Disc
	for _, b := range bodies {
		all = append(all, b...)
	}
	out := []float64{0, math.Pi}
	if len(all) > exactDiscs {
		for k := 1; k < sampledPieces; k++ {
			out = append(out, math.Pi*float64(k)/sampledPieces)
		}
		slices.Sort(out)
		return out
	}
	for i, a := range all {
		for _, b := range all[:i] {
			dx, dy := a.X-b.X, a.Y-b.Y
			l, phi := math.Hypot(dx, dy), math.Atan2(dy, dx)
			for _, t := range [4]float64{a.R - b.R, b.R - a.R, a.R + b.R, -a.R - b.R} {
				if math.Abs(t) <= l && l > 0 {
					s := math.Asin(t / l)
					out = append(out, half(phi-s), half(phi+s))
				}
			}
		}
	}
	slices.Sort(out)
	return out
}

// half folds a direction into [0, π).
func half(x float64) float64 {
	x = math.Mod(x, math.Pi)
	if x < 0 {
		x += math.Pi
	}
	return x
}

// sight looks through bodies in one direction after another.
type sight struct {
	bodies  [][]Disc
	between [][]float64
	spans   []span
	ends    []end
	row     []int
	depth   []float64
}

// span is what a body covers across a direction.
type span struct {
	lo, hi Disc    // whose edges these are
	a, b   float64 // where
	pa, pb float64 // how far along the direction the edges lie
}

// end is one edge of a span.
type end struct {
	at    float64
	of    Disc
	sign  float64
	body  int
	whole float64 // ∫ of the edge's place over the directions looked at
}

// aim finds the spans of all bodies across direction theta and sorts their edges.
func (v *sight) aim(theta, from, to float64) {
	sin, cos := math.Sincos(theta)
	s0, c0 := math.Sincos(from)
	s1, c1 := math.Sincos(to)
	v.ends = v.ends[:0]
	for i, b := range v.bodies {
		s := span{a: math.Inf(1), b: math.Inf(-1)}
		for _, d := range b {
			p := d.Y*cos - d.X*sin
			along := d.X*cos + d.Y*sin
			if p-d.R < s.a {
				s.lo, s.a, s.pa = d, p-d.R, along
			}
			if p+d.R > s.b {
				s.hi, s.b, s.pb = d, p+d.R, along
			}
		}
		v.spans[i] = s
		edge := func(d Disc, sign, at float64) {
			v.ends = append(v.ends, end{at, d, sign, i, d.X*(c1-c0) + d.Y*(s1-s0) + sign*d.R*(to-from)})
		}
		edge(s.lo, -1, s.a)
		edge(s.hi, 1, s.b)
	}
	slices.SortFunc(v.ends, func(a, b end) int { return cmp.Compare(a.at, b.at) })
}

// at lists the bodies on the line at p, by their places along it.
func (v *sight) at(p float64) []int {
	v.row, v.depth = v.row[:0], v.depth[:0]
	for i := range v.spans {
		s := &v.spans[i]
		if !(s.a < p && p < s.b) {
			continue
		}
		d := s.pa + (p-s.a)/(s.b-s.a)*(s.pb-s.pa) // a point of the body on the line
		k := len(v.row)
		v.row, v.depth = append(v.row, i), append(v.depth, d)
		for ; k > 0 && v.depth[k-1] > d; k-- {
			v.row[k], v.depth[k] = v.row[k-1], v.depth[k-1]
		}
		v.row[k], v.depth[k] = i, d
	}
	return v.row
}

// look adds what is seen in the directions between two.
func (v *sight) look(from, to float64) {
	v.aim((from+to)/2, from, to)
	for k := 1; k < len(v.ends); k++ {
		a, b := &v.ends[k-1], &v.ends[k]
		if b.at <= a.at {
			continue
		}
		row := v.at((a.at + b.at) / 2)
		for m := 1; m < len(row); m++ {
			i, j := row[m-1], row[m]
			w := (b.whole - a.whole) / 2
			v.between[i][j] += w
			v.between[j][i] += w
		}
	}
}

// above is the width of each body that is seen from straight above.
func (v *sight) above() []float64 {
	out := make([]float64, len(v.bodies))
	v.aim(math.Pi/2, 0, 0)
	for k := 1; k < len(v.ends); k++ {
		a, b := v.ends[k-1].at, v.ends[k].at
		if row := v.at((a + b) / 2); len(row) > 0 {
			out[row[len(row)-1]] += b - a
		}
	}
	return out
}
