package section

import "math"

// Shape is the resolved outline of one thing in the section, in millimetres and in the plane of the whole section (nested
// parts included, turned and moved). It is the plain value by which rating tells render and ui what is there.
type Shape struct {
	ID     string // "L1", "C1/L1"; "" for the holder
	Kind   string // Core, Cable, Rod, or the holder's kind
	At     Point  // centre of a round shape, lower left inside corner of a rectangle
	Unset  bool   // unplaced: At is only where to draw it beside the section
	Rings  []Ring // round shapes: from the inside outwards; the last is the outside
	Width  float64
	Height float64   // rectangles: the inside; Rings then give wall layers with R = distance outwards from the inside face
	Loops  [][]Point // of a shape that is not round and no rectangle: the outer outline of each of Rings, whose radii are then those of circles around them
	// Against is, of the holder, what of the outline rests against something: a line, counterclockwise.
	Against []Point
	Depth   int    // 0 for the holder and its parts, 1 for parts of a cable …
	Label   string // one line for people: "8 AWG copper THHN, ⌀ 5.49 mm"
}

// Ring is one material between two radii (mm) of a shape. R0 is 0 for a full disc.
type Ring struct {
	Material string
	Metal    bool
	R0, R1   float64
}

// OuterR returns the outside radius of a round shape in mm.
func (s Shape) OuterR() float64 {
	if len(s.Rings) == 0 {
		return 0
	}
	return s.Rings[len(s.Rings)-1].R1
}

// InnerR returns the radius in mm of the largest disc about At within a part's outline: OuterR of a round one.
func (s Shape) InnerR() float64 {
	r := s.OuterR()
	if len(s.Loops) == 0 {
		return r
	}
	l := s.Loops[len(s.Loops)-1]
	for i, a := range l {
		b := l[(i+1)%len(l)]
		dx, dy := b.X-a.X, b.Y-a.Y
		t := 0.0
		if q := dx*dx + dy*dy; q > 0 {
			t = min(1, max(0, ((s.At.X-a.X)*dx+(s.At.Y-a.Y)*dy)/q))
		}
		r = min(r, math.Hypot(a.X+t*dx-s.At.X, a.Y+t*dy-s.At.Y))
	}
	return r
}

// Reading is what is known of one shape or layer after solving.
type Reading struct {
	ID        string // as Shape.ID, or "jacket", "jacket/2" … for layers of the holder, "outside" for its outer surface
	Kind      string // Core, Cable, Rod, "layer", "surface"
	TempC     float64
	LimitC    Opt[float64]
	Assumed   bool // the limit is assumed, not given by a wire type or a person
	CurrentA  Opt[float64]
	HeatWM    float64
	Governs   bool // smallest margin of all
	Hottest   bool // hottest conductor
	Unloaded  bool // carries nothing (idle, spare, earth) or isn't a conductor
	LoadKnown bool
}

// MarginK returns limit − temperature; ok is false where there is no limit.
func (r Reading) MarginK() (k float64, ok bool) {
	return r.LimitC.V - r.TempC, r.LimitC.OK
}

// Over tells whether the limit is exceeded, judged on the unrounded value.
func (r Reading) Over() bool { k, ok := r.MarginK(); return ok && k < 0 }
