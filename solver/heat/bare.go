package heat

import "math"

// bare is one part without a wall and without other parts inside: everything is concentric.
type bare struct {
	m     *Model
	piece piece
}

// layoutBare prepares a part whose own outside has the film. A cable's jacket is then the wall of its inside.
func (m *Model) layoutBare() {
	p := &m.p
	for i := range p.Parts {
		q := &p.Parts[i]
		if q.In != -1 {
			continue
		}
		if q.Core == Inside {
			m.top = newRegion(p, i, q.K)
			m.top.r = q.Radius
			m.top.wall = outerWall(q.K, q.Radius, q.Rings, p.Wall.Film)
			continue
		}
		m.bare = &bare{m: m, piece: newPiece(p, i, 1)}
	}
}

// resistance is the whole way from the core to the outside, film that of the film alone, K·m/W.
func (b *bare) resistance() (whole, film float64) {
	if h := b.m.p.Wall.Film; !math.IsInf(h, 1) {
		film = 1 / (2 * math.Pi * b.piece.drawn * h)
	}
	return b.piece.series + film, film
}

func (b *bare) solve(heats []float64) *Result {
	r := b.m.blank(Converged)
	part := &b.m.p.Parts[b.piece.part]
	whole, film := b.resistance()
	amb := b.m.p.Wall.Ambient
	q := 0.0
	switch part.Core {
	case Metal:
		q = heats[b.piece.part]
		r.Generated = q
	case FixedBore:
		if whole > 0 {
			q = (part.Fixed - amb) / whole
		}
		r.Absorbed[b.piece.part] = -q
	}
	s := pieceState{piece: b.piece, mean: amb + q*film, q: q}
	r.Surfaces[s.part] = s.faces()
	r.Core[s.part] = s.core(r.Surfaces[s.part])
	r.WallMax = []float64{s.mean}
	r.WallMean = s.mean
	r.Released = b.released(s.mean, q)
	r.ErrorK = 0
	r.Field = &bareField{p: &s, l: s.layers()}
	return r
}

// released is the film's heat at the outside's temperature, or the last layer's where the outside is held.
func (b *bare) released(outside, q float64) float64 {
	if h := b.m.p.Wall.Film; !math.IsInf(h, 1) {
		return h * (outside - b.m.p.Wall.Ambient) * 2 * math.Pi * b.piece.drawn
	}
	return q
}

func (b *bare) influence(out [][]float64) {
	i := b.piece.part
	if b.m.p.Parts[i].Core != Metal {
		return
	}
	whole, _ := b.resistance()
	out[i] = make([]float64, len(out))
	out[i][i] = whole
}

// bareField is the field of a bare part.
type bareField struct {
	p *pieceState
	l layers
}

func (f *bareField) At(x, y float64) float64 {
	z := complex(x, y) - f.p.at
	r2 := square(z)
	switch {
	case math.Sqrt(r2) > f.p.drawn*(1+1e-12):
		return math.NaN()
	case r2 > f.l.r0*f.l.r0:
		return f.l.at(z, r2)
	}
	return f.l.innerT
}

func (f *bareField) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = f.At(x0+float64(i)*dx, y)
	}
}
