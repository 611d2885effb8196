package study

import (
	"math"
	"slices"

	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Ranges that hold where a document states none. Ambient and loads are what the person entered, so they have none unless stated.
const (
	usualFilmPercent   = 15  // correlations of natural convection scatter so much; common practice, no source
	usualEmissivityOff = 0.1 // plastics 0.85–0.95 and older or dirtier ones
	usualPositionMM    = 0.2
	usualSoilPercent   = 25   // moisture and seasons, common practice, no source
	widestClearance    = 2.5  // times the mean clearance; the least is contact
	otherKPercent      = 20.0 // of a material whose row has no range
)

// Input is one thing that a temperature depends on and nobody knows exactly. Low and High are its ends.
type Input struct {
	Name      string // "conductivity of PVC"
	From, To  string // "0.14 W/mK"
	Stated    bool   // by the document; else the program's or the catalogue's
	low, high change
}

// change is a design and a variation to solve; nil d is the design itself.
type change struct {
	d    *section.Document
	vary rating.Vary
	none bool // this end is the design itself
}

// inputs lists what d's temperatures depend on, from the document's ranges and, where it states none, the usual ones.
func (s *Study) inputs(d *section.Document, base *rating.Result) (out []Input) {
	r := d.Ranges
	add := func(in Input) { out = append(out, in) }
	if k := r.AmbientK; k.OK && k.V > 0 {
		c := d.Surroundings.AmbientC.V
		at := func(c float64) change { return change{d: warmer(d, c-d.Surroundings.AmbientC.V)} }
		add(Input{"ambient", degrees(c - k.V), degrees(c + k.V), true, at(c - k.V), at(c + k.V)})
	}
	if f := r.FilmPercent.Or(usualFilmPercent) / 100; f > 0 && hasFilm(d) {
		add(Input{
			"film outside", percent(-f), percent(f), r.FilmPercent.OK,
			change{vary: rating.Vary{Film: math.Max(1-f, 0.05)}},
			change{vary: rating.Vary{Film: 1 + f}},
		})
	}
	if e := r.Emissivity.Or(usualEmissivityOff); e > 0 {
		add(Input{
			"emissivities", signed(-e, 2), signed(e, 2), r.Emissivity.OK,
			change{vary: rating.Vary{Emissivity: -e}},
			change{vary: rating.Vary{Emissivity: e}},
		})
	}
	if d.Surroundings.Kind == section.Buried {
		f := usualSoilPercent / 100.0
		k := d.Surroundings.SoilWMK.V
		at := func(v float64) change {
			return change{d: d.With(func(d *section.Document) { d.Surroundings.SoilWMK = section.Some(v) })}
		}
		add(Input{"conductivity of the soil", watts(k * (1 - f)), watts(k * (1 + f)), false, at(k * (1 - f)), at(k * (1 + f))})
	}
	out = append(out, s.materialInputs(d)...)
	if in, ok := clearanceInput(d, base); ok {
		add(in)
	}
	return out
}

// hasFilm tells whether a film of fluid is outside.
func hasFilm(d *section.Document) bool {
	switch d.Surroundings.Kind {
	case section.FixedWall, section.Buried, section.Vacuum:
		return false
	}
	return true
}

// warmer shifts every temperature outside, so that what it is compared to stays as far from the ambient as it was.
func warmer(d *section.Document, k float64) *section.Document {
	return d.With(func(d *section.Document) {
		d.Surroundings.AmbientC.V += k
		if d.Surroundings.RadiantC.OK {
			d.Surroundings.RadiantC.V += k
		}
	})
}

// materialInputs are the conductivities of what heat passes: insulation, jackets, fillers, media. Metals conduct too well to matter.
func (s *Study) materialInputs(d *section.Document) (out []Input) {
	const metalK = 5
	for _, id := range s.materials(d) {
		m, known := s.cat.Material(id)
		k, low, high, name := m.K.V, m.K.Low, m.K.High, m.Name
		if i := slices.IndexFunc(d.Materials, func(m section.Material) bool { return m.Name == id }); i >= 0 {
			own := d.Materials[i]
			if own.Gas || own.KWMK > metalK {
				continue
			}
			k, low, high, name, known = own.KWMK, 0, 0, own.Name, true
		} else if m.Gas || m.Metal || k > metalK {
			continue
		}
		if !known || k <= 0 {
			continue
		}
		if !(low < high) || low <= 0 {
			low, high = k*(1-otherKPercent/100), k*(1+otherKPercent/100)
		}
		in := Input{Name: "conductivity of " + name, From: watts(low), To: watts(high)}
		in.low, in.high = change{none: low >= k}, change{none: high <= k}
		in.low.vary.K, in.high.vary.K = map[string]float64{id: low / k}, map[string]float64{id: high / k}
		out = append(out, in)
	}
	return out
}

// materials lists the solid materials of a design by id, each once, in order of appearance.
func (s *Study) materials(d *section.Document) (out []string) {
	add := func(id string) {
		if id != "" && !slices.Contains(out, id) {
			out = append(out, id)
		}
	}
	parts := func(list []section.Part) {
		for i := range list {
			p := &list[i]
			if w, ok := s.cat.Wire(p.Stock); ok {
				add(w.Insulation)
			}
			for _, l := range p.Layers {
				add(l.Material)
			}
			add(p.Material)
		}
	}
	holder := func(h *section.Holder) {
		if h.Fill != "air" {
			add(h.Fill)
		}
		if row, ok := s.cat.Holder(h.Stock); ok {
			add(row.Wall)
		}
		for _, l := range h.Layers {
			add(l.Material)
		}
	}
	parts(d.Parts)
	for i := range d.Builds {
		parts(d.Builds[i].Parts)
		holder(&d.Builds[i].Holder)
	}
	holder(&d.Holder)
	if w := d.Surroundings.Wrap; w != nil {
		add(w.Material)
	}
	return out
}

// clearanceInput goes from contact to 2.5 times the mean clearance of loose parts, or through what the document states.
func clearanceInput(d *section.Document, base *rating.Result) (Input, bool) {
	gap := base.ClearanceMM
	if !gap.OK || gap.V <= 0 {
		return Input{}, false
	}
	span := d.Ranges.ClearanceMM
	low, high := 0.0, widestClearance*gap.V
	if span.OK {
		low, high = span.V.Low, span.V.High
	}
	at := func(v float64) change {
		return change{d: d.With(func(d *section.Document) { d.Holder.ClearanceMM = section.Some(v) })}
	}
	in := Input{Name: "mean clearance", From: trimmed(low) + " mm", To: trimmed(high) + " mm", Stated: span.OK}
	in.low, in.high = at(low), at(high)
	in.low.none, in.high.none = low >= gap.V, high <= gap.V
	return in, true
}

func degrees(c float64) string { return quantity.Trimmed(c, 1) + " °C" }

func percent(f float64) string { return signed(100*f, 0) + " %" }

func watts(k float64) string { return quantity.Significant(k, 3) + " W/mK" }

func signed(v float64, decimals int) string {
	s := quantity.Fixed(v, decimals)
	if v > 0 {
		s = "+" + s
	}
	return s
}

func trimmed(v float64) string { return quantity.Trimmed(v, 3) }
