package pack

import "math"

// spot is a place for a disc's centre and what it costs to lie there; tie decides between equals.
type spot struct{ cost, tie, x, y float64 }

// queue is a heap of the places for discs of one radius, the cheapest on top.
type queue struct {
	spots []spot
	eps   float64 // costs closer than this are equal
	done  int     // discs of the bed that have been gone through
}

func (q *queue) before(i, j int) bool {
	s, t := &q.spots[i], &q.spots[j]
	if math.Abs(s.cost-t.cost) > q.eps {
		return s.cost < t.cost
	}
	return s.tie < t.tie
}

func (q *queue) push(s spot) {
	q.spots = append(q.spots, s)
	for i := len(q.spots) - 1; i > 0; {
		up := (i - 1) / 2
		if !q.before(i, up) {
			return
		}
		q.spots[i], q.spots[up] = q.spots[up], q.spots[i]
		i = up
	}
}

// pop throws the cheapest away.
func (q *queue) pop() {
	n := len(q.spots) - 1
	q.spots[0] = q.spots[n]
	q.spots = q.spots[:n]
	for i := 0; ; {
		k := 2*i + 1
		if k >= n {
			return
		}
		if k+1 < n && q.before(k+1, k) {
			k++
		}
		if !q.before(k, i) {
			return
		}
		q.spots[i], q.spots[k] = q.spots[k], q.spots[i]
		i = k
	}
}
