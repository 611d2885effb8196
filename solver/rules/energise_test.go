package rules

import (
	"fmt"
	"math/rand/v2"
	"testing"
)

func loadsOf(n int) (out []Load) {
	for i := range n {
		out = append(out, Load{ID: fmt.Sprintf("l%d", i)})
	}
	return out
}

// TestEnergised against trying every subset, for random exclusions.
func TestEnergised(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 7))
	for range 300 {
		loads := loadsOf(1 + rng.IntN(9))
		weights := map[string]int{}
		for i := range loads {
			weights[loads[i].ID] = rng.IntN(5)
			for j := range i {
				if rng.IntN(5) == 0 {
					loads[i].NotWith = append(loads[i].NotWith, loads[j].ID)
				}
			}
		}
		var atMost []AtMost
		if rng.IntN(2) == 0 {
			var ids []string
			for _, l := range loads {
				if rng.IntN(2) == 0 {
					ids = append(ids, l.ID)
				}
			}
			atMost = append(atMost, AtMost{ids, rng.IntN(4)})
		}
		on, tangled := energised(loads, atMost, func(id string) int { return weights[id] })
		got, best := 0, 0
		for id, running := range on {
			if running {
				got += weights[id]
			}
		}
		for mask := range uint(1) << len(loads) {
			sum, ok := 0, true
			for i, l := range loads {
				if mask>>i&1 == 0 {
					continue
				}
				sum += weights[l.ID]
				for j, m := range loads {
					for _, other := range l.NotWith {
						ok = ok && (m.ID != other || mask>>j&1 == 0)
					}
				}
			}
			for _, a := range atMost {
				n := 0
				for i, l := range loads {
					for _, id := range a.Loads {
						if id == l.ID && mask>>i&1 == 1 {
							n++
						}
					}
				}
				ok = ok && n <= a.Count
			}
			if ok {
				best = max(best, sum)
			}
		}
		if got != best || len(tangled) != 0 {
			t.Errorf("%+v %+v %v: %d, want %d, tangled %v", loads, atMost, weights, got, best, tangled)
		}
	}
}

// TestEnergisedKeepsTheFirst: of equals the earliest in the design counts; many exclusive loads are quick; a large tangle counts whole and is named.
func TestEnergisedKeepsTheFirst(t *testing.T) {
	loads := loadsOf(2)
	loads[0].NotWith = []string{"l1", "gone"}
	if on, _ := energised(loads, nil, func(string) int { return 3 }); !on["l0"] || on["l1"] {
		t.Errorf("%v", on)
	}
	many := loadsOf(400)
	var ids []string
	for _, l := range many {
		ids = append(ids, l.ID)
	}
	on, tangled := energised(many, []AtMost{{ids, 3}}, func(id string) int { return len(id) })
	n := 0
	for _, running := range on {
		if running {
			n++
		}
	}
	if n != 3 || len(tangled) != 0 || !on["l100"] {
		t.Errorf("%d run, tangled %v", n, tangled)
	}
	for i := 1; i < len(many); i++ {
		many[i].NotWith = []string{many[i-1].ID}
	}
	if on, tangled := energised(many, nil, func(string) int { return 1 }); len(tangled) != 400 || !on["l7"] {
		t.Errorf("%d tangled", len(tangled))
	}
}
