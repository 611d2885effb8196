package outline

import (
	"math"
	"sort"
)

// Measured on the finite-element cases and on thin metal walls against three times finer panels: a few mK at fineness 1.
const (
	modes       = 5    // per panel
	inCorner    = 60.0 // the shorter inside over the scale of lengths in a corner, where densities grow like distance^(−1/3)
	fromCorner  = 1.5  // growth of lengths away from a corner: e^1.5 from panel to panel
	perHarmonic = 10.0 // a panel at distance r from a centre resolves harmonic m if it is no longer than perHarmonic·r/m
	visible     = 0.1  // a harmonic that has decayed to this no longer needs resolving
	reach       = 1.4  // no panel is longer than this times the distance to a centre
	thinMetal   = 2e-4 // m: an error of the flux into a layer of good metal grows as the layer gets thinner
)

// grading decides how long a panel may be.
type grading struct {
	corner   float64
	harmonic float64
}

func newGrading(r *Rect, fineness float64) grading {
	for _, l := range r.Layers {
		if l.K > 5 && l.Thickness <= thinMetal {
			fineness *= 1.5
			break
		}
	}
	return grading{corner: math.Min(r.W, r.H) / (inCorner * fineness), harmonic: perHarmonic / fineness}
}

// near is the longest panel at z that follows the harmonics of d, or anything above limit.
func (g *grading) near(d *Disc, z complex128, limit float64) float64 {
	x := math.Max(0, math.Abs(real(z)-real(d.C))-d.Slack)
	y := math.Max(0, math.Abs(imag(z)-imag(d.C))-d.Slack)
	square := math.Max(x*x+y*y, d.A*d.A)
	m := math.Max(float64(d.M), 1)
	if l := math.Min(reach, g.harmonic/m); l*l*square >= limit*limit {
		return limit
	}
	r := math.Sqrt(square)
	if r > 1.0001*d.A {
		m = math.Min(m, math.Max(1, math.Log(visible)/math.Log(d.A/r)))
	}
	return math.Min(reach, g.harmonic/m) * r
}

// length is the longest panel at s along e.
func (g *grading) length(e *edge, discs []Disc, s float64) float64 {
	l := g.corner + fromCorner*math.Min(s, e.length-s)
	z := e.at(s)
	for i := range discs {
		l = math.Min(l, g.near(&discs[i], z, l))
	}
	return math.Max(l, e.length*1e-6) // a disc of no size on the wall
}

// cuts divides e into panels of those lengths: at equal steps of ∫ ds/length, taken from both ends so that mirrored edges have mirrored cuts.
func (g *grading) cuts(e *edge, discs []Disc) []float64 {
	middle := e.length / 2
	left, leftSum := march(middle, func(s float64) float64 { return g.length(e, discs, s) })
	right, rightSum := march(middle, func(s float64) float64 { return g.length(e, discs, e.length-s) })
	a, b := leftSum[len(left)-1], rightSum[len(right)-1]
	n := max(2, int(math.Ceil(a+b-0.05)))
	cuts := make([]float64, n+1)
	for i := range cuts {
		if want := (a + b) * float64(i) / float64(n); want <= a {
			cuts[i] = lookUp(left, leftSum, want)
		} else {
			cuts[i] = e.length - lookUp(right, rightSum, (a+b)*float64(n-i)/float64(n))
		}
	}
	cuts[0], cuts[n] = 0, e.length
	return cuts
}

// march tabulates ∫ ds/length from 0 to end.
func march(end float64, length func(s float64) float64) (at, sum []float64) {
	at, sum = []float64{0}, []float64{0}
	before := length(0)
	for s, total := 0.0, 0.0; s < end; {
		step := before / 4
		if end-s < 1.5*step {
			step = end - s
			s = end
		} else {
			s += step
		}
		l := length(s)
		total += step / 2 * (1/before + 1/l)
		before = l
		at, sum = append(at, s), append(sum, total)
	}
	return at, sum
}

// lookUp inverts the table.
func lookUp(at, sum []float64, want float64) float64 {
	j := min(max(sort.SearchFloat64s(sum, want), 1), len(sum)-1)
	t := (want - sum[j-1]) / (sum[j] - sum[j-1])
	return at[j-1] + t*(at[j]-at[j-1])
}

// panels cuts every edge and numbers the unknowns and the ends of cells.
func (g *grading) panels(edges []edge, discs []Disc) (all []panel, unknowns, ends int) {
	for i := range edges {
		e := &edges[i]
		e.first = len(all)
		cuts := g.cuts(e, discs)
		for j := 1; j < len(cuts); j++ {
			p := newPanel(e, i, cuts[j-1], cuts[j], modes)
			p.dof, p.firstCell = unknowns, ends
			all = append(all, p)
			unknowns += p.p
			ends += p.p + 1
		}
		e.end = len(all)
	}
	return all, unknowns, ends
}

// resolves tells whether the panels are short enough for a disc, to the tolerance that a drag can bear.
func (g *grading) resolves(d Disc, panels []panel) bool {
	d.Slack = 0
	x := rules[6]
	for i := range panels {
		p := &panels[i]
		pieces := 0.0
		for j, t := range x.x {
			pieces += x.w[j] * p.half / g.near(&d, p.at(t), math.Inf(1))
		}
		if pieces > 1.6 {
			return false
		}
	}
	return true
}
