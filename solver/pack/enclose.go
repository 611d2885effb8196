package pack

import "math"

// Enclose returns the smallest circle around the discs as they lie; all zero without discs.
//
// Method: exchange of a basis of at most three discs, as for linear programs (the problem is of LP type: M. Sharir and E. Welzl,
// "A combinatorial bound for linear programming and related problems", STACS 1992). The plain recursion of Welzl's circle for points fails for discs
// (K. Fischer and B. Gärtner, "The smallest enclosing ball of balls", SoCG 2003); here each exchange is solved outright over the
// few subsets, and the radius grows strictly.
func Enclose(discs []Disc) (x, y, r float64) {
	if len(discs) == 0 {
		return 0, 0, 0
	}
	x, y, r = discs[0].X, discs[0].Y, discs[0].R
	basis := []Disc{discs[0]}
	tol := 1e-13 * reach(discs, Box{})
	for {
		far, worst := -1, tol
		for i, d := range discs {
			if e := math.Hypot(d.X-x, d.Y-y) + d.R - r; e > worst {
				far, worst = i, e
			}
		}
		if far < 0 {
			break
		}
		next, nx, ny, nr := exchange(basis, discs[far], tol)
		if !(nr > r) { // rounding has the last word
			break
		}
		basis, x, y, r = next, nx, ny, nr
	}
	for _, d := range discs { // never less than what is there
		r = max(r, math.Hypot(d.X-x, d.Y-y)+d.R)
	}
	return x, y, r
}

// exchange returns the smallest circle round the basis and one disc outside it, with the discs that hold it up.
func exchange(basis []Disc, d Disc, tol float64) (next []Disc, x, y, r float64) {
	r = math.Inf(1)
	all := append([]Disc{d}, basis...)
	try := func(cx, cy, cr float64, on ...Disc) {
		if !(cr < r) {
			return
		}
		for _, e := range all {
			if math.Hypot(e.X-cx, e.Y-cy)+e.R > cr+tol {
				return
			}
		}
		next, x, y, r = append([]Disc(nil), on...), cx, cy, cr
	}
	try(d.X, d.Y, d.R, d)
	for i, p := range basis {
		cx, cy, cr := roundTwo(d, p)
		try(cx, cy, cr, d, p)
		for _, q := range basis[:i] {
			for _, c := range roundThree(d, p, q) {
				try(c.X, c.Y, c.R, d, p, q)
			}
		}
	}
	return next, x, y, r
}

// roundTwo is the smallest circle round two discs neither of which holds the other.
func roundTwo(p, q Disc) (x, y, r float64) {
	dx, dy := q.X-p.X, q.Y-p.Y
	d := math.Hypot(dx, dy)
	if d == 0 {
		return p.X, p.Y, max(p.R, q.R)
	}
	r = (d + p.R + q.R) / 2
	t := (r - p.R) / d
	return p.X + t*dx, p.Y + t*dy, r
}

// roundThree returns the circles that three discs touch from within (problem of Apollonius): |c − cᵢ| = r − rᵢ. Differences of the squares are
// linear in c and r, so that c = a + b r, which put into the first gives a quadratic.
func roundThree(p, q, s Disc) []Disc {
	x1, y1, x2, y2 := q.X-p.X, q.Y-p.Y, s.X-p.X, s.Y-p.Y
	det := 2 * (x1*y2 - x2*y1)
	if det == 0 {
		return nil
	}
	// With u = r − p.R: |c|² = u², |c − cᵢ|² = (u − eᵢ)², eᵢ = rᵢ − p.R.
	e1, e2 := q.R-p.R, s.R-p.R
	k1, k2 := x1*x1+y1*y1-e1*e1, x2*x2+y2*y2-e2*e2
	ax, ay := (k1*y2-k2*y1)/det, (x1*k2-x2*k1)/det
	bx, by := 2*(e1*y2-e2*y1)/det, 2*(x1*e2-x2*e1)/det
	var out []Disc
	for _, u := range quadratic(bx*bx+by*by-1, 2*(ax*bx+ay*by), ax*ax+ay*ay) {
		out = append(out, Disc{X: p.X + ax + bx*u, Y: p.Y + ay + by*u, R: u + p.R})
	}
	return out
}

// quadratic returns the real roots of a t² + b t + c without cancellation.
func quadratic(a, b, c float64) []float64 {
	disc := b*b - 4*a*c
	if disc < 0 {
		return nil
	}
	q := -(b + math.Copysign(math.Sqrt(disc), b)) / 2
	var out []float64
	if a != 0 {
		out = append(out, q/a)
	}
	if q != 0 {
		out = append(out, c/q)
	}
	return out
}
