package rating

import (
	"context"
	"maps"
	"math"
	"slices"

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
	temps []float64
	around

	memory       anderson
	failed, good *around // what let a metal run away, and something hotter that did not
}

// around is what the conductors lie in: both conduct better the hotter they are.
type around struct {
	air  spaces
	flux []float64 // W/m² of each face, that its film is taken at
}

// answer runs the outer loop around the fixed point of the resistances.
func (e *Engine) answer(ctx context.Context, s *scene, o Options) answered {
	l := loop{e: e, s: s, grade: o.Accuracy, temps: e.startTemps(s), around: around{air: e.startAir(s)}}
	s.out.air.Cautious = o.Cautious
	if t := s.out.together; t != nil {
		t.Outside.Cautious = o.Cautious
	}
	warm := s.out.free && e.out.like(&s.out) && len(e.temps) == len(s.parts)
	l.keep = warm && o.Accuracy == heat.Draft
	if warm {
		l.flux = e.flux
	} else if s.out.free {
		l.flux = s.guess(l.temps)
	}
	a := l.run(ctx)
	if a.status == heat.ThermalRunaway && s.out.free {
		if a = l.critical(ctx, a); a.status == heat.StoppedEarly { // what hid between the films is found from their hotter side
			l.failed, l.good = nil, nil
			l.memory.forget()
			l.temps = e.coldTemps(s)
			if b := l.run(ctx); b.status == heat.Converged {
				a = b
			}
		}
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

// guess spreads the heat that metals at temps make over the faces: evenly, or body by body.
func (s *scene) guess(temps []float64) []float64 {
	if !s.apart() {
		return s.out.guess(s.heatAt(temps))
	}
	q := make([]float64, s.out.n)
	for b := range s.bodies {
		for _, i := range s.bodies[b].all {
			q[b] += s.parts[i].heat(temps[i]) / s.out.wide[b]
		}
	}
	return q
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
		if l.good != nil && l.failed.near(l.good) { // the films that a steady state asks for let a metal run away
			a.status = heat.ThermalRunaway
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
	l.e.prepare(l.s, l.s.problems(l.air, f), l.grade)
	a := settle(ctx, l.e.model, l.s, l.temps, l.grade)
	a.air, a.films = l.air, f
	return a
}

// step takes what an answer says of air and films over; true if they were right already. A draft is content with its first air.
func (l *loop) step(a *answered) (done bool) {
	done = true
	next := around{air: l.air, flux: l.flux}
	if len(l.air) > 0 && (l.grade != heat.Draft || l.failed != nil) {
		next.air = l.air.copy()
		done = next.air.update(l.s, a.heat) < airTolerance
	}
	if l.s.out.free && !l.keep {
		next.flux = l.s.out.flux(a.heat)
		done = done && l.s.out.miss(a.films, next.flux) <= filmTolerance(l.grade)
	}
	if done {
		return true
	}
	l.follow(next)
	return false
}

// follow chooses what to try after the present state led to next.
func (l *loop) follow(next around) {
	good := l.around
	l.around = next.with(l.memory.next(l.vector(), next.vector()))
	if l.failed == nil {
		return
	}
	l.good = &good
	if l.below(l.failed) {
		l.around = l.failed.between(&good)
	}
}

// plainFilm (W/m²K) weighs flows against temperatures: a usual film.
const plainFilm = 10

// vector writes a state in kelvins.
func (a *around) vector() []float64 {
	x := make([]float64, 0, len(a.flux)+len(a.air))
	for _, q := range a.flux {
		x = append(x, q/plainFilm)
	}
	for _, i := range a.air.order() {
		x = append(x, a.air[i])
	}
	return x
}

// with is the state of a vector.
func (a *around) with(x []float64) around {
	out := around{air: a.air.copy(), flux: make([]float64, len(a.flux))}
	for i := range out.flux {
		out.flux[i] = x[i] * plainFilm
	}
	for k, i := range a.air.order() {
		out.air[i] = math.Max(x[len(out.flux)+k], 1-zeroC)
	}
	return out
}

// order lists the regions, so that vectors agree.
func (a spaces) order() []int { return slices.Sorted(maps.Keys(a)) }

func total(x []float64) (sum float64) {
	for _, v := range x {
		sum += v
	}
	return sum
}

// between is half way.
func (a *around) between(b *around) around {
	m := around{air: a.air.copy(), flux: make([]float64, len(a.flux))}
	for i := range m.flux {
		m.flux[i] = (a.flux[i] + b.flux[i]) / 2
	}
	for i, t := range b.air {
		m.air[i] = (m.air[i] + t) / 2
	}
	return m
}

// below tells whether a is nowhere hotter than b.
func (a *around) below(b *around) bool {
	for i, t := range a.air {
		if t > b.air[i] {
			return false
		}
	}
	for i, q := range a.flux {
		if q > b.flux[i] {
			return false
		}
	}
	return true
}

// near tells whether the two are the same for all purposes.
func (a *around) near(b *around) bool {
	for i, t := range a.air {
		if math.Abs(t-b.air[i]) > 0.1 {
			return false
		}
	}
	return math.Abs(total(a.flux)-total(b.flux)) < 1e-4*math.Abs(total(b.flux))
}

// raise tries a hotter outside and hotter air after a metal ran away with those at hand. False if they are hotter than any metal may be, or
// nothing is left between what failed and what did not.
func (l *loop) raise() bool {
	failed := l.around
	l.failed = &failed
	l.memory.forget()
	l.temps = l.e.coldTemps(l.s)
	if l.good != nil {
		l.around = failed.between(l.good)
		return !failed.near(l.good)
	}
	return l.hotter()
}

// hotter raises air and outside by half of what they are over the ambient. False if nothing may get hotter.
func (l *loop) hotter() bool {
	o := &l.s.out
	ambient := l.s.doc.Surroundings.AmbientC.V
	up := func(c float64) float64 { return ambient + 1.5*max(c-ambient, 10) }
	l.air, l.flux = l.air.copy(), slices.Clone(l.flux)
	hottest := math.Inf(-1)
	for j, c := range l.air {
		l.air[j] = up(c)
		hottest = max(hottest, l.air[j])
	}
	if o.together != nil {
		return l.hotterBodies(up, hottest)
	}
	for i := range o.n {
		if !o.open[i] {
			continue
		}
		t, _ := o.air.Surface(o.faces[i], l.flux[i])
		c := up(t - zeroC)
		hottest = max(hottest, c)
		l.flux[i] = o.air.Film(o.faces[i], c+zeroC).Flux(c + zeroC)
		for j := range l.air {
			l.air[j] = max(l.air[j], c)
		}
	}
	return hottest > ambient && hottest <= hottestC
}

// hotterBodies does it for several bodies: all outsides at once, since each is in the films of the others.
func (l *loop) hotterBodies(up func(float64) float64, hottest float64) bool {
	t := l.s.out.together
	surfaces, _ := t.Surfaces(l.flux)
	for i, k := range surfaces {
		c := up(k - zeroC)
		surfaces[i] = c + zeroC
		hottest = max(hottest, c)
	}
	l.flux = t.Flux(surfaces)
	for j := range l.air {
		l.air[j] = max(l.air[j], surfaces[0]-zeroC)
	}
	return hottest > l.s.doc.Surroundings.AmbientC.V && hottest <= hottestC
}

// critical finds the largest factor on all currents that settles, with films as they are there.
func (l *loop) critical(ctx context.Context, a answered) answered {
	l.failed, l.good = nil, nil
	l.memory.forget()
	for range loopRounds {
		f := l.s.out.at(l.flux)
		l.e.prepare(l.s, l.s.problems(l.air, f), l.grade)
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
		if l.s.out.miss(f, flux) < 0.01 {
			break
		}
		l.follow(around{air: l.air, flux: flux})
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
