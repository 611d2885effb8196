package rating

import (
	"math"
	"slices"

	"packrise/solver/film"
	"packrise/solver/heat"
)

// like tells whether two outsides differ by their sizes alone, so that flows per area of one are a good guess for the other.
func (o *outside) like(p *outside) bool {
	if o.n != p.n || o.free != p.free || o.air != p.air || o.coat != p.coat || !slices.Equal(o.open, p.open) || o.rest != p.rest {
		return false
	}
	for i, f := range o.faces {
		g := &p.faces[i]
		f.DiameterM, f.WidthM, f.HeightM = g.DiameterM, g.WidthM, g.HeightM
		if f != *g {
			return false
		}
	}
	return true
}

// facet is the film of one face at present.
type facet struct {
	film   float64 // W/m²K
	toward float64 // °C: what it leads to, sun and radiant temperature in it
	at     film.Answer
}

// leastFilm keeps a film above nothing: natural convection of a surface at the ambient is none.
const leastFilm = 1e-3

// films are those of all faces for the heat flows that they give off, W/m².
type films []facet

// at returns the films for given flows. A face of fixed flow has one temperature whatever the section behind it is, so a guess of the
// flow is worth more than one of the temperature.
func (o *outside) at(flux []float64) films {
	f := make(films, o.n)
	if o.together != nil {
		_, all := o.together.Surfaces(flux)
		for i, a := range all {
			f[i] = facet{math.Max(a.Coefficient(), leastFilm), a.TowardK - zeroC, a}
		}
		return f
	}
	for i := range o.n {
		if o.open[i] {
			_, a := o.air.Surface(o.faces[i], flux[i])
			f[i] = facet{math.Max(a.Coefficient(), leastFilm), a.TowardK - zeroC, a}
		}
	}
	return f
}

// flux reads the heat flows of the faces off an answer.
func (o *outside) flux(r *heat.Result) []float64 {
	q := make([]float64, o.n)
	if o.together != nil {
		for i := range q {
			q[i] = r.Bodies[i].Released / o.wide[i]
		}
		return q
	}
	if o.n == 1 {
		q[0] = (r.Released - r.AgainstOut) / o.wide[0]
		return q
	}
	for i := range o.n {
		q[i] = r.SideOut[i] / o.wide[i]
	}
	return q
}

// guess spreads a whole heat (W/m) evenly.
func (o *outside) guess(heat float64) []float64 {
	q := make([]float64, o.n)
	around := 0.0
	for i := range o.n {
		if o.open[i] {
			around += o.wide[i]
		}
	}
	for i := range o.n {
		if o.open[i] {
			q[i] = heat / around
		}
	}
	return q
}

// miss is the largest difference (K) between the temperature of a face in an answer, whose flows are q, and that at which its film was taken.
func (o *outside) miss(f films, q []float64) (worst float64) {
	if o.together != nil {
		all, _ := o.together.Surfaces(q)
		for i, t := range all {
			worst = math.Max(worst, math.Abs(t-zeroC-(f[i].toward+q[i]/f[i].film)))
		}
		return worst
	}
	for i := range o.n {
		if !o.open[i] {
			continue
		}
		t, _ := o.air.Surface(o.faces[i], q[i])
		worst = math.Max(worst, math.Abs(t-zeroC-(f[i].toward+q[i]/f[i].film)))
	}
	return worst
}

// coefficient is the mean film of the open faces, W/m²K; ok is false if there is none.
func (o *outside) coefficient(f films) (h float64, ok bool) {
	sum, around := 0.0, 0.0
	for i := range o.n {
		if o.open[i] {
			sum += o.wide[i] * f[i].film
			around += o.wide[i]
		}
	}
	return sum / around, around > 0
}

// wall puts the films on a heat problem's wall.
func (o *outside) wall(w *heat.Wall, f films) {
	if o.n == 1 {
		w.Film, w.Ambient = f[0].film, f[0].toward
		return
	}
	w.Film = 1 // every open side has its own
	for i := range o.n {
		if o.open[i] {
			w.Sides[i].Film, w.Sides[i].Temp = f[i].film, f[i].toward
		}
	}
}
