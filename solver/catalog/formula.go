package catalog

import (
	"fmt"
	"math"

	"packrise/solver/quantity"
)

// formula makes a conductor that no table lists.
type formula struct {
	Classes map[string]formulaClass `yaml:"classes"`
	Rope    struct {
		OverMM2    float64 `yaml:"over_mm2"`
		Resistance float64 `yaml:"resistance"`
		StrandMM   float64 `yaml:"strand_mm"`
	} `yaml:"rope"`
	Coating []struct {
		ToMM   float64 `yaml:"to_mm"`
		Factor float64 `yaml:"factor"`
	} `yaml:"coating"`
	Source sourceRow `yaml:"source"`
}

type formulaClass struct {
	Fill       float64 `yaml:"fill"`       // metal area / area of the circle over the strands
	Resistance float64 `yaml:"resistance"` // resistance / (resistivity / area)
	Strands    float64 `yaml:"strands"`    // number of strands, or
	StrandMM   float64 `yaml:"strand_mm"`  // diameter of one
}

func (f *formula) check() error {
	var c check
	for _, class := range classes {
		k, ok := f.Classes[class]
		if !ok {
			c.fail("classes lacks %s", class)
		}
		c.within(class+".fill", k.Fill, 0.4, 1)
		c.within(class+".resistance", k.Resistance, 1, 1.1)
		if class != Solid && k.Strands == 0 {
			c.within(class+".strand_mm", k.StrandMM, 0.02, 1)
		}
	}
	c.within("rope.over_mm2", f.Rope.OverMM2, 1, 100)
	c.within("rope.resistance", f.Rope.Resistance, 1, 1.1)
	c.within("rope.strand_mm", f.Rope.StrandMM, 0.02, 1)
	c.within("number of coatings", float64(len(f.Coating)), 1, 20)
	for i, k := range f.Coating {
		c.within("coating.factor", k.Factor, 1, 1.2)
		if i > 0 && (k.ToMM <= f.Coating[i-1].ToMM || k.Factor > f.Coating[i-1].Factor) {
			c.fail("coating is not in order: thicker strands, smaller factors")
		}
	}
	c.sources(f.Source)
	return c.err
}

// over returns the diameter (mm) over the strands of so many mm² of metal.
func (f *formula) over(class string, areaMM2 float64) float64 {
	return math.Sqrt(4 / math.Pi * areaMM2 / f.Classes[class].Fill)
}

// allowance returns resistance / (resistivity / area) of a class in plain or coated strands.
func (f *formula) allowance(class, metal string, areaMM2 float64) float64 {
	k := f.Classes[class]
	factor, strand := k.Resistance, k.StrandMM
	if class == Flexible && areaMM2 > f.Rope.OverMM2 {
		factor, strand = f.Rope.Resistance, f.Rope.StrandMM
	}
	if metal != "tinned-copper" {
		return factor
	}
	if strand == 0 {
		strand = math.Sqrt(4 / math.Pi * areaMM2 / max(k.Strands, 1))
	}
	for _, c := range f.Coating {
		if strand <= c.ToMM {
			return factor * c.Factor
		}
	}
	return factor
}

// ConductorOf returns a conductor that is given by its metal area (m²) or, with area 0, by the diameter of its metal (m, over the strands if
// it has any): resistance by ρ/A with the usual allowance for strands (none for solid) and tin; the class's usual fill stands for
// whichever of the two is missing. The error is one sentence.
func (c *Catalog) ConductorOf(areaM2, diameterM float64, metal, class string) (Conductor, error) {
	if err := c.known(metal, class); err != nil {
		return Conductor{}, err
	}
	area, diameter := areaM2*1e6, diameterM*1e3
	for _, v := range []float64{area, diameter} {
		if math.IsNaN(v) || v < 0 || v > 1e5 {
			return Conductor{}, fmt.Errorf("a conductor's area_mm2 or diameter_mm must be above zero and below 100000")
		}
	}
	f := &c.formula
	switch {
	case area == 0 && diameter == 0:
		return Conductor{}, fmt.Errorf("a conductor needs size, area_mm2 or diameter_mm above zero")
	case area == 0:
		area = math.Pi / 4 * diameter * diameter * f.Classes[class].Fill
	case diameter == 0:
		diameter = f.over(class, area)
	case area > 1.0001*math.Pi/4*diameter*diameter:
		return Conductor{}, fmt.Errorf("%s mm² of metal do not fit within a circle of %s mm", quantity.Significant(area, 4), quantity.Significant(diameter, 4))
	}
	m, _ := c.Metal(metal)
	k := f.allowance(class, metal, area)
	src := f.Source.source()
	src.Note = fmt.Sprintf("resistance by resistivity / area × %s", quantity.Trimmed(k, 4))
	return Conductor{
		Size: quantity.Significant(area, 4) + " mm2", Metal: metal, Class: class, AreaM2: area * 1e-6, DiameterM: diameter * 1e-3,
		R20: m.Rho20 / (area * 1e-6) * k, Formula: true, Source: src,
	}, nil
}
