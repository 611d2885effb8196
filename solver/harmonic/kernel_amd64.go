package harmonic

//go:noescape
func applyAVX(cols *uint16, n int, data, xi, xj, yi, yj *float64)

//go:noescape
func apply8AVX(cols *uint16, n int, data, xi, xj, yi, yj *float64)

//go:noescape
func apply8AVX512(cols *uint16, n int, data, xi, xj, yi, yj *float64)

//go:noescape
func axpyAVX(y *float64, f float64, x *float64, n int)

//go:noescape
func dotAVX(a, b *float64, n int) float64

func cpuid(leaf, sub uint32) (a, b, c, d uint32)

func xgetbv() (a uint32)

// wide tells whether the processor and the system have AVX2 and fused multiply-add (Intel 64 and IA-32 Architectures Software Developer's Manual,
// volume 1, chapter 14, on detection).
var wide = func() bool {
	const fma, osxsave, avx, avx2, ymm = 1 << 12, 1 << 27, 1 << 28, 1 << 5, 6
	if top, _, _, _ := cpuid(0, 0); top < 7 {
		return false
	}
	_, _, c, _ := cpuid(1, 0)
	if c&(fma|osxsave|avx) != fma|osxsave|avx || xgetbv()&ymm != ymm {
		return false
	}
	_, b, _, _ := cpuid(7, 0)
	return b&avx2 != 0
}()

// wider tells whether there is AVX-512 besides (the same, volume 1, chapter 15).
var wider = func() bool {
	const avx512f, zmm = 1 << 16, 0xe6
	if !wide || xgetbv()&zmm != zmm {
		return false
	}
	_, b, _, _ := cpuid(7, 0)
	return b&avx512f != 0
}()

func (b *block) apply(xi, xj, yi, yj []float64) {
	if wide {
		applyAVX(&b.cols[0], len(b.cols), &b.data[0], &xi[0], &xj[0], &yi[0], &yj[0])
		return
	}
	b.applyPlain(xi, xj, yi, yj)
}

func (b *block) apply8(xi, xj, yi, yj []float64) {
	switch {
	case wider:
		apply8AVX512(&b.cols[0], len(b.cols), &b.data[0], &xi[0], &xj[0], &yi[0], &yj[0])
		return
	case wide:
		apply8AVX(&b.cols[0], len(b.cols), &b.data[0], &xi[0], &xj[0], &yi[0], &yj[0])
		return
	}
	b.apply8Plain(xi, xj, yi, yj)
}

// Dot returns Σ a[i] b[i] over a; b is at least as long.
func Dot(a, b []float64) float64 {
	if wide && len(a) >= 8 {
		b = b[:len(a)]
		return dotAVX(&a[0], &b[0], len(a))
	}
	return dotPlain(a, b)
}

// Axpy adds f x to y over the length of x; y is at least as long.
func Axpy(y []float64, f float64, x []float64) {
	if wide && len(x) >= 8 {
		y = y[:len(x)]
		axpyAVX(&y[0], f, &x[0], len(x))
		return
	}
	axpyPlain(y, f, x)
}
