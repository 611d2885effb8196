package heat

const badOutside = "heat: only film, ambient and sides can change outside"

// Outside gives the wall other films and outside temperatures: Film, Ambient, Sides and Against.Temp of w; the rest of w must be as in the Problem. What does
// not depend on them is kept, so that a fixed point over a film costs little: a round wall's matrix stays, a rectangle's wall is written again.
func (m *Model) Outside(w Wall) {
	old := m.p.Wall
	if a, b := w.Against, old.Against; a.Share != b.Share || a.At != b.At || a.Held != b.Held {
		panic(badOutside)
	}
	if w.Shape != old.Shape || w.R != old.R || w.W != old.W || w.H != old.H || len(w.Rings) != len(old.Rings) {
		panic(badOutside)
	}
	w.Rings, w.Taut = old.Rings, old.Taut
	w.check()
	m.p.Wall = w
	m.forget()
	if m.glow != nil {
		m.glow.cores = nil
	}
	switch {
	case m.form != nil:
		m.form.outside()
	case m.top == nil: // a bare part reads the wall each time
	case m.contours != nil:
		m.contours.outside()
		if c := m.glow; c != nil && c.top.rad != nil && !c.top.rad.sides.wall.follow(c.top.rad.sides, -1) {
			m.dim()
		}
	case w.Shape == Hull:
		m.top.border.(*hullWall).outside(&m.p.Wall)
		if c := m.glow; c != nil && c.top.rad != nil && !c.top.rad.sides.wall.follow(c.top.rad.sides, -1) {
			m.dim()
		}
	case m.top.border != nil:
		factor, _, _ := m.set.Accuracy.settings()
		m.top.border = newRectWall(&m.p, factor)
		if m.ready {
			m.top.border.write(m.top, nil)
		}
		m.dim()
	default:
		m.top.wall.Outer = outerWall(m.top.k, m.top.wall.R, nil, w.Film).Outer
		m.top.lean(&w)
		if m.ready = m.ready && m.top.reflectAnew(); m.ready && m.glow != nil {
			m.glow.top.fit()
		}
	}
}

// reflectAnew takes over what the round wall now reflects besides the images; false if the images change as well or many more harmonics come
// in than the parts are mapped to. Results that are out keep the old circle.
func (g *region) reflectAnew() bool {
	c := g.newCircle()
	if c.RhoInf != g.circle.RhoInf || len(c.Sigma) > g.sys.Top()+2 || (c.Mix == nil) != (g.circle.Mix == nil) {
		return false
	}
	c.Sigma = c.Sigma[:min(len(c.Sigma), g.sys.Top())] // what is cut is as small as what newCircle leaves out
	c.Mix = c.Mix.Cut(g.sys.Top())
	g.circle = c
	g.sys.Reflect(c)
	return true
}
