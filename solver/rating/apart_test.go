package rating_test

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// wires is a section of equal wires ⌀ 6 mm at places in mm, all with one current.
func wires(around, holder string, current float64, at ...[2]float64) string {
	var b strings.Builder
	fmt.Fprintf(&b, "packrise: 1\nsurroundings: {%s}\nholder: {%s}\nparts:\n", around, holder)
	var ids []string
	for i, p := range at {
		id := fmt.Sprintf("L%d", i+1)
		ids = append(ids, id)
		fmt.Fprintf(&b, "  - {id: %s, kind: core, conductor: {diameter_mm: 4, class: solid}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [%.7g, %.7g]}\n", id, p[0], p[1])
	}
	fmt.Fprintf(&b, "loads: [{id: a, conductors: [%s], current_a: %g}]\n", strings.Join(ids, ", "), current)
	return b.String()
}

const stillAir = "kind: still-air, ambient_c: 30"

// TestApartFarIsAlone: bodies far apart have the temperature of one alone, and one touching pair that of an open bundle.
func TestApartFarIsAlone(t *testing.T) {
	for _, around := range []string{stillAir, "kind: vacuum, ambient_c: 30", "kind: fixed-film, ambient_c: 30, film_w_m2k: 9", stillAir + ", sun_w_m2: 600"} {
		o := rating.Options{Accuracy: heat.Fine}
		alone := solve(t, parse(t, wires(around, "kind: none", 50, [2]float64{0, 0})), o)
		two := solve(t, parse(t, wires(around, "kind: apart", 50, [2]float64{0, 0}, [2]float64{1e8, 0})), o)
		for _, c := range two.Conductors {
			if math.Abs(c.TempC-alone.Conductors[0].TempC) > 1e-6*(alone.Conductors[0].TempC-30) {
				t.Errorf("%s: %s at %.9f, alone %.9f °C", around, c.ID, c.TempC, alone.Conductors[0].TempC)
			}
		}
	}
	pair := [][2]float64{{0, 0}, {6, 0}}
	bundle := solve(t, parse(t, wires(stillAir, "kind: open-bundle", 50, pair...)), rating.Options{})
	apart := solve(t, parse(t, wires(stillAir, "kind: apart", 50, pair...)), rating.Options{})
	// the film of a bundle does not know that it is wider than high, that of a body does so only for the sun
	if d := apart.Conductors[1].TempC - bundle.Conductors[1].TempC; math.Abs(d) > 2e-3 { // the tolerance of the fixed point
		t.Errorf("a touching pair differs by %g K from a bundle", d)
	}
}

// TestApartOrder: what is known of neighbours without any formula. Each one more makes the hottest hotter; nearer is hotter; one above another is
// hotter than beside; a mirrored section is the same mirrored.
func TestApartOrder(t *testing.T) {
	hot := func(around string, at ...[2]float64) float64 {
		r := solve(t, parse(t, wires(around, "kind: apart", 50, at...)), rating.Options{})
		if r.Status != heat.Converged || math.Abs(r.Generated-r.Released) > 1e-5*r.Generated {
			t.Errorf("%v: %v, in %g, out %g W/m", at, r.Status, r.Generated, r.Released)
		}
		worst := 0.0
		for _, c := range r.Conductors {
			worst = max(worst, c.TempC)
		}
		return worst
	}
	last := 0.0
	for _, gap := range []float64{30, 12, 4, 2, 1, 0.2} { // mm
		two := hot(stillAir, [2]float64{0, 0}, [2]float64{6 + gap, 0})
		three := hot(stillAir, [2]float64{0, 0}, [2]float64{6 + gap, 0}, [2]float64{12 + 2*gap, 0})
		up := hot(stillAir, [2]float64{0, 0}, [2]float64{0, 6 + gap})
		if two <= last || three <= two || gap < 12 && up <= two {
			t.Errorf("gap %g mm: two %g, three %g, above %g °C, before %g", gap, two, three, up, last)
		}
		last = two
	}
	// drawn together or into line, a body only gets hotter, but for 0.05 K where the row that counts changes, and never by a jump
	before, aside := 0.0, 0.0
	for k := 120; k > 0; k-- {
		gap := 0.05 * float64(k)
		three := hot(stillAir, [2]float64{0, 0}, [2]float64{6 + gap, 0}, [2]float64{3 + gap/2, (6 + gap) * math.Sqrt(0.75)})
		line := hot(stillAir, [2]float64{0, 0}, [2]float64{1.5 * gap, 9})
		if before > 0 && (three < before-0.05 || three > before+0.6 || line < aside-1e-3 || line > aside+0.6) {
			t.Errorf("gap %g mm: trefoil %g after %g, %g mm out of line %g after %g °C", gap, three, before, 1.5*gap, line, aside)
		}
		before, aside = three, line
	}
	r := solve(t, parse(t, wires(stillAir, "kind: apart", 50, [2]float64{-20, 3}, [2]float64{0, 0}, [2]float64{7, 1}, [2]float64{-7, 1}, [2]float64{20, 3})), rating.Options{})
	for _, p := range [][2]int{{0, 4}, {2, 3}} {
		if d := r.Conductors[p[0]].TempC - r.Conductors[p[1]].TempC; math.Abs(d) > 2e-3 {
			t.Errorf("mirror images differ by %g K", d)
		}
	}
	shade := solve(t, parse(t, wires(stillAir+", sun_w_m2: 1000", "kind: apart", 0, [2]float64{0, 0}, [2]float64{0, -40})), rating.Options{})
	if a, b := shade.Conductors[0].TempC, shade.Conductors[1].TempC; !(a > 35 && b < 33) {
		t.Errorf("in the sun %g, in its shade %g °C", a, b)
	}
}

// TestApartDrag: while a part is dragged against another the two become one body, and what a warm engine gives is what a fresh one gives.
func TestApartDrag(t *testing.T) {
	e := rating.NewEngine(catalog.Load())
	for _, x := range []float64{40, 30, 18.5, 18.001, 18, 18.0004, 18.3, 25} {
		d := parse(t, wires(stillAir, "kind: apart", 50, [2]float64{0, 0}, [2]float64{12, 0}, [2]float64{x, 0}, [2]float64{0, 15}))
		warm, problems, err := e.Solve(context.Background(), d, rating.Options{})
		if err != nil || warm == nil {
			t.Fatalf("%v %v", problems, err)
		}
		fresh := solve(t, d, rating.Options{})
		bodies, loops := 0, len(warm.Shapes[0].Loops)
		for _, o := range warm.Others {
			if o.Kind == "surface" {
				bodies++
			}
		}
		want := 4
		if x <= 18.001 {
			want = 3
		}
		if bodies != want || loops != 4-want {
			t.Errorf("at %g mm: %d bodies, %d strings drawn", x, bodies, loops)
		}
		for i := range fresh.Conductors {
			if d := warm.Conductors[i].TempC - fresh.Conductors[i].TempC; math.Abs(d) > 0.01 {
				t.Errorf("at %g mm: %s differs by %g K from a fresh answer", x, fresh.Conductors[i].ID, d)
			}
		}
		row := []float64{0}
		for i, s := range warm.Shapes[1:] {
			if warm.Row(row, s.At.Y, s.At.X, 1); math.Abs(row[0]-warm.Conductors[i].TempC) > 1e-6 {
				t.Errorf("at %g mm: field at %s %g, it has %g °C", x, s.ID, row[0], warm.Conductors[i].TempC)
			}
		}
	}
}

// TestApartNotes: what stands for neighbours is said, and where it does not fit.
func TestApartNotes(t *testing.T) {
	row := func(n int, step float64) (at [][2]float64) {
		for i := range n {
			at = append(at, [2]float64{step * float64(i), 0})
		}
		return at
	}
	thin := strings.Replace(wires(stillAir, "kind: apart", 20, row(2, 7)...), "diameter_mm: 4, class: solid}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [7", "diameter_mm: 2, class: solid}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [7", 1)
	for _, c := range []struct{ text, want string }{
		{wires(stillAir, "kind: apart", 20, row(3, 12)...), "too far apart for the group constants"},
		{wires(stillAir, "kind: apart", 20, row(3, 8)...), "three cables side by side, 0.33 diameters apart"},
		{wires(stillAir, "kind: apart", 20, row(5, 8)...), "end at three cables"},
		{wires(stillAir, "kind: apart", 20, row(2, 6.1)...), "too close to a neighbour for air to pass"},
		{wires(stillAir, "kind: apart", 20, [2]float64{0, 0}, [2]float64{7, 0}, [2]float64{0, 7}, [2]float64{7, 7}), "both beside and above"},
		{wires(stillAir, "kind: apart", 20, [2]float64{0, 0}, [2]float64{7, 0}, [2]float64{3.5, 6.06}), "three cables in trefoil"},
		{thin, "differ from their neighbours"},
		{wires(stillAir, "kind: apart", 20, row(2, 7)...), "2 bodies apart; the hottest outside is that of L1"},
		{wires("kind: moving-air, ambient_c: 30, air_speed_m_s: 1", "kind: apart", 20, row(2, 7)...), "shelter each other in moving air is not reckoned"},
		{wires("kind: water, ambient_c: 30", "kind: apart", 20, row(2, 7)...), "shelter each other in water is not reckoned"},
		{wires(stillAir+", run: vertical, height_m: 3", "kind: apart", 20, row(2, 7)...), "vertical run"},
		{wires("kind: fixed-film, ambient_c: 30, film_w_m2k: 9", "kind: apart", 20, row(2, 7)...), "fixed film counts for every body alike"},
		{wires("kind: buried, ambient_c: 15, depth_m: 0.7, soil_w_mk: 1", "kind: apart", 20, row(2, 7)...), "superposition"},
	} {
		r := solve(t, parse(t, c.text), rating.Options{})
		if r.Status != heat.Converged || !strings.Contains(strings.Join(r.Notes, "\n"), c.want) {
			t.Errorf("%v: no %q in\n%s", r.Status, c.want, strings.Join(r.Notes, "\n"))
		}
	}
	for _, c := range []struct{ text, want string }{
		{wires("kind: buried, ambient_c: 15, depth_m: 0.02, soil_w_mk: 1", "kind: apart", 20, [2]float64{0, 30}, [2]float64{0, -30}), "out of the ground"},
	} {
		_, problems, _ := rating.NewEngine(catalog.Load()).Solve(context.Background(), parse(t, c.text), rating.Options{})
		if len(problems) == 0 || !strings.Contains(problems[0].Sentence(), c.want) {
			t.Errorf("no %q in %v", c.want, problems)
		}
	}
}

// TestApartBuried: three cables in the ground, one diameter apart, against T4 of IEC 60287-2-1 for three equally loaded flat cables: ρ/2π [ln(u +
// √(u²−1)) + ln(1 + (2L/s)²)], from memory.
func TestApartBuried(t *testing.T) {
	r := solve(t, parse(t, wires("kind: buried, ambient_c: 15, depth_m: 0.7, soil_w_mk: 1", "kind: apart", 20, [2]float64{-12, 0}, [2]float64{0, 0}, [2]float64{12, 0})), rating.Options{})
	u := 2 * 0.7 / 0.006
	t4 := (math.Log(u+math.Sqrt(u*u-1)) + math.Log(1+math.Pow(2*0.7/0.012, 2))) / (2 * math.Pi)
	q := r.Generated / 3
	for _, o := range r.Others {
		if o.ID == "outside" && math.Abs((o.TempC-15)/(q*t4)-1) > 1e-3 {
			t.Errorf("outside at %g °C, by the standard %g", o.TempC, 15+q*t4)
		}
	}
	if math.Abs(r.Generated-r.Released) > 1e-6*r.Generated {
		t.Errorf("in %g, out %g W/m", r.Generated, r.Released)
	}
}

// apartAtRandom draws bodies of any kind on a jittered raster, some touching.
func apartAtRandom(d dice) string {
	parts, ids := "", []string{}
	core := func(x, y, r float64) {
		id := fmt.Sprintf("L%d", len(ids)+1)
		ids = append(ids, id)
		parts += fmt.Sprintf("  - {id: %s, kind: core, conductor: {diameter_mm: %.3f, class: solid}, layers: [{material: %s, thickness_mm: %.3f}], at_mm: [%.6f, %.6f]}\n",
			id, 1.2*r, d.of("pvc", "xlpe", "ptfe"), 0.4*r, x, y)
	}
	n := 1 + d.IntN(7)
	for i := range n {
		x, y := 30*float64(i%3)+d.in(-6, 6), 30*float64(i/3)+d.in(-6, 6)
		switch r := d.in(0.5, 4); d.IntN(5) {
		case 0: // a pair
			core(x, y, r)
			core(x+2*r, y, r)
		case 1: // three
			core(x, y, r)
			core(x+2*r, y, r)
			core(x+r, y+math.Sqrt(3)*r, r)
		case 2:
			h, turn := d.in(1, 3), d.in(0, 180)
			if d.IntN(6) == 0 { // a wire that touches a bar
				core(x, y+h/2+r, r)
				turn = 0
			}
			id := fmt.Sprintf("L%d", len(ids)+1)
			ids = append(ids, id)
			parts += fmt.Sprintf("  - {id: %s, kind: core, conductor: {shape: bar, width_mm: %.2f, height_mm: %.6f, metal: copper}, layers: [], at_mm: [%.6f, %.6f], turn_deg: %.0f}\n", id, d.in(2, 9), h, x, y, turn)
		default:
			core(x, y, r)
		}
	}
	around := strings.Replace(d.surroundings(25, 0, 500*float64(d.IntN(2))), "kind: insulation", "kind: still-air", 1)
	if i := strings.Index(around, ", wrap:"); i >= 0 {
		around = around[:i]
	}
	return fmt.Sprintf("packrise: 1\nsurroundings: {%s}\nholder: {kind: apart%s}\nparts:\n%sloads: [{id: a, conductors: [%s], current_a: %.3f}]\n",
		around, []string{"", ", clearance_mm: 0", ", fill: pvc"}[d.IntN(3)], parts, strings.Join(ids, ", "), d.in(3, 30))
}

// TestRandomBodies: random sections of bodies converge or say that none is steady, heat in is heat out, and moving all of it changes nothing.
func TestRandomBodies(t *testing.T) {
	n := 24
	switch {
	case testing.Short():
		n = 12
	case os.Getenv("PACKRISE_SOAK") == "1":
		n = 1000
	}
	for seed := range n {
		text := apartAtRandom(dice{rand.New(rand.NewPCG(uint64(seed), 31))})
		d := parse(t, text)
		r := solve(t, d, rating.Options{})
		if r.Status == heat.ThermalRunaway && r.Settles > 0 && r.Settles < 1 {
			continue
		}
		balance := 1e-5
		if strings.Contains(text, "shape: bar") { // contours of a bar beside a wire that it touches
			balance = 1e-3
		}
		if r.Status != heat.Converged || math.Abs(r.Generated-r.Released) > balance*r.Generated {
			t.Errorf("seed %d: %v, in %g, out %g W/m:\n%s", seed, r.Status, r.Generated, r.Released, text)
			continue
		}
		moved := d.With(func(d *section.Document) {
			d.Parts = append([]section.Part(nil), d.Parts...)
			for i := range d.Parts {
				d.Parts[i].At.V.X += 123
				d.Parts[i].At.V.Y -= 45
			}
		})
		w := solve(t, moved, rating.Options{})
		for i, c := range r.Conductors {
			if c.TempC < 24.9 && !strings.Contains(text, "radiant_c") || math.Abs(w.Conductors[i].TempC-c.TempC) > 0.01 {
				t.Errorf("seed %d: %s at %g, moved with all others %g °C:\n%s", seed, c.ID, c.TempC, w.Conductors[i].TempC, text)
			}
		}
	}
}

// TestApartRunaway: far too much current in one of three bodies is told as such, with a factor that settles.
func TestApartRunaway(t *testing.T) {
	text := wires(stillAir, "kind: apart", 400, [2]float64{0, 0}, [2]float64{7, 0}, [2]float64{30, 0})
	r := solve(t, parse(t, text), rating.Options{})
	if r.Status != heat.ThermalRunaway || !(r.Settles > 0 && r.Settles < 1) {
		t.Fatalf("%v, settles at %g", r.Status, r.Settles)
	}
	below := solve(t, parse(t, wires(stillAir, "kind: apart", 400*r.Settles*0.98, [2]float64{0, 0}, [2]float64{7, 0}, [2]float64{30, 0})), rating.Options{})
	if below.Status != heat.Converged {
		t.Errorf("2 %% below what settles: %v", below.Status)
	}
}

// TestSettleApart puts parts without a place in a row, a diameter apart, and leaves the others.
func TestSettleApart(t *testing.T) {
	d := parse(t, wires(stillAir, "kind: apart", 5, [2]float64{3, 2}, [2]float64{0, 0}, [2]float64{0, 0}))
	d = d.With(func(d *section.Document) {
		d.Parts = append([]section.Part(nil), d.Parts...)
		for i := range d.Parts[1:] {
			d.Parts[i+1].At = section.Opt[section.Point]{}
		}
	})
	at, err := rating.Settle(d, catalog.Load())
	if err != nil {
		t.Fatal(err)
	}
	for id, want := range map[string]section.Point{"L1": {X: 3, Y: 2}, "L2": {X: 15, Y: 2}, "L3": {X: 27, Y: 2}} {
		if got := at[id]; math.Hypot(got.X-want.X, got.Y-want.Y) > 1e-9 {
			t.Errorf("%s at %v, want %v", id, got, want)
		}
	}
	if _, err := rating.LayUp(d, catalog.Load()); err == nil {
		t.Error("bodies apart were laid up")
	}
}

func benchmarkApart(b *testing.B, at [][2]float64, moved int, grade heat.Accuracy) {
	b.ReportAllocs()
	e := rating.NewEngine(catalog.Load())
	d := parse(b, wires(stillAir, "kind: apart", 20, at...))
	for i := 0; b.Loop(); i++ {
		d = d.With(func(d *section.Document) {
			d.Parts = append([]section.Part(nil), d.Parts...)
			d.Parts[moved].At.V.X = at[moved][0] - 0.01*float64(i%100)
		})
		r, problems, err := e.Solve(context.Background(), d, rating.Options{Accuracy: grade})
		if err != nil || r == nil || r.Status != heat.Converged {
			b.Fatal(r, problems, err)
		}
	}
}

// twoBundles are two hexagons of 19 wires side by side.
func twoBundles() (at [][2]float64) {
	for _, x0 := range []float64{0, 60} {
		for q := -2; q <= 2; q++ {
			for s := max(-2, -2-q); s <= min(2, 2-q); s++ {
				at = append(at, [2]float64{x0 + 6*float64(q) + 3*float64(s), 6 * math.Sqrt(0.75) * float64(s)})
			}
		}
	}
	return at
}

func twelve() (at [][2]float64) {
	for i := range 12 {
		at = append(at, [2]float64{12 * float64(i), 0})
	}
	return at
}

func BenchmarkApart12(b *testing.B)     { benchmarkApart(b, twelve(), 11, heat.Standard) }
func BenchmarkApart12Drag(b *testing.B) { benchmarkApart(b, twelve(), 11, heat.Draft) }
func BenchmarkApart2x19(b *testing.B)   { benchmarkApart(b, twoBundles(), 0, heat.Standard) }
func BenchmarkApart2x19Drag(b *testing.B) {
	benchmarkApart(b, twoBundles(), 0, heat.Draft)
}

// TestApartPoint: the influence matrix of bodies holds what one body does to the others through radiation, and through the ground.
func TestApartPoint(t *testing.T) {
	text := func(around string, heats ...float64) string {
		s := wires(around, "kind: apart", 20, [2]float64{0, 0}, [2]float64{6, 0}, [2]float64{14, 0}, [2]float64{4, 14})
		s = s[:strings.Index(s, "loads:")] + "loads:\n"
		for i, q := range heats {
			s += fmt.Sprintf("  - {id: q%d, conductors: [L%d], heat_w_m: %g}\n", i, i+1, q)
		}
		return s
	}
	for _, around := range []string{stillAir, "kind: vacuum, ambient_c: 30", "kind: buried, ambient_c: 15, depth_m: 0.7, soil_w_mk: 1"} {
		e := rating.NewEngine(catalog.Load())
		o := rating.Options{Accuracy: heat.Fine}
		heats := []float64{4, 2, 6, 3}
		p, _, problems, err := e.Point(context.Background(), parse(t, text(around, heats...)), o)
		if p == nil {
			t.Fatal(problems, err)
		}
		for j := range heats {
			up, down := append([]float64(nil), heats...), append([]float64(nil), heats...)
			up[j] += 0.2
			down[j] -= 0.2
			a, b := solve(t, parse(t, text(around, up...)), o), solve(t, parse(t, text(around, down...)), o)
			for i := range heats {
				want := (a.Conductors[i].TempC - b.Conductors[i].TempC) / 0.4
				// air between the two that touch conducts as it is in K
				if k := p.K[i][j]; !(math.Abs(k-want) < 0.02*p.K[j][j]) || !(k > 0) {
					t.Errorf("%s: K[%d][%d] %.5f, by solving %.5f", around, i, j, k, want)
				}
			}
		}
	}
}

// TestApartSector: a sector that touches another part is refused in words, one by itself is not.
func TestApartSector(t *testing.T) {
	text := `
packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: apart}
parts:
  - {id: S1, kind: core, conductor: {shape: sector, angle_deg: 90, radius_mm: 6.5, corner_mm: 1, metal: copper}, at_mm: [4, 4], turn_deg: 45}
  - {id: L1, kind: core, stock: thhn-12, at_mm: [%s, %s]}
loads: [{id: a, conductors: [S1, L1], current_a: 16}]
`
	for at, want := range map[string]bool{"6.9967": true, "9": false} {
		d, problems := section.Read([]byte(strings.ReplaceAll(text, "%s", at)))
		if len(problems) > 0 {
			t.Fatal(problems)
		}
		r, problems, err := rating.NewEngine(catalog.Load()).Solve(context.Background(), d, rating.Options{})
		refused := r == nil && len(problems) == 1 && problems[0].Rule == "bundle-sector"
		if err != nil || refused != want {
			t.Errorf("at %s: %v %v", at, problems, err)
		}
	}
}
