package outline

import "testing"

func BenchmarkNew(b *testing.B) {
	for _, name := range []string{"c09_rect7_floor_air", "c13_sides_steel8", "r03_wireway24_steel"} {
		b.Run(name, func(b *testing.B) {
			r, rods := readCase(b, name)
			orders(r, rods, 1)
			var discs []Disc
			for _, p := range rods {
				discs = append(discs, Disc{p.c, p.radius, p.order})
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
		discs = append(discs, Disc{p.c, p.radius, p.order})
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
