package gas_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/fluid"
	"packrise/solver/gas"
)

func fill(e *gas.Enclosure, by ...float64) []float64 {
	x := make([]float64, e.Len())
	for i, v := range by {
		a, b := e.Patches(i)
		for k := a; k < b; k++ {
			x[k] = v
		}
	}
	return x
}

// Concentric cylinders: q = A₁σ(T₁⁴ − T₂⁴)/(1/ε₁ + (A₁/A₂)(1/ε₂ − 1)) (F. P. Incropera and D. P. DeWitt, Fundamentals of Heat and Mass Transfer,
// table 13.3).
func TestTwoSurfaces(t *testing.T) {
	const r1, r2, t1, t2 = 0.004, 0.01, 370.0, 310.0
	e := gas.NewEnclosure([]gas.Disc{{R: r1, Cuts: around(24)}}, ring(r2, 72), 3, 2, nil)
	for _, eps := range [][2]float64{{0.9, 0.8}, {0.25, 0.9}, {1, 1}, {0.05, 0.05}, {1, 0.1}} {
		x := gas.NewExchange(e, fill(e, eps[0], eps[1]))
		out := make([]float64, e.Len())
		x.Net(out, fill(e, t1, t2))
		q, sum := 0.0, 0.0
		for k, v := range out {
			if k < 24 {
				q += v
			}
			sum += v
		}
		want := 2 * math.Pi * r1 * gas.Sigma * (math.Pow(t1, 4) - math.Pow(t2, 4)) / (1/eps[0] + r1/r2*(1/eps[1]-1))
		if math.Abs(q/want-1) > 3e-5 {
			t.Errorf("ε %v: %.6f W/m, want %.6f", eps, q, want)
		}
		if math.Abs(sum) > 1e-12*q {
			t.Errorf("ε %v: %g W/m get lost", eps, sum)
		}
	}
}

// The exchange is symmetric in the emissive powers, takes nothing from uniform temperatures, and Change is its derivative.
func TestExchange(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	e := gas.NewEnclosure(scatter(r, 9, false), ring(10, 40), 2, 2, nil)
	eps := make([]float64, e.Len())
	for k := range eps {
		eps[k] = r.Float64()
	}
	x := gas.NewExchange(e, eps)
	node := make([]float64, e.Len())
	for k := range node {
		node[k] = r.Float64()
	}
	x.SetNode(node)
	temp, other := make([]float64, e.Len()), make([]float64, e.Len())
	for k := range temp {
		temp[k], other[k] = 300+80*r.Float64(), 300+80*r.Float64()
	}
	out, back := make([]float64, e.Len()), make([]float64, e.Len())
	x.Net(out, fill(e, 333, 333, 333, 333, 333, 333, 333, 333, 333, 333))
	for k, v := range out {
		if math.Abs(v) > 1e-8 {
			t.Fatalf("patch %d emits %g W/m at a uniform temperature", k, v)
		}
	}
	x.SetNode(nil)
	x.Net(out, temp)
	x.Net(back, other)
	a, b := 0.0, 0.0
	for k := range out {
		a += out[k] * math.Pow(other[k], 4)
		b += back[k] * math.Pow(temp[k], 4)
	}
	if math.Abs(a/b-1) > 1e-9 {
		t.Errorf("not symmetric: %g and %g", a, b)
	}
	x.SetNode(node)
	const h = 1e-3
	up, down, d := make([]float64, e.Len()), make([]float64, e.Len()), make([]float64, e.Len())
	dt := make([]float64, e.Len())
	for k := range dt {
		dt[k] = r.Float64() - 0.5
	}
	for k := range temp {
		other[k] = temp[k] + h*dt[k]
	}
	x.Net(up, other)
	for k := range temp {
		other[k] = temp[k] - h*dt[k]
	}
	x.Net(down, other)
	x.Change(d, temp, dt)
	for k := range d {
		if n := (up[k] - down[k]) / (2 * h); math.Abs(n-d[k]) > 1e-6*(1+math.Abs(n)) {
			t.Fatalf("patch %d: change %g, difference %g", k, d[k], n)
		}
	}
}

// A tube of 100 mm at 120 °C in a shield of 120 mm at 35 °C loses 100 W/m by free convection, Ra_c = 171 (Incropera and DeWitt, example 9.5,
// from memory; worked out again from the table's properties of air at 350 K: ν 20.92e-6, α 29.9e-6 m²/s, k 0.030 W/mK).
func TestAnnulus(t *testing.T) {
	air := fluid.Air(350.65, 101325)
	nu, ok := gas.Annulus(0.1, 0.12, air, 85)
	if q := 2 * math.Pi * nu * air.Conductivity / math.Log(1.2) * 85; !ok || math.Abs(q/100-1) > 0.015 {
		t.Errorf("%.2f W/m, want 100", q)
	}
	// From the same page: the formula holds while Ra_c ≥ 100; below, conduction alone.
	if nu, _ := gas.Annulus(0.1, 0.104, air, 20); nu != 1 {
		t.Errorf("a 2 mm gap convects: Nu %g", nu)
	}
	if _, ok := gas.Annulus(0.2, 1.2, air, 85); ok {
		t.Error("a Rayleigh number beyond the range passes")
	}
}

// One wire in the middle of a pipe: what convection adds is what the annulus formula says.
func TestStir(t *testing.T) {
	const r1, r2, t1, t2 = 0.02, 0.05, 350.0, 310.0
	e := gas.NewEnclosure([]gas.Disc{{R: r1, Cuts: around(24)}}, ring(r2, 72), 3, 2, nil)
	x := gas.NewExchange(e, fill(e, 0, 0))
	temps := fill(e, t1, t2)
	nu, ok := x.Stir(temps, 101325)
	out := make([]float64, e.Len())
	x.Net(out, temps)
	q, sum := 0.0, 0.0
	for k, v := range out {
		sum += v
		if k < 24 {
			q += v
		}
	}
	want := 2 * math.Pi * fluid.AirConductivity(330) * (nu - 1) / math.Log(r2/r1) * (t1 - t2)
	if !ok || nu < 2 || math.Abs(q/want-1) > 0.01 {
		t.Errorf("Nu %.3f: %.4f W/m, want %.4f", nu, q, want)
	}
	if math.Abs(sum) > 1e-12*q {
		t.Errorf("the air keeps %g W/m", sum)
	}
	small := gas.NewExchange(gas.NewEnclosure([]gas.Disc{{R: 0.004, Cuts: around(24)}}, ring(0.0155, 72), 3, 2, nil), make([]float64, 96))
	if nu, _ := small.Stir(temps, 101325); nu != 1 {
		t.Errorf("31 mm convect: Nu %g", nu)
	}
	packed := gas.NewEnclosure([]gas.Disc{{R: 0.045, Cuts: around(24)}}, ring(r2, 72), 3, 2, nil)
	if nu, _ := gas.NewExchange(packed, make([]float64, 96)).Stir(temps, 101325); nu != 1 {
		t.Errorf("a gap of 5 mm convects: Nu %g", nu)
	}
}

// Seeking emissions along with temperatures ends at the same ones: NetOf returns the net emission when it is given it, and ChangeOf its change.
func TestNetOf(t *testing.T) {
	r := rand.New(rand.NewPCG(6, 2))
	e := gas.NewEnclosure(scatter(r, 9, false), ring(10, 40), 2, 2, nil)
	temp, dt := make([]float64, e.Len()), make([]float64, e.Len())
	for k := range temp {
		temp[k], dt[k] = 300+80*r.Float64(), r.Float64()-0.5
	}
	for _, least := range []float64{0.05, 0.6} {
		eps := make([]float64, e.Len())
		for k := range eps {
			eps[k] = least + (1-least)*r.Float64()
		}
		x := gas.NewExchange(e, eps)
		node := make([]float64, e.Len())
		for k := range node {
			node[k] = r.Float64()
		}
		x.SetNode(node)
		net, again := make([]float64, e.Len()), make([]float64, e.Len())
		for what, f := range map[string][2]func(){
			"net":    {func() { x.Net(net, temp) }, func() { x.NetOf(again, temp, net) }},
			"change": {func() { x.Change(net, temp, dt) }, func() { x.ChangeOf(again, temp, dt, net) }},
		} {
			f[0]()
			f[1]()
			for k := range net {
				if math.Abs(net[k]-again[k]) > 1e-8 {
					t.Fatalf("ε from %g, %s: %g, want %g", least, what, again[k], net[k])
				}
			}
		}
	}
}
