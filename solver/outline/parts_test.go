package outline

import (
	"encoding/csv"
	"math"
	"math/cmplx"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"gonum.org/v1/gonum/mat"
	"gopkg.in/yaml.v3"
)

// rod is a round part: a metal core in layers (PHYSICS of layered cylinders, harmonic by harmonic).
type rod struct {
	id     string
	c      complex128
	core   float64
	k, t   []float64 // layers, outwards
	kCore  float64   // 0: one temperature throughout
	heat   float64
	order  int
	radius float64
}

// reflect returns t_n in d_n = t_n conj(b_n).
func (p *rod) reflect(n int, km float64) float64 {
	g := 1.0
	r := p.core
	y := math.Inf(1)
	if p.kCore > 0 {
		y = p.kCore
	}
	for i, k := range p.k {
		if !math.IsInf(y, 1) {
			g = (y - k) / (y + k)
		}
		u := math.Pow(r/(r+p.t[i]), 2*float64(n))
		y = k * (1 + g*u) / (1 - g*u)
		r += p.t[i]
	}
	if math.IsInf(y, 1) {
		return -1
	}
	return (1 - y/km) / (1 + y/km)
}

func (p *rod) resistance() float64 {
	r, sum := p.core, 0.0
	for i, k := range p.k {
		sum += math.Log((r+p.t[i])/r) / (2 * math.Pi * k)
		r += p.t[i]
	}
	return sum
}

// whole is a section solved densely: wall and parts.
type whole struct {
	wall *System
	rods []rod
	src  Sources
	y    []float64
	core []float64
}

// solveWhole finds d from d_n = t_n conj(b_n), b_n from the other parts (translations of multipoles: Greengard and Rokhlin,
// Journal of Computational Physics 73, 1987, in two dimensions) and from the wall.
func solveWhole(r Rect, rods []rod, fineness float64, ground bool) *whole {
	discs := make([]Disc, len(rods))
	first := make([]int, len(rods)+1)
	for i, p := range rods {
		discs[i] = Disc{C: p.c, A: p.radius, M: p.order}
		first[i+1] = first[i] + 2*p.order
	}
	w := &whole{wall: New(r, discs, fineness), rods: rods}
	n := first[len(rods)]
	src := Sources{Q: make([]float64, len(rods)), D: make([][]complex128, len(rods))}
	b := make([][]complex128, len(rods))
	for i, p := range rods {
		src.D[i] = make([]complex128, p.order)
		b[i] = make([]complex128, p.order+1)
	}
	residual := func(ground bool) []float64 { // d − t conj(b)
		for i := range b {
			clear(b[i])
		}
		w.direct(src, b, r.MediumK)
		w.wall.Incoming(w.wall.Respond(src, ground), b)
		out := make([]float64, n)
		for i := range rods {
			for m := 1; m <= rods[i].order; m++ {
				z := src.D[i][m-1] - complex(rods[i].reflect(m, r.MediumK), 0)*cmplx.Conj(b[i][m])
				out[first[i]+2*m-2], out[first[i]+2*m-1] = real(z), imag(z)
			}
		}
		return out
	}
	a := mat.NewDense(n, n, nil)
	for i := range rods {
		for m := range 2 * rods[i].order {
			v := complex(1, 0)
			if m%2 == 1 {
				v = 1i
			}
			src.D[i][m/2] = v
			a.SetCol(first[i]+m, residual(false))
			src.D[i][m/2] = 0
		}
	}
	for i, p := range rods {
		src.Q[i] = p.heat
	}
	rhs := mat.NewVecDense(n, residual(ground))
	var x mat.VecDense
	if n > 0 {
		if err := x.SolveVec(a, rhs); err != nil {
			panic(err)
		}
	}
	for i := range rods {
		for m := range rods[i].order {
			src.D[i][m] = -complex(x.AtVec(first[i]+2*m), x.AtVec(first[i]+2*m+1))
		}
	}
	residual(ground)
	w.src, w.y = src, w.wall.Respond(src, ground)
	w.core = make([]float64, len(rods))
	for i, p := range rods {
		w.core[i] = real(b[i][0]) - p.heat*math.Log(p.radius)/(2*math.Pi*r.MediumK) + p.heat*p.resistance()
	}
	return w
}

func (w *whole) direct(src Sources, b [][]complex128, km float64) {
	for i := range w.rods {
		for j := range w.rods {
			if i == j {
				continue
			}
			pi, pj := &w.rods[i], &w.rods[j]
			dz := pi.c - pj.c
			x, y := complex(pi.radius, 0)/dz, complex(pj.radius, 0)/dz
			q := complex(-src.Q[j]/(2*math.Pi*km), 0)
			b[i][0] += q * complex(math.Log(cmplx.Abs(dz)), 0)
			xn := complex(1, 0)
			for n := 0; n <= pi.order; n++ {
				if n > 0 {
					xn *= -x
					b[i][n] -= q * xn / complex(float64(n), 0)
				}
				ym, c := complex(1, 0), 1.0
				for m := 1; m <= pj.order; m++ {
					ym *= y
					if m > 1 {
						c *= float64(m+n-1) / float64(m-1)
					}
					b[i][n] += complex(c, 0) * xn * ym * src.D[j][m-1]
				}
			}
		}
	}
}

// orders gives each rod the harmonics that its gaps need; c = 1 is standard.
func orders(r Rect, rods []rod, c float64) {
	wallMetal := len(r.Layers) > 0 && r.Layers[0].K > 5
	for i := range rods {
		p := &rods[i]
		ratio := r.MediumK / p.k[len(p.k)-1]
		m := 6.0
		if ratio > 0.5 {
			m = 3
		}
		need := func(reff, gap float64) {
			x := math.Max(math.Sqrt(2*reff*math.Max(gap, 0)), reff*math.Min(ratio, 1.5))
			m = math.Max(m, c*p.radius/x)
		}
		for j := range rods {
			if o := &rods[j]; i != j {
				need(p.radius*o.radius/(p.radius+o.radius), cmplx.Abs(p.c-o.c)-p.radius-o.radius)
			}
		}
		x, y := real(p.c), imag(p.c)
		gap := math.Min(math.Min(x, r.W-x), math.Min(y, r.H-y)) - p.radius
		reff := p.radius
		if wallMetal {
			reff /= 2
		}
		need(reff, gap)
		p.order = int(math.Min(math.Ceil(m), 40))
	}
}

type caseFile struct {
	Surroundings struct {
		Ambient float64 `yaml:"ambient_c"`
		Film    float64 `yaml:"film_w_m2k"`
	}
	Holder struct {
		Width  float64 `yaml:"width_mm"`
		Height float64 `yaml:"height_mm"`
		Layers []layerFile
		Fill   string
		Sides  map[string]yaml.Node
	}
	Parts []struct {
		ID        string
		Conductor struct {
			Diameter float64 `yaml:"diameter_mm"`
		}
		Layers []layerFile
		At     [2]float64 `yaml:"at_mm"`
	}
	Loads []struct {
		Conductors []string
		Heat       float64 `yaml:"heat_w_m"`
	}
	Materials map[string]struct {
		K float64 `yaml:"k_w_mk"`
	}
}

type layerFile struct {
	Material  string
	Thickness float64 `yaml:"thickness_mm"`
}

const casesDir = "../../testdata/fe-cases"

// readCase reads one of the finite-element cases.
func readCase(t testing.TB, name string) (Rect, []rod) {
	t.Helper()
	raw, err := os.ReadFile(filepath.Join(casesDir, name+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	var f caseFile
	if err := yaml.Unmarshal(raw, &f); err != nil {
		t.Fatal(err)
	}
	r := Rect{W: f.Holder.Width / 1000, H: f.Holder.Height / 1000, MediumK: f.Materials[f.Holder.Fill].K}
	for _, l := range f.Holder.Layers {
		r.Layers = append(r.Layers, Layer{f.Materials[l.Material].K, l.Thickness / 1000})
	}
	for i, side := range []string{"bottom", "right", "top", "left"} {
		r.Sides[i] = Side{Kind: Open, Film: f.Surroundings.Film, Temp: f.Surroundings.Ambient}
		node, ok := f.Holder.Sides[side]
		switch {
		case !ok:
		case node.Value == "insulated":
			r.Sides[i] = Side{Kind: Insulated}
		default:
			var held struct {
				Fixed float64 `yaml:"fixed_c"`
			}
			if err := node.Decode(&held); err != nil {
				t.Fatal(err)
			}
			r.Sides[i] = Side{Kind: Held, Temp: held.Fixed}
		}
	}
	heat := map[string]float64{}
	for _, l := range f.Loads {
		for _, c := range l.Conductors {
			heat[c] = l.Heat
		}
	}
	var rods []rod
	for _, p := range f.Parts {
		q := rod{id: p.ID, c: complex(p.At[0]/1000, p.At[1]/1000), core: p.Conductor.Diameter / 2000, heat: heat[p.ID]}
		q.radius = q.core
		for _, l := range p.Layers {
			q.k, q.t = append(q.k, f.Materials[l.Material].K), append(q.t, l.Thickness/1000)
			q.radius += l.Thickness / 1000
		}
		rods = append(rods, q)
	}
	return r, rods
}

// expected reads a column of numbers of a case from one of the CSV files, by conductor or side.
func expected(t testing.TB, file, name string) map[string]float64 {
	t.Helper()
	f, err := os.Open(filepath.Join(casesDir, file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	out := map[string]float64{}
	for _, row := range rows {
		if row[0] == name {
			out[row[1]] = number(t, row[2])
		}
	}
	if len(out) == 0 {
		t.Fatalf("%s has no %s", file, name)
	}
	return out
}

func number(t testing.TB, s string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}
