//go:build !amd64

package harmonic

func (b *block) apply(xi, xj, yi, yj []float64) { b.applyPlain(xi, xj, yi, yj) }

func (b *block) apply8(xi, xj, yi, yj []float64) { b.apply8Plain(xi, xj, yi, yj) }

// Dot returns Σ a[i] b[i] over a; b is at least as long.
func Dot(a, b []float64) float64 { return dotPlain(a, b) }

// Axpy adds f x to y over the length of x; y is at least as long.
func Axpy(y []float64, f float64, x []float64) { axpyPlain(y, f, x) }
