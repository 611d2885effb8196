package heat

import "context"

// influence fills in the rises for 1 W/m in each metal; with radiation they are the tangent at the last solution.
func (s *shaped) influence(ctx context.Context, out [][]float64) Status {
	if !s.prepare(ctx) || !s.solvedHere(ctx) {
		return Cancelled
	}
	parts := s.m.p.Parts
	for j := range parts {
		if parts[j].Core != Metal {
			continue
		}
		y, ok := s.column(ctx, j)
		if !ok {
			return Cancelled
		}
		for i := range parts {
			if parts[i].Core != Metal {
				continue
			}
			if out[i] == nil {
				out[i] = make([]float64, len(parts))
			}
			out[i][j] = s.sys.Metal(y, s.plan.first[i])
		}
	}
	if s.glow != nil {
		return Converged
	}
	for i := range out { // reciprocal but for what the densities lack
		for j := range i {
			if out[i] != nil && out[j] != nil {
				v := (out[i][j] + out[j][i]) / 2
				out[i][j], out[j][i] = v, v
			}
		}
	}
	return Converged
}

// column is the answer to 1 W/m more in part j.
func (s *shaped) column(ctx context.Context, j int) ([]float64, bool) {
	if s.glow != nil {
		return s.glow.column(ctx, s.plan.first[j])
	}
	heats := make([]float64, len(s.m.p.Parts))
	heats[j] = 1
	return s.sys.Respond(s.load(heats), false), ctx.Err() == nil
}

// solvedHere solves for the last heats, or the Problem's own, where surfaces radiate and the last solution is not that of the section as it is.
func (s *shaped) solvedHere(ctx context.Context) bool {
	if s.glow == nil || s.glow.cores != nil {
		return true
	}
	heats := s.heats
	if heats == nil {
		heats = s.m.heats(nil)
	}
	return s.solve(ctx, heats).Status != Cancelled
}

// radiates tells whether surfaces radiate to each other, as far as the problem tells.
func (s *shaped) radiates() bool {
	if s.sys != nil {
		return s.glow != nil
	}
	p := &s.m.p
	if p.Wall.Shape != BarePart && p.Filling != Solid {
		return true
	}
	for i := range p.Parts {
		if p.Parts[i].Core == Inside && p.Parts[i].Filling != Solid {
			return true
		}
	}
	return false
}

// tangentAt is the temperature of each metal that its row of the influence k leads to without heat.
func (s *shaped) tangentAt(k [][]float64) []float64 {
	ground := make([]float64, len(k))
	for i, row := range k {
		if row == nil {
			continue
		}
		ground[i] = s.glow.cores[i]
		for j, q := range s.heats {
			ground[i] -= row[j] * q
		}
	}
	return ground
}

// resume takes over what old, of a like section, knows.
func (s *shaped) resume(old *shaped) {
	if s.sys != nil {
		return
	}
	if s.before = old.glow; s.before == nil {
		s.before = old.before
	}
	if s.old = old.sys; s.old == nil {
		s.old = old.old
	}
}
