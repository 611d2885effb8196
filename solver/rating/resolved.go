package rating

import (
	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// scene is a document resolved against the catalogue: SI, flattened, every material found. Parts stand in depth-first order, a
// cable before its parts, so that their indices are those of heat.Problem.Parts.
type scene struct {
	doc    *section.Document
	holder enclosure
	parts  []item
	origin section.Point // mm: the document's point that is the origin of the heat problem
	notes  []string
	// parts with a limit above the catalogue's and no reason for it
	unreasoned []string
	filmW      float64 // W/m²K where the film is fixed, +Inf for a fixed wall
	out        outside
	bodies     []body // of several in one surroundings
}

// enclosure is a holder, or the jacket of a cable.
type enclosure struct {
	kind    string
	round   bool
	radius  float64 // m, inside; of the circle round a flat one
	flat    bool    // w × h with half-circle ends
	w, h    float64 // m, inside
	strings float64 // emissivity of a bundle's strings, on the inside
	layers  []layer
	fill    medium
	gap     float64 // m, mean clearance of the parts
	skin    float64 // emissivity of the outside by the catalogue's row, 0: by the material
}

// layer is one ring of a known material.
type layer struct {
	id        string // material id
	material  material
	thickness float64 // m
}

// medium is what lies between parts or in a bore.
type medium struct {
	id  string
	air bool    // conductivity by temperature
	gas bool    // air or another gas
	k   float64 // W/mK, when not air
}

// material is the part of a catalogue or document material that the heat problem and the limits need.
type material struct {
	name   string
	k      float64 // W/mK
	gas    bool
	metal  bool
	limitC section.Opt[float64] // lowest in use
	usualC section.Opt[float64]
	source string

	emissivity, absorptivity float64
	assumed                  bool // the emissivity is a default of the program
}

// item is one part of the flattened section.
type item struct {
	id     string
	kind   string
	in     int // index of its cable, −1 for the holder
	depth  int
	src    *section.Part
	x, y   float64 // m, as heat.Part wants them
	abs    section.Point
	unset  bool
	radius float64 // m, of metal, body, bore or inside; of the circle round one that is not round
	form   heat.Form
	layers []layer // from radius outwards
	metal  bool
	wire   catalog.Conductor
	alpha  float64 // 1/K at 20 °C
	body   float64 // W/mK of a rod's material
	bore   *hollow
	inside *enclosure
	skin   float64 // emissivity of its outermost surface
	limit  limit
	load   *section.Load
	label  string
}

// hollow is a hose's bore.
type hollow struct {
	fill  medium
	fixed section.Opt[float64]
}

// limit is a temperature limit and who set it.
type limit struct {
	c       section.Opt[float64]
	assumed bool
	by      string
}

// outer returns the outside radius in m.
func (p *item) outer() float64 {
	r := p.radius
	for _, l := range p.layers {
		r += l.thickness
	}
	return r
}

// loadKnown tells whether the heat of a conductor is known. Earth and signal conductors and everything that is no conductor make none.
func (p *item) loadKnown() bool {
	if !p.metal {
		return true
	}
	if p.load == nil {
		return p.src.Role == section.RoleEarth || p.src.Role == section.RoleSignal
	}
	return !p.load.Unknown
}
