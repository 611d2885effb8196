package heat

import (
	"math"

	"packrise/solver/outline"
)

// FormKind tells what outline a core, a cable's inside or a wall has.
type FormKind int

// Forms.
const (
	Disc   FormKind = iota // round, of the part's Radius
	Bar                    // W × H, corners rounded with Corner
	Sector                 // of a disc of radius R, opening Angle, eroded and then dilated by Corner; at the part's place lies its centroid
	Flat                   // W × H with half-circle ends on the short sides
)

// Form is an outline of a part that need not be round: m, rad. Layers lie at equal distance all round it. It is turned by Turn about the part's place.
type Form struct {
	Kind   FormKind
	W, H   float64
	R      float64
	Angle  float64
	Corner float64
	Turn   float64
}

const badForm = "heat: a form that is not round has a size, corner or angle that can't be drawn"

// check panics on what can't be drawn.
func (f *Form) check() {
	ok := good(f.Turn)
	switch f.Kind {
	case Bar:
		ok = ok && positive(f.W, f.H) && f.Corner >= 0 && f.Corner <= math.Min(f.W, f.H)/2
	case Sector:
		ok = ok && positive(f.R, f.Angle) && f.Angle <= math.Pi && f.Corner >= 0 && f.Corner <= outline.MaxCorner(f.R, f.Angle)*(1+1e-9)
	case Flat:
		ok = ok && positive(f.W, f.H)
	}
	if !ok {
		panic(badForm)
	}
}

// Loop is the outline about the part's place, grown by t; r is the radius of a Disc.
func (f *Form) Loop(r, t float64) outline.Loop {
	var l outline.Loop
	switch f.Kind {
	case Bar:
		if f.Corner+t < 0 {
			return outline.Bar(f.W+2*t, f.H+2*t, 0, 0).Placed(f.Turn, 0)
		}
		l = outline.Bar(f.W, f.H, f.Corner, t)
	case Sector:
		corner := math.Max(math.Min(f.Corner, outline.MaxCorner(f.R, f.Angle)), -t)
		_, centroid := outline.Sector(f.R, f.Angle, f.Corner, 0).Area()
		return outline.Sector(f.R, f.Angle, corner, t).Placed(0, -centroid).Placed(f.Turn, 0)
	case Flat:
		l = outline.Flat(f.W, f.H, t)
	default:
		return outline.Circle(r + t)
	}
	return l.Placed(f.Turn, 0)
}

// round tells whether everything in the problem is.
func (p *Problem) round() bool {
	if p.Wall.Shape == FlatWall {
		return false
	}
	for i := range p.Parts {
		if p.Parts[i].Form.Kind != Disc {
			return false
		}
	}
	return true
}
