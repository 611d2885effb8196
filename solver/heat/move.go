package heat

import "slices"

// Move puts a part of the top level elsewhere and rewrites only its blocks: for dragging. Orders are fixed at the larger of old and new.
func (m *Model) Move(part int, x, y float64) {
	if part < 0 || part >= len(m.p.Parts) || m.p.Parts[part].In != -1 {
		panic(badMove)
	}
	if !good(x, y) {
		panic(badNumber)
	}
	m.p.Parts[part].X, m.p.Parts[part].Y = x, y
	if m.form != nil {
		m.form.move()
		return
	}
	if m.contours != nil && m.contours.holds(part) {
		m.reshape()
		return
	}
	if m.p.Wall.Shape == BarePart {
		m.moveBare()
		return
	}
	g := m.top
	i := 0
	for g.pieces[i].part != part {
		i++
	}
	g.pieces[i].at = complex(x, y) + m.shift()
	g.settle(i)
	factor, _, _ := m.set.Accuracy.settings()
	m.forget()
	if !m.ready {
		g.order(factor)
		return
	}
	old := g.offsets()
	if !g.relocate(i, factor) {
		m.ready = false // a cable needs more harmonics: its inside is solved anew
	}
	m.carry(old)
	m.glowOn(i, old)
}

// carry takes what is known over to new offsets, for a warm start.
func (m *Model) carry(old []int) {
	fresh := m.top.offsets()
	if fresh[len(fresh)-1] == old[len(old)-1] {
		return
	}
	if m.x != nil {
		m.x = stretch(m.x, old, fresh)
	}
	if m.floorX != nil {
		m.floorX = stretch(m.floorX, old, fresh)
	}
	if m.ground != nil {
		m.ground = stretch(m.ground, old, fresh)
	}
	for i, c := range m.columns {
		if c != nil {
			m.columns[i] = stretch(c, old, fresh)
		}
	}
}

// shift leads from the holder's coordinates to the region's: a rectangle's clearance widens it to the left and downwards too, a bare
// cable's inside has its own centre.
func (m *Model) shift() complex128 {
	if i := m.bareCable(); i >= 0 {
		return -complex(m.p.Parts[i].X, m.p.Parts[i].Y)
	}
	if m.p.Wall.Shape != Rect || m.contours != nil {
		return 0
	}
	return complex(m.p.Clearance/2, m.p.Clearance/2)
}

func (m *Model) moveBare() {
	if m.bare != nil {
		m.bare.piece.at = complex(m.p.Parts[m.bare.piece.part].X, m.p.Parts[m.bare.piece.part].Y)
	}
}

// relocate rewrites what depends on the place of piece i; false if the whole region has to be written again.
func (g *region) relocate(i int, factor float64) bool {
	changed := []int{i}
	for _, j := range g.clear() {
		if j != i {
			changed = append(changed, j)
		}
	}
	changed, ok := g.reorder(i, factor, changed)
	if !ok {
		return false
	}
	grown := false
	for _, j := range changed {
		grown = grown || g.orders[j] != len(g.sys.Disc(j).S)
		g.sys.Put(j, g.disc(j))
	}
	if grown {
		g.setSigns()
	}
	if g.border != nil && (len(changed) > 1 || grown || !g.border.move(g, i)) {
		g.border.write(g, nil)
	}
	return true
}

// reorder raises orders for the new place of piece i and appends the pieces that need more; false if one of them is a cable.
func (g *region) reorder(i int, factor float64, changed []int) ([]int, bool) {
	ok := true
	for j := range g.pieces {
		n := g.orders[j]
		if j == i {
			n = max(n, g.orderOf(i, factor))
		} else {
			n = max(n, g.orderBeside(&g.pieces[j], &g.pieces[i], factor, n))
		}
		if g.border != nil {
			n = min(n, maxOrderBorder)
		}
		if n == g.orders[j] {
			continue
		}
		g.orders[j] = n
		if in := g.pieces[j].inside; in != nil {
			in.port, ok = n, false
		}
		if !slices.Contains(changed, j) {
			changed = append(changed, j)
		}
	}
	return changed, ok
}

// stretch carries a vector over from old offsets to fresh ones: harmonics that are new start at nought.
func stretch(x []float64, old, fresh []int) []float64 {
	y := make([]float64, fresh[len(fresh)-1])
	for i := range len(old) - 1 {
		copy(y[fresh[i]:fresh[i+1]], x[old[i]:old[i+1]])
	}
	return y
}

// offsets are where the pieces' unknowns begin, and where the last end.
func (g *region) offsets() []int {
	o := make([]int, len(g.pieces)+1)
	for i, n := range g.orders {
		o[i+1] = o[i] + 2*n
	}
	return o
}
