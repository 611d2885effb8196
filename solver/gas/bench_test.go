package gas_test

import (
	"fmt"
	"math"
	"testing"

	"packrise/solver/gas"
)

// heap is n discs of radius 1 in touching hexagonal rows, within a circle that leaves a third of it free.
func heap(n int) ([]gas.Disc, float64) {
	r := math.Sqrt(float64(n) / 0.55)
	var d []gas.Disc
	for row := 0; len(d) < n && row < 40; row++ {
		y := -r + 1.5 + float64(row)*math.Sqrt(3)
		x := -r + float64(row%2)
		for ; x < r && len(d) < n; x += 2 {
			if math.Hypot(x, y) < r-1 {
				d = append(d, gas.Disc{C: complex(x, y), R: 1, Cuts: around(24)})
			}
		}
	}
	return d, r
}

func BenchmarkEnclosure(b *testing.B) {
	for _, n := range []int{37, 91, 200} {
		d, r := heap(n)
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				e := gas.NewEnclosure(d, ring(r, 72), 3, 1, nil)
				b.ReportMetric(float64(e.Entries()), "entries")
			}
		})
	}
}

func BenchmarkMove(b *testing.B) {
	for _, n := range []int{37, 200} {
		d, r := heap(n)
		e := gas.NewEnclosure(d, ring(r, 72), 3, 1, nil)
		c := d[n-1].C
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			b.ReportAllocs()
			for k := 0; b.Loop(); k++ {
				e.Move(n-1, c+complex(0, 0.1*float64(k&1)), 1)
			}
		})
	}
}
