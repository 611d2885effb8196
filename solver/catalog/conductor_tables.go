package catalog

import (
	"fmt"
	"math"
	"strconv"

	"packrise/solver/quantity"
)

// iecFile is IEC 60228 as it is printed: a row for each area, a column for each class and metal.
type iecFile struct {
	Below struct {
		AreasMM2 []float64 `yaml:"areas_mm2"`
		Note     string    `yaml:"note"`
	} `yaml:"below"`
	Rows []iecRow `yaml:"rows"`
}

type iecRow struct {
	Size     string     `yaml:"size"`
	Solid    *iecColumn `yaml:"solid"`
	Stranded *iecColumn `yaml:"stranded"`
	Flexible *iecColumn `yaml:"flexible"`
	Source   sourceRow  `yaml:"source"`
}

// iecColumn holds highest resistances at 20 °C in Ω/km; 0 is not in the table.
type iecColumn struct {
	Copper       float64 `yaml:"copper"`
	TinnedCopper float64 `yaml:"tinned-copper"`
	Aluminium    float64 `yaml:"aluminium"`
	MaxMM        float64 `yaml:"max_mm"`
}

func (r iecRow) columns() map[string]*iecColumn {
	return map[string]*iecColumn{Solid: r.Solid, Stranded: r.Stranded, Flexible: r.Flexible}
}

// metals in the order of the files.
func (c iecColumn) metals() [3]struct {
	name string
	r    float64
} {
	return [3]struct {
		name string
		r    float64
	}{{"copper", c.Copper}, {"tinned-copper", c.TinnedCopper}, {"aluminium", c.Aluminium}}
}

func (f *iecFile) rows(cat *Catalog) (out []conductorRow, err error) {
	var c check
	for _, mm2 := range f.Below.AreasMM2 {
		out = append(out, f.below(cat, mm2)...)
	}
	for _, r := range f.Rows {
		area := c.size(r.Size).AreaMM2()
		for _, class := range classes {
			col := r.columns()[class]
			if col == nil {
				continue
			}
			d := round(cat.formula.over(class, area), 4)
			if col.MaxMM != 0 {
				d = min(d, col.MaxMM) // the real area of 50 mm² and some others is below the nominal
			}
			for _, m := range col.metals() {
				if m.r != 0 {
					out = append(out, conductorRow{
						ID: conductorID(r.Size, m.name, class), Size: r.Size, Metal: m.name, Class: class,
						AreaMM2: area, DiameterMM: d, R20: m.r, Source: r.Source,
					})
				}
			}
		}
	}
	return out, c.err
}

// below scales the smallest row with the area, so that the margin of the standard over resistivity / area stays.
func (f *iecFile) below(cat *Catalog, mm2 float64) (out []conductorRow) {
	r := f.Rows[0]
	smallest, err := quantity.ParseSize(r.Size)
	if err != nil {
		return nil // told where the row itself is read
	}
	size, scale := quantity.MM2Size(mm2).String(), smallest.AreaMM2()/mm2
	for _, class := range classes {
		col := r.columns()[class]
		if col == nil {
			continue
		}
		for _, m := range col.metals() {
			if m.r != 0 {
				out = append(out, conductorRow{
					ID: conductorID(size, m.name, class), Size: size, Metal: m.name, Class: class,
					AreaMM2: mm2, DiameterMM: round(cat.formula.over(class, mm2), 4),
					R20: round(m.r*scale, 6), Formula: true, Source: r.Source.noting(f.Below.Note),
				})
			}
		}
	}
	return out
}

// awgFile is NFPA 70 chapter 9 table 8, with the AWG sizes that it doesn't list by formula.
type awgFile struct {
	Coefficient map[string]float64 `yaml:"r75_coefficient_1_k"`
	AWG         struct {
		Thinnest int    `yaml:"thinnest"`
		Thickest string `yaml:"thickest"`
	} `yaml:"awg"`
	FormulaSource sourceRow `yaml:"formula_source"`
	Rows          []awgRow  `yaml:"rows"`
}

type awgRow struct {
	Size     string     `yaml:"size"`
	Solid    *awgColumn `yaml:"solid"`
	Stranded *awgColumn `yaml:"stranded"`
	Source   sourceRow  `yaml:"source"`
}

// awgColumn holds resistances in Ω per 1000 ft at 75 °C.
type awgColumn struct {
	Strands      int     `yaml:"strands"`
	Copper       float64 `yaml:"copper"`
	TinnedCopper float64 `yaml:"tinned-copper"`
	Aluminium    float64 `yaml:"aluminium"`
	DiameterIn   float64 `yaml:"diameter_in"`
}

const kft = 0.3048 // km

func (f *awgFile) rows(cat *Catalog) ([]conductorRow, error) {
	var c check
	listed := map[string]awgRow{}
	var sizes []quantity.Size
	thickest := c.size(f.AWG.Thickest + " AWG")
	last, ok := thickest.AWG()
	if !ok || f.AWG.Thinnest < last || f.AWG.Thinnest > quantity.ThinnestAWG {
		c.fail("awg must run from thinnest to thickest within 40 to 4/0")
		return nil, c.err
	}
	for n := f.AWG.Thinnest; n >= last; n-- {
		sizes = append(sizes, quantity.AWGSize(n))
	}
	for _, r := range f.Rows {
		if s := c.size(r.Size); s.Kind() == quantity.Kcmil {
			sizes = append(sizes, s)
		}
		listed[r.Size] = r
	}
	var out []conductorRow
	for _, s := range sizes {
		for _, class := range classes {
			for _, metal := range []string{"copper", "tinned-copper", "aluminium"} {
				if metal == "aluminium" && class == Flexible || s.Kind() == quantity.Kcmil && class == Solid {
					continue // not made
				}
				out = append(out, f.row(cat, s, listed[s.String()], class, metal))
			}
		}
	}
	return out, c.err
}

func (f *awgFile) row(cat *Catalog, s quantity.Size, listed awgRow, class, metal string) conductorRow {
	area := s.AreaMM2()
	row := conductorRow{
		ID: conductorID(s.String(), metal, class), Size: s.String(), Metal: metal, Class: class,
		AreaMM2: round(area, 6), DiameterMM: round(cat.formula.over(class, area), 4),
	}
	col := map[string]*awgColumn{Solid: listed.Solid, Stranded: listed.Stranded}[class]
	if col == nil {
		m, _ := cat.Metal(metal)
		row.R20 = round(m.Rho20/area*1e9*cat.formula.allowance(class, metal, area), 6)
		row.Formula, row.Source = true, f.FormulaSource
		return row
	}
	r75 := map[string]float64{"copper": col.Copper, "tinned-copper": col.TinnedCopper, "aluminium": col.Aluminium}[metal]
	row.R20 = round(r75/kft*(1-55*f.Coefficient[metal]), 6)
	row.Source = listed.Source
	if col.DiameterIn != 0 {
		row.DiameterMM = round(col.DiameterIn*inch, 5)
		row.Source = row.Source.noting(fmt.Sprintf("%d strands", col.Strands))
	}
	return row
}

// round keeps so many significant digits.
func round(v float64, digits int) float64 {
	if v == 0 || math.IsNaN(v) || math.IsInf(v, 0) {
		return v
	}
	out, err := strconv.ParseFloat(strconv.FormatFloat(v, 'e', digits-1, 64), 64)
	if err != nil {
		return v
	}
	return out
}
