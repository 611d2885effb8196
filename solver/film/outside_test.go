package film_test

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"packrise/solver/film"
	"packrise/solver/fluid"
)

const zero = 273.15

// still returns still air at c °C.
func still(c float64) film.Outside {
	return film.Outside{Kind: film.StillAir, AmbientK: c + zero, RadiantK: c + zero, PressurePa: fluid.Atmosphere}
}

func pipe(d float64) film.Face {
	return film.Face{Shape: film.Round, DiameterM: d, Emissivity: 0.9, Absorptivity: 0.9}
}

// randomOutside makes surroundings of every kind.
func randomOutside(r *rand.Rand) film.Outside {
	u := func(a, b float64) float64 { return a + (b-a)*r.Float64() }
	o := film.Outside{Kind: film.Kind(r.IntN(5)), AmbientK: zero + u(-40, 60), PressurePa: fluid.Atmosphere * math.Exp(-u(0, 4))}
	o.RadiantK = o.AmbientK + u(-1, 1)*20*float64(r.IntN(2))
	if o.Kind == film.Water {
		o.AmbientK = zero + u(6, 40)
	}
	if o.Kind == film.MovingAir || o.Kind == film.Water {
		o.SpeedMS = u(0, 1) * math.Exp(u(-4, 3)) * float64(r.IntN(2))
		o.Along = r.IntN(2) == 0
	}
	if r.IntN(3) == 0 {
		o.Vertical, o.HeightM = true, math.Exp(u(-2, 4))
	}
	if r.IntN(2) == 0 {
		o.SunWM2 = u(0, 1200)
	}
	o.DepthM, o.SoilWMK = u(0.5, 2), u(0.3, 2)
	o.Cautious = r.IntN(3) == 0
	return o
}

func randomFace(r *rand.Rand) film.Face {
	u := func(a, b float64) float64 { return a + (b-a)*r.Float64() }
	f := film.Face{Shape: film.Shape(r.IntN(4)), Emissivity: u(0.05, 1), Absorptivity: u(0.1, 1)}
	if f.Shape == film.Round {
		f.DiameterM = math.Exp(u(math.Log(3e-4), math.Log(0.5)))
	} else {
		f.WidthM, f.HeightM = math.Exp(u(-4, -0.7)), math.Exp(u(-4, -0.7))
	}
	return f
}

// TestFluxRises: the flux is continuous, also through the ambient, and rises with the surface's temperature, for all kinds. Surface finds the
// temperature again.
func TestFluxRises(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	for range 2000 {
		o, f := randomOutside(r), randomFace(r)
		last := math.Inf(-1)
		slope := 0.0
		for _, dt := range grid() {
			k := o.AmbientK + dt
			if o.Kind == film.Water && k < zero {
				continue // ice
			}
			a := o.Film(f, k)
			q := a.Flux(k)
			if math.IsNaN(q) || math.IsInf(q, 0) || a.Convective < 0 || a.Radiative < 0 || len(a.By) == 0 {
				t.Fatalf("%+v %+v at %+g K: %+v", o, f, dt, a)
			}
			if q <= last {
				t.Fatalf("%+v %+v: flux falls from %g to %g at %+g K", o, f, last, q, dt)
			}
			last = q
			slope = math.Max(slope, math.Abs(q))
		}
		// no jump: over a step of 1e-7 K the flux changes by no more than a steep film would give
		for _, dt := range []float64{-30, -1, 0, 1e-3, 1, 30} {
			k := o.AmbientK + dt
			a, b := o.Film(f, k), o.Film(f, k+1e-7)
			if d := b.Flux(k+1e-7) - a.Flux(k); d < 0 || d > 1e-7*1e6 {
				t.Fatalf("%+v %+v: jump of %g W/m² at %+g K", o, f, d, dt)
			}
		}
		want := o.AmbientK + 60*r.Float64()
		q := o.Film(f, want).Flux(want)
		got, a := o.Surface(f, q)
		if math.Abs(got-want) > 1e-6 && math.Abs(a.Flux(got)-q) > 1e-9*math.Max(1, math.Abs(q)) {
			t.Fatalf("%+v %+v: surface %.9f K, want %.9f K", o, f, got, want)
		}
	}
}

func grid() []float64 {
	out := []float64{}
	for d := 200.0; d > 1e-6; d /= 1.5 {
		out = append(out, -math.Min(d, 150))
	}
	out = append(out, 0)
	for d := 1e-6; d < 900; d *= 1.5 {
		out = append(out, d)
	}
	clean := out[:1]
	for _, d := range out[1:] {
		if d > clean[len(clean)-1] {
			clean = append(clean, d)
		}
	}
	return clean
}

// TestFixedPoint: T ← toward(T) + q/h(T) converges from anywhere, for all kinds, within a few steps.
func TestFixedPoint(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	for range 1000 {
		o, f := randomOutside(r), randomFace(r)
		k := o.AmbientK + 40
		q := o.Film(f, k).Flux(k)
		x := o.AmbientK + 100
		for range 60 {
			a := o.Film(f, x)
			x = math.Max(a.TowardK+q/a.Coefficient(), 50)
		}
		if math.Abs(x-k) > 1e-4 {
			t.Fatalf("%+v %+v: %.6f K, want %.6f K", o, f, x, k)
		}
	}
}

// TestMonotone: more altitude, more sun, less emissivity, less speed make a surface that must give off 200 W/m² hotter.
func TestMonotone(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	for range 500 {
		o, f := randomOutside(r), randomFace(r)
		if o.Kind == film.Buried || o.Kind == film.Water {
			continue
		}
		hot := func(o film.Outside, f film.Face) float64 { k, _ := o.Surface(f, 200); return k }
		base := hot(o, f)
		worse := map[string]float64{}
		p := o
		p.PressurePa *= 0.7
		worse["altitude"] = hot(p, f)
		p = o
		p.SunWM2 += 300
		worse["sun"] = hot(p, f)
		p = o
		p.SpeedMS *= 0.5
		worse["speed"] = hot(p, f)
		p = o
		p.AmbientK += 5
		p.RadiantK += 5
		worse["ambient"] = hot(p, f)
		g := f
		if o.RadiantK < base {
			g.Emissivity *= 0.8
			worse["emissivity"] = hot(o, g)
		}
		for what, k := range worse {
			if k < base-1e-7 {
				t.Fatalf("%+v %+v: %s makes it cooler, %g instead of %g K", o, f, what, k, base)
			}
		}
	}
}

// TestBlackBody: in vacuum at emissivity 1 a surface gives off σT⁴ (CODATA 2018), 1418.0 W/m² between 400 K and 100 K … 1451.6 − 5.7.
func TestBlackBody(t *testing.T) {
	o := film.Outside{Kind: film.Vacuum, AmbientK: 100, RadiantK: 100}
	f := film.Face{Shape: film.Round, DiameterM: 0.01, Emissivity: 1}
	near(t, "black body", o.Film(f, 400).Flux(400), 5.670374419e-8*(math.Pow(400, 4)-math.Pow(100, 4)), 1e-12)
}

// TestSun: a black pipe in vacuum far from the sun at 1361 W/m² (solar constant) settles at (1361/(πσ))^¼ = 295.7 K, the mean over a
// cylinder across the rays (closed form).
func TestSun(t *testing.T) {
	o := film.Outside{Kind: film.Vacuum, AmbientK: 4, RadiantK: 4, SunWM2: 1361}
	k, _ := o.Surface(film.Face{Shape: film.Round, DiameterM: 0.02, Emissivity: 1, Absorptivity: 1}, 0)
	near(t, "pipe in the sun", k, math.Pow(1361/(math.Pi*5.670374419e-8), 0.25), 1e-6)
	k, a := o.Surface(film.Face{Shape: film.Top, WidthM: 1, HeightM: 1, Emissivity: 1, Absorptivity: 1}, 0)
	near(t, "plate in the sun", k, 393.6, 1e-3) // (1361/σ)^¼
	near(t, "absorbed", a.AbsorbedWM2, 1361, 1e-12)
	if o.Film(film.Face{Shape: film.Side, WidthM: 1, HeightM: 1, Emissivity: 1, Absorptivity: 1}, 300).AbsorbedWM2 != 0 {
		t.Error("the sun from above shines on a side")
	}
}

// TestBlend: no speed is still air, a breath does not cool below it, and a flow along brings 0.42 of the flow across (CIGRE 207).
func TestBlend(t *testing.T) {
	f := pipe(0.02)
	base := still(30).Film(f, 333.15)
	o := still(30)
	o.Kind = film.MovingAir
	for _, v := range []float64{0, 0.001, 0.01} {
		o.SpeedMS = v
		if a := o.Film(f, 333.15); a.Convective != base.Convective {
			t.Errorf("%g m/s: %g W/m²K, still %g", v, a.Convective, base.Convective)
		}
	}
	o.SpeedMS = 3
	across := o.Film(f, 333.15)
	o.Along = true
	along := o.Film(f, 333.15)
	near(t, "along over across", along.Convective/across.Convective, 0.42, 1e-12)
}

// TestAlongABox: along a 100 × 60 mm box at 2 m/s the film agrees with a turbulent plate of 3 m and 10 m, Nu = 0.037 Re^0.8 Pr^⅓ (Incropera,
// equation 7.41, tripped boundary layer; from memory) within a quarter.
func TestAlongABox(t *testing.T) {
	o := still(30)
	o.Kind, o.SpeedMS, o.Along = film.MovingAir, 2, true
	a := o.Film(film.Face{Shape: film.Side, WidthM: 0.1, HeightM: 0.06, Emissivity: 0.9}, 323.15)
	s := fluid.Air(313.15, fluid.Atmosphere)
	for _, l := range []float64{3, 10} {
		h := 0.037 * math.Pow(2*l/s.Kinematic(), 0.8) * math.Cbrt(s.Prandtl()) * s.Conductivity / l
		t.Logf("along a box: %.2f W/m²K, turbulent plate of %g m %.2f, ratio %.2f", a.Convective, l, h, a.Convective/h)
		if r := a.Convective / h; r < 0.75 || r > 1.25 {
			t.Errorf("ratio %.2f", r)
		}
	}
}

// TestAcrossABox: a 60 mm square in cross flow at 5 m/s, Nu = 0.14 Re^0.66 Pr^⅓ on the side (E. M. Sparrow and others 2004, Re 5000–60 000,
// from memory): the cylinder of its perimeter gives 10–20 % less.
func TestAcrossABox(t *testing.T) {
	o := still(30)
	o.Kind, o.SpeedMS = film.MovingAir, 5
	a := o.Film(film.Face{Shape: film.Side, WidthM: 0.06, HeightM: 0.06, Emissivity: 0.9}, 323.15)
	s := fluid.Air(313.15, fluid.Atmosphere)
	h := 0.14 * math.Pow(5*0.06/s.Kinematic(), 0.66) * math.Cbrt(s.Prandtl()) * s.Conductivity / 0.06
	t.Logf("across a box: %.2f W/m²K, square cylinder %.2f, ratio %.2f", a.Convective, h, a.Convective/h)
	if r := a.Convective / h; r < 0.8 || r > 1 {
		t.Errorf("ratio %.2f", r)
	}
}

// TestHandbookPipe: the horizontal steam pipe of Incropera example 9.4 (0.1 m, 165 °C, air and walls 23 °C, emissivity 0.85; from memory):
// Ra 5.073e6, Nu 23.3 by Churchill and Chu, k 0.0313, so h 7.29; 325 W/m by convection and 441 by radiation.
func TestHandbookPipe(t *testing.T) {
	o := still(23)
	f := film.Face{Shape: film.Round, DiameterM: 0.1, Emissivity: 0.85}
	o.Cautious = true
	a := o.Film(f, 438.15)
	near(t, "convection", a.Convective, 7.29, 0.01)
	near(t, "loss", a.Flux(438.15)*math.Pi*0.1, 766, 0.01)
	near(t, "radiation", a.Radiative*142*math.Pi*0.1, 441, 0.01)
}

// TestStanding: a vertical pipe as thick as tall walls go is a plate; a thin tall one is better than a plate and never better than lying.
func TestStanding(t *testing.T) {
	o := still(20)
	o.Vertical, o.HeightM = true, 0.4
	k := 343.15
	plate := o.Film(film.Face{Shape: film.Side, WidthM: 1, HeightM: 1, Emissivity: 0.9}, k).Convective
	thick := o.Film(pipe(0.12), k).Convective
	if thick < plate || thick > 1.06*plate { // Incropera: a plate within 5 % where D/H ≥ 35/Gr^¼, 0.28 here
		t.Errorf("thick pipe %g W/m²K, plate %g", thick, plate)
	}
	o.HeightM = 3
	plate = o.Film(film.Face{Shape: film.Side, WidthM: 1, HeightM: 1, Emissivity: 0.9}, k).Convective
	for _, d := range []float64{0.002, 0.01, 0.05} {
		up := o.Film(pipe(d), k)
		lying := still(20).Film(pipe(d), k)
		t.Logf("⌀ %g mm, 3 m tall: standing %.2f, plate %.2f, lying %.2f W/m²K", d*1e3, up.Convective, plate, lying.Convective)
		if up.Convective < plate || up.Convective > lying.Convective {
			t.Errorf("⌀ %g: standing %g, plate %g, lying %g", d, up.Convective, plate, lying.Convective)
		}
		if !has(up.Notes, "near the top") {
			t.Error("no word on the hot top")
		}
	}
}

func has(notes []string, part string) bool { return strings.Contains(strings.Join(notes, "\n"), part) }

// TestWater: a pipe of 20 mm, 10 K above water of 20 °C loses 500–700 W/m²K by natural convection: Ra by Çengel's table A-9 at 25 °C (ν
// 0.894e-6, a 1.457e-7, β 0.247e-3, k 0.607, from memory) is 1.49e6, Nu by Churchill and Chu 17.4.
func TestWater(t *testing.T) {
	o := film.Outside{Kind: film.Water, AmbientK: 293.15, Cautious: true}
	a := o.Film(pipe(0.02), 303.15)
	ra := 9.80665 * 0.247e-3 * 10 * 8e-6 / (0.894e-6 * 1.457e-7)
	nu, _ := film.ChurchillChu(ra, 0.894e-6/1.457e-7)
	near(t, "natural convection in water", a.Convective, nu*0.607/0.02, 0.02)
	if a.Radiative != 0 {
		t.Error("radiation through water")
	}
	o.SpeedMS = 0.5
	if b := o.Film(pipe(0.02), 303.15); b.Convective < 3*a.Convective {
		t.Errorf("flowing water %g, standing %g", b.Convective, a.Convective)
	}
	o.SpeedMS = 0
	if !has(o.Film(pipe(0.02), 473.15).Notes, "boiling") {
		t.Error("no word on boiling")
	}
	// about 4 °C, where the expansion changes sign, the film stays alive
	o.AmbientK = zero + 2
	if h := o.Film(pipe(0.02), zero+6).Convective; h < 50 {
		t.Errorf("film %g W/m²K between 2 and 6 °C", h)
	}
}

// TestNotes: whatever is used outside its range says so.
func TestNotes(t *testing.T) {
	for _, c := range []struct {
		name string
		o    film.Outside
		f    film.Face
		k    float64
		want string // "" for none
	}{
		{"plain", still(30), pipe(0.02), 330, ""},
		{"huge pipe", still(30), pipe(12), 380, "Morgan's formula (1975) for natural convection of a horizontal cylinder is used outside its range: Rayleigh number"},
		{"hot", still(30), pipe(0.02), 2300, "air at 1028 °C beside the surface is outside the range of its properties, -73 to 727 °C"},
		{"small bottom", still(30), film.Face{Shape: film.Bottom, WidthM: 0.01, HeightM: 0.01, Emissivity: 0.9}, 330, "face that looks down is used outside its range"},
		{"level with the ambient", still(30), film.Face{Shape: film.Bottom, WidthM: 0.01, HeightM: 0.01, Emissivity: 0.9}, 303.2, ""},
		{"warm soil", film.Outside{Kind: film.Buried, AmbientK: 293, DepthM: 0.7, SoilWMK: 0.4}, pipe(0.05), 325, "soil may dry out"},
		{"cool soil", film.Outside{Kind: film.Buried, AmbientK: 293, DepthM: 0.7, SoilWMK: 0.4}, pipe(0.05), 320, ""},
		{"flat box in soil", film.Outside{Kind: film.Buried, AmbientK: 293, DepthM: 0.7, SoilWMK: 0.4}, film.Face{Shape: film.Top, WidthM: 0.4, HeightM: 0.1}, 300, "flatter than 3 to 1"},
		{"breath", film.Outside{Kind: film.MovingAir, AmbientK: 303, RadiantK: 303, PressurePa: 101325, SpeedMS: 0.01}, pipe(0.02), 330, "counts alone"},
		{"box in the wind", film.Outside{Kind: film.MovingAir, AmbientK: 303, RadiantK: 303, PressurePa: 101325, SpeedMS: 3}, film.Face{Shape: film.Top, WidthM: 0.1, HeightM: 0.1, Emissivity: 0.9}, 330, "cylinder of its perimeter"},
	} {
		notes := c.o.Film(c.f, c.k).Notes
		if c.want == "" && len(notes) > 0 || !has(notes, c.want) {
			t.Errorf("%s: %q", c.name, notes)
		}
	}
}

// TestSoil: IEC 60287-2-1, depth 0.8 m, diameter 40 mm, 1 K·m/W gives 0.6974 K·m/W (computed from its formula); the film carries the same, also around a
// square box by Neher and McGrath's equivalent circle.
func TestSoil(t *testing.T) {
	near(t, "T4", film.Soil(0.8, 0.04, 1), 0.6974, 1e-4)
	o := film.Outside{Kind: film.Buried, AmbientK: 288.15, DepthM: 0.8, SoilWMK: 1}
	a := o.Film(pipe(0.04), 320)
	near(t, "film of the soil", 1/(a.Coefficient()*math.Pi*0.04), 0.6974, 1e-4)
	// the equivalent diameter of a square lies between its side and the exact one of an isothermal square, 1.180 sides (logarithmic capacity,
	// G. Pólya and G. Szegő 1951): on the cautious side, by 2 % of the resistance here
	box := o.Film(film.Face{Shape: film.Top, WidthM: 0.1, HeightM: 0.1}, 320)
	d := equivalent(1/(box.Coefficient()*0.4), 0.8, 1)
	if s := d / 0.1; s < 1 || s > 1.18 {
		t.Errorf("equivalent diameter of a square over its side: %g", s)
	}
}

// equivalent finds the cylinder of a given resistance.
func equivalent(r, depth, k float64) float64 {
	u := math.Cosh(2 * math.Pi * k * r)
	return 2 * depth / u
}
