package rating

import (
	"fmt"
	"math"

	"packrise/solver/heat"
)

// remarks lists what is assumed or left out, one sentence each.
func (s *scene) remarks(r *Result, a answered, o Options) []string {
	out := append([]string(nil), s.notes...)
	if n := s.formNote(); n != "" {
		out = append(out, n)
	}
	if n := s.restNote(a); n != "" {
		out = append(out, n)
	}
	if n := s.radiationNote(a); n != "" {
		out = append(out, n)
	}
	if n := s.airNote(a); n != "" {
		out = append(out, n)
	}
	if s.holder.gap > 0 {
		how := "given"
		if !s.doc.Holder.ClearanceMM.OK {
			how = "assumed"
		}
		out = append(out, fmt.Sprintf("mean clearance of the loose parts %s mm (%s)", digits(s.holder.gap/mm, 3), how))
	}
	if len(r.Unassigned) > 0 {
		out = append(out, fmt.Sprintf("%s of unknown or unassigned current (%s): the temperatures leave the heat out and are too low; write current_a, or 0 where idle",
			count(len(r.Unassigned), "conductor"), list(r.Unassigned)))
	}
	if o.AssumeIdle {
		out = append(out, "conductors of unknown or unassigned current are assumed idle")
	}
	out = append(out, s.weatherNotes(a)...)
	out = append(out, s.bodyNotes(a)...)
	out = append(out, s.limitNotes()...)
	if s.anyAlternating() {
		out = append(out, "skin effect by IEC 60287-1-1; proximity of conductors is left out")
	}
	if s.bareOutside() {
		out = append(out, "bare metal touching its neighbours is reckoned with a gap of 10 µm")
	}
	if s.innerClearance() {
		out = append(out, "clearance given inside a construction is not reckoned: its parts touch as drawn")
	}
	if a.status == heat.StoppedEarly {
		out = append(out, "the calculation stopped before it settled; take the temperatures as a first estimate")
	}
	return out
}

func (s *scene) airNote(a answered) string {
	region, t, ok := a.air.hottestHolder()
	if !ok || a.heat == nil || a.status == heat.ThermalRunaway {
		return ""
	}
	return fmt.Sprintf("air between the parts conducts %s W/mK at its %s °C", digits(a.air.k(region, s.holder.fill), 4), digits(math.Round(t), 0))
}

// limitNotes says which limits are assumed from the bare polymer.
func (s *scene) limitNotes() []string {
	by := map[string][]string{}
	var order []string
	for i := range s.parts {
		if l := s.parts[i].limit; l.assumed {
			if by[l.by] == nil {
				order = append(order, l.by)
			}
			by[l.by] = append(by[l.by], s.parts[i].id)
		}
	}
	var out []string
	for _, b := range order {
		out = append(out, fmt.Sprintf("limit assumed for %s: %s", list(by[b]), b))
	}
	return out
}

func (s *scene) anyAlternating() bool {
	for i := range s.parts {
		if l := s.parts[i].load; l != nil && l.FrequencyHz.V > 0 {
			return true
		}
	}
	return false
}

func (s *scene) bareOutside() bool {
	for i := range s.parts {
		p := &s.parts[i]
		if p.in < 0 && s.alone(i) {
			continue
		}
		if (p.metal && len(p.layers) == 0 || len(p.layers) > 0 && p.layers[len(p.layers)-1].material.metal) && len(s.parts) > 1 {
			return true
		}
	}
	return false
}

// alone tells whether part i of the top level is a body by itself.
func (s *scene) alone(i int) bool {
	for k := range s.bodies {
		if b := &s.bodies[k]; !b.several() && b.top[0] == i {
			return true
		}
	}
	return false
}

func (s *scene) innerClearance() bool {
	for i := range s.parts {
		if p := &s.parts[i]; p.inside != nil && p.inside.gap > 0 {
			return true
		}
	}
	return false
}
