package section

import "math"

// Place is one part of the unfolded section: a part of the top level, or one inside a cable.
type Place struct {
	ID      string     // full id: "L1", "C1/L1"
	Part    *Part      // in the document, or in a build: not to be written to
	Depth   int        // 0 for the top level, 1 for parts of a cable …
	At      Opt[Point] // centre in the plane of the whole section, mm; not OK if it or a cable around it is unplaced
	TurnDeg float64    // how far it is turned in that plane, anticlockwise
}

// Unfold returns all conductors of the document with their full ids, in the document's order, nested ones in place of their
// cable. Documents that Check refuses for their nesting are cut off at the limits.
func Unfold(d *Document) []Place {
	var out []Place
	for _, p := range UnfoldAll(d) {
		if p.Part.Kind == Core {
			out = append(out, p)
		}
	}
	return out
}

// UnfoldAll returns all parts: cores, rods, and cables, each cable before the parts in it.
func UnfoldAll(d *Document) []Place {
	u := unfolder{d: d}
	u.parts(d.Parts, "", 0, Some(Point{}), 0)
	return u.out
}

type unfolder struct {
	d   *Document
	out []Place
}

func (u *unfolder) parts(parts []Part, prefix string, depth int, origin Opt[Point], turn float64) {
	sin, cos := sincosDeg(turn)
	for i := range parts {
		p := &parts[i]
		if len(u.out) >= 8*MaxParts {
			return
		}
		pl := Place{ID: prefix + p.ID, Part: p, Depth: depth, TurnDeg: turn + p.TurnDeg.V}
		if origin.OK && p.At.OK {
			pl.At = Some(Point{origin.V.X + cos*p.At.V.X - sin*p.At.V.Y, origin.V.Y + sin*p.At.V.X + cos*p.At.V.Y})
		}
		u.out = append(u.out, pl)
		if p.Kind != Cable || depth >= MaxNesting {
			continue
		}
		if b := buildOf(u.d, p.Build); b != nil {
			u.parts(b.Parts, pl.ID+"/", depth+1, pl.At, pl.TurnDeg)
		}
	}
}

// sincosDeg is exact at the quarter turns, so that an unturned or squarely turned cable keeps its digits.
func sincosDeg(deg float64) (sin, cos float64) {
	switch math.Mod(math.Mod(deg, 360)+360, 360) {
	case 0:
		return 0, 1
	case 90:
		return 1, 0
	case 180:
		return 0, -1
	case 270:
		return -1, 0
	}
	return math.Sincos(deg * math.Pi / 180)
}
