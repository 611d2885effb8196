package heat_test

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"packrise/solver/heat"
)

// The estimate bounds the true error (against the fine setting) on at least 95 % of random sections of every kind, and is not more than
// ten times too large in the median.
func TestEstimate(t *testing.T) {
	kinds := []wish{
		{parts: 3, air: true},
		{parts: 9, air: true},
		{parts: 9, air: true, cables: true},
		{parts: 7, air: true, loose: true},
		{parts: 8},
		{parts: 8, conducts: true},
		{parts: 5, air: true, rect: true},
		{parts: 6, rect: true},
	}
	each := soak(8, 200)
	if testing.Short() {
		each = 2
	}
	for _, acc := range []heat.Accuracy{heat.Draft, heat.Standard} {
		bounded, all := 0, 0
		var over []float64
		worst := 0.0
		for k, w := range kinds {
			for i := range each {
				p := randomSection(rand.New(rand.NewPCG(100+uint64(k), uint64(i))), w)
				fine := heat.New(p, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
				r := heat.New(p, heat.Settings{Accuracy: acc}).Solve(bg, nil)
				e := 0.0
				for i := range r.Core {
					e = math.Max(e, math.Abs(r.Core[i]-fine.Core[i]))
				}
				worst = math.Max(worst, e)
				all++
				if e <= r.ErrorK {
					bounded++
				}
				if e > 0 {
					over = append(over, r.ErrorK/e)
				}
			}
		}
		slices.Sort(over)
		t.Logf("accuracy %d: bounded %d of %d, median %.1f times the error, least %.2f, worst error %.4f K", acc, bounded, all, over[len(over)/2], over[0], worst)
		if bounded*100 < 95*all {
			t.Errorf("accuracy %d: only %d of %d bounded", acc, bounded, all)
		}
		if over[len(over)/2] > 10 {
			t.Errorf("accuracy %d: %.1f times too large in the median", acc, over[len(over)/2])
		}
	}
}
