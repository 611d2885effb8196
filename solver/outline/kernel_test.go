package outline

import (
	"math"
	"math/cmplx"
	"testing"
)

// TestPotential compares the closed forms with a Gauss rule of many points (off the panel) on both branches of the recurrence.
func TestPotential(t *testing.T) {
	x, wt := gauss(400)
	var f, g potential
	for _, w := range []complex128{0.3 + 0.2i, -0.9 + 0.15i, 1.5i, 1.9 + 0.4i, -2.1 + 0.1i, 2.05, 3 - 4i, -7 + 1i, 9, 40i, 300 + 100i, -2000 + 1i} {
		flip := real(w) < 0
		f.at(w, maxModes, flip, true)
		for k := range maxModes {
			var want complex128
			for i := range x {
				p, _ := legendre(k, x[i])
				d := w - complex(x[i], 0)
				if flip {
					d = -d
				}
				want += complex(wt[i]*p, 0) * cmplx.Log(d)
			}
			if d := cmplx.Abs(f.first[k] - want); d > 2e-10 {
				t.Errorf("w %v mode %d: first off by %g", w, k, d)
			}
		}
		// second is the antiderivative of first
		h := complex(0.003, 0.002)
		var mean complex128
		gx, gw := gauss(8)
		for i := range gx {
			g.at(w+h*complex(gx[i], 0), maxModes, flip, false)
			mean += complex(gw[i]/2, 0) * g.first[3]
		}
		g.at(w+h, maxModes, flip, true)
		hi := g.second
		g.at(w-h, maxModes, flip, true)
		if d := cmplx.Abs((hi[3]-g.second[3])/(2*h) - mean); d > 1e-8 {
			t.Errorf("w %v: second off by %g", w, d)
		}
	}
}

// TestPotentialOnPanel checks the real parts on the panel and at its ends, where ∫ ln|w−t| dt has elementary values.
func TestPotentialOnPanel(t *testing.T) {
	var f potential
	f.at(1, 3, false, true)
	if d := math.Abs(real(f.first[0]) - (2*math.Ln2 - 2)); d > 1e-14 {
		t.Error("end, mode 0:", d)
	}
	if d := math.Abs(real(f.first[1]) + 1); d > 1e-14 { // ∫ t ln(1−t) dt = −1
		t.Error("end, mode 1:", real(f.first[1]))
	}
	f.at(0, 3, false, false)
	if d := math.Abs(real(f.first[0]) + 2); d > 1e-14 {
		t.Error("middle, mode 0:", d)
	}
	if d := math.Abs(real(f.first[2]) - 2.0/3); d > 1e-14 { // 2∫₀¹ (3t²−1)/2 ln t dt = 2(−1/6 + 1/2)
		t.Error("middle, mode 2:", real(f.first[2]))
	}
}
