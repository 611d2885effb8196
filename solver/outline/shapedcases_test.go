package outline

import (
	"math"
	"os"
	"testing"

	"gopkg.in/yaml.v3"
)

// shapedDoc holds the keys of the reference sections with parts that are not round.
type shapedDoc struct {
	Surroundings struct {
		Ambient float64 `yaml:"ambient_c"`
		Film    float64 `yaml:"film_w_m2k"`
	}
	Holder struct {
		Inside float64 `yaml:"inside_mm"`
		Width  float64 `yaml:"width_mm"`
		Height float64 `yaml:"height_mm"`
		Layers []shapedLayer
		Fill   string
	}
	Parts []struct {
		ID        string
		Conductor struct {
			Shape    string
			Diameter float64 `yaml:"diameter_mm"`
			Width    float64 `yaml:"width_mm"`
			Height   float64 `yaml:"height_mm"`
			Corner   float64 `yaml:"corner_mm"`
			Angle    float64 `yaml:"angle_deg"`
			Radius   float64 `yaml:"radius_mm"`
		}
		Layers []shapedLayer
		At     [2]float64 `yaml:"at_mm"`
		Turn   float64    `yaml:"turn_deg"`
	}
	Loads []struct {
		Conductors []string
		Heat       float64 `yaml:"heat_w_m"`
	}
	Materials map[string]struct {
		K float64 `yaml:"k_w_mk"`
	}
}

type shapedLayer struct {
	Material  string
	Thickness float64 `yaml:"thickness_mm"`
}

// parting keeps faces that touch apart, mm.
const parting = 0.01e-3

// contours turns a document into contours, heats by contour, and the contours of the metals by part.
func (d *shapedDoc) contours() (all []Contour, heats []float64, metals []int) {
	const mm = 1e-3
	fill := d.Materials[d.Holder.Fill].K
	heat := map[string]float64{}
	for _, l := range d.Loads {
		heat[l.Conductors[0]] = l.Heat
	}
	for i := range d.Parts {
		p := &d.Parts[i]
		c := &p.Conductor
		form := func(t float64) Loop {
			switch c.Shape {
			case "bar":
				return Bar(c.Width*mm, c.Height*mm, c.Corner*mm, t)
			case "sector":
				l := Sector(c.Radius*mm, c.Angle*math.Pi/180, c.Corner*mm, 0)
				_, z := l.Area()
				return Sector(c.Radius*mm, c.Angle*math.Pi/180, c.Corner*mm, t).Placed(0, -z)
			}
			return Circle(c.Diameter/2*mm + t)
		}
		in, t := math.Inf(1), 0.0
		metals = append(metals, len(all))
		for j := 0; j <= len(p.Layers); j++ {
			out := fill
			grow := t
			if j < len(p.Layers) {
				out = d.Materials[p.Layers[j].Material].K
				t += p.Layers[j].Thickness * mm
			} else {
				grow -= parting * mm
			}
			loop := form(grow).Placed(p.Turn*math.Pi/180, complex(p.At[0]*mm, p.At[1]*mm))
			all = append(all, Contour{Loop: loop, In: in, Out: out})
			in = out
			h := 0.0
			if j == 0 {
				h = heat[p.ID]
			}
			heats = append(heats, h)
		}
	}
	in, t := fill, 0.0
	for j := 0; j <= len(d.Holder.Layers); j++ {
		loop := Circle(d.Holder.Inside/2*mm + t)
		if d.Holder.Width > 0 {
			loop = Flat(d.Holder.Width*mm, d.Holder.Height*mm, t)
		}
		c := Contour{Loop: loop, In: in}
		if j < len(d.Holder.Layers) {
			in = d.Materials[d.Holder.Layers[j].Material].K
			t += d.Holder.Layers[j].Thickness * mm
			c.Out = in
		} else {
			c.Sides = []Side{{Film: d.Surroundings.Film, Temp: d.Surroundings.Ambient}}
		}
		all, heats = append(all, c), append(heats, 0)
	}
	return all, heats, metals
}

// The reference sections with sectors, a bar and a flat jacket against a converged general finite-element solution (testdata/fe-cases/README.md).
func TestShapedReferenceCases(t *testing.T) {
	for _, name := range []string{"s01_sector4", "s02b_flat_air", "s03_bar_two_wires"} {
		want := expected(t, "expected.csv", name)
		raw, err := os.ReadFile("../../testdata/fe-cases/" + name + ".yaml")
		if err != nil {
			t.Fatal(err)
		}
		var d shapedDoc
		if err := yaml.Unmarshal(raw, &d); err != nil {
			t.Fatal(err)
		}
		contours, heats, metals := d.contours()
		for _, fineness := range []float64{0.7, 1, 1.5} {
			s := NewShaped(contours, fineness, never)
			y := s.Respond(heats, true)
			worst := 0.0
			for i, m := range metals {
				worst = math.Max(worst, math.Abs(s.Metal(y, m)-want[d.Parts[i].ID]))
			}
			t.Logf("%-18s %.1f: error %.4f K, %d unknowns, loose %.1e", name, fineness, worst, s.Len(), s.Loose())
			if worst > 0.02 {
				t.Errorf("%s: error %.4f K", name, worst)
			}
		}
	}
}
