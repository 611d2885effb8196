package outline

import "math"

// Lengths of panels, as shares of the radius of the part that a piece begins or ends at: measured against panels of a quarter, on
// bundles of 2 to 37 parts (1 to 4 mK of 40 K).
const (
	bareShare   = 2.0
	stringShare = 2.0
	fromTangent = 2.0 // growth of lengths on a string away from the part that it leaves
	heldShare   = 0.6 // of a string that is held at a temperature: heat crowds where its gap to the part gets thin
	fromHeld    = 1.0
)

// Modes of panels: where a string nears the part that it leaves, what it gives off changes faster than one panel of the usual number follows (2 to 6 mK of
// 30 K; with these 0.4 to 2). A short arc on a part needs fewer than usual.
const (
	stringModes = 7
	arcModes    = 3
	shortArc    = 1.2 // rad
)

// hullGrading decides how long a panel of the hull may be.
type hullGrading struct {
	grading
	fineness float64
	discs    []Disc
}

func newHullGrading(discs []Disc, fineness float64) hullGrading {
	return hullGrading{grading: grading{harmonic: perHarmonic / fineness}, fineness: fineness, discs: discs}
}

// length is the longest panel at s along p.
func (g *hullGrading) length(p *piece, s float64) float64 {
	var l float64
	if p.disc >= 0 {
		l = bareShare * p.a / g.fineness
	} else {
		a, b := g.discs[p.ends[0]].A, g.discs[p.ends[1]].A
		share, growth := stringShare, fromTangent
		if p.rests && math.IsInf(p.out.Film, 1) {
			share, growth = heldShare, fromHeld
		}
		l = math.Min(share*a+growth*s, share*b+growth*(p.length-s)) / g.fineness
	}
	z := p.at(s)
	for i := range g.discs {
		if d := &g.discs[i]; i != p.ends[0] && i != p.ends[1] {
			l = math.Min(l, g.near(d, z, l))
		}
	}
	return math.Max(g.tips(p, s, l), p.length*1e-6)
}

// cuts divides p into panels of those lengths, as a straight side is.
func (g *hullGrading) cuts(p *piece) []float64 {
	middle := p.length / 2
	left, leftSum := march(middle, func(s float64) float64 { return g.length(p, s) })
	right, rightSum := march(middle, func(s float64) float64 { return g.length(p, p.length-s) })
	return divide(p.length, left, leftSum, right, rightSum)
}

// divide puts cuts at equal steps of ∫ ds/length, tabulated from both ends.
func divide(length float64, left, leftSum, right, rightSum []float64) []float64 {
	a, b := leftSum[len(left)-1], rightSum[len(right)-1]
	n := max(1, int(math.Ceil(a+b-0.05)))
	cuts := make([]float64, n+1)
	for i := range cuts {
		if want := (a + b) * float64(i) / float64(n); want <= a {
			cuts[i] = lookUp(left, leftSum, want)
		} else {
			cuts[i] = length - lookUp(right, rightSum, (a+b)*float64(n-i)/float64(n))
		}
	}
	cuts[0], cuts[n] = 0, length
	return cuts
}

// panels cuts every piece and numbers the unknowns. A piece that old has too keeps its panels if they will still do.
func (g *hullGrading) panels(pieces []piece, old *HullSystem) (all []bow, unknowns int) {
	before := make(map[piece][]bow, len(old.pieces))
	for i := range old.panels {
		b := &old.panels[i]
		before[old.pieces[b.piece]] = append(before[old.pieces[b.piece]], *b)
	}
	for i := range pieces {
		q := &pieces[i]
		some := before[*q]
		if len(some) == 0 || !g.resolve(q, some) {
			some = some[:0:0]
			cuts := g.cuts(q)
			n := g.modes(q, len(cuts)-1)
			for j := 1; j < len(cuts); j++ {
				some = append(some, newBow(q, i, cuts[j-1], cuts[j], n))
			}
		}
		for _, b := range some {
			b.piece, b.dof = i, unknowns
			all = append(all, b)
			unknowns += b.p
		}
	}
	return all, unknowns
}

// modes of the panels of p, which is divided into so many.
func (g *hullGrading) modes(p *piece, panels int) int {
	switch {
	case p.disc < 0:
		return stringModes
	case panels == 1 && p.turn < shortArc/g.fineness && !p.tip[0] && !p.tip[1]:
		return arcModes
	}
	return modes
}

// resolve tells whether panels of a piece are short enough for all discs, to the tolerance that a drag can bear.
func (g *hullGrading) resolve(p *piece, panels []bow) bool {
	for i := range panels {
		b := &panels[i]
		for _, t := range [3]float64{-0.7, 0, 0.7} {
			if g.length(p, b.along+t*b.half) < 1.2*b.half {
				return false
			}
		}
	}
	return true
}
