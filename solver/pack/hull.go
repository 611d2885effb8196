package pack

import (
	"cmp"
	"math"
	"slices"
)

// Arc is a piece of the taut-string hull: the arc of disc Disc from angle From to angle To (radians, counterclockwise), followed by a straight string to
// the next arc's disc. From lies in [0, 2π) and To in [From, From + 2π]. A disc that the string only touches has To == From.
type Arc struct {
	Disc     int
	From, To float64
}

// Hull returns the taut string round the discs, counterclockwise, its perimeter and the total length of its straight strings. A lone disc, or one
// that holds all others, is one arc of 2π.
//
// Method: gift wrapping on the support functions h(θ) = c·u(θ) + r. At the angle where another disc's support overtakes that of the disc under
// the string, the string leaves for it.
func Hull(discs []Disc) (arcs []Arc, perimeter, strings float64) {
	if len(discs) == 0 {
		return nil, 0, 0
	}
	tol := 1e-12 * reach(discs, Box{})
	outer := notHeld(discs, tol)
	at, from := outer[0], 0.0
	for _, i := range outer { // the disc under the string at θ = 0; of equal ones the upper
		d, f := discs[i], discs[at]
		if h, g := d.X+d.R, f.X+f.R; h > g+tol || h > g-tol && d.Y > f.Y {
			at = i
		}
	}
	for range 4*len(discs) + 4 {
		next, to := overtake(discs, outer, at, from, tol)
		if next < 0 || to >= 2*math.Pi {
			break
		}
		arcs = append(arcs, Arc{at, from, to})
		at, from = next, to
	}
	arcs = closeArcs(append(arcs, Arc{at, from, 2 * math.Pi}))
	arcs = touched(discs, arcs)
	return measure(discs, arcs)
}

// notHeld lists the discs that lie inside no other; of equal ones the first.
func notHeld(discs []Disc, tol float64) []int {
	var outer []int
	for i, d := range discs {
		held := func(j int, e Disc) bool {
			return math.Hypot(e.X-d.X, e.Y-d.Y) <= e.R-d.R+tol && (e.R > d.R+tol || j < i)
		}
		inside := false
		for j, e := range discs {
			if j != i && held(j, e) {
				inside = true
				break
			}
		}
		if !inside {
			outer = append(outer, i)
		}
	}
	return outer
}

// overtake returns the disc that takes over the string from disc i at the least angle ≥ from, −1 when none does.
func overtake(discs []Disc, outer []int, i int, from, tol float64) (next int, at float64) {
	next, at = -1, math.Inf(1)
	best := 0.0
	for _, j := range outer {
		if j == i {
			continue
		}
		d := discs[j]
		dx, dy := d.X-discs[i].X, d.Y-discs[i].Y
		dist, diff := math.Hypot(dx, dy), discs[i].R-d.R
		if dist <= math.Abs(diff) {
			continue // one holds the other: no tangent between them
		}
		length := math.Sqrt(dist*dist - diff*diff)
		// The support of j rises through that of i where the outer tangent's normal points.
		theta := math.Atan2(dy, dx) - math.Acos(diff/dist)
		eps := 2 * tol / length
		turn := theta - from // from −4π to π
		for turn < -eps {
			turn += 2 * math.Pi
		}
		turn = max(turn, 0)
		if t := from + turn; next < 0 || t < at-eps || t <= at+eps && length > best {
			next, at, best = j, t, length
		}
	}
	return next, at
}

// closeArcs joins the first arc with the last, which is its beginning.
func closeArcs(arcs []Arc) []Arc {
	n := len(arcs) - 1
	if n == 0 || arcs[0].Disc != arcs[n].Disc {
		return arcs
	}
	arcs[0].From = arcs[n].From - 2*math.Pi
	if arcs[0].From < 0 {
		arcs[0].From, arcs[0].To = arcs[0].From+2*math.Pi, arcs[0].To+2*math.Pi
	}
	return arcs[:n]
}

// touched puts in the discs that a string passes over without bending.
func touched(discs []Disc, arcs []Arc) []Arc {
	if len(arcs) < 2 {
		return arcs
	}
	tol := 1e-9 * reach(discs, Box{})
	var out []Arc
	for k, a := range arcs {
		out = append(out, a)
		next := arcs[(k+1)%len(arcs)]
		s, c := math.Sincos(a.To)
		p, q := discs[a.Disc], discs[next.Disc]
		length := math.Hypot(q.X-p.X, q.Y-p.Y)
		type touch struct {
			disc  int
			along float64
		}
		var on []touch
		for i, d := range discs {
			h := (d.X-p.X)*c + (d.Y-p.Y)*s + d.R - p.R
			along := -(d.X-p.X)*s + (d.Y-p.Y)*c
			if i != a.Disc && i != next.Disc && math.Abs(h) <= tol && along > tol && along < length-tol {
				on = append(on, touch{i, along})
			}
		}
		slices.SortFunc(on, func(a, b touch) int { return cmp.Compare(a.along, b.along) })
		at := math.Mod(a.To, 2*math.Pi)
		for _, t := range on {
			out = append(out, Arc{t.disc, at, at})
		}
	}
	return out
}

// measure adds up arcs and strings.
func measure(discs []Disc, arcs []Arc) (_ []Arc, perimeter, strings float64) {
	for k, a := range arcs {
		p, q := discs[a.Disc], discs[arcs[(k+1)%len(arcs)].Disc]
		perimeter += p.R * (a.To - a.From)
		dx, dy := q.X-p.X, q.Y-p.Y
		strings += math.Sqrt(max(0, dx*dx+dy*dy-(q.R-p.R)*(q.R-p.R)))
	}
	return arcs, perimeter + strings, strings
}
