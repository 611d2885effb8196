package pack

import "slices"

// bears reports whether a contact carries force at the end of press, as opposed to a gap that is merely small.
func (c *crowd) bears(t contact) bool { return t.f*c.near > t.s }

// close shuts the bearing contacts' last gaps by Newton steps of least length. It gives back the old places when that makes an overlap.
func (c *crowd) close() {
	before := slices.Clone(c.discs)
	all := c.contacts
	c.contacts = slices.DeleteFunc(slices.Clone(all), func(t contact) bool { return !c.bears(t) })
	p := presser{crowd: c}
	p.layout()
	for range 4 {
		p.m.clear()
		clear(p.b)
		for k := range p.order {
			p.m.add(2*k, 2*k, 1e-9)
			p.m.add(2*k+1, 2*k+1, 1e-9)
		}
		for k := range p.contacts {
			t := &p.contacts[k]
			p.look(t)
			t.f = 0
			p.couple(t, 1, -t.g)
		}
		p.m.factor(1e-14)
		p.m.solve(p.b)
		for k, i := range p.order {
			p.discs[i].X += p.b[2*k]
			p.discs[i].Y += p.b[2*k+1]
		}
	}
	c.contacts = all
	for k := range all {
		c.look(&all[k])
		if all[k].g < -slack*reach(c.discs, c.in) {
			copy(c.discs, before)
			break
		}
	}
}
