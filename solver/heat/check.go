package heat

import "math"

const (
	badNumber   = "heat: a length, conductivity or temperature of the problem is not a usable number"
	badOrder    = "heat: a part lies in something that is no cable before it"
	badBare     = "heat: a bare part needs exactly one part of the top level"
	badHull     = "heat: a hull needs a part of the top level and a way to wind the string"
	badHeats    = "heat: one heat per part is needed"
	badMove     = "heat: only a part of the top level can be moved"
	badFilm     = "heat: the film must be positive or +Inf"
	badShine    = "heat: an emissivity must lie from 0 to 1, absolute zero and pressure must not be negative"
	badNoEscape = "heat: no side lets heat out"
)

func good(x ...float64) bool {
	for _, v := range x {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}

func positive(x ...float64) bool {
	for _, v := range x {
		if !(v > 0) || math.IsInf(v, 1) {
			return false
		}
	}
	return true
}

// check panics on misuse.
func (p *Problem) check() {
	if !positive(p.MediumK) && p.Wall.Shape != BarePart || !good(p.Clearance) || p.Clearance < 0 {
		panic(badNumber)
	}
	tops := 0
	for i := range p.Parts {
		q := &p.Parts[i]
		if q.In < -1 || q.In >= i || q.In >= 0 && p.Parts[q.In].Core != Inside {
			panic(badOrder)
		}
		if q.In == -1 {
			tops++
		}
		q.check()
	}
	if p.Wall.Shape == BarePart && tops != 1 {
		panic(badBare)
	}
	if p.Wall.Shape == Hull && (tops == 0 || p.Wall.Taut == nil) {
		panic(badHull)
	}
	p.checkShine()
	p.Wall.check()
}

func (q *Part) check() {
	if !good(q.X, q.Y, q.Heat, q.Fixed) || !positive(q.Radius) {
		panic(badNumber)
	}
	if q.Core != Metal && q.Core != FixedBore && !positive(q.K) {
		panic(badNumber)
	}
	for _, r := range q.Rings {
		if !positive(r.K, r.Thickness) {
			panic(badNumber)
		}
	}
}

func (w *Wall) check() {
	if !(w.Film > 0) {
		panic(badFilm)
	}
	if !good(w.Ambient) {
		panic(badNumber)
	}
	w.Against.check(w)
	for _, r := range w.Rings {
		if !positive(r.K, r.Thickness) {
			panic(badNumber)
		}
	}
	switch w.Shape {
	case Round:
		if !positive(w.R) {
			panic(badNumber)
		}
	case FlatWall:
		if !positive(w.W, w.H) {
			panic(badNumber)
		}
	case Rect:
		if !positive(w.W, w.H) {
			panic(badNumber)
		}
		shut := true
		for _, s := range w.Sides {
			shut = shut && s.Kind == Insulated
			if !good(s.Temp) {
				panic(badNumber)
			}
			if s.Film < 0 || math.IsNaN(s.Film) {
				panic(badFilm)
			}
		}
		if shut {
			panic(badNoEscape)
		}
	}
}
