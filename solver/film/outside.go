package film

import "math"

// Kind of surroundings.
type Kind int

// Kinds of surroundings.
const (
	StillAir Kind = iota
	MovingAir
	Buried
	Water
	Vacuum
)

// Outside is what a run gives its heat to.
type Outside struct {
	Kind       Kind
	AmbientK   float64 // far away; buried: the ground's surface
	RadiantK   float64 // what the surface radiates to
	PressurePa float64 // of the air; 0: one atmosphere
	SpeedMS    float64 // MovingAir, Water
	Along      bool    // the flow goes along the run, else across
	Vertical   bool    // the run stands
	HeightM    float64 // of a vertical run
	SunWM2     float64 // irradiance from above; on a vertical run across it
	DepthM     float64 // Buried: of the axis
	SoilWMK    float64 // Buried
	Cautious   bool    // natural convection of horizontal cylinders by Churchill and Chu in place of Morgan
	Convection float64 // times what the formulas for moving fluids give, for bands; 0 means 1
}

// Shape of a face.
type Shape int

// Shapes of a face: a whole round outside or one side of a box.
const (
	Round Shape = iota
	Side
	Top
	Bottom
)

// Face is a surface with one film.
type Face struct {
	Shape           Shape
	DiameterM       float64 // Round: perimeter/π
	WidthM, HeightM float64 // Side, Top, Bottom: the box's outside in the section plane
	Emissivity      float64
	Absorptivity    float64 // of the sun
}

// across is the diameter of a cylinder with the box's perimeter.
func (f Face) across() float64 {
	if f.Shape == Round {
		return f.DiameterM
	}
	return 2 * (f.WidthM + f.HeightM) / math.Pi
}

// Answer is the film at one surface temperature: the surface gives off (Convective + Radiative)·(T − TowardK), W/m².
type Answer struct {
	Convective, Radiative float64 // W/m²K; soil counts as convective
	TowardK               float64 // ambient and radiant temperature weighted, raised by the sun
	AbsorbedWM2           float64 // of the sun, mean over the face, in TowardK already
	By                    []string
	Notes                 []string // out of range, and what the reader should know
}

// Coefficient is the whole film, W/m²K.
func (a Answer) Coefficient() float64 { return a.Convective + a.Radiative }

// Flux returns what a surface at surfaceK gives off, W/m².
func (a Answer) Flux(surfaceK float64) float64 { return a.Coefficient() * (surfaceK - a.TowardK) }

func (a *Answer) say(note string) { a.Notes = append(a.Notes, note) }

func (a *Answer) by(law string) { a.By = append(a.By, law) }

// stefan is the Stefan–Boltzmann constant, W/m²K⁴ (CODATA 2018).
const stefan = 5.670374419e-8

// Film returns the film of a face at surfaceK. Its flux is continuous and rises with surfaceK, also through the ambient.
func (o Outside) Film(f Face, surfaceK float64) Answer {
	var a Answer
	switch o.Kind {
	case Buried:
		o.soil(&a, f, surfaceK)
	case Vacuum:
		a.by("radiation alone (vacuum)")
	default:
		o.convect(&a, f, surfaceK)
		if o.Convection > 0 {
			a.Convective *= o.Convection
		}
	}
	drive := a.Convective * o.AmbientK
	if o.Kind != Buried && o.Kind != Water {
		s, r := surfaceK, o.RadiantK
		a.Radiative = f.Emissivity * stefan * (s*s + r*r) * (s + r)
		drive += a.Radiative * r
		a.AbsorbedWM2 = o.sun(f)
	}
	a.TowardK = o.AmbientK
	if h := a.Coefficient(); h > 0 {
		a.TowardK = (drive + a.AbsorbedWM2) / h
	}
	if o.SunWM2 > 0 && o.Vertical {
		a.say("the sun on a vertical run is reckoned across it, onto what is drawn as its top")
	}
	return a
}

// sun is what a face absorbs: irradiance × absorptivity × the width seen from above, spread over the face.
func (o Outside) sun(f Face) float64 {
	switch f.Shape {
	case Round:
		return f.Absorptivity * o.SunWM2 / math.Pi
	case Top:
		return f.Absorptivity * o.SunWM2
	}
	return 0
}

// soil treats the ground as a film on the face.
func (o Outside) soil(a *Answer, f Face, surfaceK float64) {
	d := f.DiameterM
	if f.Shape != Round {
		in := true
		if d, in = equivalentBuried(f.WidthM, f.HeightM); !in {
			a.say("the buried box is flatter than 3 to 1, beyond the range of its equivalent circle (Neher and McGrath 1957)")
		}
	}
	a.Convective = 1 / (Soil(o.DepthM, d, o.SoilWMK) * math.Pi * f.across())
	a.by("soil by IEC 60287-2-1, the ground's surface at the ambient")
	if surfaceK > dryingK {
		a.say("the surface in the ground is above 50 °C: soil may dry out there and conduct far less than written")
	}
}
