package rules

import (
	"math"
	"strings"

	"packrise/solver/quantity"
)

// Run is a run of wiring as the tables see it: one holder, what lies in it, and what it carries.
type Run struct {
	Conductors  []Conductor
	Parts       []Part // cables and rods directly in the holder; loose cores stand under Conductors alone
	Loads       []Load
	AtMost      []AtMost // what the person states beyond the loads' not_with
	Holder      Holder
	AmbientC    float64 // °C around the holder; NaN when nobody entered it
	AltitudeM   float64 // m, pressure altitude; 0 is sea level
	ListedPanel bool    // inside a listed panel, where the panel's own standard rules
	Method      string  // reference method A1 … G of IEC 60364-5-52; "" takes the usual one of the holder
	Arrangement string  // bunched (also ""), or a single layer: layer-wall, layer-ceiling, layer-tray, layer-ladder
}

// Conductor is one core, loose or in a cable.
type Conductor struct {
	ID        string
	Size      quantity.Size // the zero Size: only an area is known
	AreaMM2   float64       // mm², used when Size is zero
	Metal     string        // the catalogue's word: copper, tinned-copper, aluminium …
	Family    Family        // of the insulation
	RatingC   float64       // °C, highest continuous temperature of the wire where it lies (dry or wet); 0 or NaN unknown
	Role      Role
	Load      string  // id of its load; "" is unassigned
	Cable     string  // id of the Part that it is a core of; "" is loose in the holder
	OutsideMM float64 // mm, over the insulation; 0 or NaN unknown
	Bare      bool
}

// Family is the kind of insulation as tables name it.
type Family string

// Families of insulation.
const (
	Thermoplastic Family = "thermoplastic" // PVC and the like
	Thermoset     Family = "thermoset"     // XLPE, EPR
	Rubber        Family = "rubber"
	OtherFamily   Family = "other" // silicone, fluoropolymers, polyimide
)

// FamilyOf returns the family of one of the catalogue's insulation materials.
func FamilyOf(material string) Family {
	switch m := strings.ToLower(material); {
	case strings.HasPrefix(m, "pvc"), m == "pe", m == "tpe", m == "tpe-e", m == "pur", m == "polypropylene", m == "lszh":
		return Thermoplastic
	case m == "xlpe", m == "epr":
		return Thermoset
	case m == "rubber", strings.HasPrefix(m, "polychloroprene"):
		return Rubber
	}
	return OtherFamily
}

// Role is what a conductor is for, in the words of the section.
type Role string

// Roles of a conductor. Signal is a core whose current can't warm it: a data pair, a signal.
const (
	Line    Role = "line"
	Neutral Role = "neutral"
	Earth   Role = "earth"
	Control Role = "control"
	Spare   Role = "spare"
	Signal  Role = "signal"
)

// Part takes room in the holder besides loose cores: a cable as a whole, a rod or hose.
type Part struct {
	ID        string
	Kind      string  // cable | rod
	OutsideMM float64 // mm; of an oval cable its larger diameter, which the code takes as a circle
}

// Load is a circuit.
type Load struct {
	ID         string
	CurrentA   float64 // r.m.s. in each line; NaN when unknown
	System     System
	Neutral    string // id of its neutral conductor
	Nonlinear  bool   // the major part of the load is nonlinear: the neutral carries harmonics
	Continuous bool   // three hours or more
	Motor      bool
	Device     Device
	Terminal   Terminal
	NotWith    []string // loads that can't be energised together with it
}

// System is the kind of supply, in the words of the section.
type System string

// Kinds of supply; the empty System is unknown.
const (
	DC          System = "dc"
	SinglePhase System = "single-phase"
	ThreePhase  System = "three-phase"
)

// AtMost states that no more than Count of the loads can be energised together.
type AtMost struct {
	Loads []string
	Count int
}

// Device protects a load's conductors; the zero Device is unknown.
type Device struct {
	Kind    string  // breaker | fuse …, for words
	RatingA float64 // A; 0 unknown
	TripsAt float64 // conventional tripping current over the rating, for example 1.45; 0 unknown
}

// Terminal is the weaker end of the load's conductors. It caps the current and is never a temperature of the section; the zero Terminal is unmarked.
type Terminal struct {
	RatingC float64 // °C; 0 unmarked
	RatedA  float64 // A; 0 none: an IEC terminal's rated current or a connector contact's
}

// Holder is what encloses the parts.
type Holder struct {
	Kind              string // the section's words: jacket | conduit | wireway | open-bundle | apart | none
	Stock             string // catalogue id, "" when it has its own sizes
	InsideMM          float64
	WidthMM, HeightMM float64
	AreaMM2           float64 // inside; 0 follows from the sizes
	Metal             bool    // conduit, wireway: of metal
	LengthM           float64 // 0 is long; a nipple is at most 0.6 m
}

// Kinds of holder, in the words of the section.
const (
	Jacket     = "jacket"
	Conduit    = "conduit"
	Wireway    = "wireway"
	OpenBundle = "open-bundle"
	Apart      = "apart"
	Single     = "none"
)

const bunched = "bunched"

// Area returns the inside area in mm², 0 when it is unknown or the holder is open.
func (h Holder) Area() float64 {
	switch {
	case h.AreaMM2 > 0:
		return h.AreaMM2
	case h.Kind == Wireway:
		return h.WidthMM * h.HeightMM
	case h.Kind == Conduit || h.Kind == Jacket:
		return math.Pi / 4 * h.InsideMM * h.InsideMM
	}
	return 0
}

// nippleM is the length up to which a raceway is a nipple: 24 in, which the code writes as 600 mm (NEC 310.15(C)(1)(b)).
const nippleM = 0.61

func (h Holder) nipple() bool {
	return (h.Kind == Conduit || h.Kind == Wireway) && h.LengthM > 0 && h.LengthM <= nippleM
}
