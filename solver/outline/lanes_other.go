//go:build !amd64

package outline

func in2(r0, r1, x, a []float64) { in2Plain(r0, r1, x, a) }

func out2(r0, r1, u, y []float64) { out2Plain(r0, r1, u, y) }
