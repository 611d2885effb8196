package rating

import (
	"fmt"
	"math"

	"packrise/solver/film"
	"packrise/solver/fluid"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// outside is what a scene gives its heat to.
type outside struct {
	free  bool // the film follows the surface's temperature; else scene.filmW counts
	air   film.Outside
	faces []film.Face // of a rectangle in heat's order of sides; else the first alone
	wide  []float64   // m, around the section: what a face is of the perimeter
	open  []bool      // faces that have a film
	n     int
	coat  coat
	rest  section.Against // what a part of it rests against

	together *film.Together // of several bodies, one a face; nil else
}

// coat is how the outermost surface radiates, and why.
type coat struct {
	emissivity, absorptivity float64
	of                       string // whose surface: "galvanised steel"
	assumed                  bool
}

// outside resolves the surroundings once the section has its sizes.
func (r *resolver) outside() {
	s := &r.scene
	d := s.doc.Surroundings
	switch d.Kind {
	case section.FixedWall:
		s.filmW = math.Inf(1)
		return
	case section.FixedFilm:
		s.filmW = d.FilmWM2K.V
		return
	}
	if s.heldAround() {
		s.filmW = math.Inf(1)
		return
	}
	if len(s.parts) == 0 || !r.placed() || r.unsound() {
		return
	}
	o := &s.out
	o.free, o.air, o.coat = true, r.weather(), r.coat()
	h := &s.holder
	if s.apart() {
		r.outsides()
		return
	}
	if h.kind != section.Wireway {
		o.face(1)
		o.open[0], o.wide[0] = true, s.around()
		d := o.wide[0] / math.Pi // a cylinder of the same circumference stands for what is not round
		o.faces[0] = film.Face{Shape: film.Round, DiameterM: d, Emissivity: o.coat.emissivity, Absorptivity: o.coat.absorptivity * s.lit()}
		o.wide[0] *= s.openShare()
		if a := s.rests(); a != nil {
			o.rest = *a
		}
		r.deepEnough(s.outerRadius())
		return
	}
	t := thickness(h.layers)
	o.face(4)
	sides := s.doc.Holder.Sides
	for i, of := range [4]section.Side{heat.Bottom: sides.Bottom, heat.Right: sides.Right, heat.Top: sides.Top, heat.Left: sides.Left} {
		f := film.Face{Shape: film.Side, WidthM: h.w + 2*t, HeightM: h.h + 2*t, Emissivity: o.coat.emissivity, Absorptivity: o.coat.absorptivity}
		o.wide[i] = f.HeightM
		switch i {
		case heat.Bottom:
			f.Shape, o.wide[i] = film.Bottom, f.WidthM
		case heat.Top:
			f.Shape, o.wide[i] = film.Top, f.WidthM
		}
		o.faces[i], o.open[i] = f, of.Kind == "" || of.Kind == section.SideOpen
	}
	r.deepEnough(h.h/2 + t)
}

// face makes room for n faces.
func (o *outside) face(n int) {
	o.n, o.faces, o.wide, o.open = n, make([]film.Face, n), make([]float64, n), make([]bool, n)
}

// deepEnough refuses a buried run that would stick out of the ground.
func (r *resolver) deepEnough(half float64) {
	if a := &r.scene.out.air; a.Kind == film.Buried && a.DepthM <= half {
		r.refuse(&section.Problem{
			Rule: "not-buried", Key: "surroundings.depth_m",
			What: fmt.Sprintf("the axis lies %s mm deep, and the section reaches %s mm up from it, out of the ground", digits(a.DepthM/mm, 1), digits(half/mm, 1)),
			Do:   "write the depth of the axis in metres",
		})
	}
}

// outerRadius is that of a round holder, bundle or bare part.
func (s *scene) outerRadius() float64 {
	if s.holder.kind == section.NoHolder {
		for i := range s.parts {
			if s.parts[i].in < 0 {
				return s.parts[i].outer()
			}
		}
	}
	return s.holder.radius + thickness(s.holder.layers)
}

func thickness(layers []layer) (t float64) {
	for _, l := range layers {
		t += l.thickness
	}
	return t
}

// weather turns the document's surroundings into film's.
func (r *resolver) weather() film.Outside {
	d := r.scene.doc.Surroundings
	p, _ := fluid.StandardPressure(d.AltitudeM.V) // the reader keeps it inside the range
	o := film.Outside{
		Kind:     map[string]film.Kind{section.StillAir: film.StillAir, section.MovingAir: film.MovingAir, section.Insulation: film.StillAir, section.Buried: film.Buried, section.Water: film.Water, section.Vacuum: film.Vacuum}[d.Kind],
		AmbientK: d.AmbientC.V + zeroC, RadiantK: d.RadiantC.Or(d.AmbientC.V) + zeroC, PressurePa: p,
		SpeedMS: d.AirSpeedMS.V, Along: r.scene.along(), Vertical: d.Run == section.Vertical, HeightM: d.HeightM.V,
		SunWM2: d.SunWM2.V, DepthM: d.DepthM.V, SoilWMK: d.SoilWMK.V,
	}
	return o
}

// along tells whether the flow goes along the run: the default in a wireway.
func (s *scene) along() bool {
	d := s.doc.Surroundings
	if d.AirDirection == "" {
		return s.holder.kind == section.Wireway
	}
	return d.AirDirection == section.Along
}

// coat finds what the outside is made of.
func (r *resolver) coat() coat {
	s := &r.scene
	h := &s.holder
	of := func(m material) coat { return coat{m.emissivity, m.absorptivity, m.name, m.assumed} }
	switch n := len(h.layers); {
	case n > 0:
		k := of(h.layers[n-1].material)
		if h.skin > 0 && s.doc.Surroundings.Wrap == nil {
			k.emissivity, k.assumed = h.skin, false
		}
		return k
	case h.kind == section.OpenBundle || h.kind == section.NoHolder || s.apart():
		return r.partsCoat(s.children(-1))
	}
	return coat{usualEmissivity, usualAbsorbed, "a wall without layers", true}
}

// partsCoat is the mean over the parts' own outsides, by their circumference.
func (r *resolver) partsCoat(of []int) coat {
	sum, around := coat{}, 0.0
	for _, i := range of {
		p := &r.scene.parts[i]
		m := r.outermost(p)
		w := p.outside().Perimeter()
		sum.emissivity += w * m.emissivity
		sum.absorptivity += w * m.absorptivity
		sum.assumed = sum.assumed || m.assumed
		around += w
		switch {
		case sum.of == "" || sum.of == m.name:
			sum.of = m.name
		default:
			sum.of = "the parts' mean"
		}
	}
	sum.emissivity /= around
	sum.absorptivity /= around
	return sum
}

// outermost is the material that shows on a part.
func (r *resolver) outermost(p *item) material {
	if n := len(p.layers); n > 0 {
		return p.layers[n-1].material
	}
	name := p.src.Material
	if p.metal {
		name = p.wire.Metal
	}
	if m, pr := r.material(name, p.id, ""); pr == nil {
		return m
	}
	return material{name: "a surface without layers", emissivity: usualEmissivity, absorptivity: usualAbsorbed, assumed: true}
}

// wrap lays thermal insulation around the section: one more layer of the wall, or of the bare part.
func (r *resolver) wrap() {
	w := r.scene.doc.Surroundings.Wrap
	if w == nil {
		return
	}
	m, p := r.material(w.Material, "", "surroundings.wrap.material")
	if r.refuse(p) {
		return
	}
	l := layer{id: w.Material, material: m, thickness: w.ThicknessMM * mm}
	if r.scene.holder.kind != section.NoHolder {
		r.scene.holder.layers = append(r.scene.holder.layers, l)
		return
	}
	for _, i := range r.scene.children(-1) {
		r.scene.parts[i].layers = append(r.scene.parts[i].layers, l)
	}
}
