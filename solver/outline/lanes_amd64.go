package outline

//go:noescape
func in2AVX(r0, r1 *float64, n int, x, a *float64)

//go:noescape
func out2AVX(r0, r1 *float64, n int, u, y *float64)

//go:noescape
func in2AVX512(r0, r1 *float64, n int, x, a *float64)

//go:noescape
func out2AVX512(r0, r1 *float64, n int, u, y *float64)

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

func in2(r0, r1, x, a []float64) {
	if n := len(r0); wide && n > 0 {
		_, _, _ = r1[n-1], x[Lanes*n-1], a[2*Lanes-1]
		if wider {
			in2AVX512(&r0[0], &r1[0], n, &x[0], &a[0])
		} else {
			in2AVX(&r0[0], &r1[0], n, &x[0], &a[0])
		}
		return
	}
	in2Plain(r0, r1, x, a)
}

func out2(r0, r1, u, y []float64) {
	if n := len(r0); wide && n > 0 {
		_, _, _ = r1[n-1], u[2*Lanes-1], y[Lanes*n-1]
		if wider {
			out2AVX512(&r0[0], &r1[0], n, &u[0], &y[0])
		} else {
			out2AVX(&r0[0], &r1[0], n, &u[0], &y[0])
		}
		return
	}
	out2Plain(r0, r1, u, y)
}
