package study

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// board is a design to first order: which conductor sits where.
type board struct {
	p       *rating.Point
	ids     []string // conductors, as in the point
	seats   [][]int  // classes of conductors that may change places, as indices
	sit     []int    // conductor → place (both indices of the point; a place is where that conductor sat)
	q       []float64
	ground  []float64 // temperature at a place without the conductors' heats
	limit   []float64
	moving  []int // conductors in classes of two or more
	classOf []int
	kind    []string // conductors of one kind are as good as each other anywhere
}

// newBoard classes the conductors: equal diameters, of the top level, not pinned, of the same group.
func newBoard(p *rating.Point, d *section.Document) *board {
	n := len(p.Sources)
	b := &board{p: p, sit: make([]int, n), q: make([]float64, n), ground: make([]float64, n), limit: make([]float64, n), classOf: make([]int, n)}
	type class struct {
		group string
		mm    float64
	}
	var classes []class
	for i, c := range p.Conductors {
		b.ids = append(b.ids, c.ID)
		b.kind = append(b.kind, kindOf(d, c.ID))
		b.sit[i], b.q[i], b.classOf[i] = i, c.HeatWM, -1
		b.limit[i] = math.Inf(1)
		if c.LimitC.OK {
			b.limit[i] = c.LimitC.V
		}
		part := topPart(d, c.ID)
		mm := outsideOf(p.Shapes, c.ID)
		if part == nil || part.Pinned || !(mm > 0) {
			continue
		}
		k := slices.IndexFunc(classes, func(x class) bool { return x.group == part.Group && math.Abs(x.mm-mm) < sameMM })
		if k < 0 {
			k = len(classes)
			classes = append(classes, class{part.Group, mm})
			b.seats = append(b.seats, nil)
		}
		b.seats[k] = append(b.seats[k], i)
		b.classOf[i] = k
	}
	for k, of := range b.seats {
		if len(of) < 2 {
			for _, i := range of {
				b.classOf[i] = -1
			}
			b.seats[k] = nil
		}
	}
	for i := range n {
		if b.classOf[i] >= 0 {
			b.moving = append(b.moving, i)
		}
		b.ground[i] = p.Conductors[i].TempC
		for j := range n {
			b.ground[i] -= p.K[i][j] * b.q[j]
		}
	}
	return b
}

// topPart is a round core of the top level that is placed.
func topPart(d *section.Document, id string) *section.Part {
	for i := range d.Parts {
		p := &d.Parts[i]
		if p.ID == id && p.Kind == section.Core && p.At.OK && (p.Conductor == nil || p.Conductor.Round()) {
			return p
		}
	}
	return nil
}

func outsideOf(shapes []section.Shape, id string) float64 {
	for i := range shapes {
		if s := &shapes[i]; s.ID == id && len(s.Rings) > 0 {
			return 2 * s.Rings[len(s.Rings)-1].R1
		}
	}
	return 0
}

// temperatures of conductors with seats as in sit. Heats stay: resistances follow later, in full.
func (b *board) temperatures(t []float64) {
	for i, at := range b.sit {
		t[i] = b.ground[at]
		for j, from := range b.sit {
			t[i] += b.p.K[at][from] * b.q[j]
		}
	}
}

func (b *board) margin(t []float64) float64 {
	m := math.Inf(1)
	for i := range t {
		m = math.Min(m, b.limit[i]-t[i])
	}
	return m
}

// swap exchanges two conductors and brings t up to date.
func (b *board) swap(i, j int, t []float64) {
	pi, pj := b.sit[i], b.sit[j]
	b.sit[i], b.sit[j] = pj, pi
	for k, at := range b.sit {
		if k == i || k == j {
			continue
		}
		t[k] += (b.p.K[at][pj] - b.p.K[at][pi]) * (b.q[i] - b.q[j])
	}
	for _, k := range [2]int{i, j} {
		at := b.sit[k]
		t[k] = b.ground[at]
		for l, from := range b.sit {
			t[k] += b.p.K[at][from] * b.q[l]
		}
	}
}

// pair draws two conductors of one class.
func (b *board) pair(random *rand.Rand) (i, j int) {
	i = b.moving[random.IntN(len(b.moving))]
	of := b.seats[b.classOf[i]]
	for j = i; j == i; {
		j = of[random.IntN(len(of))]
	}
	return i, j
}

// stay lets conductors that are as good as each other keep their places where some of them sit there anyway.
func (b *board) stay(sit []int) {
	of := map[string][]int{}
	var order []string
	for _, i := range b.moving {
		key := fmt.Sprint(b.classOf[i], b.kind[i])
		if of[key] == nil {
			order = append(order, key)
		}
		of[key] = append(of[key], i)
	}
	for _, key := range order {
		var free, left []int
		for _, i := range of[key] {
			free = append(free, sit[i])
		}
		for _, i := range of[key] {
			if k := slices.Index(free, i); k >= 0 {
				sit[i] = i
				free = slices.Delete(free, k, k+1)
			} else {
				left = append(left, i)
			}
		}
		slices.Sort(free)
		for k, i := range left {
			sit[i] = free[k]
		}
	}
}

// kindOf tells what a conductor is and carries, but for its name and place.
func kindOf(d *section.Document, id string) string {
	p := topPart(d, id)
	if p == nil {
		return id
	}
	q := *p
	q.ID, q.At, q.Conductor = "", section.Opt[section.Point]{}, nil
	wire, load := section.Conductor{}, section.Load{}
	if p.Conductor != nil {
		wire = *p.Conductor
	}
	if l := section.LoadOf(d, id); l != nil {
		load = section.Load{CurrentA: l.CurrentA, Unknown: l.Unknown, HeatWM: l.HeatWM, FrequencyHz: l.FrequencyHz}
	}
	return fmt.Sprintf("%v %v %v", q, wire, load)
}

// seated is the design with conductors in other places.
func (b *board) seated(d *section.Document, sit []int) *section.Document {
	places := map[string]section.Point{}
	for i, at := range sit {
		if i != at {
			places[b.ids[i]] = topPart(d, b.ids[at]).At.V
		}
	}
	return moved(d, places)
}
