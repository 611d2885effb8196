package section

import (
	"reflect"
	"slices"
	"strings"
)

// ChangeLoad applies f to a copy of the load with the id. f must replace slices and not write into them, and leave the id and the conductors alone.
func ChangeLoad(d *Document, id string, f func(*Load)) *Document {
	for i := range d.Loads {
		if d.Loads[i].ID != id {
			continue
		}
		l := d.Loads[i]
		f(&l)
		if reflect.DeepEqual(l, d.Loads[i]) {
			return d
		}
		return fitStates(withLoads(d, func(loads []Load) []Load { loads[i] = l; return loads }))
	}
	return d
}

// SetProtection names the device ahead of a load; the zero Protection makes it unknown.
func SetProtection(d *Document, load string, p Protection) *Document {
	return ChangeLoad(d, load, func(l *Load) { l.Protection = p })
}

// SetContinuous says whether a load runs three hours or more.
func SetContinuous(d *Document, load string, on bool) *Document {
	return ChangeLoad(d, load, func(l *Load) { l.Continuous, l.StartingDuty = on, l.StartingDuty && !on })
}

// SetMotor says whether a load is a motor's branch circuit.
func SetMotor(d *Document, load string, on bool) *Document {
	return ChangeLoad(d, load, func(l *Load) { l.Motor, l.StartingDuty = on, l.StartingDuty && !on })
}

// SetStartingDuty says whether a load runs only while a motor starts, which is then neither a motor's own nor continuous.
func SetStartingDuty(d *Document, load string, on bool) *Document {
	return ChangeLoad(d, load, func(l *Load) {
		l.StartingDuty, l.Motor, l.Continuous = on, l.Motor && !on, l.Continuous && !on
	})
}

// SetTerminals caps the current of a load's conductors; the zero Terminals make the cap unknown.
func SetTerminals(d *Document, load string, t Terminals) *Document {
	return ChangeLoad(d, load, func(l *Load) { l.Terminals = t })
}

// SetSystem sets the system of a load, "" is not said.
func SetSystem(d *Document, load, system string) *Document {
	return ChangeLoad(d, load, func(l *Load) { l.System = system })
}

// SetNeutral names a conductor as the neutral of a load, "" none. A conductor with another role than line becomes a neutral by its role.
func SetNeutral(d *Document, load, conductor string) *Document {
	if conductor != "" {
		p := Find(d, conductor)
		if p == nil || p.Kind != Core || LoadNamed(d, load) == nil {
			return d
		}
		if p.Role != "" {
			d = SetRole(d, conductor, RoleNeutral)
		}
	}
	return ChangeLoad(d, load, func(l *Load) { l.Neutral = conductor })
}

// SetRole sets the role of a conductor, "" is line. Loads that name it as their neutral no longer do if the role is another.
func SetRole(d *Document, id, role string) *Document {
	if p := Find(d, id); p == nil || p.Kind != Core {
		return d
	}
	out := change(d, id, func(p *Part) { p.Role = role })
	if out == d || role == "" || role == RoleNeutral {
		return out
	}
	p := Find(out, id)
	for _, l := range out.Loads {
		if l.Neutral != "" && Find(out, l.Neutral) == p {
			out = ChangeLoad(out, l.ID, func(l *Load) { l.Neutral = "" })
		}
	}
	return out
}

// SetNotWith names the loads that can't be energised together with a load, and takes back what others say of it that is not among them. Cases in which
// two of them run both have the named ones off.
func SetNotWith(d *Document, load string, others ...string) *Document {
	if LoadNamed(d, load) == nil {
		return d
	}
	var named []string
	for _, id := range others {
		if id != load && LoadNamed(d, id) != nil && !slices.Contains(named, id) {
			named = append(named, id)
		}
	}
	out := d
	for _, l := range d.Loads {
		if l.ID != load && slices.Contains(l.NotWith, load) {
			if slices.Contains(named, l.ID) {
				named = without(named, l.ID) // it says so itself
				continue
			}
			out = ChangeLoad(out, l.ID, func(l *Load) { l.NotWith = without(l.NotWith, load) })
		}
	}
	return separate(ChangeLoad(out, load, func(l *Load) { l.NotWith = named }), load)
}

func without(list []string, word string) []string {
	return noEmpty(slices.DeleteFunc(slices.Clone(list), func(s string) bool { return s == word }))
}

// separate switches off, in cases where the load runs, what can't run with it.
func separate(d *Document, load string) *Document {
	bad := exclusions(d)[load]
	if len(bad) == 0 || len(d.Cases) == 0 {
		return d
	}
	return d.With(func(d *Document) {
		d.Cases = mapped(d.Cases, func(c Case) Case {
			runs := slices.ContainsFunc(c.Loads, func(s CaseLoad) bool { return s.Load == load && s.on() })
			c.Loads = mapped(c.Loads, func(s CaseLoad) CaseLoad {
				if runs && bad[s.Load] && s.on() {
					return CaseLoad{Load: s.Load, Off: true}
				}
				return s
			})
			return c
		})
	})
}

// RenameLoad gives a load another id; cases, measurements and other loads follow. It changes nothing where to is empty, holds a "/" or is taken.
func RenameLoad(d *Document, id, to string) *Document {
	if !goodID(to) || LoadNamed(d, id) == nil || LoadNamed(d, to) != nil {
		return d
	}
	out := withLoads(d, func(loads []Load) []Load {
		return mapped(loads, func(l Load) Load {
			if l.ID == id {
				l.ID = to
			}
			return l
		})
	})
	return follow(out, nil, map[string]string{id: to})
}

// RemoveLoad takes a load out: its conductors are then in none, which is not the same as idle.
func RemoveLoad(d *Document, id string) *Document {
	if LoadNamed(d, id) == nil {
		return d
	}
	return tidy(withLoads(d, func(loads []Load) []Load {
		return slices.DeleteFunc(loads, func(l Load) bool { return l.ID == id })
	}))
}

func goodID(id string) bool {
	return id != "" && !strings.Contains(id, "/") && strings.TrimSpace(id) == id
}

// SetPinned says whether a part stays where it is when places are sought.
func SetPinned(d *Document, id string, on bool) *Document {
	return change(d, id, func(p *Part) { p.Pinned = on })
}

// SetGroup puts a part into a group that stays together when places are sought, "" into none.
func SetGroup(d *Document, id, group string) *Document {
	return change(d, id, func(p *Part) { p.Group = group })
}

// SetRanges says how far the inputs may be off.
func SetRanges(d *Document, v Ranges) *Document {
	if d.Ranges == v {
		return d
	}
	return d.With(func(d *Document) { d.Ranges = v })
}

// SetRules chooses the tables beside the computed values.
func SetRules(d *Document, v Rules) *Document {
	if reflect.DeepEqual(d.Rules, v) {
		return d
	}
	return d.With(func(d *Document) { d.Rules = v })
}

// SetReason writes the reason for something, "" takes it out: see the keys of reasons. The reason of a margin of 0 stays while it is 0.
func SetReason(d *Document, key, text string) *Document {
	text = strings.TrimSpace(text)
	if d.Reason(key) == text || text == "" && key == ReasonMargin && d.DesignMarginK == Some(0.0) {
		return d
	}
	return d.With(func(d *Document) {
		i := slices.IndexFunc(d.Reasons, func(v Reason) bool { return v.For == key })
		d.Reasons = slices.Clone(d.Reasons)
		switch {
		case i < 0:
			d.Reasons = append(d.Reasons, Reason{key, text})
		case text == "":
			d.Reasons = noEmpty(slices.Delete(d.Reasons, i, i+1))
		default:
			d.Reasons[i].Text = text
		}
	})
}

// SetMargin sets the design margin; not OK leaves it to the default. A margin of 0 needs a reason: without one, given here or before, nothing changes.
// The reason of a former 0 is taken out.
func SetMargin(d *Document, k Opt[float64], reason string) *Document {
	if k.OK && k.V < 0 {
		return d
	}
	if k == Some(0.0) {
		if strings.TrimSpace(reason) != "" {
			d = SetReason(d, ReasonMargin, reason)
		} else if d.Reason(ReasonMargin) == "" {
			return d
		}
	}
	if d.DesignMarginK != k {
		d = d.With(func(d *Document) { d.DesignMarginK = k })
	}
	if k != Some(0.0) {
		d = SetReason(d, ReasonMargin, "")
	}
	return d
}
