package catalog

import (
	"strings"

	"packrise/solver/quantity"
)

// Wire is a finished wire whose outside diameter a standard gives.
type Wire struct {
	ID, Name    string
	Size        string
	Metal       string
	Class       string
	DiameterM   float64 // outside
	Type        string  // wire type id
	Insulation  string  // material id; its thickness fills from the conductor to DiameterM
	Source      Source
	Abbreviated string    // how people write it: "12 thhn"
	Own         Conductor // strands of its own, where they are not the table's of Size; else zero: see WireConductor
}

type wireRow struct {
	ID         string      `yaml:"id"`
	Name       string      `yaml:"name"`
	Size       string      `yaml:"size"`
	Metal      string      `yaml:"metal"`
	Class      string      `yaml:"class"`
	OutsideMM  float64     `yaml:"outside_mm"`
	Type       string      `yaml:"type"`
	Insulation string      `yaml:"insulation"`
	Strands    *strandsRow `yaml:"strands,omitempty"`
	Source     sourceRow   `yaml:"source"`
}

type strandsRow struct {
	AreaMM2    float64 `yaml:"area_mm2"`
	DiameterMM float64 `yaml:"diameter_mm"`
	R20        float64 `yaml:"r20_ohm_km"`
}

func (r wireRow) key() string { return r.ID }

const thinnestLayer = 0.05 // mm of insulation, less is a slip of the pen

func (r wireRow) build(cat *Catalog) (Wire, error) {
	var c check
	c.id(r.ID)
	c.name(r.Name)
	s := c.size(r.Size)
	cat.refers(&c, "metal", "metal", r.Metal)
	cat.refers(&c, "type", "type", r.Type)
	cat.refers(&c, "insulation", "material", r.Insulation)
	c.within("outside_mm", r.OutsideMM, 0.1, 200)
	c.sources(r.Source)
	w := Wire{
		ID: r.ID, Name: r.Name, Size: r.Size, Metal: r.Metal, Class: r.Class, DiameterM: r.OutsideMM * 1e-3, Type: r.Type,
		Insulation: r.Insulation, Source: r.Source.source(), Abbreviated: short(s) + " " + r.Type,
	}
	if o := r.Strands; o != nil {
		c.word("class", r.Class, classes...)
		c.strands(cat, r.Metal, o.AreaMM2, o.DiameterMM, o.R20)
		w.Own = Conductor{r.Size, r.Metal, r.Class, o.AreaMM2 * 1e-6, o.DiameterMM * 1e-3, o.R20 * 1e-3, false, w.Source}
	}
	if c.err != nil {
		return w, c.err
	}
	metal, err := cat.WireConductor(w)
	if err != nil {
		return w, err
	}
	if t := (w.DiameterM - metal.DiameterM) / 2 * 1e3; t < thinnestLayer {
		c.fail("outside_mm is %g but the conductor alone is %g mm thick", r.OutsideMM, metal.DiameterM*1e3)
	}
	return w, c.err
}

// short is a size as it stands in ids and in speech: "12", "1/0", "250", "2.5".
func short(s quantity.Size) string {
	text, _, _ := strings.Cut(s.String(), " ")
	return text
}

// wireSheetRow is a row of a sheet of wires: one size, in the types that share it.
type wireSheetRow struct {
	Types        []string    `yaml:"types"`
	Size         string      `yaml:"size"`
	OutsideIn    float64     `yaml:"outside_in"`
	OutsideMM    float64     `yaml:"outside_mm"`
	InsulationMM float64     `yaml:"insulation_mm"`
	Strands      *strandsRow `yaml:"strands"`
	Source       sourceRow   `yaml:"source"`
}

// rows writes the row out for each of its types.
func (r wireSheetRow) rows(cat *Catalog) (out []wireRow, err error) {
	var c check
	s := c.size(r.Size)
	for _, id := range r.Types {
		t, ok := cat.WireType(id)
		if !ok {
			cat.refers(&c, "types", "type", id)
			break
		}
		row := wireRow{
			ID: id + "-" + short(s), Name: t.Name + " " + s.Pretty(), Size: r.Size, Metal: t.Metal, Class: t.Class, Type: id,
			Insulation: t.Insulation, Strands: r.Strands, Source: r.Source,
			OutsideMM: round(either(&c, "outside", r.OutsideMM, r.OutsideIn), 6),
		}
		if r.InsulationMM != 0 {
			metal, err := cat.WireConductor(Wire{Size: row.Size, Metal: row.Metal, Class: row.Class})
			if err != nil {
				return nil, err
			}
			row.OutsideMM = round(metal.DiameterM*1e3+2*r.InsulationMM, 6)
		}
		out = append(out, row)
	}
	return out, c.err
}

// WireConductor returns the conductor of a finished wire: its own strands where it has them, else the table's for its size.
func (c *Catalog) WireConductor(w Wire) (Conductor, error) {
	if w.Own.AreaM2 > 0 {
		return w.Own, nil
	}
	return c.Conductor(w.Size, w.Metal, w.Class)
}

// Wire returns a finished wire by id.
func (c *Catalog) Wire(id string) (Wire, bool) { return c.wires.get(id) }

// Wires lists the finished wires by type, in each from thin to thick.
func (c *Catalog) Wires() []Wire { return c.wires.list() }
