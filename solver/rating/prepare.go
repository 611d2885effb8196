package rating

import (
	"context"

	"packrise/solver/heat"
)

// model answers for heats: one heat.Model, or a heat.Group of bodies apart.
type model interface {
	Solve(ctx context.Context, heats []float64) *heat.Result
	Tangent(ctx context.Context) (k [][]float64, ground []float64, status heat.Status)
	Radiates() bool
}

// tangent is the influence matrix at the last answer, films and air as they are; of bodies apart the films follow the outsides of all bodies, so that
// each warms the others.
func (e *Engine) tangent(ctx context.Context) ([][]float64, heat.Status) {
	g, ok := e.model.(*heat.Group)
	if !ok || e.out.together == nil {
		k, _, status := e.model.Tangent(ctx)
		return k, status
	}
	surfaces, _ := e.out.together.Surfaces(e.flux)
	return g.Coupled(ctx, e.out.together.Follow(surfaces))
}

// prepared is the heat model of one body with the problem that it is for.
type prepared struct {
	model   *heat.Model
	problem heat.Problem
	member  *heat.Member // of bodies apart
}

// prepare makes the models fit the problems of a scene.
func (e *Engine) prepare(s *scene, problems []heat.Problem, grade heat.Accuracy) {
	old := e.bodies
	if e.grade != grade {
		for i := range old {
			old[i].problem.Parts = nil // fits nothing
		}
	}
	e.bodies, e.grade = make([]prepared, len(problems)), grade
	used := make([]bool, len(old))
	for k := range problems {
		e.bodies[k] = fitting(old, used, k, &problems[k])
	}
	for k := range problems {
		e.bodies[k].fit(problems[k], grade)
	}
	if !s.apart() {
		e.model = e.bodies[0].model
		return
	}
	members := make([]*heat.Member, len(problems))
	for k := range members {
		members[k] = e.bodies[k].place(s, &s.bodies[k])
	}
	e.model = heat.NewGroup(len(s.parts), members)
}

// fitting takes what was prepared for a problem that differs least from p: in the same place if it is the same or one part moved, else the same
// elsewhere; else what stood in its place, to start from.
func fitting(old []prepared, used []bool, k int, p *heat.Problem) prepared {
	take := func(j int) prepared {
		used[j] = true
		return old[j]
	}
	if k < len(old) && !used[k] && difference(&old[k].problem, p) != other {
		return take(k)
	}
	for j := range old {
		if !used[j] && len(old[j].problem.Parts) == len(p.Parts) && difference(&old[j].problem, p) == same {
			return take(j)
		}
	}
	if k < len(old) && !used[k] {
		return take(k)
	}
	return prepared{}
}

// fit makes the model fit the problem: kept when it is the same, moved when one part of the top level moved, given other films, else new.
func (b *prepared) fit(p heat.Problem, grade heat.Accuracy) {
	if b.model != nil {
		if moved := difference(&b.problem, &p); moved != other {
			if moved >= 0 {
				b.model.Move(moved, p.Parts[moved].X, p.Parts[moved].Y)
				b.changed()
			}
			if !sameOutside(&b.problem.Wall, &p.Wall) {
				b.model.Outside(p.Wall)
				b.changed()
			}
			b.problem = p
			return
		}
	}
	m := heat.New(p, heat.Settings{Accuracy: grade})
	m.Resume(b.model)
	*b = prepared{model: m, problem: p}
}

func (b *prepared) changed() {
	if b.member != nil {
		b.member.Changed()
	}
}

// place tells the group where a body lies.
func (b *prepared) place(s *scene, at *body) *heat.Member {
	if b.member == nil {
		b.member = &heat.Member{Model: b.model}
	}
	m := b.member
	x, y := (at.origin.X-s.origin.X)*mm, (at.origin.Y-s.origin.Y)*mm
	const edge = 1e-9 // m, for rounding
	m.Parts, m.X, m.Y, m.Around = at.all, x, y, at.around
	m.Box = [4]float64{
		(at.box[0]-at.origin.X)*mm - edge, (at.box[1]-at.origin.Y)*mm - edge,
		(at.box[2]-at.origin.X)*mm + edge, (at.box[3]-at.origin.Y)*mm + edge,
	}
	return m
}
