package heat

import (
	"math"

	"gonum.org/v1/gonum/mat"

	"packrise/solver/harmonic"
)

// deafTau is the transmission below which a jacket's harmonics do not reach the inside: those are like any part's.
const deafTau = 1e-5

// law is what a cable, its inside eliminated, does to the region that it lies in: outgoing scaled amplitudes δ = T β + Σ q_s u_s for what
// comes in, β, and the heats q_s (W/m) of the sources in it, for the harmonics that the jacket lets through. T is symmetric and kept as
// −L diag(sign) Lᵀ.
type law struct {
	n        int // reals: twice the harmonics
	t        *mat.SymDense
	l        *mat.Dense
	sign     []float64 // +1 where T is negative: the cable conducts better than the medium
	definite bool
	open     bool // not eliminated
	u        [][]float64
	own      [][]float64 // rise of source s over the cable's mean rim for 1 W/m in source r, at β = 0
	buf      []float64

	drive    [][]float64 // inside unknowns for each unit of β
	response [][]float64 // inside unknowns for 1 W/m in each source
	tau, in  []float64   // of the jacket, by harmonic
}

// eliminate solves the inside of cable c for every source and for every harmonic that the jacket lets in.
func (g *region) eliminate(c *piece, threads int, stop func() bool) (*law, bool) {
	m := g.heard()
	l := &law{n: 2 * m, tau: make([]float64, m), in: make([]float64, m), buf: make([]float64, 2*m)}
	ports := make([]harmonic.Port, m)
	for n := range m {
		ports[n] = c.stack.Port(n + 1)
		l.tau[n], l.in[n] = ports[n].Tau, ports[n].TauIn
	}
	ns := len(g.sources)
	f := make([][]float64, 0, ns+2*m)
	for s := range g.sources {
		f = append(f, g.sourceColumn(s))
	}
	omega := make([]complex128, g.sys.Top())
	for k := range 2 * m {
		omega[k/2] = complex(l.in[k/2], 0)
		if k%2 == 1 {
			omega[k/2] = complex(0, l.in[k/2])
		}
		f = append(f, g.driveColumn(omega))
		omega[k/2] = 0
	}
	x, z, ok := g.columns(f, 1e-6, threads, stop)
	if !ok {
		return nil, false
	}
	l.response, l.drive = x[:ns], x[ns:]
	l.build(g, c, ports, z)
	return l, true
}

// heard is how many harmonics of what comes to a cable from outside reach its inside.
func (g *region) heard() int {
	for m := g.port; m > 0; m-- {
		if p := g.wall.Port(m); math.Max(math.Abs(p.Tau), math.Abs(p.TauIn)) > deafTau {
			return m
		}
	}
	return 0
}

// driveColumn is the right-hand side that the wall's regular field omega makes.
func (g *region) driveColumn(omega []complex128) []float64 {
	y := make([]float64, g.sys.Len())
	g.sys.Spread(y, omega)
	g.drop(y)
	for i := range y {
		y[i] = -y[i]
	}
	return y
}

// build makes T, u and own of the inner products z = Fᵀ A⁻¹ F.
func (l *law) build(g *region, c *piece, ports []harmonic.Port, z [][]float64) {
	ns := len(g.sources)
	ratio := g.k / c.stack.Outer.V // Tau/TauIn
	t := mat.NewSymDense(l.n, nil)
	for i := range l.n {
		for j := i; j < l.n; j++ {
			v := -ratio * z[ns+i][ns+j]
			if i == j {
				v += ports[i/2].T
			}
			t.SetSym(i, j, v)
		}
	}
	l.t = t
	l.factor()
	own := g.ownMatrix(z)
	l.own = own
	l.u = make([][]float64, ns)
	for s := range ns {
		u := make([]float64, l.n)
		a := g.sourceOut(s)
		for i := range u {
			v := real(a[i/2])
			if i%2 == 1 {
				v = imag(a[i/2])
			}
			u[i] = l.tau[i/2]*v - ratio*z[ns+i][s]
		}
		l.u[s] = u
		for r := range own[s] {
			own[s][r] += c.series
		}
	}
}

// factor splits T: by Cholesky where −T is positive, which is quick, else by its eigenvalues.
func (l *law) factor() {
	l.sign = make([]float64, l.n)
	l.definite = true
	if l.n == 0 {
		return
	}
	var minus mat.SymDense
	minus.ScaleSym(-1, l.t)
	var chol mat.Cholesky
	if chol.Factorize(&minus) {
		var lower mat.TriDense
		chol.LTo(&lower)
		l.l = mat.DenseCopyOf(&lower)
		for i := range l.sign {
			l.sign[i] = 1
		}
		return
	}
	var eig mat.EigenSym
	if !eig.Factorize(l.t, true) {
		panic("heat: eigenvalues of a cable's law not found")
	}
	var v mat.Dense
	eig.VectorsTo(&v)
	for j, e := range eig.Values(nil) {
		l.sign[j] = 1
		if e > 0 {
			l.sign[j] = -1
			l.definite = l.definite && e < 1e-6
		}
		f := math.Sqrt(math.Abs(e))
		if math.Abs(e) < deafT {
			f = 0
		}
		for i := range l.n {
			v.Set(i, j, f*v.At(i, j))
		}
	}
	l.l = &v
}

// lift sets x ← L x, drop x ← Lᵀ x.
func (l *law) lift(x []float64) {
	for i := range l.buf {
		s := 0.0
		for j, e := range l.l.RawRowView(i) {
			s += e * x[j]
		}
		l.buf[i] = s
	}
	copy(x, l.buf)
}

func (l *law) drop(x []float64) {
	for j := range l.buf {
		l.buf[j] = 0
	}
	for i, v := range x {
		for j, e := range l.l.RawRowView(i) {
			l.buf[j] += e * v
		}
	}
	copy(x, l.buf)
}
