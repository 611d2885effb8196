package rating

import (
	"math"

	"packrise/solver/film"
)

// outsides gives every body a face of its own, in one surroundings.
func (r *resolver) outsides() {
	s := &r.scene
	o := &s.out
	o.face(len(s.bodies))
	o.together = &film.Together{Outside: o.air}
	rows := s.rows()
	for k := range s.bodies {
		b := &s.bodies[k]
		b.coat = r.partsCoat(b.top)
		o.open[k], o.wide[k] = true, b.around
		o.faces[k] = film.Face{Shape: film.Round, DiameterM: b.around / math.Pi, Emissivity: b.coat.emissivity, Absorptivity: b.coat.absorptivity}
		o.together.Bodies = append(o.together.Bodies, film.Body{Face: o.faces[k], Hull: s.seen(b), Row: rows[k].row})
	}
	if len(s.bodies) > 0 {
		r.deepEnough((s.outerBox()[3] - s.origin.Y) * mm)
	}
}

// seen is a body's hull in m about the section's axis.
func (s *scene) seen(b *body) []film.Disc {
	out := make([]film.Disc, len(b.hull))
	for i, d := range b.hull {
		out[i] = film.Disc{X: (d.X - s.origin.X) * mm, Y: (d.Y - s.origin.Y) * mm, R: d.R * mm}
	}
	return out
}

// standing is how a body stands among its neighbours: the published row of equal cables that is nearest to it, and how near that is.
type standing struct {
	row     film.Row
	of      []int   // bodies of the row
	near    int     // the nearest other body, −1 without one
	nearGap float64 // m
	unequal bool    // diameters differ by more than a tenth
	crossed bool    // others beside it as well as above or below, or askew: no row is like that
	uneven  bool    // gaps to both sides differ by more than a quarter
	beyond  bool    // thicker than the table goes
	far     bool    // none within the reach of a row
}

// Limits of what a row of equal cables stands for.
const (
	equalWithin = 1.1
	evenWithin  = 1.25
	askewGap    = 0.5 // diameters within which a body askew counts as near
	tightGap    = 0.1 // diameters below which no air passes
	inLine      = 0.2 // how far out of line still counts as in line
)

// diameterM is that of a cylinder with the body's circumference.
func (b *body) diameterM() float64 { return b.around / math.Pi }

// gapBetween is the free distance between two bodies, m.
func (s *scene) gapBetween(p, q *body) float64 {
	gap := math.Inf(1)
	for _, m := range p.top {
		for _, n := range q.top {
			gap = math.Min(gap, s.gapOf(m, n))
		}
	}
	return gap
}

// way tells how body j lies from body i: beside it, or above or below it; on the right or above; and how far out of line, from 0 to 1 where the
// narrower of the two has nothing of the other straight beside, above or below it.
func (s *scene) way(i, j int) (a film.Arrangement, after bool, off float64) {
	p, q := &s.bodies[i], &s.bodies[j]
	dx, dy := (q.box[0]+q.box[2]-p.box[0]-p.box[2])/2, (q.box[1]+q.box[3]-p.box[1]-p.box[3])/2
	line := func(lo, hi int) float64 {
		common := math.Min(p.box[hi], q.box[hi]) - math.Max(p.box[lo], q.box[lo])
		return 1 - math.Max(0, common/math.Min(p.box[hi]-p.box[lo], q.box[hi]-q.box[lo]))
	}
	if math.Abs(dx) >= math.Abs(dy) {
		return film.SideBySide, dx > 0, line(1, 3)
	}
	return film.OneAboveAnother, dy > 0, line(0, 2)
}

// neighbour is another body within the reach of a row.
type neighbour struct {
	body int
	way  film.Arrangement
	side int     // 0 or 1: to the left or below, to the right or above
	gap  float64 // over the mean diameter
	off  float64 // out of line, 0 to 1
}

// rows finds for each body the published arrangement that stands for its neighbours.
func (s *scene) rows() []standing {
	n := len(s.bodies)
	out := make([]standing, n)
	near := make([][]neighbour, n)
	for i := range out {
		out[i] = standing{near: -1, nearGap: math.Inf(1)}
	}
	for i := range n {
		for j := range i {
			d := (s.bodies[i].diameterM() + s.bodies[j].diameterM()) / 2
			if math.Hypot(s.bodies[i].origin.X-s.bodies[j].origin.X, s.bodies[i].origin.Y-s.bodies[j].origin.Y)*mm > 40*d && n > 40 {
				continue
			}
			way, after, off := s.way(i, j)
			gap := s.gapBetween(&s.bodies[i], &s.bodies[j])
			for k, p := range [][2]int{{i, j}, {j, i}} {
				if st := &out[p[0]]; gap < st.nearGap {
					st.near, st.nearGap = p[1], gap
				}
				side := k
				if after {
					side = 1 - k
				}
				near[p[0]] = append(near[p[0]], neighbour{p[1], way, side, gap / d, off})
			}
		}
	}
	for i := range out {
		s.stand(&out[i], i, near)
	}
	return out
}

// stand chooses the row of body i: of the trefoil that it is in, those beside it and those above and below it the one that leaves it least of its
// convection.
func (s *scene) stand(st *standing, i int, near [][]neighbour) {
	d := s.bodies[i].diameterM()
	st.far, st.beyond = true, d > film.GroupLimitM
	least := math.Inf(1)
	rows := 0
	try := func(row film.Row, of []int, uneven bool) {
		if row.Gap >= row.Reach() {
			return
		}
		st.far = false
		rows++
		if c := row.Sheltered(d, row.Open(), 40); c < least {
			least, st.row, st.of, st.uneven = c, row, of, uneven
		}
	}
	of, gap, triangle := trefoil(i, near)
	if triangle {
		try(film.Row{N: 3, Arrangement: film.Trefoil, Gap: gap}, of, false)
	}
	for _, a := range []film.Arrangement{film.SideBySide, film.OneAboveAnother} {
		of, gaps := chain(i, a, near)
		if len(of) > 1 && len(gaps) > 0 {
			n := min(len(of), 3)
			try(film.Row{N: n, Arrangement: a, Gap: gaps[0]}, of, len(gaps) > 1 && gaps[1] > gaps[0]*evenWithin)
		}
	}
	st.crossed = rows > 1 && !triangle
	for _, o := range near[i] {
		st.crossed = st.crossed || !triangle && o.off > inLine && o.gap < askewGap
	}
	s.judge(st)
}

// judge compares the diameters of a row.
func (s *scene) judge(st *standing) {
	for _, a := range st.of {
		for _, b := range st.of {
			st.unequal = st.unequal || s.bodies[a].diameterM() > equalWithin*s.bodies[b].diameterM()
		}
	}
}

// trefoil finds two bodies that with body i make a triangle of like gaps, all others being out of the way.
func trefoil(i int, near [][]neighbour) (of []int, gap float64, ok bool) {
	of = []int{i}
	var gaps []float64
	for _, o := range near[i] {
		if o.gap < askewGap {
			of, gaps = append(of, o.body), append(gaps, o.gap)
		}
	}
	if len(of) != 3 {
		return nil, 0, false
	}
	for _, o := range near[of[1]] {
		if o.body == of[2] {
			gaps = append(gaps, o.gap)
		} else if o.body != i && o.gap < askewGap {
			return nil, 0, false
		}
	}
	lo, hi := math.Min(gaps[0], math.Min(gaps[1], gaps[2])), math.Max(gaps[0], math.Max(gaps[1], gaps[2]))
	return of, (gaps[0] + gaps[1] + gaps[2]) / 3, hi < askewGap && hi-lo < 0.25
}

// chain lists the bodies that stand in one row with body i, itself first, and its own gaps to the nearest on each side, the smaller first. A
// neighbour out of line counts as farther away, up to the gap from which it does not count.
func chain(i int, a film.Arrangement, near [][]neighbour) (of []int, gaps []float64) {
	reach := film.Row{N: 3, Arrangement: a}.Reach()
	of = []int{i}
	in := map[int]bool{i: true}
	inRow := func(body int) bool { // with all others of the row
		for _, o := range near[body] {
			if in[o.body] && o.way != a {
				return false
			}
		}
		return true
	}
	for k := 0; k < len(of); k++ {
		for _, o := range near[of[k]] {
			if o.way == a && o.off < 1 && o.gap < reach && !in[o.body] && inRow(o.body) {
				in[o.body] = true
				of = append(of, o.body)
			}
		}
	}
	reach = film.Row{N: min(len(of), 3), Arrangement: a}.Reach()
	sides := [2]float64{math.Inf(1), math.Inf(1)}
	for _, o := range near[i] {
		if in[o.body] && o.gap < reach {
			sides[o.side] = math.Min(sides[o.side], o.gap+o.off*(reach-o.gap))
		}
	}
	for _, g := range [2]float64{math.Min(sides[0], sides[1]), math.Max(sides[0], sides[1])} {
		if g < reach {
			gaps = append(gaps, g)
		}
	}
	return of, gaps
}
