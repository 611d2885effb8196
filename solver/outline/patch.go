package outline

import "math"

// Patches are pieces of the inside outline that take up heat besides what the medium brings them, such as radiation, and whose mean temperatures are
// wanted. They stand counterclockwise from the lower left corner. Not safe for concurrent use with Move.
type Patches struct {
	A, B   []complex128 // their ends
	Length []float64    // m

	s     *System
	first []int     // cell of each patch, and of one more
	dof   []int     // row of each cell
	share []float64 // of each cell in the length of its patch
	gain  []float64 // what 1 W/m² into a patch adds to the rows of its cells
	temp  []float64 // mean temperature of each patch per density, n columns
	feel  [][]touch // per disc and patch
}

// touch is the mean temperature that a disc brings to a patch: q, Re d_1, Im d_1, ….
type touch []float64

// Patches divides the inside outline along its cells, longest telling how long a patch at z may be. It costs about half of what New does.
func (s *System) Patches(longest func(z complex128) float64) *Patches {
	p := &Patches{s: s}
	for i := range s.panels {
		q := &s.panels[i]
		if s.edges[q.edge].face > 0 {
			continue
		}
		first := q == &s.panels[s.edges[q.edge].first]
		for l := range q.p {
			at := cellsOf[q.p].at
			a, b := q.at(at[l]), q.at(at[l+1])
			if k := len(p.A) - 1; k < 0 || first && l == 0 || dist(p.A[k], b) > longest(scale(0.5, p.A[k]+b)) {
				p.A, p.B = append(p.A, a), append(p.B, b)
				p.first = append(p.first, len(p.dof))
				p.gain = append(p.gain, s.gain(q.edge))
			}
			p.B[len(p.B)-1] = b
			p.dof = append(p.dof, q.dof+l)
			p.share = append(p.share, q.half*(at[l+1]-at[l]))
		}
	}
	p.first = append(p.first, len(p.dof))
	for k := range p.A {
		length := 0.0
		for _, l := range p.share[p.first[k]:p.first[k+1]] {
			length += l
		}
		p.Length = append(p.Length, length)
		for c := p.first[k]; c < p.first[k+1]; c++ {
			p.share[c] /= length
		}
	}
	p.join()
	p.measure()
	p.feel = make([][]touch, len(s.discs))
	eachOf(len(s.discs), s.rect.Workers, p.Follow)
	return p
}

func dist(a, b complex128) float64 { return math.Hypot(real(a-b), imag(a-b)) }

// join makes neighbours meet exactly.
func (p *Patches) join() {
	n := len(p.A)
	for k := range p.A {
		p.A[(k+1)%n] = p.B[k]
	}
}

// gain is what a flux into the wall adds to the rows of an edge: the medium's flux plus w goes on into the wall, or, without layers, into the film.
func (s *System) gain(edge int) float64 {
	r := &s.rows[edge]
	if len(s.k) > 1 {
		return 2 / (s.k[0] + s.k[1])
	}
	return 2 * r.density / s.k[0]
}

// measure fills temp.
func (p *Patches) measure() {
	s := p.s
	p.temp = make([]float64, len(p.A)*s.n)
	owner := make([]int, 0, len(p.dof)) // patch of each cell
	for k := range p.A {
		for range p.first[k+1] - p.first[k] {
			owner = append(owner, k)
		}
	}
	eachOf(len(s.panels), s.rect.Workers, func(j int) {
		var b block
		from := &s.panels[j]
		c := 0
		for i := range s.panels {
			to := &s.panels[i]
			if s.edges[to.edge].face > 0 {
				continue
			}
			b.look(from, to, true)
			for l := range to.p {
				b.temp(p.share[c], from, l, p.temp[owner[c]*s.n+from.dof:][:from.p])
				c++
			}
		}
	})
}

// Of tells whether the patches are those of s.
func (p *Patches) Of(s *System) bool { return p.s == s }

// Follow works out anew what disc i brings to the patches, after Move.
func (p *Patches) Follow(i int) {
	d := &p.s.discs[i].Disc
	p.feel[i] = make([]touch, len(p.A))
	for k := range p.A {
		half := scale(0.5, p.B[k]-p.A[k])
		q := panel{mid: scale(0.5, p.A[k]+p.B[k]), half: dist(p.A[k], p.B[k]) / 2, p: 1}
		q.dir = scale(1/q.half, half)
		m := d.M
		if r := q.distance(d.C); r > 1.0001*d.A {
			m = min(m, 1+int(math.Log(decayed)/math.Log(d.A/r)))
		}
		row := make(touch, 1+2*m)
		d.excite(&q, row2temp, p.s.rect.MediumK, m, row)
		for e := range row {
			row[e] = -row[e]
		}
		p.feel[i][k] = row
	}
}

// row2temp asks excite for mean temperatures.
var row2temp = row{temp: 1}

// RespondTo is System.RespondTo with w (W/m) going into each patch besides.
func (p *Patches) RespondTo(y []float64, src Sources, ground bool, w []float64) {
	p.s.load(y, src, ground)
	for k, v := range w {
		v *= p.gain[k] / p.Length[k]
		for _, c := range p.dof[p.first[k]:p.first[k+1]] {
			y[c] += v
		}
	}
	p.s.solve(y)
}

// Means sets t to the mean temperatures of the patches, for the whole solution.
func (p *Patches) Means(t, y []float64, src Sources) {
	n := p.s.n
	for k := range t {
		t[k] = y[n] + dot(p.temp[k*n:][:n], y)
	}
	for j := range p.s.discs {
		v := pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j])
		for k, row := range p.feel[j] {
			m := min(len(row), len(v))
			t[k] += dot(row[:m], v)
		}
	}
}

// Direct returns the heat (W/m) that goes through each side's outer face straight from the patches, which Faces does not see: where
// there are no layers.
func (p *Patches) Direct(w []float64) (out [4]float64) {
	if len(p.s.k) > 1 {
		return out
	}
	side := 0
	for k, v := range w {
		for side < 3 && !p.s.edges[side].holds(p.A[k], p.B[k]) {
			side++
		}
		out[side] += v
	}
	return out
}

// holds tells whether a patch lies on the edge.
func (e *edge) holds(a, b complex128) bool {
	t := (scale(0.5, a+b) - e.start) * conj(e.dir)
	return math.Abs(imag(t)) < 1e-9*e.length && real(t) > 0 && real(t) < e.length
}
