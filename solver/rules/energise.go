package rules

import "slices"

// most loads of one tangle of exclusions that are searched exactly.
const exactLoads = 16

// energised returns the loads that can be energised together with the largest sum of weights, the earliest where several sets are as heavy. A tangle
// of more than 16 loads is taken as energised whole, which is on the safe side, and returned in tangled.
func energised(loads []Load, atMost []AtMost, weight func(id string) int) (on map[string]bool, tangled []string) {
	on = map[string]bool{}
	for _, l := range loads {
		on[l.ID] = true
	}
	sets := exclusions(loads, atMost)
	for len(sets) > 0 {
		var tangle []AtMost
		tangle, sets = split(sets)
		ids := members(loads, tangle)
		switch {
		case len(tangle) == 1:
			keepHeaviest(ids, tangle[0].Count, weight, on)
		case len(ids) <= exactLoads:
			keepBest(ids, tangle, weight, on)
		default:
			tangled = append(tangled, ids...)
		}
	}
	return on, tangled
}

// exclusions are the sets of loads of which only so many can run, those that bind.
func exclusions(loads []Load, atMost []AtMost) (out []AtMost) {
	known := func(id string) bool { return slices.ContainsFunc(loads, func(l Load) bool { return l.ID == id }) }
	for _, l := range loads {
		for _, other := range l.NotWith {
			if known(other) && other != l.ID {
				out = append(out, AtMost{[]string{l.ID, other}, 1})
			}
		}
	}
	for _, a := range atMost {
		var ids []string
		for _, id := range a.Loads {
			if known(id) && !slices.Contains(ids, id) {
				ids = append(ids, id)
			}
		}
		if a.Count >= 0 && a.Count < len(ids) {
			out = append(out, AtMost{ids, a.Count})
		}
	}
	return out
}

// split takes one tangle, sets joined by common loads, off the front.
func split(sets []AtMost) (tangle, rest []AtMost) {
	tangle, rest = sets[:1:1], sets[1:]
	for grown := true; grown; {
		grown = false
		var left []AtMost
		for _, s := range rest {
			if slices.ContainsFunc(tangle, func(t AtMost) bool { return meet(s, t) }) {
				tangle, grown = append(tangle, s), true
			} else {
				left = append(left, s)
			}
		}
		rest = left
	}
	return tangle, rest
}

func meet(a, b AtMost) bool {
	return slices.ContainsFunc(a.Loads, func(id string) bool { return slices.Contains(b.Loads, id) })
}

// members lists the loads of a tangle in the order of the run.
func members(loads []Load, tangle []AtMost) (ids []string) {
	for _, l := range loads {
		if slices.ContainsFunc(tangle, func(t AtMost) bool { return slices.Contains(t.Loads, l.ID) }) {
			ids = append(ids, l.ID)
		}
	}
	return ids
}

func keepHeaviest(ids []string, count int, weight func(string) int, on map[string]bool) {
	order := slices.Clone(ids)
	slices.SortStableFunc(order, func(a, b string) int { return weight(b) - weight(a) })
	for i, id := range order {
		on[id] = i < count
	}
}

// keepBest tries every subset; the earliest load is the highest bit, so that the first of equal weight keeps the earliest loads.
func keepBest(ids []string, tangle []AtMost, weight func(string) int, on map[string]bool) {
	n := len(ids)
	bit := func(i int) uint { return 1 << (n - 1 - i) }
	best, most := uint(0), -1
	for mask := uint(1)<<n - 1; ; mask-- {
		sum := 0
		for i, id := range ids {
			if mask&bit(i) != 0 {
				sum += weight(id)
			}
		}
		if sum > most && possible(mask, ids, tangle, bit) {
			best, most = mask, sum
		}
		if mask == 0 {
			break
		}
	}
	for i, id := range ids {
		on[id] = best&bit(i) != 0
	}
}

func possible(mask uint, ids []string, tangle []AtMost, bit func(int) uint) bool {
	for _, t := range tangle {
		n := 0
		for i, id := range ids {
			if mask&bit(i) != 0 && slices.Contains(t.Loads, id) {
				n++
			}
		}
		if n > t.Count {
			return false
		}
	}
	return true
}
