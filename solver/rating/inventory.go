package rating

import (
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// Inventory is what a design holds, by type and measure, for code tables: nothing here comes from a current or a temperature.
type Inventory struct {
	Wires  []Wire    // every conductor, in the order of Result.Conductors
	Bulks  []Bulk    // cables and rods of the top level
	Holder Enclosing // the holder
}

// Wire is a conductor.
type Wire struct {
	ID         string
	Size       string // "12 AWG", "2.5 mm2"; "" where only an area is known
	AreaMM2    float64
	Metal      string
	Insulation string  // material of the innermost layer, "" for bare metal
	RatingC    float64 // °C: of the wire type where it lies, else of its insulation; a lower limit of the person's own counts. 0: unknown
	Role       string
	Load       string // "" in none
	Cable      string // part of the top level that it lies in, "" for a loose core
	OutsideMM  float64
}

// Bulk takes room besides loose cores.
type Bulk struct {
	ID, Kind  string // cable | rod
	OutsideMM float64
}

// Enclosing is the holder.
type Enclosing struct {
	Kind, Stock                 string
	InsideMM, WidthMM, HeightMM float64
	Metal                       bool
}

// Take lists what a design holds. Problems of substance are those that Solve finds; a list made despite refused ones may lack sizes.
func Take(d *section.Document, cat *catalog.Catalog) (inv Inventory, problems []section.Problem) {
	r := resolved(d, cat, Vary{})
	s := &r.scene
	for i := range s.parts {
		p := &s.parts[i]
		top, _, nested := strings.Cut(p.id, "/")
		switch {
		case p.metal:
			w := Wire{
				ID: p.id, Size: p.wire.Size, AreaMM2: p.wire.AreaM2 / mm / mm, Metal: p.wire.Metal, Insulation: p.insulation(), RatingC: r.usualLimit(p).c.V,
				Role: p.src.Role, OutsideMM: 2 * p.outer() / mm,
			}
			if l := p.src.LimitC; l.OK && (w.RatingC == 0 || l.V < w.RatingC) {
				w.RatingC = l.V
			}
			if p.load != nil {
				w.Load = p.load.ID
			}
			if nested {
				w.Cable = top
			}
			inv.Wires = append(inv.Wires, w)
		case p.in < 0:
			b := Bulk{ID: p.id, Kind: section.Rod, OutsideMM: 2 * p.outer() / mm}
			if p.inside != nil {
				b.Kind = section.Cable
			}
			inv.Bulks = append(inv.Bulks, b)
		}
	}
	h := &s.holder
	inv.Holder = Enclosing{Kind: h.kind, Stock: d.Holder.Stock, WidthMM: h.w / mm, HeightMM: h.h / mm}
	if h.round && !h.flat {
		inv.Holder.InsideMM = 2 * h.radius / mm
	}
	for _, l := range h.layers {
		inv.Holder.Metal = inv.Holder.Metal || l.material.metal
	}
	return inv, d.Locate(r.problems)
}
