package rating

import (
	"context"

	"packrise/solver/heat"
)

// Limits of the loop around the fixed point of the resistances, over the conductivity of enclosed air and the films outside. Conductivity
// follows its temperature at 0.25 %/K, so each round gains a factor of about ten; a film of given heat flow depends on nothing else, so
// what is left is how the flow follows.
const (
	loopRounds   = 30
	airTolerance = 5e-4 // of a conductivity
)

// filmTolerance is the largest error (K) of a face's temperature.
func filmTolerance(grade heat.Accuracy) float64 { return 2 * tolerance(grade) }

// loop is its state.
type loop struct {
	e     *Engine
	s     *scene
	grade heat.Accuracy
	keep  bool // the films as they are: while dragging
	air   spaces
	temps []float64
	flux  [4]float64 // W/m² of each face, that its film is taken at

	lastG, lastF []float64   // Anderson's memory of the flows
	failed, good *[4]float64 // flows whose films let a metal run away, and above them flows whose films don't
}

// answer runs the outer loop around the fixed point of the resistances.
func (e *Engine) answer(ctx context.Context, s *scene, o Options) answered {
	l := loop{e: e, s: s, grade: o.Accuracy, air: e.startAir(s), temps: e.startTemps(s)}
	warm := s.out.free && e.out == s.out && len(e.temps) == len(s.parts)
	l.keep = !s.out.free || warm && o.Accuracy == heat.Draft
	if warm {
		l.flux = e.flux
	} else if s.out.free {
		l.flux = s.out.guess(s.heatAt(l.temps))
	}
	a := l.run(ctx)
	if a.status == heat.ThermalRunaway && s.out.free {
		a = l.critical(ctx, a)
	}
	if a.status != heat.Converged {
		e.forget()
		return a
	}
	e.temps, e.air, e.out, e.flux = a.temps, a.air, s.out, l.flux
	return a
}

// heatAt is all heat (W/m) with the metals at temps.
func (s *scene) heatAt(temps []float64) (sum float64) {
	for i := range s.parts {
		sum += s.parts[i].heat(temps[i])
	}
	return sum
}

// run goes round until nothing changes any more.
func (l *loop) run(ctx context.Context) answered {
	for round := 1; ; round++ {
		a := l.solve(ctx)
		switch {
		case a.status == heat.ThermalRunaway && !l.keep && round < loopRounds && l.raise():
			continue
		case a.status != heat.Converged:
			return a
		}
		l.temps = a.temps
		if l.step(&a) {
			return a
		}
		if round >= loopRounds {
			a.status = heat.StoppedEarly
			return a
		}
	}
}

// solve settles the resistances with the air and films at hand.
func (l *loop) solve(ctx context.Context) answered {
	f := l.s.out.at(l.flux)
	l.e.prepare(l.s.build(l.air, &f), l.grade)
	a := settle(ctx, l.e.model, l.s, l.temps, l.grade)
	a.air, a.films = l.air, f
	return a
}

// step takes what an answer says of air and films over; true if they were right already. A draft is content with its first air.
func (l *loop) step(a *answered) (done bool) {
	done = true
	if len(l.air) > 0 && l.grade != heat.Draft {
		next := l.air.copy()
		if next.update(l.s, a.heat) >= airTolerance {
			l.air, done = next, false
		}
	}
	if l.keep {
		return done
	}
	flux := l.s.out.flux(a.heat)
	if l.s.out.miss(&a.films, flux) <= filmTolerance(l.grade) {
		return done
	}
	l.follow(flux)
	return false
}

// follow chooses the next flows after the present ones turned out as flux.
func (l *loop) follow(flux [4]float64) {
	g, f := flux[:], make([]float64, 4)
	for i := range f {
		f[i] = flux[i] - l.flux[i]
	}
	next := [4]float64(mix(g, l.lastG, f, l.lastF))
	l.lastG, l.lastF = append([]float64(nil), g...), f
	if l.failed != nil && total(flux) < total(l.flux) {
		good := l.flux
		l.good = &good
		if total(next) <= total(*l.failed) {
			next = between(*l.failed, good)
		}
	}
	l.flux = next
}

func total(x [4]float64) float64 { return x[0] + x[1] + x[2] + x[3] }

func between(a, b [4]float64) (x [4]float64) {
	for i := range x {
		x[i] = (a[i] + b[i]) / 2
	}
	return x
}

// raise tries films of a hotter outside after a metal ran away with those at hand: films get better with temperature. False if the outside
// is hotter than any metal may be.
func (l *loop) raise() bool {
	failed := l.flux
	l.failed, l.lastG, l.lastF = &failed, nil, nil
	l.temps = l.e.coldTemps(l.s)
	if l.good != nil {
		l.flux = between(failed, *l.good)
		return total(*l.good)-total(failed) > 1e-6*total(*l.good)
	}
	o := &l.s.out
	for i := range o.n {
		if !o.open[i] {
			continue
		}
		t, _ := o.air.Surface(o.faces[i], l.flux[i])
		t = o.air.AmbientK + 1.5*max(t-o.air.AmbientK, 10)
		if t > hottestC+zeroC {
			return false
		}
		l.flux[i] = o.air.Film(o.faces[i], t).Flux(t)
	}
	return true
}

// critical finds the largest factor on all currents that settles, with films as they are there.
func (l *loop) critical(ctx context.Context, a answered) answered {
	l.failed, l.good, l.lastG, l.lastF = nil, nil, nil, nil
	for range loopRounds {
		f := l.s.out.at(l.flux)
		l.e.prepare(l.s.build(l.air, &f), l.grade)
		w, _, status := writeOut(ctx, l.e.model, l.s)
		if status != heat.Converged {
			return answered{status: status}
		}
		a.settles, a.at = w.largest()
		a.films = f
		r := l.e.model.Solve(ctx, w.heats(l.s, a.settles))
		if r.Status == heat.Cancelled {
			return answered{status: r.Status}
		}
		flux := l.s.out.flux(r)
		if l.s.out.miss(&f, flux) < 0.01 {
			break
		}
		l.follow(flux)
	}
	if a.settles >= 1 { // a steady state may hide between the films that were tried
		a.status = heat.StoppedEarly
	}
	return a
}

// heats are those of all parts at factor s on the currents.
func (a *affine) heats(sc *scene, s float64) []float64 {
	q := make([]float64, len(sc.parts))
	for j, t := range a.temperatures(s) {
		q[a.index[j]] = s*s*a.square[j]*(1+a.alpha[j]*(t-20)) + a.fixed[j]
	}
	return q
}
