package rating

import (
	"math"

	"packrise/solver/heat"
	"packrise/solver/section"
)

// Conductor is one conductor's answer. Temperatures in °C, NaN when there is no steady state.
type Conductor struct {
	ID           string
	TempC        float64
	LimitC       section.Opt[float64]
	LimitAssumed bool
	LimitBy      string // what sets the limit: "THHN, dry", "given", "lowest for PVC, assumed"
	HeatWM       float64
	CurrentA     section.Opt[float64] // not OK: a fixed heat, unknown or unassigned
	// ResistanceOhm is in Ω/m at TempC and the load's frequency.
	ResistanceOhm float64
	Load          string // "" if in none
	LoadKnown     bool
	ErrorK        float64
	Heats         bool    // it is known to make heat of its own
	HottestC      float64 // of the metal and of the insulation that its limit speaks for; above TempC beside hotter neighbours
}

// Other is any other thing with a temperature.
type Other struct {
	ID, Kind     string // Kind: rod | layer | surface
	TempC        float64
	LimitC       section.Opt[float64]
	LimitAssumed bool
	LimitBy      string
	AbsorbedWM   section.Opt[float64]
}

// Governs names the thing with the smallest margin.
type Governs struct {
	Part          string
	TempC, LimitC float64
	MarginK       float64
	LimitAssumed  bool
	Heats         bool   // it is a conductor that makes heat; else others heat it
	Insulation    bool   // it is a conductor whose insulation is hotter than its metal: TempC is the insulation's
	SetBy         string // what sets the limit: "THHN, dry", "given", "lowest for PVC, assumed"
}

// Result is the answer for one document. It is immutable and safe to share.
type Result struct {
	Title      string
	AmbientC   float64
	Conductors []Conductor // the document's order, nested ones as C1/L1
	Others     []Other
	SurfaceC   float64              // mean of the outside
	FilmWM2K   section.Opt[float64] // at the present temperature, mean of the open sides; not OK for a fixed wall
	// OutsideEmissivity is the mean of the outside's; 0 where it does not radiate.
	OutsideEmissivity float64
	// ClearanceMM is the mean clearance of loose parts; not OK where they touch.
	ClearanceMM section.Opt[float64]
	Generated   float64            // W/m
	Released    float64            // W/m
	Absorbed    float64            // W/m
	Sides       map[string]float64 // W/m released: of a rectangle bottom, right, top, left; of what rests against something open, against
	Hottest     string
	Governing   *Governs // nil if nothing has a limit
	Status      heat.Status
	Notes       []string // what is assumed or left out, a sentence each
	Unassigned  []string // conductors in no load or of unknown current, that results depend on
	Unreasoned  []string // parts whose limit is above the catalogue's without a reason: nothing is rated
	Unknowns    int
	ErrorK      float64
	Seconds     float64
	Settles     float64 // thermal runaway: largest factor on all currents that still settles, else 0
	RunawayAt   string  // conductor that runs away
	Shapes      []section.Shape

	surroundings string // "fixed film of 9 W/m²K"
	origin       section.Point
	bounds       [4]float64 // mm: x0, y0, x1, y1
	layerK       []float64
	field        heat.Field
}

// result reads the heat answer into the words of the trade.
func (s *scene) result(a answered, o Options) *Result {
	r := &Result{
		Title: s.doc.Title, AmbientC: s.doc.Surroundings.AmbientC.V, Status: a.status, Shapes: s.shapes(),
		origin: s.origin, bounds: s.bounds(), surroundings: s.surroundingsText(),
		Unreasoned: s.unreasoned,
	}
	r.FilmWM2K = s.filmShown(a)
	if s.out.free {
		r.OutsideEmissivity = s.out.coat.emissivity
	}
	if g := s.holder.gap; g > 0 {
		r.ClearanceMM = section.Some(g / mm)
	}
	for i := range s.parts {
		if p := &s.parts[i]; p.metal && !p.loadKnown() && !o.AssumeIdle {
			r.Unassigned = append(r.Unassigned, p.id)
		}
	}
	if a.status == heat.ThermalRunaway {
		r.Settles, r.RunawayAt = a.settles, s.parts[a.at].id
	}
	if a.heat != nil && a.status != heat.ThermalRunaway {
		h := a.heat
		r.Generated, r.Released, r.Unknowns, r.ErrorK = h.Generated, h.Released, h.Unknowns, h.ErrorK
		r.SurfaceC, r.field, r.layerK = h.WallMean, h.Field, s.layerK(a)
		for _, w := range h.Absorbed {
			r.Absorbed += w
		}
		if s.holder.kind == section.Wireway {
			r.Sides = map[string]float64{"bottom": h.SideOut[heat.Bottom], "right": h.SideOut[heat.Right], "top": h.SideOut[heat.Top], "left": h.SideOut[heat.Left]}
		}
		if n := s.restOut(h); n != nil {
			r.Sides = n
		}
	} else {
		r.SurfaceC = math.NaN()
	}
	s.readConductors(r, a)
	s.readOthers(r, a)
	r.Governing = r.governing()
	r.Notes = s.remarks(r, a, o)
	return r
}

func (s *scene) readConductors(r *Result, a answered) {
	hot := math.Inf(-1)
	for i := range s.parts {
		p := &s.parts[i]
		if !p.metal {
			continue
		}
		c := Conductor{
			ID: p.id, TempC: math.NaN(), LimitC: p.limit.c, LimitAssumed: p.limit.assumed, LimitBy: p.limit.by, LoadKnown: p.loadKnown(),
			HeatWM: math.NaN(), ResistanceOhm: math.NaN(), Heats: p.heats(), HottestC: math.NaN(),
		}
		if p.load != nil {
			c.Load = p.load.ID
			c.CurrentA = p.load.CurrentA
		}
		if a.heat != nil && a.status != heat.ThermalRunaway {
			c.TempC = a.temps[i]
			c.HottestC = s.hottestAt(p, c.TempC, faces(a.heat, i))
			c.HeatWM, c.ResistanceOhm = p.heat(c.TempC), p.resistance(c.TempC)
			if i < len(a.heat.PartErrorK) {
				c.ErrorK = a.heat.PartErrorK[i]
			}
			if c.TempC > hot {
				hot, r.Hottest = c.TempC, p.id
			}
		}
		r.Conductors = append(r.Conductors, c)
	}
}

func (s *scene) readOthers(r *Result, a answered) {
	if a.heat == nil || a.status == heat.ThermalRunaway {
		return
	}
	h := a.heat
	for i := range s.parts {
		p := &s.parts[i]
		switch {
		case p.inside != nil:
			r.addLayers(p.id+"/"+section.Jacket, p.layers, h.Surfaces[i], p.limit)
		case !p.metal:
			o := Other{ID: p.id, Kind: section.Rod, TempC: max(h.Core[i], h.Surfaces[i][0], h.Surfaces[i][len(h.Surfaces[i])-1]), LimitC: p.limit.c, LimitAssumed: p.limit.assumed, LimitBy: p.limit.by}
			if p.bore != nil {
				o.TempC = max(h.Surfaces[i][0], h.Surfaces[i][len(h.Surfaces[i])-1])
				o.AbsorbedWM = section.Some(h.Absorbed[i])
			}
			r.Others = append(r.Others, o)
			s.addCoverings(r, p, h.Surfaces[i])
		default:
			s.addCoverings(r, p, h.Surfaces[i])
		}
	}
	r.addLayers(s.holder.kind, s.holder.layers, h.WallMax, limit{})
	if s.doc.Surroundings.Wrap != nil && s.holder.kind != section.NoHolder {
		r.Others[len(r.Others)-1].ID = wrapID
	}
	if s.holder.kind == section.NoHolder && s.doc.Surroundings.Wrap != nil {
		s.addBareWrap(r, h)
	}
	t := s.touch()
	if s.apart() {
		s.addOutsides(r, h, t)
		return
	}
	r.Others = append(r.Others, Other{ID: "outside", Kind: "surface", TempC: h.WallMax[len(h.WallMax)-1], LimitC: t.c, LimitBy: t.by})
}

// wrapID is what thermal insulation around a section is called.
const wrapID = "wrap"

// addBareWrap adds the wrap of a bare part, which is its last layer.
func (s *scene) addBareWrap(r *Result, h *heat.Result) {
	for i := range s.parts {
		if p := &s.parts[i]; p.in < 0 {
			n := len(p.layers)
			lim := lowest(p.layers[n-1:])
			f := h.Surfaces[i]
			r.Others = append(r.Others, Other{ID: wrapID, Kind: "layer", TempC: max(f[n-1], f[n]), LimitC: lim.c, LimitAssumed: lim.assumed, LimitBy: lim.by})
		}
	}
}

// addLayers adds the layers of a wall or jacket: "jacket", "jacket/2" …, each judged at its hotter face, which is the inner one unless
// the outside is warmer.
func (r *Result) addLayers(id string, layers []layer, faces []float64, given limit) {
	for k := range layers {
		name := id
		if k > 0 {
			name += "/" + digits(float64(k+1), 0)
		}
		lim := lowest(layers[k : k+1])
		if given.c.OK {
			lim = given
		}
		r.Others = append(r.Others, Other{ID: name, Kind: "layer", TempC: max(faces[k], faces[k+1]), LimitC: lim.c, LimitAssumed: lim.assumed, LimitBy: lim.by})
	}
}

// governing finds the smallest margin of all.
func (r *Result) governing() *Governs {
	var g *Governs
	try := func(id string, t float64, l section.Opt[float64], assumed bool, by string) {
		if !l.OK || math.IsNaN(t) {
			return
		}
		if m := l.V - t; g == nil || m < g.MarginK {
			g = &Governs{Part: id, TempC: t, LimitC: l.V, MarginK: m, LimitAssumed: assumed, SetBy: by}
		}
	}
	for i := range r.Conductors {
		c := &r.Conductors[i]
		was := g
		if try(c.ID, c.JudgedC(), c.LimitC, c.LimitAssumed, c.LimitBy); g != was {
			g.Heats, g.Insulation = c.Heats, c.JudgedC() > c.TempC
		}
	}
	for _, o := range r.Others {
		try(o.ID, o.TempC, o.LimitC, o.LimitAssumed, o.LimitBy)
	}
	return g
}

// Over tells whether anything is over its limit or no steady temperature exists.
func (r *Result) Over() bool {
	return r.Status == heat.ThermalRunaway || (r.Governing != nil && r.Governing.MarginK < 0)
}
