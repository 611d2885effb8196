package rating

import (
	"context"

	"gonum.org/v1/gonum/mat"

	"packrise/solver/heat"
	"packrise/solver/section"
)

// Source is the heat law of a conductor at its present current: Square·(1 + Alpha·(T − 20)) + Fixed W/m, T its own temperature in °C.
type Source struct {
	ID     string
	Square float64 // I²R20 with the skin effect at the answer's temperature, W/m
	Alpha  float64 // 1/K
	Fixed  float64 // W/m
}

// Point is an answer with how its conductors' temperatures follow their heats near it: for screening what might help before it is solved
// in full. Immutable but for Learn.
type Point struct {
	*Result
	Sources []Source    // as Result.Conductors
	K       [][]float64 // K per W/m, [conductor][source]; films and air as they are, see Learn; of bodies apart films follow, so that each warms all others
}

// Point solves a document and writes its working point out. The point is nil when a problem is refused or the answer is not converged (its
// Result says how it ended then). Heats in W/m, temperatures in °C.
func (e *Engine) Point(ctx context.Context, d *section.Document, o Options) (*Point, *Result, []section.Problem, error) {
	r, problems, err := e.Solve(ctx, d, o)
	if r == nil || err != nil || r.Status != heat.Converged {
		return nil, r, problems, err
	}
	k, status := e.tangent(ctx)
	if status != heat.Converged {
		c := *r
		c.Status = status
		return nil, &c, problems, nil
	}
	s, _ := resolve(d, e.cat)
	a := newAffine(&s, k, make([]float64, len(s.parts)))
	p := &Point{Result: r, K: make([][]float64, len(a.index))}
	for row, i := range a.index {
		p.K[row] = append([]float64(nil), a.k.RawRowView(row)...)
		p.Sources = append(p.Sources, Source{s.parts[i].id, a.square[row], a.alpha[row], a.fixed[row]})
	}
	return p, r, problems, nil
}

// Learn takes over from another answer of the same section with other heats how the outside follows: films fall with the surface's
// temperature, which the influence matrix of fixed films leaves out. What the matrix misses there is given to all conductors alike, since
// the whole section stands on the same outside. An answer of the same heat, or of another section, changes nothing.
func (p *Point) Learn(r *Result) {
	if r == nil || r.Status != heat.Converged || len(r.Conductors) != len(p.Conductors) {
		return
	}
	dq := make([]float64, len(p.Sources))
	sum := 0.0
	for j := range dq {
		if r.Conductors[j].ID != p.Conductors[j].ID {
			return
		}
		dq[j] = r.Conductors[j].HeatWM - p.Conductors[j].HeatWM
		sum += dq[j]
	}
	if whole := p.Generated; sum*sum < 1e-8*whole*whole || sum == 0 {
		return
	}
	miss := 0.0
	for i, row := range p.K {
		miss += r.Conductors[i].TempC - p.Conductors[i].TempC
		for j, k := range row {
			miss -= k * dq[j]
		}
	}
	miss /= float64(len(p.K)) * sum
	for i := range p.K {
		for j := range p.K[i] {
			p.K[i][j] += miss
		}
	}
}

// Predict returns the conductors' temperatures (°C) to first order when the square of each current is multiplied by x (one per source; nil
// leaves them) and extra heat (W/m, nil for none) is made in each, with resistances at their own temperatures. nil where no steady state is
// near.
func (p *Point) Predict(x, extra []float64) []float64 {
	n := len(p.Sources)
	lhs, rhs := mat.NewDense(n, n, nil), mat.NewVecDense(n, nil)
	for i := range n {
		sum := p.Conductors[i].TempC
		for j, s := range p.Sources {
			square := s.Square
			if x != nil {
				square *= x[j]
			}
			k := p.K[i][j]
			lhs.Set(i, j, -k*square*s.Alpha)
			sum += k * (square*(1-20*s.Alpha) + s.Fixed - p.Conductors[j].HeatWM)
			if extra != nil {
				sum += k * extra[j]
			}
		}
		lhs.Set(i, i, lhs.At(i, i)+1)
		rhs.SetVec(i, sum)
	}
	var t mat.VecDense
	if err := t.SolveVec(lhs, rhs); err != nil {
		return nil
	}
	return t.RawVector().Data
}
