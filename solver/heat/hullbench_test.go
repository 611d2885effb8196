package heat_test

import (
	"context"
	"fmt"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/pack"
)

// laidUp is a bundle of n parts of three sizes, laid up, some of them idle; gas is taken as a solid.
func laidUp(n int) heat.Problem {
	p := heat.Problem{MediumK: 0.027, Wall: heat.Wall{Shape: heat.Hull, Film: 10, Ambient: 30, Taut: taut}}
	cores := []float64{0.6 * mm, 0.9 * mm, 1.4 * mm}
	var radii []float64
	for i := range n {
		radii = append(radii, cores[i%3]+0.7*mm)
	}
	places, _ := pack.LayUp(radii)
	for i, d := range places {
		r := d.R - 0.7*mm
		p.Parts = append(p.Parts, heat.Part{In: -1, X: d.X, Y: d.Y, Radius: r, Rings: []heat.Ring{{K: 0.2, Thickness: 0.7 * mm}}, Heat: float64(i % 4)})
	}
	return p
}

func BenchmarkHull(b *testing.B) {
	for _, n := range []int{7, 37, 91, 200} {
		p := laidUp(n)
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				heat.New(p, one(heat.Standard)).Solve(context.Background(), nil)
			}
		})
	}
}

func BenchmarkHullInfluence(b *testing.B) {
	for _, n := range []int{7, 37, 91, 200} {
		p := laidUp(n)
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				heat.New(p, one(heat.Standard)).Influence(context.Background())
			}
		})
	}
}

// BenchmarkHullDrag moves a part of the outside, which winds the string anew, and one inside.
func BenchmarkHullDrag(b *testing.B) {
	for _, n := range []int{37, 200} {
		p := laidUp(n)
		for i := range p.Parts { // room to move in
			p.Parts[i].X *= 1.1
			p.Parts[i].Y *= 1.1
		}
		top := 0
		for i := range p.Parts {
			if p.Parts[i].Y > p.Parts[top].Y {
				top = i
			}
		}
		for name, i := range map[string]int{"outside": top, "inside": 0} {
			b.Run(fmt.Sprint(n, " ", name), func(b *testing.B) {
				m := heat.New(p, one(heat.Standard))
				m.Solve(context.Background(), nil)
				b.ReportAllocs()
				steps, k := 0, 0
				for ; b.Loop(); k++ {
					m.Move(i, p.Parts[i].X, p.Parts[i].Y+float64(min(k%10, 10-k%10))*0.05*mm)
					steps += m.Solve(context.Background(), nil).Steps
				}
				b.ReportMetric(float64(steps)/float64(k), "steps/op")
			})
		}
	}
}

// BenchmarkHullRadiatesDrag moves a part of the outside of a bundle whose surfaces radiate, in a draft: most frames are frozen.
func BenchmarkHullRadiatesDrag(b *testing.B) {
	for _, n := range []int{37, 200} {
		p := lit(laidUp(n))
		top := 0
		for i := range p.Parts {
			p.Parts[i].X *= 1.1
			p.Parts[i].Y *= 1.1
			if p.Parts[i].Y > p.Parts[top].Y {
				top = i
			}
		}
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			m := heat.New(p, one(heat.Draft))
			m.Solve(context.Background(), nil)
			b.ReportAllocs()
			frozen, k := 0, 0
			for ; b.Loop(); k++ {
				m.Move(top, p.Parts[top].X, p.Parts[top].Y+float64(min(k%40, 40-k%40))*0.05*mm)
				if m.Solve(context.Background(), nil).Frozen {
					frozen++
				}
			}
			b.ReportMetric(float64(frozen)/float64(k), "frozen/op")
		})
	}
}

// BenchmarkHullField samples a picture of 512 × 512.
func BenchmarkHullField(b *testing.B) {
	p := laidUp(37)
	m := heat.New(p, one(heat.Standard))
	half := 0.0
	for _, q := range p.Parts {
		half = max(half, q.X+2*mm, q.Y+2*mm, -q.X+2*mm, -q.Y+2*mm)
	}
	row := make([]float64, 512)
	b.ReportAllocs()
	for b.Loop() {
		b.StopTimer()
		f := m.Solve(context.Background(), nil).Field
		b.StartTimer()
		for i := range row {
			f.Row(row, -half+2*half*float64(i)/512, -half, 2*half/512)
		}
	}
}

// BenchmarkHullRadiates is one load with surfaces and strings that radiate.
func BenchmarkHullRadiates(b *testing.B) {
	for _, n := range []int{7, 37, 91, 200} {
		p := lit(laidUp(n))
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				heat.New(p, one(heat.Standard)).Solve(context.Background(), nil)
			}
		})
	}
}

// lit fills the pockets with a gas between dark surfaces.
func lit(p heat.Problem) heat.Problem {
	p.Filling, p.ZeroK, p.Wall.Emissivity = heat.Gas, 273.15, 0.9
	p.Parts = append([]heat.Part(nil), p.Parts...)
	for i := range p.Parts {
		p.Parts[i].Emissivity, p.Parts[i].InsideEmissivity = 0.9, 0.9
	}
	return p
}
