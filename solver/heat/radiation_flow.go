package heat

// send works out what everything in the knot sends out at unknowns z and heats q (W/m, by source), the insides of cables last.
func (k *knot) send(z, q []float64) {
	k.utter(z, q)
	k.charges.Send(k.flow)
	for i := range k.bonds {
		if b := &k.bonds[i]; b.inside != nil {
			b.inside.send(z, b.q)
		}
	}
}

// utter prepares the flow.
func (k *knot) utter(z, q []float64) {
	g := k.g
	x := k.flow.X
	copy(x, z[k.x0:])
	clear(k.heat)
	for i := range k.bonds {
		clear(k.bonds[i].q)
	}
	for i, l := range g.laws {
		if l != nil && k.bonds[i].inside == nil {
			l.lift(x[g.sys.Offset(i):][:l.n])
		}
	}
	for s, f := range q {
		src := &g.sources[s]
		k.heat[src.piece] += f
		if b := &k.bonds[src.piece]; b.inside != nil {
			b.q[src.own] = f
		} else if src.u != nil {
			axpy(x[g.sys.Offset(src.piece):], f, src.u)
		}
	}
	copy(k.charge, k.heat)
	k.shine(z)
	for i, p := range k.charge {
		k.flow.Q[i] = g.c2() * p
	}
}

// shine takes the emissions off what the pieces send out.
func (k *knot) shine(z []float64) {
	if k.rad == nil {
		return
	}
	g, c2 := k.g, k.g.c2()
	for p, u := range k.unit {
		k.emission[p] = u * z[k.e0+p]
	}
	for i := range k.bonds {
		b := &k.bonds[i]
		k.charge[i] -= k.rad.rims[i].emit(b.e, k.emission)
		scale(b.e, c2)
		x := k.flow.X[g.sys.Offset(i):g.sys.Offset(i+1)]
		for n := range min(len(b.e), len(x)) {
			if s := b.s[n/2]; s > 0 {
				x[n] -= b.e[n] / s
			}
		}
	}
	if k.rad.sides != nil {
		from := k.rad.first[len(k.bonds)]
		for p := range k.rad.sides.taken {
			k.rad.sides.taken[p] = -k.emission[from+p]
		}
		return
	}
	k.rad.wall.emit(k.absorbed, k.emission)
	scale(k.absorbed, -c2)
}

// receive works out what comes in and, where something radiates, the temperatures of the patches. level is the mean temperature of a round wall's
// inside, omega what a cable's jacket lets in; ground adds the drive of sides and ambient.
func (k *knot) receive(level float64, omega []complex128, ground bool) {
	g, f := k.g, k.flow
	k.expect(level, omega, ground)
	k.charges.Receive(f)
	switch {
	case k.rad != nil && k.rad.sides != nil:
		k.rad.sides.bring(g, k.charge, f.X, ground, f.Y, f.Mean)
	case g.border != nil:
		g.border.bring(g, k.charge, f.X, ground, f.Y, f.Mean)
	}
	k.meet()
	for i := range k.bonds {
		if b := &k.bonds[i]; b.inside != nil {
			b.inside.receive(k.within(i), b.omega, ground)
		}
	}
	if k.feel(); k.rad != nil && k.rad.sides != nil {
		k.rad.sides.means(k.t[k.rad.first[len(k.bonds)]:])
	}
}

// within is the mean temperature of the inside of the jacket of piece i.
func (k *knot) within(i int) float64 {
	return k.level + k.flow.Mean[i] + k.heat[i]*k.g.pieces[i].series
}

// expect prepares what comes from outside.
func (k *knot) expect(level float64, omega []complex128, ground bool) {
	f := k.flow
	k.level = level
	clear(f.Omega)
	copy(f.Omega, omega)
	for n := range len(k.absorbed) / 2 {
		if n < len(f.Omega) {
			a := 1 + k.reflect[n]
			f.Omega[n] += complex(a*k.absorbed[2*n], a*k.absorbed[2*n+1])
		}
	}
	k.lean(ground)
}

// meet works out what the pieces' insides feel.
func (k *knot) meet() {
	g, f := k.g, k.flow
	k.level += f.Lift
	for i := range k.bonds {
		b, o := &k.bonds[i], g.sys.Offset(i)
		for n := range b.c {
			b.c[n] = 0
			if s := b.s[n/2]; s > 0 {
				b.c[n] = f.Y[o+n] / s
			}
			if n < len(b.e) {
				b.c[n] -= b.e[n]
			}
		}
		if b.inside == nil {
			continue
		}
		for n := range b.omega {
			b.omega[n] = 0
			if n < b.first {
				b.omega[n] = complex(b.in[n]*b.c[2*n], b.in[n]*b.c[2*n+1])
			}
		}
	}
}

// feel works out the temperatures of the patches, but for those of a border.
func (k *knot) feel() {
	if k.rad == nil {
		return
	}
	g, f := k.g, k.flow
	for i := range k.bonds {
		b, o := &k.bonds[i], g.sys.Offset(i)
		tau := k.tau[:2*k.rad.rims[i].harmonics]
		for n := range tau {
			switch {
			case n >= len(b.c):
				tau[n] = -(1 + b.t[n/2]) * b.e[n]
			case n/2 < b.first:
				tau[n] = b.c[n] + b.e[n] + f.X[o+n] // what comes in and what goes out
			default:
				tau[n] = (1 + b.t[n/2]) * b.c[n]
			}
		}
		k.rad.rims[i].feel(k.t, tau, k.level+f.Mean[i])
	}
	if k.rad.sides != nil {
		return
	}
	tau := k.tau[:len(k.absorbed)]
	clear(tau)
	for n := range min(len(tau)/2, len(f.Alpha)) {
		a := complex(1+k.reflect[n], 0)*f.Alpha[n] + f.Omega[n] + f.Back[n]
		tau[2*n], tau[2*n+1] = real(a), imag(a)
	}
	k.rad.wall.feel(k.t, tau, k.level)
}

// miss sets r to how far the unknowns z are from what send and receive make of them; for patches, of the emissions that net tells.
func (k *knot) miss(r, z []float64, net func(k *knot, out []float64)) {
	g := k.g
	x, y := z[k.x0:][:g.sys.Len()], r[k.x0:][:g.sys.Len()]
	copy(y, x)
	for i := range k.bonds {
		b, o := &k.bonds[i], g.sys.Offset(i)
		for n := 2 * b.first; n < len(b.c); n++ {
			if s := b.s[n/2]; s > 0 {
				y[o+n] -= b.t[n/2] / s * b.c[n]
			}
		}
		switch l := g.laws[i]; {
		case b.inside != nil:
			b.inside.answer(b, y[o:])
			b.inside.miss(r, z, net)
		case l != nil:
			tmp := k.tau[:l.n]
			copy(tmp, b.c)
			l.drop(tmp)
			for n, v := range tmp {
				y[o+n] += l.sign[n] * v
			}
		}
	}
	if k.rad == nil || net == nil {
		return
	}
	net(k, k.rad.net)
	for p, u := range k.unit {
		r[k.e0+p] = z[k.e0+p] - k.rad.net[p]/u
	}
}

// answer takes off y what the open cable b sends out: t c + τ (A + ω).
func (k *knot) answer(b *bond, y []float64) {
	for n := range b.first {
		a := k.outward(n)
		y[2*n] -= b.t[n]*b.c[2*n] + b.tau[n]*real(a)
		y[2*n+1] -= b.t[n]*b.c[2*n+1] + b.tau[n]*imag(a)
	}
}

// outward is what a jacket answers to from inside, √n A_n with what it takes up.
func (k *knot) outward(n int) complex128 {
	var a complex128
	if n < len(k.flow.Alpha) {
		a = k.flow.Alpha[n]
	}
	if 2*n < len(k.absorbed) {
		a += complex(k.absorbed[2*n], k.absorbed[2*n+1])
	}
	return a
}

// core is the temperature of source s at heats q.
func (k *knot) core(s int, q []float64) float64 {
	g := k.g
	src := &g.sources[s]
	b := &k.bonds[src.piece]
	if b.inside != nil {
		return b.inside.core(src.own, b.q)
	}
	t := k.level + k.flow.Mean[src.piece]
	if src.own < 0 {
		return t + q[s]*g.pieces[src.piece].series
	}
	for n, u := range src.u {
		t += u * b.c[n] / g.c2()
	}
	for r, f := range q {
		if f != 0 {
			t += f * g.ownTerm(src, &g.sources[r])
		}
	}
	return t
}
