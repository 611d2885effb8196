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
			m.top.lean(&p.Wall)
			continue
		}
		m.bare = &bare{m: m}
		c := newPiece(p, i, 1)
		m.bare.piece = newPiece(p, i, outermost(&c.stack))
	}
}

// resistance is the whole way from the core to the outside, film that of the film and what the outside rests against, K·m/W; base is the temperature
// without heat.
func (b *bare) resistance() (whole, film, base float64, t *rest) {
	w := &b.m.p.Wall
	base = w.Ambient
	if !math.IsInf(w.Film, 1) {
		film = 1 / (2 * math.Pi * b.piece.drawn * w.Film)
	}
	if w.Against.Share > 0 {
		if b.gripped() {
			return 0, 0, w.Against.Temp, nil
		}
		s := outerWall(1, b.piece.stack.R, b.m.p.Parts[b.piece.part].Rings, w.Film)
		s.Inner = b.piece.stack.Inner
		t = newRest(w, &s, 1/(2*math.Pi))
		lift := t.mix.Sign * dot(t.mix.W0, t.mix.W0)
		film, base = film+lift, base+lift*t.ground
	}
	return b.piece.series + film, film, base, t
}

// gripped tells that the part is metal without a layer and touches what holds its temperature.
func (b *bare) gripped() bool {
	return b.piece.source && len(b.piece.stack.Rings) == 0 && b.m.p.Wall.Against.Held && b.m.p.Wall.Against.Share > 0
}

func (b *bare) solve(heats []float64) *Result {
	r := b.m.blank(Converged)
	part := &b.m.p.Parts[b.piece.part]
	whole, film, base, rest := b.resistance()
	q := 0.0
	switch part.Core {
	case Metal:
		q = heats[b.piece.part]
		r.Generated = q
	case FixedBore:
		if whole > 0 {
			q = (part.Fixed - base) / whole
		}
		r.Absorbed[b.piece.part] = -q
	}
	s := pieceState{piece: b.piece, mean: base + q*film, q: q}
	var arc *arcSource
	if rest != nil {
		arc = rest.answer(nil, q)
		s.b = arc.within(&b.piece)
	}
	r.Surfaces[s.part] = s.faces()
	r.Core[s.part] = s.core(r.Surfaces[s.part])
	r.WallMax = []float64{r.Surfaces[s.part][len(r.Surfaces[s.part])-1]}
	r.WallMean = s.mean
	r.Released, r.AgainstOut = b.released(s.mean, q, arc)
	r.ErrorK = 0
	r.Field = &bareField{p: &s, l: s.layers()}
	return r
}

// released is the film's heat at the outside's temperature, or the last layer's where the outside is held, and what of it the arc takes up.
func (b *bare) released(outside, q float64, arc *arcSource) (all, taken float64) {
	w := &b.m.p.Wall
	open := w.Film * (outside - w.Ambient) * 2 * math.Pi * b.piece.drawn
	switch {
	case arc != nil:
		open, taken = arc.leaves(outside)
		return open + taken, taken
	case b.gripped():
		return q, q - open*(1-w.Against.Share)
	case math.IsInf(w.Film, 1):
		return q, 0
	}
	return open, 0
}

func (b *bare) influence(out [][]float64) {
	i := b.piece.part
	if b.m.p.Parts[i].Core != Metal {
		return
	}
	whole, _, _, _ := b.resistance()
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
