package pack

import (
	"encoding/csv"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"testing"

	"gopkg.in/yaml.v3"
)

// TestHullAgainstReferenceSections: perimeter and strings of the bundles b* (expected_geometry.csv, computed beside the finite-element cases, nine
// decimals).
func TestHullAgainstReferenceSections(t *testing.T) {
	f, err := os.Open("../../testdata/fe-cases/expected_geometry.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	seen := 0
	for _, row := range rows[1:] {
		if row[1] != "hull_perimeter_mm" && row[1] != "strings_total_mm" {
			continue
		}
		want, err := strconv.ParseFloat(row[2], 64)
		if err != nil {
			t.Fatal(err)
		}
		_, perimeter, strings := Hull(bundle(t, row[0]))
		got := perimeter
		if row[1] == "strings_total_mm" {
			got = strings
		}
		if seen++; math.Abs(got-want) > 2e-9 {
			t.Errorf("%s %s: %.9f, want %.9f", row[0], row[1], got, want)
		}
	}
	if seen < 10 {
		t.Errorf("only %d reference values seen", seen)
	}
}

// bundle reads the outside circles of a reference section.
func bundle(t *testing.T, name string) []Disc {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("../../testdata/fe-cases", name+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	var doc struct {
		Parts []struct {
			Conductor struct {
				Diameter float64 `yaml:"diameter_mm"`
			}
			Layers []struct {
				Thickness float64 `yaml:"thickness_mm"`
			}
			At [2]float64 `yaml:"at_mm"`
		}
	}
	if err := yaml.Unmarshal(data, &doc); err != nil {
		t.Fatal(err)
	}
	var out []Disc
	for _, p := range doc.Parts {
		r := p.Conductor.Diameter / 2
		for _, l := range p.Layers {
			r += l.Thickness
		}
		out = append(out, Disc{X: p.At[0], Y: p.At[1], R: r})
	}
	return out
}

// TestHullClosedForms: plane geometry.
func TestHullClosedForms(t *testing.T) {
	row := func(n int, pitch float64) (out []Disc) {
		for i := range n {
			out = append(out, Disc{X: pitch * float64(i), R: 1})
		}
		return out
	}
	flower := []Disc{{R: 1}}
	for k := range 6 {
		s, c := math.Sincos(math.Pi / 3 * float64(k))
		flower = append(flower, Disc{X: 2 * c, Y: 2 * s, R: 1})
	}
	// Belt round two pulleys, radii 3 and 1 at distance 4: half-angle of wrap acos((3−1)/4) = 60°.
	belt := 2*math.Sqrt(16-4) + 3*(2*math.Pi-2*math.Pi/3) + 2*math.Pi/3
	for _, c := range []struct {
		name               string
		discs              []Disc
		perimeter, strings float64
		arcs               int
	}{
		{"none", nil, 0, 0, 0},
		{"one", []Disc{{3, 4, 2, false}}, 4 * math.Pi, 0, 1},
		{"two touching", row(2, 2), 4 + 2*math.Pi, 4, 2},
		{"two apart", row(2, 5), 10 + 2*math.Pi, 10, 2},
		{"two overlapping", row(2, 1), 2 + 2*math.Pi, 2, 2},
		{"belt", []Disc{{0, 0, 3, false}, {4, 0, 1, false}}, belt, 2 * math.Sqrt(12), 2},
		{"five in a row, the middle ones touch both strings", row(5, 2), 16 + 2*math.Pi, 16, 8},
		{"six round one", flower, 12 + 2*math.Pi, 12, 6},
		{"one inside another", []Disc{{0, 0, 5, false}, {1, 1, 2, false}}, 10 * math.Pi, 0, 1},
		{"one inside another, touching it", []Disc{{3, 0, 2, false}, {0, 0, 5, false}}, 10 * math.Pi, 0, 1},
		{"the same twice", []Disc{{1, 1, 2, false}, {1, 1, 2, false}}, 4 * math.Pi, 0, 1},
	} {
		arcs, perimeter, strings := Hull(c.discs)
		if math.Abs(perimeter-c.perimeter) > 1e-12*(1+c.perimeter) || math.Abs(strings-c.strings) > 1e-12*(1+c.perimeter) {
			t.Errorf("%s: perimeter %.15g, strings %.15g, want %.15g, %.15g", c.name, perimeter, strings, c.perimeter, c.strings)
		}
		if len(arcs) != c.arcs {
			t.Errorf("%s: arcs %v, want %d", c.name, arcs, c.arcs)
		}
	}
}

// support of the discs in direction θ: how far they reach.
func support(discs []Disc, theta float64) float64 {
	s, c := math.Sincos(theta)
	h := math.Inf(-1)
	for _, d := range discs {
		h = max(h, d.X*c+d.Y*s+d.R)
	}
	return h
}

// nasty draws discs of which many touch, lie in line, hold one another or are equal.
func nasty(n int, seed uint64) []Disc {
	rng := rand.New(rand.NewPCG(seed, 5))
	out := make([]Disc, n)
	for i := range out {
		switch d := &out[i]; rng.IntN(5) {
		case 0:
			*d = Disc{X: float64(rng.IntN(4)), Y: float64(rng.IntN(4)), R: 0.5}
		case 1:
			*d = Disc{X: float64(rng.IntN(4)), Y: 2, R: float64(rng.IntN(3)) / 2}
		case 2:
			if i > 0 {
				*d = out[rng.IntN(i)]
				s, c := math.Sincos(math.Pi / 6 * float64(rng.IntN(12)))
				*d = Disc{X: d.X + c*(d.R+0.25), Y: d.Y + s*(d.R+0.25), R: 0.25}
			}
		default:
			*d = Disc{X: 4 * rng.Float64(), Y: 4 * rng.Float64(), R: rng.Float64()}
		}
	}
	return out
}

// TestHullIsTheSupport: the arcs go once round; under each the disc reaches as far as any (so the string holds all discs and could not be shorter); and the perimeter is the
// integral of the support over all directions (Cauchy's formula).
func TestHullIsTheSupport(t *testing.T) {
	for seed := range uint64(fewer(300)) {
		discs := nasty(1+int(seed)%23, seed)
		arcs, perimeter, _ := Hull(discs)
		turn := 0.0
		for k, a := range arcs {
			turn += a.To - a.From
			if a.To < a.From || a.From < 0 || a.From >= 2*math.Pi {
				t.Errorf("seed %d: arc %v", seed, a)
			}
			next := arcs[(k+1)%len(arcs)]
			if gap := math.Remainder(next.From-a.To, 2*math.Pi); math.Abs(gap) > 1e-7 {
				t.Errorf("seed %d: arc %v is followed by %v", seed, a, next)
			}
			for _, theta := range []float64{a.From, (a.From + a.To) / 2, a.To} {
				if own, all := support(discs[a.Disc:a.Disc+1], theta), support(discs, theta); all-own > 1e-9 {
					t.Errorf("seed %d: disc %d reaches %g at %g, others %g", seed, a.Disc, own, theta, all)
				}
			}
		}
		if math.Abs(turn-2*math.Pi) > 1e-9 {
			t.Errorf("seed %d: the arcs turn by %g", seed, turn)
		}
		const steps = 20000 // trapezoidal rule over kinks of the support: error about (2π/steps)²
		sum := 0.0
		for k := range steps {
			sum += support(discs, 2*math.Pi*float64(k)/steps)
		}
		if sum *= 2 * math.Pi / steps; math.Abs(sum-perimeter) > 1e-5 {
			t.Errorf("seed %d: perimeter %g, integral of the support %g", seed, perimeter, sum)
		}
	}
}

// TestHullBesidePolygon compares with the convex hull of points on the circles, which is shorter by a share of about π²/(6 m²).
func TestHullBesidePolygon(t *testing.T) {
	const m = 2000
	for seed := range uint64(fewer(20)) {
		discs := nasty(12, seed)
		_, perimeter, _ := Hull(discs)
		var points [][2]float64
		for _, d := range discs {
			for k := range m {
				s, c := math.Sincos(2 * math.Pi * float64(k) / m)
				points = append(points, [2]float64{d.X + d.R*c, d.Y + d.R*s})
			}
		}
		if polygon := convexLength(points); polygon > perimeter*(1+1e-12) || polygon < perimeter*(1-1e-6) {
			t.Errorf("seed %d: string %.9g, polygon %.9g", seed, perimeter, polygon)
		}
	}
}

// convexLength is the length round the convex hull of points (monotone chain).
func convexLength(points [][2]float64) float64 {
	slices.SortFunc(points, func(a, b [2]float64) int { return slices.Compare(a[:], b[:]) })
	length := 0.0
	for _, side := range []float64{1, -1} {
		var chain [][2]float64
		for _, p := range points {
			for len(chain) > 1 {
				a, b := chain[len(chain)-2], chain[len(chain)-1]
				if side*((b[0]-a[0])*(p[1]-a[1])-(b[1]-a[1])*(p[0]-a[0])) > 0 {
					break
				}
				chain = chain[:len(chain)-1]
			}
			chain = append(chain, p)
		}
		for k := range chain[1:] {
			length += math.Hypot(chain[k+1][0]-chain[k][0], chain[k+1][1]-chain[k][1])
		}
	}
	return length
}

// TestHullOrderAndMirror: numbering the discs otherwise, or looking from behind, changes nothing.
func TestHullOrderAndMirror(t *testing.T) {
	for seed := range uint64(50) {
		discs := nasty(15, seed)
		_, perimeter, strings := Hull(discs)
		rng := rand.New(rand.NewPCG(seed, 6))
		other := slices.Clone(discs)
		rng.Shuffle(len(other), func(i, j int) { other[i], other[j] = other[j], other[i] })
		for i := range other {
			other[i].X = -other[i].X
		}
		_, p, s := Hull(other)
		if math.Abs(p-perimeter) > 1e-12*perimeter || math.Abs(s-strings) > 1e-6*perimeter {
			t.Errorf("seed %d: perimeter %.15g and %.15g, strings %.15g and %.15g", seed, perimeter, p, strings, s)
		}
	}
}

func BenchmarkHull200(b *testing.B) {
	discs, _ := lying(b, 200, 5, 0.45, 1)
	for b.Loop() {
		Hull(discs)
	}
}
