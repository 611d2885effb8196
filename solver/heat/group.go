package heat

import (
	"context"
	"math"
	"slices"

	"gonum.org/v1/gonum/mat"
)

// Member is a section of its own among several: one body in the surroundings that all share.
type Member struct {
	Model  *Model
	Parts  []int      // per part of the model its index in the group
	X, Y   float64    // of the model's origin in the group's coordinates
	Box    [4]float64 // x0, y0, x1, y1 of the body in its model's coordinates
	Around float64    // m, its circumference

	heats []float64
	last  *Result
}

// Changed is to be called after Model moved a part or was given another outside.
func (m *Member) Changed() { m.last = nil }

// Group lets members answer as one section. What they do to each other outside is in the films that the caller gives each Model. Not safe for
// concurrent use.
type Group struct {
	n       int
	members []*Member
}

const badMember = "heat: every part of a group belongs to one member"

// NewGroup puts n parts together. Misuse panics.
func NewGroup(n int, members []*Member) *Group {
	seen := make([]bool, n)
	count := 0
	for _, m := range members {
		if len(m.Parts) != len(m.Model.p.Parts) {
			panic(badMember)
		}
		for _, i := range m.Parts {
			if i < 0 || i >= n || seen[i] {
				panic(badMember)
			}
			seen[i] = true
			count++
		}
	}
	if count != n || len(members) == 0 {
		panic(badMember)
	}
	return &Group{n, members}
}

// solve answers for the heats of the group's parts, or hands back the last answer where nothing changed.
func (m *Member) solve(ctx context.Context, heats []float64) *Result {
	own := make([]float64, len(m.Parts))
	for k, i := range m.Parts {
		own[k] = heats[i]
	}
	if m.last != nil && slices.Equal(own, m.heats) {
		return m.last
	}
	r := m.Model.Solve(ctx, own)
	m.heats, m.last = own, r
	if r.Status != Converged {
		m.last = nil
	}
	return r
}

// Solve is Model.Solve for all members. WallMax and WallMean are of all outsides; Bodies has each member's own answer.
func (g *Group) Solve(ctx context.Context, heats []float64) *Result {
	if len(heats) != g.n {
		panic(badHeats)
	}
	r := &Result{
		Core: make([]float64, g.n), Surfaces: make([][]float64, g.n), Absorbed: make([]float64, g.n), PartErrorK: make([]float64, g.n),
		WallMax: []float64{math.Inf(-1)}, Nusselt: 1, Bodies: make([]*Result, len(g.members)),
	}
	f := make(groupField, len(g.members))
	around := 0.0
	for b, m := range g.members {
		var own *Result
		if r.Status == Cancelled {
			own = m.Model.blank(Cancelled)
		} else {
			own = m.solve(ctx, heats)
		}
		r.Bodies[b], f[b] = own, groupPiece{m.X, m.Y, m.Box, own.Field}
		r.take(own, m)
		around += m.Around
	}
	r.WallMean /= around
	r.Field = f
	return r
}

// take adds a member's answer.
func (r *Result) take(own *Result, m *Member) {
	for k, i := range m.Parts {
		r.Core[i], r.Surfaces[i], r.Absorbed[i] = own.Core[k], own.Surfaces[k], own.Absorbed[k]
		if k < len(own.PartErrorK) {
			r.PartErrorK[i] = own.PartErrorK[k]
		}
	}
	r.WallMax[0] = math.Max(r.WallMax[0], own.WallMax[len(own.WallMax)-1])
	r.WallMean += m.Around * own.WallMean
	r.Generated += own.Generated
	r.Released += own.Released
	r.Status = max(r.Status, own.Status)
	r.Unknowns += own.Unknowns
	r.Steps += own.Steps
	r.Radiates, r.Frozen, r.Beyond = r.Radiates || own.Radiates, r.Frozen || own.Frozen, r.Beyond || own.Beyond
	r.Nusselt, r.ErrorK, r.MetalGap = math.Max(r.Nusselt, own.Nusselt), math.Max(r.ErrorK, own.ErrorK), math.Max(r.MetalGap, own.MetalGap)
}

// Radiates tells whether surfaces radiate to each other in any member.
func (g *Group) Radiates() bool {
	return slices.ContainsFunc(g.members, func(m *Member) bool { return m.Model.Radiates() })
}

// Tangent is Model.Tangent with films as they are: bodies do not feel each other.
func (g *Group) Tangent(ctx context.Context) (k [][]float64, ground []float64, status Status) {
	k, ground = make([][]float64, g.n), make([]float64, g.n)
	for _, m := range g.members {
		own, floor, status := m.Model.Tangent(ctx)
		if status != Converged {
			return k, nil, status
		}
		for a, i := range m.Parts {
			ground[i] = floor[a]
			if own[a] == nil {
				continue
			}
			k[i] = make([]float64, g.n)
			for b, j := range m.Parts {
				k[i][j] = own[a][b]
			}
		}
	}
	return k, ground, Converged
}

// Coupled is the tangent with films that follow. follow[i][j] is how much what the film of body i leads to, its model's Ambient, rises with
// the mean temperature of the outside of body j (K/K), i itself included, where its film changes with its own. It is for the last solution.
func (g *Group) Coupled(ctx context.Context, follow [][]float64) ([][]float64, Status) {
	k, _, status := g.Tangent(ctx)
	if status != Converged {
		return nil, status
	}
	n := len(g.members)
	sway, rho := make([][]float64, n), make([]float64, n)
	for b, m := range g.members {
		if sway[b], rho[b], status = m.sway(ctx); status != Converged {
			return nil, status
		}
	}
	lhs, rhs := mat.NewDense(n, n, nil), mat.NewDense(n, n, nil)
	for i := range n {
		for j, m := range g.members {
			d := 1 / (m.Model.p.Wall.Film * m.Around)
			lhs.Set(i, j, -follow[i][j]*(1+d*rho[j]))
			rhs.Set(i, j, follow[i][j]*d)
		}
		lhs.Set(i, i, lhs.At(i, i)+1)
	}
	var shift mat.Dense // of each film's end by the heat of each body
	if err := shift.Solve(lhs, rhs); err != nil {
		return k, StoppedEarly
	}
	for b, m := range g.members {
		for a, i := range m.Parts {
			for c, o := range g.members {
				for e, j := range o.Parts {
					if k[i] != nil && k[j] != nil {
						k[i][j] += sway[b][a] * shift.At(b, c) * sway[c][e]
					}
				}
			}
		}
	}
	return k, Converged
}

// sway is how the temperatures of a member's parts, and the heat that it gives off, follow what its film leads to: 1 and 0 unless bores are held. By
// reciprocity the former is also the share of each part's heat that comes out.
func (m *Member) sway(ctx context.Context) (parts []float64, released float64, status Status) {
	held := false
	parts = make([]float64, len(m.Parts))
	for a := range parts {
		parts[a] = 1
		held = held || m.Model.p.Parts[a].Core == FixedBore
	}
	if !held {
		return parts, 0, Converged
	}
	w := m.Model.p.Wall
	before := m.Model.Solve(ctx, m.heats)
	warmer := w
	warmer.Ambient++
	m.Model.Outside(warmer)
	after := m.Model.Solve(ctx, m.heats)
	m.Model.Outside(w)
	m.Changed()
	for a := range parts {
		parts[a] = after.Core[a] - before.Core[a]
	}
	return parts, after.Released - before.Released, max(before.Status, after.Status)
}

// groupField is the field of all members, as they lay.
type groupField []groupPiece

type groupPiece struct {
	x, y float64
	box  [4]float64
	of   Field
}

func (f groupField) At(x, y float64) float64 {
	for i := range f {
		p := &f[i]
		u, v := x-p.x, y-p.y
		if u < p.box[0] || v < p.box[1] || u > p.box[2] || v > p.box[3] {
			continue
		}
		if t := p.of.At(u, v); !math.IsNaN(t) {
			return t
		}
	}
	return math.NaN()
}

func (f groupField) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = math.NaN()
	}
	var buf []float64
	for k := range f {
		p := &f[k]
		if v := y - p.y; v < p.box[1] || v > p.box[3] {
			continue
		}
		lo, hi := 0, len(dst)
		if dx > 0 {
			lo = int(math.Ceil(max(0, (p.x+p.box[0]-x0)/dx)))
			hi = int(math.Floor(min(float64(hi), (p.x+p.box[2]-x0)/dx+1)))
		}
		if lo >= hi {
			continue
		}
		buf = append(buf[:0], dst[lo:hi]...)
		p.of.Row(buf, y-p.y, x0+float64(lo)*dx-p.x, dx)
		for i, t := range buf {
			if !math.IsNaN(t) {
				dst[lo+i] = t
			}
		}
	}
}
