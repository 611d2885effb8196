package film

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// middle is the centre of the box round the body.
func (b *Body) middle() (x, y float64) {
	x0, y0, x1, y1 := math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)
	for _, d := range b.Hull {
		x0, y0 = math.Min(x0, d.X-d.R), math.Min(y0, d.Y-d.R)
		x1, y1 = math.Max(x1, d.X+d.R), math.Max(y1, d.Y+d.R)
	}
	return (x0 + x1) / 2, (y0 + y1) / 2
}

// images finds how the heat of each buried body raises all others: IEC 60287-2-1, groups of buried cables, ΔT = q/(2πk) ln(d'/d), d the
// distance from the other's axis and d' that from its mirror image in the ground's surface.
func (t *Together) images() {
	n := len(t.Bodies)
	t.soil = mat.NewDense(n, n, nil)
	o := &t.Outside
	for i := range t.Bodies {
		x, y := t.Bodies[i].middle()
		for j := range t.Bodies {
			if j == i {
				t.soil.Set(i, i, Soil(o.DepthM-y, t.Bodies[i].Face.DiameterM, o.SoilWMK))
				continue
			}
			u, v := t.Bodies[j].middle()
			d, mirrored := math.Hypot(x-u, y-v), math.Hypot(x-u, 2*o.DepthM-y-v)
			t.soil.Set(i, j, math.Log(mirrored/d)/(2*math.Pi*o.SoilWMK))
		}
	}
}

// heats are those (W/m) that make surface temperatures in the ground.
func (t *Together) heats(surfaceK []float64) []float64 {
	rise := mat.NewVecDense(len(surfaceK), nil)
	for i, s := range surfaceK {
		rise.SetVec(i, s-t.Outside.AmbientK)
	}
	var q mat.VecDense
	if err := q.SolveVec(t.soil, rise); err != nil {
		return make([]float64, len(surfaceK))
	}
	return q.RawVector().Data
}

// buried is the film of body i for the heats of all.
func (t *Together) buried(i int, surfaceK float64, heat []float64) Answer {
	o := t.Outside
	_, y := t.Bodies[i].middle()
	o.DepthM -= y
	a := o.Film(t.Bodies[i].Face, surfaceK)
	for j, q := range heat {
		if j != i {
			a.TowardK += t.soil.At(i, j) * q
		}
	}
	return a
}

// followSoil is Follow in the ground: of ΔT = R q without each body's own share.
func (t *Together) followSoil() [][]float64 {
	n := len(t.Bodies)
	out := make([][]float64, n)
	var inverse mat.Dense
	if err := inverse.Inverse(t.soil); err != nil {
		for i := range out {
			out[i] = make([]float64, n)
		}
		return out
	}
	for i := range out {
		out[i] = make([]float64, n)
		for j := range n {
			out[i][j] = -t.soil.At(i, i) * inverse.At(i, j)
		}
		out[i][i]++
	}
	return out
}
