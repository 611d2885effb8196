package heat_test

import (
	"math"
	"testing"

	"packrise/solver/heat"
)

const stefan = 5.670374419e-8 // W/m²K⁴, CODATA 2018

// layersOut are concentric shells seen from a heat of q W/m outwards: temperatures by resistances in series and, across a gas, by conduction beside the
// two-surface formula of radiation (F. P. Incropera and D. P. DeWitt, Fundamentals of Heat and Mass Transfer, table 13.3).
func acrossGas(q, outer, a, b, k, ea, eb float64) (inner float64) {
	lo, hi := outer, outer+2000
	for range 80 {
		t := (lo + hi) / 2
		fourth := func(c float64) float64 { return math.Pow(c+273.15, 4) }
		flow := 2*math.Pi*k*(t-outer)/math.Log(b/a) + 2*math.Pi*a*stefan*(fourth(t)-fourth(outer))/(1/ea+a/b*(1/eb-1))
		if flow > q {
			hi = t
		} else {
			lo = t
		}
	}
	return lo
}

func series(q, r0, r1, k float64) float64 { return q * math.Log(r1/r0) / (2 * math.Pi * k) }

// A core in the gas of a cable, in the gas of a tube, all concentric.
func TestConcentricCable(t *testing.T) {
	for _, k := range []float64{0.027, 1e-3} {
		p := heat.Problem{
			MediumK: k, Filling: heat.Gas, ZeroK: 273.15,
			Wall: heat.Wall{R: 15e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 2e-3}}, Film: 9, Ambient: 25, Emissivity: 0.7},
			Parts: []heat.Part{
				{In: -1, Core: heat.Inside, Radius: 6e-3, K: k, Filling: heat.Gas, Rings: []heat.Ring{{K: 0.25, Thickness: 1e-3}}, Emissivity: 0.9, InsideEmissivity: 0.8},
				{In: 0, Core: heat.Metal, Radius: 2e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.8e-3}}, Heat: 6, Emissivity: 0.6},
			},
		}
		const q = 6
		want := 25 + q/(2*math.Pi*17e-3*9) + series(q, 15e-3, 17e-3, 0.2)
		want = acrossGas(q, want, 7e-3, 15e-3, k, 0.9, 0.7) + series(q, 6e-3, 7e-3, 0.25)
		jacket := want
		want = acrossGas(q, want, 2.8e-3, 6e-3, k, 0.6, 0.8) + series(q, 2e-3, 2.8e-3, 0.2)
		r := heat.New(p, heat.Settings{}).Solve(bg, nil)
		if math.Abs(r.Core[1]-want) > 2e-3*k/1e-3 && math.Abs(r.Core[1]-want) > 0.01 || math.Abs(r.Core[0]-jacket) > 0.01 {
			t.Errorf("k %g: core %.4f, jacket inside %.4f °C; want %.4f, %.4f", k, r.Core[1], r.Core[0], want, jacket)
		}
		// Turned about the axis nothing changes; off the axis the field is still what the core says at its own place.
		if got := r.Field.At(0, 0); math.Abs(got-r.Core[1]) > 1e-6 {
			t.Errorf("k %g: the field says %.4f at the core, the core %.4f", k, got, r.Core[1])
		}
	}
}

// A cable without a holder is its inside within a wall: the same section as a holder.
func TestBareCableShines(t *testing.T) {
	l := load(t, "r01_conduit9_plastic")
	round := heat.New(l.Problem, heat.Settings{}).Solve(bg, nil)
	p := l.Problem
	p.Wall.Shape, p.Wall.Rings = heat.BarePart, nil
	p.Filling, p.MediumK = heat.Solid, 1
	jacket := heat.Part{In: -1, Core: heat.Inside, Radius: l.Wall.R, K: l.MediumK, Filling: heat.Gas, Rings: l.Wall.Rings, InsideEmissivity: l.Wall.Emissivity}
	p.Parts = []heat.Part{jacket}
	for _, q := range l.Parts {
		q.In = 0
		p.Parts = append(p.Parts, q)
	}
	bare := heat.New(p, heat.Settings{}).Solve(bg, nil)
	for i, w := range round.Core {
		if math.Abs(bare.Core[i+1]-w) > 1e-6 {
			t.Errorf("part %d: %.6f, in a holder %.6f", i, bare.Core[i+1], w)
		}
	}
}

// A wire in the middle of a wide pipe in air: conduction, two-surface radiation and the Raithby–Hollands annulus beside each other.
func TestConcentricAir(t *testing.T) {
	p := heat.Problem{
		MediumK: 0.028, Filling: heat.Air, ZeroK: 273.15,
		Wall:  heat.Wall{R: 50e-3, Film: math.Inf(1), Ambient: 30, Emissivity: 0.9},
		Parts: []heat.Part{{In: -1, Core: heat.Metal, Radius: 9e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 1e-3}}, Heat: 25, Emissivity: 0.9}},
	}
	r := heat.New(p, heat.Settings{}).Solve(bg, nil)
	still := p
	still.Filling = heat.Gas
	s := heat.New(still, heat.Settings{}).Solve(bg, nil)
	if s.Nusselt != 1 || r.Nusselt < 2 || !(r.Core[0] < s.Core[0]-1) {
		t.Fatalf("Nu %.3f in air, %.3f in a gas at rest; %.2f and %.2f °C", r.Nusselt, s.Nusselt, r.Core[0], s.Core[0])
	}
	want := acrossGas(25, 30, 10e-3, 50e-3, 0.028*r.Nusselt, 0.9, 0.9) + series(25, 9e-3, 10e-3, 0.2)
	if math.Abs(r.Core[0]-want) > 0.005*(want-30) {
		t.Errorf("%.3f °C, want %.3f", r.Core[0], want)
	}
}

// The thinnest gas stands for all that are thinner.
func TestThinnest(t *testing.T) {
	l := load(t, "r04_loose7_conduit40")
	at := func(k float64) float64 {
		l.MediumK = k
		r := heat.New(l.Problem, heat.Settings{Accuracy: heat.Draft}).Solve(bg, nil)
		if r.Status != heat.Converged {
			t.Errorf("k %g: %v", k, r.Status)
		}
		return r.Core[0]
	}
	if a, b := at(1e-7), at(heat.ThinnestK); a != b || !(a > at(1e-3)) {
		t.Errorf("%.4f at 1e-7, %.4f at the thinnest, %.4f at 1e-3 W/mK", a, b, at(1e-3))
	}
}

func TestShiningMisuse(t *testing.T) {
	for what, spoil := range map[string]func(p *heat.Problem){
		"emissivity":  func(p *heat.Problem) { p.Parts[0].Emissivity = 1.1 },
		"wall":        func(p *heat.Problem) { p.Wall.Emissivity = -0.1 },
		"not a value": func(p *heat.Problem) { p.Parts[0].InsideEmissivity = math.NaN() },
		"pressure":    func(p *heat.Problem) { p.Pressure = -1 },
	} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s passes", what)
				}
			}()
			l := load(t, "r05b_concentric1")
			spoil(&l.Problem)
			heat.New(l.Problem, heat.Settings{})
		}()
	}
}
