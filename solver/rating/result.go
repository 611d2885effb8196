package rating

import (
	"packrise/solver/heat"
	"packrise/solver/section"
)

// Conductor is one conductor's answer. Temperatures in °C.
type Conductor struct {
	ID            string
	TempC         float64
	LimitC        section.Opt[float64]
	LimitAssumed  bool
	HeatWM        float64
	CurrentA      section.Opt[float64] // not OK: a fixed heat, unknown or unassigned
	ResistanceOhm float64              // Ω/m at TempC
	Load          string               // "" if in none
	ErrorK        float64
}

// Other is any other thing with a temperature: rod, cable's jacket layer, holder's layer, outer surface.
type Other struct {
	ID, Kind     string // Kind: rod | cable | layer | surface
	TempC        float64
	LimitC       section.Opt[float64]
	LimitAssumed bool
	AbsorbedWM   section.Opt[float64]
}

// Governs names the thing with the smallest margin.
type Governs struct {
	Part          string
	TempC, LimitC float64
	MarginK       float64
	LimitAssumed  bool
	SetBy         string // what sets the limit: "THHN dry", "the person", "lowest of PVC"
}

// Result is the answer for one document. It is immutable and safe to share.
type Result struct {
	Title      string
	AmbientC   float64
	Conductors []Conductor // the document's order, nested ones as C1/L1
	Others     []Other
	SurfaceC   float64 // mean of the outside
	FilmWM2K   section.Opt[float64]
	Generated  float64
	Released   float64
	Absorbed   float64
	Sides      map[string]float64 // rectangle only: bottom, right, top, left → W/m released
	Hottest    string
	Governing  *Governs // nil if nothing has a limit
	Status     heat.Status
	Notes      []string // what is assumed or left out, a sentence each
	Unassigned []string // conductors in no load or of unknown current, that results depend on
	Unknowns   int
	ErrorK     float64
	Seconds    float64
	Settles    float64 // thermal runaway: largest factor on all currents that still settles, else 0
	RunawayAt  string  // conductor that runs away
	Shapes     []section.Shape

	field heat.Field
}
