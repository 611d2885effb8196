package outline

import "slices"

// known tells what of an older system still holds.
type known struct {
	old   *HullSystem
	panel []int  // the old panel that each is, −1 for none
	all   bool   // panels are as they were
	disc  []bool // as it was
}

// place tells panels apart.
type place struct {
	of          piece
	along, half float64
}

func (s *HullSystem) place(i int) place {
	b := &s.panels[i]
	return place{s.pieces[b.piece], b.along, b.half}
}

// known compares s, whose panels and discs are laid out, with an older system.
func (s *HullSystem) known(old *HullSystem) *known {
	k := &known{old: old, panel: make([]int, len(s.panels)), disc: make([]bool, len(s.discs))}
	if old.hull.MediumK != s.hull.MediumK || len(old.discs) != len(s.discs) {
		for i := range k.panel {
			k.panel[i] = -1
		}
		return k
	}
	k.all = s.n == old.n
	at := make(map[place]int, len(old.panels))
	for i := range old.panels {
		at[old.place(i)] = i
	}
	for i := range s.panels {
		k.panel[i] = -1
		if j, ok := at[s.place(i)]; ok {
			k.panel[i] = j
		}
		k.all = k.all && k.panel[i] == i
	}
	for i := range s.discs {
		d, o := &s.discs[i], &old.discs[i]
		k.disc[i] = d.C == o.C && d.A == o.A && d.M == o.M && d.mirror.Beyond == o.mirror.Beyond && slices.Equal(d.mirror.T, o.mirror.T)
	}
	return k
}

// takeOver takes the whole system over where only discs that lie away from the hull have changed.
func (s *HullSystem) takeOver(k *known) bool {
	if !k.all {
		return false
	}
	for i, same := range k.disc {
		if !same && (len(s.kin(i)) > 0 || len(k.old.kin(i)) > 0) {
			return false
		}
	}
	s.direct, s.means, s.lu, s.pivots = k.old.direct, k.old.means, k.old.lu, k.old.pivots
	return true
}
