package section

import (
	"slices"
	"strings"
)

// Swap exchanges the places of two parts of one list: of the top level, or of one cable's build. Each keeps its own turn.
func Swap(d *Document, a, b string) *Document {
	x, y := Find(d, a), Find(d, b)
	if x == nil || y == nil || x == y || a[:strings.LastIndex(a, "/")+1] != b[:strings.LastIndex(b, "/")+1] {
		return d
	}
	to, from := x.At, y.At
	return change(change(d, a, func(p *Part) { p.At = from }), b, func(p *Part) { p.At = to })
}

// SwapLoads exchanges what two conductors carry: each takes the other's place in its load, also as a neutral.
func SwapLoads(d *Document, a, b string) *Document {
	x, y := Find(d, a), Find(d, b)
	if x == nil || y == nil || a == b || x.Kind != Core || y.Kind != Core {
		return d
	}
	other := func(id string) string {
		switch id {
		case a:
			return b
		case b:
			return a
		}
		return id
	}
	if LoadOf(d, a) == nil && LoadOf(d, b) == nil {
		return d
	}
	return d.With(func(d *Document) {
		d.Loads = mapped(d.Loads, func(l Load) Load {
			l.Conductors = mapped(l.Conductors, other)
			if l.Neutral = other(l.Neutral); l.Neutral == "" {
				return l
			}
			if p := Find(d, l.Neutral); p != nil && p.Role != "" && p.Role != RoleNeutral {
				l.Neutral = "" // an earth or a spare is no neutral
			}
			return l
		})
	})
}

// Assign puts a conductor into a load that exists, and out of the one that it was in.
func Assign(d *Document, conductor, load string) *Document {
	p, l := Find(d, conductor), LoadNamed(d, load)
	if p == nil || p.Kind != Core || l == nil || slices.Contains(l.Conductors, conductor) {
		return d
	}
	if LoadOf(d, conductor) != nil {
		d = unload(d, conductor)
	}
	return ChangeLoad(d, load, func(l *Load) { l.Conductors = append(slices.Clip(l.Conductors), conductor) })
}

// WithoutPart takes one part out, as Delete does, but of this cable alone: other cables of its build keep theirs.
func WithoutPart(d *Document, id string) *Document {
	if Find(d, id) == nil {
		return d
	}
	return Delete(OwnBuild(d, id), id)
}

// OwnBuild gives the cables around a nested part (C1/L1) builds that nobody else uses, so that an edit of the part is one of this part alone.
func OwnBuild(d *Document, id string) *Document {
	steps := strings.Split(id, "/")
	for n := 1; n < len(steps); n++ {
		cable := strings.Join(steps[:n], "/")
		p := Find(d, cable)
		if p == nil {
			return d
		}
		b := buildOf(d, p.Build)
		if b == nil || users(d, b.Name) < 2 {
			continue
		}
		d = spreadReasons(d)
		own := *b
		own.Name = freshBuild(d, b.Name)
		d = change(d.With(func(d *Document) { d.Builds = append(slices.Clip(d.Builds), own) }), cable, func(p *Part) { p.Build = own.Name })
	}
	return d
}

// spreadReasons writes the reason of a limit in a build under each of its cables, so that none loses it when they part.
func spreadReasons(d *Document) *Document {
	if len(d.Reasons) == 0 {
		return d
	}
	out := d
	for _, p := range UnfoldAll(d) {
		if p.Depth > 0 {
			out = SetReason(out, ReasonLimit+p.ID, d.LimitReason(p.ID))
		}
	}
	return out
}

// users counts the parts that are written with a build.
func users(d *Document, build string) int {
	n := 0
	count := func(parts []Part) {
		for i := range parts {
			if parts[i].Kind == Cable && parts[i].Build == build {
				n++
			}
		}
	}
	count(d.Parts)
	for i := range d.Builds {
		count(d.Builds[i].Parts)
	}
	return n
}

func freshBuild(d *Document, stem string) string {
	used := map[string]bool{}
	for _, b := range d.Builds {
		used[b.Name] = true
	}
	return fresh(used, stem+"-")
}
