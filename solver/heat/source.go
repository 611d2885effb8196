package heat

// sourceParts returns, for unit heat in source s, the monopoles in units of 1/(2πk) and the amplitudes that its cable sends out by itself.
func (g *region) sourceParts(s int) (q, u []float64) {
	q = make([]float64, len(g.pieces))
	q[g.sources[s].piece] = g.c2()
	return q, g.sources[s].u
}

// sourceColumn is the right-hand side −Lᵀ(φ + 𝒢 u) for 1 W/m in source s.
func (g *region) sourceColumn(s int) []float64 {
	q := make([]float64, len(g.sources))
	q[s] = 1
	return g.loadColumn(q, false)
}

// loadColumn is the right-hand side for heats q by source; ground adds the drive of a rectangle's sides and ambient.
func (g *region) loadColumn(q []float64, ground bool) []float64 {
	y, none := make([]float64, g.sys.Len()), make([]float64, g.sys.Len())
	charge, v := g.outgoing(q, none)
	for k := range q {
		if g.sources[k].u != nil {
			g.sys.Apply(y, v)
			break
		}
	}
	if g.border != nil {
		g.border.bring(g, charge, v, ground, y, nil)
	}
	if g.rest != nil && ground {
		g.sys.Drive(y, g.rest.ground)
	}
	for i := range charge {
		charge[i] *= g.c2()
	}
	g.sys.Mono(y, charge)
	g.drop(y)
	for i := range y {
		y[i] = -y[i]
	}
	return y
}

// temperatures returns those of all sources for heats q and unknowns x, relative to the round wall's mean; of a rectangle, absolute if
// ground is set.
func (g *region) temperatures(q, x []float64, ground bool) []float64 {
	charge, v := g.outgoing(q, x)
	mean := g.means(charge, v, nil)
	if g.rest != nil && ground {
		g.sys.Rise(mean, g.rest.ground)
	}
	y := make([]float64, len(x))
	if g.border != nil {
		g.border.bring(g, charge, v, ground, y, mean)
	}
	nested := false
	for k := range q {
		nested = nested || g.sources[k].u != nil
	}
	if nested {
		w := make([]float64, len(x))
		g.sys.Apply(w, v)
		axpy(y, 1, w)
		for i := range charge {
			charge[i] *= g.c2()
		}
		g.sys.Mono(y, charge)
	}
	t := make([]float64, len(q))
	for k := range q {
		src := &g.sources[k]
		t[k] = mean[src.piece] + dot(src.u, y[g.sys.Offset(src.piece):])/g.c2()
		for r, f := range q {
			if f != 0 {
				t[k] += f * g.ownTerm(src, &g.sources[r])
			}
		}
	}
	return t
}

// sourceOut is what a unit source sends to the wall by itself, √n A_n.
func (g *region) sourceOut(s int) []complex128 {
	alpha := make([]complex128, g.sys.Top())
	q, u := g.sourceParts(s)
	if u != nil {
		x := make([]float64, g.sys.Len())
		copy(x[g.sys.Offset(g.sources[s].piece):], u)
		g.sys.Gather(alpha, x)
	}
	mono := make([]complex128, len(alpha))
	g.sys.ChargeOut(mono, q)
	for n := range alpha {
		alpha[n] += mono[n]
	}
	return alpha
}

// ownMatrix returns the rises of the sources over the wall's mean inside temperature, K per W/m, of z = Fᵀ A⁻¹ F.
func (g *region) ownMatrix(z [][]float64) [][]float64 {
	n := len(g.sources)
	r := make([][]float64, n)
	for s := range r {
		r[s] = make([]float64, n)
	}
	c2 := g.c2()
	cross := g.crossTerms()
	for s := range n {
		for t := s; t < n; t++ {
			a, b := &g.sources[s], &g.sources[t]
			v := c2*g.sys.Log(a.piece, b.piece) + g.ownTerm(a, b) + cross[s][t] - z[s][t]/c2
			r[s][t], r[t][s] = v, v
		}
	}
	return r
}

// ownTerm is the resistance between two sources that lies inside their common piece.
func (g *region) ownTerm(a, b *source) float64 {
	switch {
	case a.piece != b.piece:
		return 0
	case a.own < 0:
		return g.pieces[a.piece].series
	}
	return g.laws[a.piece].own[a.own][b.own]
}

// crossTerms are ⟨φ̂_s, u_t⟩ + ⟨u_s, φ̂_t⟩ + ⟨u_s, 𝒢 u_t⟩/c2: what cables' own amplitudes add before anything reflects.
func (g *region) crossTerms() [][]float64 {
	n := len(g.sources)
	x := make([][]float64, n)
	all := make([]float64, n*n)
	for s := range x {
		x[s] = all[s*n : (s+1)*n]
	}
	for t := range n {
		if g.sources[t].u == nil {
			continue
		}
		g.addCross(x, t)
	}
	for s := range n {
		for t := s + 1; t < n; t++ {
			v := x[s][t] + x[t][s]
			x[s][t], x[t][s] = v, v
		}
		x[s][s] *= 2
	}
	return x
}

// addCross adds, for every s, ⟨φ̂_s, u_t⟩ + ½⟨u_s, 𝒢 u_t⟩/c2.
func (g *region) addCross(x [][]float64, t int) {
	v, w := make([]float64, g.sys.Len()), make([]float64, g.sys.Len())
	o := g.sys.Offset(g.sources[t].piece)
	copy(v[o:], g.sources[t].u)
	mean := make([]float64, len(g.pieces))
	g.sys.MonoDot(mean, v)
	g.sys.Apply(w, v)
	for s := range g.sources {
		b := &g.sources[s]
		x[s][t] += mean[b.piece]
		for k, e := range b.u {
			x[s][t] += e * w[g.sys.Offset(b.piece)+k] / (2 * g.c2())
		}
	}
}
