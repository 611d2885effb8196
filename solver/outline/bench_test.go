package outline

import "testing"

func BenchmarkNew(b *testing.B) {
	for _, name := range []string{"c09_rect7_floor_air", "c13_sides_steel8", "r03_wireway24_steel"} {
		b.Run(name, func(b *testing.B) {
			r, rods := readCase(b, name)
			orders(r, rods, 1)
			var discs []Disc
			for _, p := range rods {
				discs = append(discs, Disc{C: p.c, A: p.radius, M: p.order})
			}
			b.ReportAllocs()
			for b.Loop() {
				s := New(r, discs, 1)
				b.ReportMetric(float64(s.Len()), "unknowns")
			}
		})
	}
}

func BenchmarkProduct(b *testing.B) {
	r, rods := readCase(b, "r03_wireway24_steel")
	orders(r, rods, 1)
	var discs []Disc
	var src Sources
	var in [][]complex128
	for _, p := range rods {
		discs = append(discs, Disc{C: p.c, A: p.radius, M: p.order})
		src.Q = append(src.Q, 1)
		src.D = append(src.D, make([]complex128, p.order))
		in = append(in, make([]complex128, p.order+1))
	}
	s := New(r, discs, 1)
	y := make([]float64, s.Len())
	b.ReportAllocs()
	for b.Loop() {
		s.RespondTo(y, src, false)
		s.Incoming(y, in)
	}
}

// crowd is 200 parts in rows on the floor of a steel wireway.
func crowd() (Rect, []rod) {
	r := Rect{W: 0.1, H: 0.1, MediumK: 0.027, Layers: []Layer{{50, 0.0015}}}
	for i := range r.Sides {
		r.Sides[i] = Side{Kind: Open, Film: 8, Temp: 35}
	}
	var rods []rod
	for i := range 200 {
		a := 0.0025
		rods = append(rods, rod{c: complex(a*float64(1+2*(i%20)), a*float64(1+2*(i/20))), core: a - 0.0008, k: []float64{0.2}, t: []float64{0.0008}, radius: a, heat: 1})
	}
	return r, rods
}

func BenchmarkCrowd(b *testing.B) {
	r, rods := crowd()
	orders(r, rods, 1)
	var discs []Disc
	var src Sources
	var in [][]complex128
	for _, p := range rods {
		discs = append(discs, Disc{C: p.c, A: p.radius, M: p.order})
		src.Q = append(src.Q, 1)
		src.D = append(src.D, make([]complex128, p.order))
		in = append(in, make([]complex128, p.order+1))
	}
	s := New(r, discs, 1)
	b.Run("new", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			New(r, discs, 1)
		}
		b.ReportMetric(float64(s.Len()), "unknowns")
	})
	y := make([]float64, s.Len())
	b.Run("product", func(b *testing.B) {
		for b.Loop() {
			s.RespondTo(y, src, false)
			s.Incoming(y, in)
		}
	})
	b.Run("move", func(b *testing.B) {
		for b.Loop() {
			s.Move(57, discs[57].C+1e-4)
		}
	})
}

// BenchmarkMany is the product of BenchmarkCrowd for Lanes right-hand sides at once.
func BenchmarkMany(b *testing.B) {
	r, rods := crowd()
	orders(r, rods, 1)
	var discs []Disc
	for _, p := range rods {
		discs = append(discs, Disc{C: p.c, A: p.radius, M: p.order})
	}
	s := New(r, discs, 1)
	l := NewLot(discs, s.Len())
	for _, v := range l.Src {
		for i := range v {
			v[i] = 1
		}
	}
	b.ReportAllocs()
	for b.Loop() {
		s.RespondMany(l)
		s.IncomingMany(l)
	}
}
