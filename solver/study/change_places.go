package study

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// movable is a part that may change places: a core, or a cable of the top level.
type movable struct {
	js        []int // its conductors
	id        string
	prefix    string // of the cable that it lies in, "" at the top level
	build     string // of a cable
	outsideMM float64
	group     string
	at        section.Point
}

func (a *adviser) movables() (out []movable) {
	inv, _ := rating.Take(a.w, a.s.cat)
	for j, c := range a.p.Conductors {
		p := section.Find(a.w, c.ID)
		if p == nil || p.Pinned || !p.At.OK || j >= len(inv.Wires) || inv.Wires[j].ID != c.ID || p.Conductor != nil && !p.Conductor.Round() {
			continue
		}
		prefix := c.ID[:strings.LastIndex(c.ID, "/")+1]
		out = append(out, movable{[]int{j}, c.ID, prefix, "", inv.Wires[j].OutsideMM, p.Group, p.At.V})
	}
	for i := range a.w.Parts {
		p := &a.w.Parts[i]
		if p.Kind != section.Cable || p.Pinned || !p.At.OK {
			continue
		}
		m := movable{id: p.ID, build: p.Build, group: p.Group, at: p.At.V}
		for j, c := range a.p.Conductors {
			if strings.HasPrefix(c.ID, p.ID+"/") {
				m.js = append(m.js, j)
			}
		}
		out = append(out, m)
	}
	return out
}

// swaps: two conductors of one place exchange theirs, or two cables of one construction. The matrix belongs to the places, the heats and limits go
// along.
func (a *adviser) swaps() {
	list := a.movables()
	for x := range list {
		if a.ctx.Err() != nil {
			return
		}
		for _, n := range list[x+1:] {
			m := list[x]
			if m.prefix != n.prefix || m.group != n.group || m.build != n.build || len(m.js) != len(n.js) || a.alike(m, n) {
				continue
			}
			room := a.swapped(m.js, n.js)
			if room < a.room+leastGainK {
				continue
			}
			a.add(candidate{
				kind: ChangeSwap, ids: []string{m.id, n.id}, text: fmt.Sprintf("Swap %s and %s", m.id, n.id), room: room,
				make: func(d *section.Document) (*section.Document, bool) {
					d = section.Swap(section.OwnBuild(d, m.id), m.id, n.id)
					if m.outsideMM == n.outsideMM || m.prefix != "" {
						return d, true
					}
					at, ok := rating.MakeRoom(d, a.s.cat, "")
					return section.PlaceAll(d, at), ok
				},
			})
		}
	}
}

// alike tells whether it makes no difference which of two parts lies where.
func (a *adviser) alike(m, n movable) bool {
	for k, i := range m.js {
		j := n.js[k]
		if math.Abs(a.p.Conductors[i].HeatWM-a.p.Conductors[j].HeatWM) > 1e-9 || a.list[i].limit != a.list[j].limit {
			return false
		}
	}
	return true
}

// swapped is the least room when the conductors at two sets of places are exchanged, one by one.
func (a *adviser) swapped(from, to []int) float64 {
	least := math.Inf(1)
	limit := map[int]section.Opt[float64]{}
	for n, i := range from {
		limit[i], limit[to[n]] = a.list[to[n]].limit, a.list[i].limit
	}
	for k, t := range a.list {
		lim := t.limit
		if other, ok := limit[k]; ok {
			lim = other
		}
		if !lim.OK || math.IsNaN(t.tempC) {
			continue
		}
		c := t.tempC
		if k < len(a.p.Conductors) {
			for n, i := range from {
				j := to[n]
				c += (a.p.Conductors[j].HeatWM - a.p.Conductors[i].HeatWM) * (a.e[k][i] - a.e[k][j])
			}
		}
		least = math.Min(least, lim.V-c)
	}
	return least
}

const (
	movers  = 5    // parts that are tried elsewhere: what governs and what heats it most
	gapMM   = 0.01 // left between touching parts
	looksAt = 3    // neighbours that a place is judged by
)

// spaced: bodies apart twice as far from each other.
func (a *adviser) spaced() {
	ids := []string{}
	at := map[string]section.Point{}
	mid := section.Point{}
	for i := range a.w.Parts {
		p := &a.w.Parts[i]
		if !p.At.OK || p.Pinned {
			return
		}
		ids = append(ids, p.ID)
		mid.X += p.At.V.X / float64(len(a.w.Parts))
		mid.Y += p.At.V.Y / float64(len(a.w.Parts))
	}
	if len(ids) < 2 {
		return
	}
	for i := range a.w.Parts {
		p := &a.w.Parts[i]
		at[p.ID] = section.Point{X: round3(2*p.At.V.X - mid.X), Y: round3(2*p.At.V.Y - mid.Y)}
	}
	a.add(candidate{
		kind: ChangeMove, ids: ids, text: "Space them twice as far apart", always: true,
		make: func(d *section.Document) (*section.Document, bool) { return section.PlaceAll(d, at), true },
	})
}

// moves: what governs, and what heats it most, to a free place.
func (a *adviser) moves() {
	if a.w.Holder.Kind == section.Apart {
		a.spaced()
	}
	if a.w.Holder.Kind == section.Apart || a.w.Holder.Kind == section.NoHolder || a.w.Holder.Flat() {
		return
	}
	list := slices.DeleteFunc(a.movables(), func(m movable) bool { return len(m.js) != 1 || m.build != "" })
	discs, ok := a.discs()
	if !ok {
		return
	}
	slices.SortStableFunc(list, func(x, y movable) int {
		return cmp.Compare(a.share(y.js[0]), a.share(x.js[0]))
	})
	tried := 0
	for _, m := range list {
		if m.prefix != "" || m.group != "" || a.ctx.Err() != nil {
			continue
		}
		if tried++; tried > movers {
			return
		}
		for _, to := range free(discs, m, a.inside()) {
			room := a.moved(list, m, to)
			if room < a.room+leastGainK {
				continue
			}
			a.add(candidate{
				kind: ChangeMove, ids: []string{m.id}, text: fmt.Sprintf("Move %s to (%s, %s) mm", m.id, trimmed(round3(to.X)), trimmed(round3(to.Y))), room: room,
				make: func(d *section.Document) (*section.Document, bool) {
					return section.Move(d, m.id, section.Point{X: round3(to.X), Y: round3(to.Y)}), true
				},
			})
		}
	}
}

func round3(v float64) float64 { return math.Round(v*1e3) / 1e3 }

// share is what a conductor does to what governs, with what governs itself first.
func (a *adviser) share(j int) float64 {
	if j == a.at {
		return math.Inf(1)
	}
	return answer(a.p, a.e, a.at, j) * a.p.Conductors[j].HeatWM
}

// moved guesses the least room with a part at another place, whose row of the matrix is taken from the conductors about it.
func (a *adviser) moved(list []movable, m movable, to section.Point) float64 {
	type near struct {
		j int
		w float64
	}
	var about []near
	for _, n := range list {
		if n.id != m.id && n.prefix == "" {
			d := math.Hypot(n.at.X-to.X, n.at.Y-to.Y)
			about = append(about, near{n.js[0], 1 / (d*d + 1e-3)})
		}
	}
	if len(about) == 0 {
		return math.Inf(-1)
	}
	slices.SortStableFunc(about, func(x, y near) int {
		return cmp.Compare(y.w, x.w)
	})
	about = about[:min(len(about), looksAt)]
	sum := 0.0
	for _, n := range about {
		sum += n.w
	}
	there := func(i int) (k float64) { // how place `to` and conductor i follow each other
		for _, n := range about {
			k += n.w / sum * a.e[i][n.j]
		}
		return k
	}
	self := m.js[0]
	q := a.p.Conductors[self].HeatWM
	least := math.Inf(1)
	for i, t := range a.list {
		if !t.limit.OK || math.IsNaN(t.tempC) {
			continue
		}
		c := t.tempC
		switch {
		case i == self:
			for k := range a.p.Conductors {
				if k != self {
					c += (there(k) - a.e[self][k]) * a.p.Conductors[k].HeatWM
				}
			}
		case i < len(a.p.Conductors):
			c += (there(i) - a.e[i][self]) * q
		}
		least = math.Min(least, t.limit.V-c)
	}
	return least
}
