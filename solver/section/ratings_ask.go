package section

import (
	"strconv"
	"strings"
)

// Outside is the name of the section's outer surface, and WrapName of thermal insulation around it, where a place is named.
const (
	Outside  = "outside"
	WrapName = "wrap"
)

// Reason returns the reason that is written for something, "" if none: see the keys of reasons.
func (d *Document) Reason(key string) string {
	for _, v := range d.Reasons {
		if v.For == key {
			return v.Text
		}
	}
	return ""
}

// LimitReason returns why the limit of a part is what it is, "" if nothing is written. A part of a build may have its reason under the id of any
// cable of the build.
func (d *Document) LimitReason(id string) string {
	if text := d.Reason(ReasonLimit + id); text != "" || !strings.Contains(id, "/") {
		return text
	}
	p := Find(d, id)
	for _, v := range d.Reasons {
		if other, ok := strings.CutPrefix(v.For, ReasonLimit); ok && p != nil && Find(d, other) == p {
			return v.Text
		}
	}
	return ""
}

// LoadNamed returns the load with the id, nil if none.
func LoadNamed(d *Document, id string) *Load {
	for i := range d.Loads {
		if d.Loads[i].ID == id {
			return &d.Loads[i]
		}
	}
	return nil
}

// CaseNamed returns the case with the id, nil if none.
func CaseNamed(d *Document, id string) *Case {
	for i := range d.Cases {
		if d.Cases[i].ID == id {
			return &d.Cases[i]
		}
	}
	return nil
}

func measurementOf(d *Document, id string) *Measurement {
	for i := range d.Measurements {
		if d.Measurements[i].ID == id {
			return &d.Measurements[i]
		}
	}
	return nil
}

// NotTogether tells whether two loads can't be energised together, whichever of them says so.
func NotTogether(d *Document, a, b string) bool { return exclusions(d)[a][b] }

// exclusions returns not_with in both directions.
func exclusions(d *Document) map[string]map[string]bool {
	out := map[string]map[string]bool{}
	put := func(a, b string) {
		if out[a] == nil {
			out[a] = map[string]bool{}
		}
		out[a][b] = true
	}
	for _, l := range d.Loads {
		for _, other := range l.NotWith {
			if other != l.ID {
				put(l.ID, other)
				put(other, l.ID)
			}
		}
	}
	return out
}

// surface tells whether a name means a surface or layer: "outside", "wrap", a wall's layer ("jacket", "conduit", "wireway", from the inside "jacket/2"
// …; each word serves for every kind of holder) or the same of a cable ("C1/jacket").
func (t *targets) surface(at string) bool {
	if at == Outside || at == WrapName {
		return true
	}
	words := strings.Split(at, "/")
	if n, err := strconv.Atoi(words[len(words)-1]); err == nil && n >= 2 && n <= MaxLayers+1 && len(words) > 1 {
		words = words[:len(words)-1]
	}
	wall, cable := words[len(words)-1], strings.Join(words[:len(words)-1], "/")
	if len(words) == 1 {
		return wall == Jacket || wall == Conduit || wall == Wireway
	}
	p := t.parts[cable]
	return wall == Jacket && p != nil && p.Kind == Cable
}
