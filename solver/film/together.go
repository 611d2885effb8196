package film

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// Body is one of several in one surroundings.
type Body struct {
	Face Face   // Round, by its perimeter
	Hull []Disc // it is the hull of these, y upwards from the section's axis
	Row  Row    // the published arrangement that stands for its neighbours
}

// Together are bodies, each of one surface temperature, that radiate to each other and shelter each other from the air: grey-diffuse
// exchange by exact view factors, convection by the group constants of IEC 60287-2-1. In the ground their rises add up by the method of images.
// Not safe for concurrent use.
type Together struct {
	Outside Outside
	Bodies  []Body

	ready bool
	pull  [][]float64 // per body of each other: net exchange over σ(T⁴ − T⁴), per area of the first
	away  []float64   // the same with the surroundings
	lit   []float64   // of the perimeter, as seen from above
	open  []float64   // of the row's worst placed cable
	soil  *mat.Dense  // Buried: K·m/W of each by the heat of each
}

func (b *Body) perimeter() float64 { return math.Pi * b.Face.DiameterM }

// prepare finds what depends on places only.
func (t *Together) prepare() {
	if t.ready {
		return
	}
	t.ready = true
	n := len(t.Bodies)
	t.open = make([]float64, n)
	for i := range t.Bodies {
		t.open[i] = t.Bodies[i].Row.Open()
	}
	switch t.Outside.Kind {
	case Buried:
		t.images()
	case Water:
	default:
		hulls := make([][]Disc, n)
		for i := range hulls {
			hulls[i] = t.Bodies[i].Hull
		}
		between, lit := Views(hulls)
		t.lit = lit
		for i := range lit {
			t.lit[i] /= t.Bodies[i].perimeter()
		}
		t.exchange(between)
	}
}

// exchange solves the grey-diffuse radiosities J = εE + (1−ε)(F J + F_away E_r) once: net q = ε(E − F J − F_away E_r).
func (t *Together) exchange(between [][]float64) {
	n := len(t.Bodies)
	f, lhs, emit := mat.NewDense(n, n, nil), mat.NewDense(n, n, nil), mat.NewDense(n, n, nil)
	for i := range t.Bodies {
		e := t.Bodies[i].Face.Emissivity
		for j := range n {
			v := between[i][j] / t.Bodies[i].perimeter()
			f.Set(i, j, v)
			lhs.Set(i, j, -(1-e)*v)
		}
		lhs.Set(i, i, lhs.At(i, i)+1)
		emit.Set(i, i, e)
	}
	var j, g mat.Dense
	if err := j.Solve(lhs, emit); err != nil { // diagonally dominant: never
		panic("film: the exchange of radiation has no solution")
	}
	g.Mul(f, &j)
	t.pull, t.away = make([][]float64, n), make([]float64, n)
	for i := range n {
		e := t.Bodies[i].Face.Emissivity
		t.pull[i] = make([]float64, n)
		t.away[i] = e * (1 - g.At(i, i))
		for k := range n {
			if k != i {
				t.pull[i][k] = e * g.At(i, k)
				t.away[i] -= t.pull[i][k]
			}
		}
	}
}

// Follow tells how the TowardK of each film, its coefficient as it is, rises with the surface temperature of each body (K/K), at given ones: what a
// flow follows beyond its own film. The first index is that of the film.
func (t *Together) Follow(surfaceK []float64) [][]float64 {
	t.prepare()
	if t.soil != nil {
		return t.followSoil()
	}
	out := make([][]float64, len(t.Bodies))
	for i, s := range surfaceK {
		out[i] = make([]float64, len(t.Bodies))
		h := t.Film(i, surfaceK).Coefficient()
		if t.pull != nil {
			for j, p := range t.pull[i] {
				k := surfaceK[j]
				out[i][j] = p * 4 * stefan * k * k * k / h
			}
		}
		const d = 1e-3
		up, down := append([]float64(nil), surfaceK...), append([]float64(nil), surfaceK...)
		up[i], down[i] = s+d, s-d
		out[i][i] = 1 - (t.Film(i, up).Flux(s+d)-t.Film(i, down).Flux(s-d))/(2*d*h)
	}
	return out
}

// Film returns the film of body i with all surfaces at the temperatures given: as Outside.Film, the neighbours in TowardK.
func (t *Together) Film(i int, surfaceK []float64) Answer {
	t.prepare()
	if t.soil != nil {
		heat := t.heats(surfaceK)
		return t.buried(i, surfaceK[i], heat)
	}
	b, s := &t.Bodies[i], surfaceK[i]
	a := t.Outside.Film(b.Face, s)
	if t.pull == nil {
		return a
	}
	a.Convective *= t.share(i, s)
	a.Radiative, a.AbsorbedWM2 = 0, b.Face.Absorptivity*t.Outside.SunWM2*t.lit[i]
	drive := a.Convective*t.Outside.AmbientK + a.AbsorbedWM2
	see := func(share, k float64) {
		h := share * stefan * (s*s + k*k) * (s + k)
		a.Radiative += h
		drive += h * k
	}
	see(t.away[i], t.Outside.RadiantK)
	for j, p := range t.pull[i] {
		if p > 0 {
			see(p, surfaceK[j])
		}
	}
	a.TowardK = t.Outside.AmbientK
	if h := a.Coefficient(); h > 0 {
		a.TowardK = drive / h
	}
	return a
}

// share is what the neighbours leave of the convection of body i. Published constants are for cables that lie in still air.
func (t *Together) share(i int, surfaceK float64) float64 {
	o := &t.Outside
	if o.Kind != StillAir && o.Kind != MovingAir || o.Vertical || o.SpeedMS > 0 {
		return 1
	}
	b := &t.Bodies[i]
	return b.Row.Sheltered(b.Face.DiameterM, t.open[i], surfaceK-o.AmbientK)
}

// Surfaces returns the temperatures at which the bodies give off the flows given (W/m²), and the films there. What one gives off rises with
// its own temperature by more than it falls with all others', so there is one answer: Newton's steps, a body at a time.
func (t *Together) Surfaces(fluxWM2 []float64) (surfaceK []float64, films []Answer) {
	t.prepare()
	n := len(t.Bodies)
	surfaceK, films = make([]float64, n), make([]Answer, n)
	if t.soil != nil {
		heat := make([]float64, n)
		for i := range heat {
			heat[i] = fluxWM2[i] * t.Bodies[i].perimeter()
		}
		for i := range films {
			films[i] = t.buried(i, 0, heat)
			surfaceK[i] = films[i].TowardK + fluxWM2[i]/films[i].Convective
			films[i] = t.buried(i, surfaceK[i], heat)
		}
		return surfaceK, films
	}
	for i := range surfaceK {
		surfaceK[i], films[i] = t.Outside.Surface(t.Bodies[i].Face, fluxWM2[i])
	}
	if t.pull != nil {
		t.agree(surfaceK, fluxWM2)
	}
	for i := range films {
		films[i] = t.Film(i, surfaceK)
	}
	return surfaceK, films
}

// agree moves the temperatures until each body gives off its flow.
func (t *Together) agree(surfaceK, flux []float64) {
	const sweeps, small, widest = 200, 1e-9, 50
	for range sweeps {
		worst := 0.0
		for i, s := range surfaceK {
			const d = 1e-3
			q := t.Film(i, surfaceK).Flux(s)
			surfaceK[i] = s + d
			slope := (t.Film(i, surfaceK).Flux(s+d) - q) / d
			step := math.Max(-widest, math.Min(widest, (flux[i]-q)/slope))
			if !(slope > 0) {
				step = 0
			}
			surfaceK[i] = math.Min(math.Max(s+step, 1), 1e5)
			worst = math.Max(worst, math.Abs(surfaceK[i]-s))
		}
		if worst < small {
			return
		}
	}
}

// Flux returns what the bodies give off at surface temperatures, W/m².
func (t *Together) Flux(surfaceK []float64) []float64 {
	t.prepare()
	out := make([]float64, len(surfaceK))
	for i := range out {
		out[i] = t.Film(i, surfaceK).Flux(surfaceK[i])
	}
	return out
}
