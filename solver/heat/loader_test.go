package heat_test

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"gopkg.in/yaml.v3"

	"packrise/solver/heat"
)

// The keys of section documents that the reference sections use.
type (
	layerDoc struct {
		Material    string  `yaml:"material"`
		ThicknessMM float64 `yaml:"thickness_mm"`
	}
	holderDoc struct {
		Kind        string               `yaml:"kind"`
		InsideMM    float64              `yaml:"inside_mm"`
		WidthMM     float64              `yaml:"width_mm"`
		HeightMM    float64              `yaml:"height_mm"`
		Sides       map[string]yaml.Node `yaml:"sides"`
		Layers      []layerDoc           `yaml:"layers"`
		Fill        string               `yaml:"fill"`
		ClearanceMM float64              `yaml:"clearance_mm"`
	}
	partDoc struct {
		ID        string `yaml:"id"`
		Kind      string `yaml:"kind"`
		Conductor struct {
			DiameterMM float64 `yaml:"diameter_mm"`
			Shape      string  `yaml:"shape"`
			WidthMM    float64 `yaml:"width_mm"`
			HeightMM   float64 `yaml:"height_mm"`
			CornerMM   float64 `yaml:"corner_mm"`
			AngleDeg   float64 `yaml:"angle_deg"`
			RadiusMM   float64 `yaml:"radius_mm"`
		} `yaml:"conductor"`
		Layers     []layerDoc `yaml:"layers"`
		At         [2]float64 `yaml:"at_mm"`
		Build      string     `yaml:"build"`
		TurnDeg    float64    `yaml:"turn_deg"`
		DiameterMM float64    `yaml:"diameter_mm"`
		BoreMM     float64    `yaml:"bore_mm"`
		Bore       yaml.Node  `yaml:"bore"`
		Material   string     `yaml:"material"`
	}
	buildDoc struct {
		Holder holderDoc `yaml:"holder"`
		Parts  []partDoc `yaml:"parts"`
	}
	sectionDoc struct {
		Surroundings struct {
			Kind     string  `yaml:"kind"`
			AmbientC float64 `yaml:"ambient_c"`
			Film     float64 `yaml:"film_w_m2k"`
		} `yaml:"surroundings"`
		Holder holderDoc           `yaml:"holder"`
		Parts  []partDoc           `yaml:"parts"`
		Builds map[string]buildDoc `yaml:"builds"`
		Loads  []struct {
			Conductors []string `yaml:"conductors"`
			HeatWM     float64  `yaml:"heat_w_m"`
		} `yaml:"loads"`
		Materials map[string]struct {
			K          float64  `yaml:"k_w_mk"`
			Emissivity *float64 `yaml:"emissivity"`
			Gas        bool     `yaml:"gas"`
		} `yaml:"materials"`
	}
)

// loaded is a reference section as a heat problem, with the parts' ids.
type loaded struct {
	heat.Problem
	ids []string
}

const mm = 1e-3

// load reads a reference section.
func load(t testing.TB, name string) loaded {
	t.Helper()
	raw, err := os.ReadFile(filepath.Join("..", "..", "testdata", "fe-cases", name+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	var d sectionDoc
	if err := yaml.Unmarshal(raw, &d); err != nil {
		t.Fatal(err)
	}
	l := loaded{}
	l.MediumK = d.Materials[d.Holder.Fill].K
	l.Clearance = d.Holder.ClearanceMM * mm
	l.Wall = heat.Wall{R: d.Holder.InsideMM / 2 * mm, Rings: d.rings(d.Holder.Layers), Film: d.Surroundings.Film, Ambient: d.Surroundings.AmbientC}
	if d.Surroundings.Kind == "fixed-wall" {
		l.Wall.Film = math.Inf(1)
	}
	if d.Holder.WidthMM > 0 {
		l.Wall.Shape, l.Wall.W, l.Wall.H = heat.Rect, d.Holder.WidthMM*mm, d.Holder.HeightMM*mm
		if d.Holder.Kind == "jacket" {
			l.Wall.Shape = heat.FlatWall
		}
		for k, name := range []string{"bottom", "right", "top", "left"} {
			l.Wall.Sides[k] = side(d.Holder.Sides[name])
		}
	}
	if d.Materials[d.Holder.Fill].Gas {
		l.Filling, l.ZeroK = heat.Gas, 273.15
	}
	if len(d.Holder.Layers) > 0 {
		l.Wall.Emissivity = d.emissivity(d.Holder.Layers[0].Material)
	}
	d.place(&l, d.Parts, -1, "", 0)
	heats := map[string]float64{}
	for _, load := range d.Loads {
		for _, id := range load.Conductors {
			heats[id] = load.HeatWM
		}
	}
	for i, id := range l.ids {
		l.Parts[i].Heat = heats[id]
	}
	return l
}

func (d *sectionDoc) rings(layers []layerDoc) []heat.Ring {
	var r []heat.Ring
	for _, l := range layers {
		r = append(r, heat.Ring{K: d.Materials[l.Material].K, Thickness: l.ThicknessMM * mm})
	}
	return r
}

func (d *sectionDoc) emissivity(material string) float64 {
	if e := d.Materials[material].Emissivity; e != nil {
		return *e
	}
	return 0.9
}

func side(n yaml.Node) heat.Side {
	switch {
	case n.Value == "insulated":
		return heat.Side{Kind: heat.Insulated}
	case n.Kind == yaml.MappingNode:
		v, _ := strconv.ParseFloat(n.Content[1].Value, 64)
		return heat.Side{Kind: heat.Held, Temp: v}
	}
	return heat.Side{}
}

// place appends parts, cables before what is in them.
func (d *sectionDoc) place(l *loaded, parts []partDoc, in int, prefix string, turn float64) {
	s, c := math.Sincos(turn * math.Pi / 180)
	for _, p := range parts {
		q := heat.Part{In: in, X: (p.At[0]*c - p.At[1]*s) * mm, Y: (p.At[0]*s + p.At[1]*c) * mm, Rings: d.rings(p.Layers)}
		switch p.Kind {
		case "core":
			c := &p.Conductor
			q.Core, q.Radius = heat.Metal, c.DiameterMM/2*mm
			q.Form = heat.Form{W: c.WidthMM * mm, H: c.HeightMM * mm, R: c.RadiusMM * mm, Corner: c.CornerMM * mm, Angle: c.AngleDeg * math.Pi / 180, Turn: (turn + p.TurnDeg) * math.Pi / 180}
			switch c.Shape {
			case "bar":
				q.Form.Kind, q.Radius = heat.Bar, c.WidthMM/2*mm
			case "sector":
				q.Form.Kind, q.Radius = heat.Sector, c.RadiusMM*mm
			}
		case "rod":
			q.Core, q.Radius, q.K = heat.Body, p.DiameterMM/2*mm, d.Materials[p.Material].K
			if p.BoreMM > 0 {
				wall := heat.Ring{K: q.K, Thickness: (p.DiameterMM - p.BoreMM) / 2 * mm}
				q.Core, q.Radius, q.K = heat.Bore, p.BoreMM/2*mm, d.Materials[p.Bore.Value].K
				q.Rings = append([]heat.Ring{wall}, q.Rings...)
			}
		case "cable":
			b := d.Builds[p.Build]
			if d.Materials[b.Holder.Fill].Gas {
				q.Filling, l.ZeroK = heat.Gas, 273.15
			}
			q.InsideEmissivity = d.emissivity(b.Holder.Layers[0].Material)
			p.Layers = b.Holder.Layers
			q.Core, q.Radius, q.K, q.Rings = heat.Inside, b.Holder.InsideMM/2*mm, d.Materials[b.Holder.Fill].K, d.rings(b.Holder.Layers)
		}
		if n := len(p.Layers); n > 0 {
			q.Emissivity = d.emissivity(p.Layers[n-1].Material)
		} else {
			q.Emissivity = d.emissivity(p.Material)
		}
		l.Parts, l.ids = append(l.Parts, q), append(l.ids, prefix+p.ID)
		if p.Kind == "cable" {
			d.place(l, d.Builds[p.Build].Parts, len(l.Parts)-1, prefix+p.ID+"/", turn+p.TurnDeg)
		}
	}
}

// expected reads a column of a check-value file that is keyed by case and another name.
func expected(t testing.TB, file, column string) map[string]map[string]float64 {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "fe-cases", file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	at := -1
	for i, h := range rows[0] {
		if h == column {
			at = i
		}
	}
	out := map[string]map[string]float64{}
	for _, r := range rows[1:] {
		v, err := strconv.ParseFloat(r[at], 64)
		if err != nil {
			t.Fatal(err)
		}
		if out[r[0]] == nil {
			out[r[0]] = map[string]float64{}
		}
		out[r[0]][r[1]] = v
	}
	return out
}
