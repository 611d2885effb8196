package render

import (
	"fmt"
	"math"
	"math/rand/v2"

	"packrise/solver/section"
)

// The scenes here are invented: packings of their own with a field that only looks like heat. They test pictures, not physics.

// blobs is a field that is highest inside its discs and falls smoothly to the edge.
type blobs struct {
	edge    outline
	ambient float64
	at      []disc
	rise    []float64
	lift    float64
}

func (b *blobs) Bounds() (x0, y0, x1, y1 float64) {
	e := b.edge.box()
	return e.x0, e.y0, e.x1, e.y1
}

func (b *blobs) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = b.value(x0+float64(i)*dx, y)
	}
}

func (b *blobs) value(x, y float64) float64 {
	inside := false
	switch {
	case b.edge.rect != nil:
		r := *b.edge.rect
		inside = x >= r.x0 && x <= r.x1 && y >= r.y0 && y <= r.y1
	case b.edge.round != nil:
		inside = math.Hypot(x-b.edge.round.x, y-b.edge.round.y) <= b.edge.round.r
	default:
		for _, d := range b.edge.parts {
			inside = inside || math.Hypot(x-d.x, y-d.y) <= d.r
		}
	}
	if !inside {
		return math.NaN()
	}
	t := b.ambient + b.lift
	for i, d := range b.at {
		u := math.Hypot(x-d.x, y-d.y) / d.r
		t += b.rise[i] / (1 + max(0, u*u-0.3)*0.35)
	}
	return t
}

// hexPlaces returns n places of a hexagonal lattice of spacing 2r, nearest to the origin first.
func hexPlaces(n int, r float64) []section.Point {
	var all []section.Point
	for a := -12; a <= 12; a++ {
		for b := -12; b <= 12; b++ {
			all = append(all, section.Point{X: 2 * r * (float64(a) + float64(b)/2), Y: 2 * r * float64(b) * math.Sqrt(3) / 2})
		}
	}
	for i := range all { // a plain selection sort by distance, then angle: the lattice has many equal distances
		for j := i + 1; j < len(all); j++ {
			if placeLess(all[j], all[i]) {
				all[i], all[j] = all[j], all[i]
			}
		}
		if i == n-1 {
			break
		}
	}
	return all[:n]
}

func placeLess(a, b section.Point) bool {
	da, db := math.Round(1e6*math.Hypot(a.X, a.Y)), math.Round(1e6*math.Hypot(b.X, b.Y))
	if da != db {
		return da < db
	}
	return math.Atan2(a.Y, a.X) < math.Atan2(b.Y, b.X)
}

// core returns the shape of a conductor with insulation.
func core(id string, at section.Point, metal, outer float64) section.Shape {
	return section.Shape{
		ID: id, Kind: section.Core, At: at,
		Rings: []section.Ring{{Material: "copper", Metal: true, R1: metal}, {Material: "pvc", R0: metal, R1: outer}},
	}
}

// hexScene is a jacket with n equal touching cores.
func hexScene(n int) Scene {
	const r = 1.5
	s := Scene{AmbientC: 30}
	places := hexPlaces(n, r)
	far := 0.0
	for _, p := range places {
		far = max(far, math.Hypot(p.X, p.Y)+r)
	}
	s.Shapes = append(s.Shapes, section.Shape{Kind: section.Jacket, Rings: []section.Ring{{Material: "pur", R0: far, R1: far + 1.2}}})
	for i, p := range places {
		s.Shapes = append(s.Shapes, core(fmt.Sprintf("L%d", i+1), p, 0.9, r))
	}
	return withField(s, 1)
}

// withField adds a field, readings with limits of 90 °C and the sentences.
func withField(s Scene, heat float64) Scene {
	f := &blobs{edge: outlineOf(s.Shapes), ambient: s.AmbientC, lift: 12 * heat}
	n := 0
	for _, sh := range s.Shapes {
		if sh.ID != "" && !sh.Unset && sh.Kind == section.Core {
			n++
		}
	}
	for i, sh := range s.Shapes {
		if sh.ID != "" && !sh.Unset && sh.Kind == section.Core {
			f.at = append(f.at, disc{sh.At.X, sh.At.Y, sh.OuterR()})
			f.rise = append(f.rise, heat*(0.6+0.4*math.Sin(float64(7*i)))*90/math.Sqrt(float64(n))/2.6)
		}
	}
	s.Field = f
	hot, tight := -1, -1
	for _, sh := range s.Shapes {
		if sh.ID == "" || sh.Unset {
			continue
		}
		r := section.Reading{ID: sh.ID, Kind: sh.Kind, TempC: f.value(sh.At.X, sh.At.Y), LoadKnown: true}
		if sh.Kind == section.Core {
			r.LimitC = section.Some(90.0)
		}
		s.Readings = append(s.Readings, r)
		i := len(s.Readings) - 1
		if sh.Kind == section.Core && (hot < 0 || r.TempC > s.Readings[hot].TempC) {
			hot = i
		}
	}
	for i, r := range s.Readings {
		if k, ok := r.MarginK(); ok {
			if tight < 0 || k < s.Readings[tight].LimitC.V-s.Readings[tight].TempC {
				tight = i
			}
		}
	}
	if hot >= 0 {
		s.Readings[hot].Hottest = true
	}
	if tight >= 0 {
		s.Readings[tight].Governs = true
	}
	if h := holderOf(s.Shapes); h != nil && len(h.Rings) > 0 {
		b := f.edge.box()
		t := f.value(b.x1-1e-9, (b.y0+b.y1)/2)
		s.Readings = append(s.Readings,
			section.Reading{ID: h.Kind, Kind: "layer", TempC: t + 2, LimitC: section.Some(80.0)},
			section.Reading{ID: "outside", Kind: "surface", TempC: t})
	}
	return withWords(s, tight)
}

func withWords(s Scene, tight int) Scene {
	s.Title = "Picture test section"
	if tight >= 0 {
		r := s.Readings[tight]
		word := "Within"
		if r.Over() {
			word = "Over"
		}
		s.Answer = fmt.Sprintf("%s. %s governs: %.0f °C, limit %.0f °C (THHN dry).", word, r.ID, r.TempC, r.LimitC.V)
	}
	s.Assumed = "Ambient 30 °C, fixed film 9 W/m²K, parts loose in the holder, clearance 0.2 mm assumed; all loads on."
	s.Status = "heat in 21.6 W/m, out 21.6 W/m · ±0.02 K numerical · 18 ms"
	s.Notes = []string{
		"Radiation and convection between the parts are left out: too hot.",
		"Limit assumed for L3: a bare polymer takes the lowest limit of its range.",
		"Resistance of 0.34 mm² from the formula below the range of the standard's table.",
	}
	s.Caution = "A calculation aid. Local codes, the maker's data and licensed practice decide; where the code's value is lower, it governs. Joints, faults and damage are not covered."
	return s
}

// looseScene is a conduit with n cores of mixed sizes dropped to its bottom.
func looseScene(n int, seed uint64) Scene {
	rng := rand.New(rand.NewPCG(seed, 7))
	radii := make([]float64, n)
	area := 0.0
	for i := range radii {
		radii[i] = 1.2 + 1.6*rng.Float64()*rng.Float64()*2
		area += radii[i] * radii[i]
	}
	inside := math.Sqrt(area / 0.45)
	s := Scene{AmbientC: 30}
	s.Shapes = append(s.Shapes, section.Shape{Kind: section.Conduit, Rings: []section.Ring{{Material: "steel", Metal: true, R0: inside, R1: inside + 1.5}}})
	for i, d := range drop(radii, inside) {
		s.Shapes = append(s.Shapes, core(fmt.Sprintf("L%d", i+1), section.Point{X: d.x, Y: d.y}, 0.6*d.r, d.r))
	}
	return withField(s, 1)
}

// drop puts every disc at the lowest free place where it touches two earlier ones or the wall.
func drop(radii []float64, inside float64) []disc {
	var out []disc
	for _, r := range radii {
		best := disc{0, math.Inf(1), r}
		try := func(x, y float64) {
			if y < best.y && math.Hypot(x, y) <= inside-r+1e-9 && clearOf(out, x, y, r) {
				best.x, best.y = x, y
			}
		}
		try(0, r-inside)
		for i, a := range out {
			for _, q := range touchBoth(disc{0, 0, inside - 2*r}, disc{a.x, a.y, a.r}, r) {
				try(q.X, q.Y)
			}
			for _, b := range out[:i] {
				for _, q := range touchBoth(a, b, r) {
					try(q.X, q.Y)
				}
			}
		}
		if math.IsInf(best.y, 1) {
			break
		}
		out = append(out, best)
	}
	return out
}

func clearOf(discs []disc, x, y, r float64) bool {
	for _, d := range discs {
		if math.Hypot(d.x-x, d.y-y) < d.r+r-1e-9 {
			return false
		}
	}
	return true
}

// touchBoth returns the centres of circles of radius r that touch a and b from outside.
func touchBoth(a, b disc, r float64) []section.Point {
	ra, rb := a.r+r, b.r+r
	d := math.Hypot(b.x-a.x, b.y-a.y)
	if d == 0 || d > ra+rb || d < math.Abs(ra-rb) {
		return nil
	}
	t := (ra*ra - rb*rb + d*d) / (2 * d)
	h := math.Sqrt(max(0, ra*ra-t*t))
	ux, uy := (b.x-a.x)/d, (b.y-a.y)/d
	return []section.Point{{X: a.x + t*ux - h*uy, Y: a.y + t*uy + h*ux}, {X: a.x + t*ux + h*uy, Y: a.y + t*uy - h*ux}}
}

// wirewayScene is a rectangular wireway with two layers of wall and n cores on its floor.
func wirewayScene(n int) Scene {
	s := Scene{AmbientC: 35}
	s.Shapes = append(s.Shapes, section.Shape{
		Kind: section.Wireway, Width: 60, Height: 40,
		Rings: []section.Ring{{Material: "pvc", R0: 0, R1: 1}, {Material: "steel", Metal: true, R0: 1, R1: 2.5}},
	})
	x, y := 3.0, 3.0
	for i := range n {
		s.Shapes = append(s.Shapes, core(fmt.Sprintf("W%d", i+1), section.Point{X: x, Y: y}, 1.8, 3))
		if x += 6; x > 57 {
			x, y = 3, y+6
		}
	}
	return withField(s, 1)
}

// nestedScene is a jacket with two cables of four cores, a hose and a filler.
func nestedScene() Scene {
	s := Scene{AmbientC: 30}
	s.Shapes = append(s.Shapes, section.Shape{Kind: section.Jacket, Rings: []section.Ring{{Material: "pur", R0: 12, R1: 13.4}}})
	for c, at := range []section.Point{{X: -5.5, Y: -3}, {X: 5.5, Y: -3}} {
		id := fmt.Sprintf("C%d", c+1)
		s.Shapes = append(s.Shapes, section.Shape{ID: id, Kind: section.Cable, At: at, Rings: []section.Ring{{Material: "pur", R0: 4.2, R1: 5.2}}})
		for k := range 4 {
			sin, cos := math.Sincos(float64(k)*math.Pi/2 + 0.4)
			sh := core(fmt.Sprintf("%s/L%d", id, k+1), section.Point{X: at.X + 2.4*cos, Y: at.Y + 2.4*sin}, 1, 1.6)
			sh.Depth = 1
			s.Shapes = append(s.Shapes, sh)
		}
	}
	s.Shapes = append(s.Shapes,
		section.Shape{ID: "H1", Kind: section.Rod, At: section.Point{X: 0, Y: 5.5}, Rings: []section.Ring{{Material: "pa", R0: 2.5, R1: 3.6}}},
		section.Shape{ID: "F1", Kind: section.Rod, At: section.Point{X: 5.5, Y: 6}, Rings: []section.Ring{{Material: "pp", R1: 1.8}}},
	)
	return withField(s, 1)
}

// bundleScene is an open bundle of n cores; the holder has no size of its own.
func bundleScene(n int) Scene {
	s := Scene{AmbientC: 30}
	s.Shapes = append(s.Shapes, section.Shape{Kind: section.OpenBundle})
	for i, p := range hexPlaces(n, 1.5) {
		s.Shapes = append(s.Shapes, core(fmt.Sprintf("L%d", i+1), p, 0.9, 1.5))
	}
	return withField(s, 1)
}

// oneScene is a single part with no holder.
func oneScene() Scene {
	return withField(Scene{AmbientC: 30, Shapes: []section.Shape{core("L1", section.Point{}, 2, 3)}}, 1)
}

// overScene is a loose scene of which some parts are over their limit.
func overScene() Scene {
	s := looseScene(9, 1)
	tight := 0
	for i := range s.Readings {
		r := &s.Readings[i]
		if r.Kind == section.Core {
			r.LimitC = section.Some(65.0)
		}
		if r.Governs {
			tight = i
		}
	}
	return withWords(s, tight)
}

// unsolved takes everything that a solution gives out of a scene.
func unsolved(s Scene) Scene {
	s.Readings, s.Field, s.Answer, s.Status = nil, nil, "", ""
	return s
}
