package pack

import "math"

// before orders spots by cost, and by tie where costs are equal.
func (b *bed) before(i, j int) bool {
	s, t := &b.spots[i], &b.spots[j]
	if math.Abs(s.cost-t.cost) > b.eps {
		return s.cost < t.cost
	}
	return s.tie < t.tie
}

// heapify makes a heap of the spots, the cheapest on top: few are looked at, so sorting all would be wasted.
func (b *bed) heapify() {
	for i := len(b.spots)/2 - 1; i >= 0; i-- {
		b.sift(i)
	}
}

func (b *bed) pop() {
	n := len(b.spots) - 1
	b.spots[0] = b.spots[n]
	b.spots = b.spots[:n]
	b.sift(0)
}

func (b *bed) sift(i int) {
	for {
		k := 2*i + 1
		if k >= len(b.spots) {
			return
		}
		if k+1 < len(b.spots) && b.before(k+1, k) {
			k++
		}
		if !b.before(k, i) {
			return
		}
		b.spots[i], b.spots[k] = b.spots[k], b.spots[i]
		i = k
	}
}
