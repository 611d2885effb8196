package study

import (
	"cmp"
	"math"
	"slices"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/combin"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// mostChoices is how many combinations of a case are all screened; beyond it the worst is searched.
const mostChoices = 2000

// screen tells to first order how warm everything gets with some of the loads under `any` on, from an answer in which each carries its share
// of the heat.
type screen struct {
	groups [][]string  // loads, group by group
	counts []int       // of each that run
	list   []thing     // at the mean
	low    []float64   // °C of each thing with none of the groups' loads
	adds   [][]float64 // [thing][load, counted through the groups] K
}

// shared is the design in which every load of a group carries its share of the heat of those that run.
func shared(d *section.Document, any []section.AnyOf) *section.Document {
	for _, g := range any {
		if len(g.Of) == 0 {
			continue
		}
		share := float64(g.Count) / float64(len(g.Of))
		for _, id := range g.Of {
			d = section.ChangeLoad(d, id, func(l *section.Load) {
				l.CurrentA.V *= math.Sqrt(share)
				l.HeatWM.V *= share
			})
		}
	}
	return d
}

// newScreen reads p, a working point of the shared design with a factor on all currents, as if rises went with its square.
func newScreen(p *rating.Point, any []section.AnyOf, factor float64) *screen {
	s := &screen{list: things(p.Result)}
	e := answers(p)
	s.low, s.adds = make([]float64, len(s.list)), make([][]float64, len(s.list))
	for i := range s.list {
		s.low[i] = s.list[i].tempC
	}
	for _, g := range any {
		s.groups, s.counts = append(s.groups, g.Of), append(s.counts, g.Count)
		share := float64(g.Count) / float64(max(1, len(g.Of)))
		for _, id := range g.Of {
			for i := range s.list {
				k := 0.0
				for j, c := range p.Conductors {
					if c.Load == id && share > 0 {
						k += answer(p, e, i, j) * c.HeatWM / share
					}
				}
				s.adds[i] = append(s.adds[i], k)
				s.low[i] -= share * k
			}
		}
	}
	if factor < 1 {
		f := factor * factor
		for i := range s.low {
			s.low[i] = p.AmbientC + (s.low[i]-p.AmbientC)/f
			for l := range s.adds[i] {
				s.adds[i][l] /= f
			}
		}
	}
	return s
}

// answers is how temperatures follow heats at 20 °C with resistances following: (1 − K·diag(α I²R20))⁻¹·K. K itself where that has no answer.
func answers(p *rating.Point) [][]float64 {
	n := len(p.Sources)
	if n == 0 {
		return nil
	}
	a, k := mat.NewDense(n, n, nil), mat.NewDense(n, n, nil)
	for i := range n {
		for j, src := range p.Sources {
			a.Set(i, j, -p.K[i][j]*src.Square*src.Alpha)
			k.Set(i, j, p.K[i][j])
		}
		a.Set(i, i, a.At(i, i)+1)
	}
	var e mat.Dense
	if e.Solve(a, k) != nil {
		return p.K
	}
	out := make([][]float64, n)
	for i := range out {
		out[i] = e.RawRowView(i)
		for j, v := range out[i] {
			if v < 0 { // beyond a runaway
				out[i][j] = p.K[i][j]
			}
		}
	}
	return out
}

// answer is how thing i follows heat in conductor j, K per W/m. What is no conductor is taken to follow all heat alike.
func answer(p *rating.Point, e [][]float64, i, j int) float64 {
	n := len(p.Conductors)
	if i < n {
		return e[i][j]
	}
	if !(p.Generated > 0) {
		return 0
	}
	return math.Max(0, p.Others[i-n].TempC-p.AmbientC) / p.Generated
}

// choice is which loads of the groups run, counted through the groups.
type choice []bool

// temp is the temperature of thing i.
func (s *screen) temp(i int, on choice) float64 {
	t := s.low[i]
	for l, yes := range on {
		if yes {
			t += s.adds[i][l]
		}
	}
	return t
}

// room is the least room of anything by its limit, and where.
func (s *screen) room(on choice) (k float64) {
	k = math.Inf(1)
	for i, t := range s.list {
		if t.limit.OK && !math.IsNaN(t.tempC) {
			k = math.Min(k, t.limit.V-s.temp(i, on))
		}
	}
	return k
}

// number of combinations, at most beyond mostChoices.
func (s *screen) number() int {
	n := 1
	for g, of := range s.groups {
		k := min(s.counts[g], len(of)-s.counts[g])
		if k < 0 {
			return 0
		}
		c := 1
		for i := 1; i <= k; i++ {
			c = c * (len(of) - k + i) / i
			if c > mostChoices {
				return mostChoices + 1
			}
		}
		if n *= c; n > mostChoices {
			return mostChoices + 1
		}
	}
	return n
}

// all lists every combination.
func (s *screen) all() (out []choice) {
	out = []choice{nil}
	for g, of := range s.groups {
		var next []choice
		if len(of) == 0 {
			continue
		}
		for _, c := range combin.Combinations(len(of), s.counts[g]) {
			on := make(choice, len(of))
			for _, l := range c {
				on[l] = true
			}
			for _, before := range out {
				next = append(next, append(slices.Clone(before), on...))
			}
		}
		out = next
	}
	return out
}

// hottest is the combination that heats thing i most: the loads of each group that add most.
func (s *screen) hottest(i int) choice {
	var on choice
	at := 0
	for g, of := range s.groups {
		order := make([]int, len(of))
		for l := range order {
			order[l] = l
		}
		slices.SortStableFunc(order, func(a, b int) int {
			return cmp.Compare(s.adds[i][at+b], s.adds[i][at+a])
		})
		part := make(choice, len(of))
		for _, l := range order[:min(len(of), s.counts[g])] {
			part[l] = true
		}
		on, at = append(on, part...), at+len(of)
	}
	return on
}

// worst returns the combinations that are worth a full solution, the least room first: of all of them, or, where there are too many, of those
// that heat each thing most, with a search by swaps behind.
func (s *screen) worst(most int) (out []choice, searched bool) {
	var tried []choice
	if searched = s.number() > mostChoices; !searched {
		tried = s.all()
	}
	for i, t := range s.list {
		if t.limit.OK && !math.IsNaN(t.tempC) {
			tried = append(tried, s.hottest(i))
		}
	}
	slices.SortStableFunc(tried, func(a, b choice) int {
		return cmp.Compare(s.room(a), s.room(b))
	})
	if searched && len(tried) > 0 {
		tried = append([]choice{s.swapped(tried[0])}, tried...)
	}
	for _, c := range tried {
		if len(out) < most && !slices.ContainsFunc(out, func(x choice) bool { return slices.Equal(x, c) }) {
			out = append(out, c)
		}
	}
	return out, searched
}

// swapped exchanges one load that runs for one of its group that does not, as long as that leaves less room.
func (s *screen) swapped(on choice) choice {
	on = slices.Clone(on)
	for best, better := s.room(on), true; better; {
		better = false
		at := 0
		for _, of := range s.groups {
			for a := at; a < at+len(of); a++ {
				for b := at; b < at+len(of); b++ {
					if !on[a] || on[b] {
						continue
					}
					on[a], on[b] = false, true
					if k := s.room(on); k < best-1e-9 {
						best, better = k, true
						break
					}
					on[a], on[b] = true, false
				}
			}
			at += len(of)
		}
	}
	return on
}

// off names the loads that do not run.
func (s *screen) off(on choice) (out []string) {
	at := 0
	for _, of := range s.groups {
		for l, id := range of {
			if !on[at+l] {
				out = append(out, id)
			}
		}
		at += len(of)
	}
	return out
}
