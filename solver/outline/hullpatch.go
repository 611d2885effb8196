package outline

import (
	"slices"
	"sync"

	"gonum.org/v1/gonum/floats"
)

// HullPatches are pieces of the strings that take up heat on their inner side besides what the medium brings them, such as radiation, and whose
// mean temperatures are wanted. They stand counterclockwise; where a patch does not begin at the end of the one before, parts lie between.
type HullPatches struct {
	A, B   []complex128 // their ends
	Length []float64    // m

	s     *HullSystem
	first []int     // cell of each patch, and of one more
	row   []int     // of each cell
	share []float64 // of each cell in the length of its patch
	gain  []float64 // what 1 W/m² into a cell adds to its row

	lock  sync.Mutex
	means *patchMeans // nil until they are wanted
}

// Patches divides the strings along their cells, longest telling how long a patch at z may be.
func (s *HullSystem) Patches(longest func(z complex128) float64) *HullPatches {
	p := &HullPatches{s: s}
	piece := -1
	for i := range s.panels {
		b := &s.panels[i]
		if b.disc >= 0 {
			continue
		}
		at := cellsOf[b.p].at
		for l := range b.p {
			from, to := b.at(at[l]), b.at(at[l+1])
			if k := len(p.A) - 1; b.piece != piece || dist(p.A[k], to) > longest(scale(0.5, p.A[k]+to)) {
				if b.piece == piece {
					from = p.B[k] // neighbours meet exactly
				}
				p.A, p.B, p.Length = append(p.A, from), append(p.B, to), append(p.Length, 0)
				p.first = append(p.first, len(p.row))
				piece = b.piece
			}
			k := len(p.A) - 1
			p.B[k] = to
			p.Length[k] += b.cell(l)
			p.row, p.share = append(p.row, b.dof+l), append(p.share, b.cell(l))
			p.gain = append(p.gain, s.gain(b.dof+l))
		}
	}
	p.first = append(p.first, len(p.row))
	p.spread()
	return p
}

// Follow leads the patches over to a system whose strings are divided like those of the one before; false if they are not.
func (p *HullPatches) Follow(s *HullSystem) bool {
	if s == p.s {
		return true
	}
	if s.n != p.s.n || !slices.EqualFunc(s.panels, p.s.panels, func(a, b bow) bool {
		return a.disc == b.disc && a.p == b.p && a.mid == b.mid && a.half == b.half && a.dir == b.dir
	}) {
		return false
	}
	p.s, p.means = s, nil
	for c, row := range p.row {
		p.gain[c] = s.gain(row)
	}
	return true
}

// Refit leads the patches over to a system whose hull has as many panels on as many arcs and strings, of the same discs, wherever they are now: every patch keeps
// its cells, and gets new ends and a new length. False, and nothing is done, if it has not.
func (p *HullPatches) Refit(s *HullSystem) bool {
	if s.n != p.s.n || !slices.EqualFunc(s.panels, p.s.panels, func(a, b bow) bool { return a.disc == b.disc && a.p == b.p && a.piece == b.piece }) ||
		!slices.EqualFunc(s.pieces, p.s.pieces, func(a, b piece) bool { return a.ends == b.ends }) {
		return false
	}
	p.s, p.means = s, nil
	c, k, before := 0, -1, -1
	for i := range s.panels {
		b := &s.panels[i]
		if b.disc >= 0 {
			continue
		}
		at := cellsOf[b.p].at
		for l := range b.p {
			if k+1 < len(p.Length) && c == p.first[k+1] {
				k++
				p.A[k], p.Length[k] = b.at(at[l]), 0
				if b.piece == before {
					p.A[k] = p.B[k-1]
				}
			}
			p.B[k], before = b.at(at[l+1]), b.piece
			p.Length[k] += b.cell(l)
			p.share[c], p.gain[c] = b.cell(l), s.gain(p.row[c])
			c++
		}
	}
	p.spread()
	return true
}

// spread makes shares of lengths.
func (p *HullPatches) spread() {
	for k, length := range p.Length {
		for c := p.first[k]; c < p.first[k+1]; c++ {
			p.share[c] /= length
		}
	}
}

// gain is what 1 W/m² on the inner side adds to row i.
func (s *HullSystem) gain(i int) float64 {
	k, _ := slices.BinarySearchFunc(s.panels, i, func(b bow, i int) int {
		switch {
		case b.dof+b.p <= i:
			return -1
		case b.dof > i:
			return 1
		}
		return 0
	})
	return 2 / s.hull.MediumK * s.scaleOf(&s.pieces[s.panels[k].piece])
}

// RespondTo is HullSystem.RespondTo with w (W/m) going into each patch besides.
func (p *HullPatches) RespondTo(y []float64, src Sources, ground bool, w []float64) {
	p.s.load(y, src, ground)
	for k, v := range w {
		v /= p.Length[k]
		for c := p.first[k]; c < p.first[k+1]; c++ {
			y[p.row[c]] += v * p.gain[c]
		}
	}
	p.s.solve(y)
}

// Means sets t to the mean temperatures of the patches, for the whole solution.
func (p *HullPatches) Means(t, y []float64, src Sources) {
	m, n := p.measured(), p.s.n
	for k := range t {
		t[k] = y[n] + floats.Dot(m.temp[k*n:][:n], y[:n])
	}
	for j, feel := range m.feel {
		v := pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j])
		for k, row := range feel {
			c := min(len(row), len(v))
			t[k] += dot(row[:c], v)
		}
	}
}
