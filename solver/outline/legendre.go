package outline

import "math"

// maxModes is the largest number of Legendre modes that a panel can have.
const maxModes = 8

// legendre returns P_n and P_{n−1} at x.
func legendre(n int, x float64) (p, prev float64) {
	if n == 0 {
		return 1, 0
	}
	prev, p = 1, x
	for k := 1; k < n; k++ {
		prev, p = p, (float64(2*k+1)*x*p-float64(k)*prev)/float64(k+1)
	}
	return p, prev
}

// gauss returns the nodes and weights of the Gauss–Legendre rule of n points on [−1, 1].
func gauss(n int) (x, w []float64) {
	x, w = make([]float64, n), make([]float64, n)
	for i := range x {
		z := -math.Cos(math.Pi * (float64(i) + 0.75) / (float64(n) + 0.5))
		var slope float64
		for range 8 {
			p, prev := legendre(n, z)
			slope = float64(n) * (z*p - prev) / (z*z - 1)
			z -= p / slope
		}
		x[i], w[i] = z, 2/((1-z*z)*slope*slope)
	}
	return x, w
}

// lobatto returns the n+1 Gauss–Lobatto points of [−1, 1], both ends included.
func lobatto(n int) []float64 {
	x := make([]float64, n+1)
	for i := range x {
		z := -math.Cos(math.Pi * float64(i) / float64(n))
		for range 16 {
			p, prev := legendre(n, z)
			z -= (z*p - prev) / (float64(n+1) * p)
		}
		x[i] = z
	}
	x[0], x[n] = -1, 1
	return x
}

// cells divides a panel of p modes into as many cells, between Lobatto points: polynomials are well determined by their means there.
type cells struct {
	at   []float64   // p+1 ends of cells on [−1, 1]
	mean [][]float64 // mean[l][k] of P_k over cell l
}

func newCells(p int) cells {
	c := cells{at: lobatto(p), mean: make([][]float64, p)}
	for l := range c.mean {
		c.mean[l] = make([]float64, p)
		a, b := c.at[l], c.at[l+1]
		for k := range c.mean[l] {
			c.mean[l][k] = (legendreIntegral(k, b) - legendreIntegral(k, a)) / (b - a)
		}
	}
	return c
}

// legendreIntegral is an antiderivative of P_k.
func legendreIntegral(k int, x float64) float64 {
	if k == 0 {
		return x
	}
	up, _ := legendre(k+1, x)
	_, down := legendre(k, x)
	return (up - down) / float64(2*k+1)
}

var (
	cellsOf [maxModes + 1]cells
	// Gauss rules with the Legendre polynomials at their nodes, by number of points.
	rules [maxRule + 1]rule
)

const maxRule = 24

type rule struct {
	x, w []float64
	p    [][maxModes]float64 // p[i][k] = w_i P_k(x_i)
}

func init() {
	for p := 1; p <= maxModes; p++ {
		cellsOf[p] = newCells(p)
	}
	for n := 1; n <= maxRule; n++ {
		r := &rules[n]
		r.x, r.w = gauss(n)
		r.p = make([][maxModes]float64, n)
		for i, x := range r.x {
			for k := range maxModes {
				v, _ := legendre(k, x)
				r.p[i][k] = r.w[i] * v
			}
		}
	}
}
