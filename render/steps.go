package render

import (
	"fmt"
	"image/color"
	"math"
	"slices"
	"sort"
	"strconv"
	"strings"

	"packrise/solver/section"
)

// mostGroups keeps the ladder of a large section calm.
const mostGroups = 10

// step is one label of the ladder.
type step struct {
	ids       []string
	name      string
	short     string     // in its place where there is no room for it
	temp      float64    // where it stands
	low, high float64    // how far a folded group reaches
	band      [2]float64 // P5 and P95 of all in it
	banded    bool       // the band is known
	close     bool       // within its limit, which the band reaches over
	limit     bool
	bold      bool
	color     color.NRGBA
	selected  bool
	pointed   bool
	label     float64 // height of the label in pixels
}

// number is what stands behind a step's name: its temperature, or the group's lowest and highest, and that it is close.
func (s step) number() string {
	a, b := wholeC(s.low), wholeC(s.high)
	if a != b {
		a += "–" + b
	}
	if s.close {
		a += " " + strings.ToLower(Near.Word())
	}
	return a
}

// mark gives a step of one reading its band, and the colour of what is over or close.
func (l *ladder) mark(s *step, r section.Reading) {
	s.band, s.banded = l.s.Bands[r.ID]
	s.close = s.banded && r.LimitC.OK && !r.Over() && s.band[1] > r.LimitC.V
	switch {
	case r.Over():
		s.color = l.pal.Over
	case s.close:
		s.color = l.pal.Close
	}
}

// join takes another step into a folded one; the temperatures are the caller's.
func (s *step) join(o step) {
	s.ids = append(s.ids, o.ids...)
	s.close = s.close || o.close
	switch {
	case o.banded && s.banded:
		s.band = [2]float64{min(s.band[0], o.band[0]), max(s.band[1], o.band[1])}
	case o.banded:
		s.band, s.banded = o.band, true
	}
}

// steps lists the ladder's labels, hottest first: parts of their own, folded groups, the holder's layers, ambient, limits.
func (l *ladder) steps() []step {
	fixed := l.limitSteps()
	if finite(l.s.AmbientC) {
		t := l.s.AmbientC
		fixed = append(fixed, step{name: "ambient", temp: t, low: t, high: t, color: l.pal.Ink})
	}
	fixed = append(fixed, l.wallSteps()...)
	named, over, others := l.partSteps()
	room := min(mostGroups, int((l.h-l.top)/(rowHeight*l.k))-len(fixed)-len(named))
	out := append(fixed, named...)
	if len(over) > 0 && len(others) > 0 {
		half := max(1, room/2)
		out = append(out, l.fold(over, half, "over")...)
		out = append(out, l.fold(others, max(1, room-half), "parts")...)
	} else {
		out = append(out, l.fold(append(over, others...), max(1, room), "parts")...)
	}
	for i := range out { // a single group beside parts of their own is "the others"
		if n := len(out[i].ids); n > 1 && len(named) > 0 && n == len(over)+len(others) && strings.HasSuffix(out[i].name, " parts") {
			out[i].name = strconv.Itoa(n) + " others"
		}
	}
	sort.SliceStable(out, func(i, j int) bool { return out[i].temp > out[j].temp })
	return out
}

// partSteps splits the parts' readings into those with a label of their own, those over their limit and the rest.
func (l *ladder) partSteps() (named, over, others []step) {
	for _, r := range l.s.Readings {
		if ofHolder(r, l.s.Shapes) || !finite(r.TempC) {
			continue
		}
		id := r.ID
		if owner, _ := layerOf(id, l.s.Shapes); r.Kind == "layer" && owner != nil {
			id = owner.ID // pointing at a cable's jacket is pointing at the cable
		}
		s := step{
			ids: []string{id}, name: readingName(r, l.s), temp: r.TempC, low: r.TempC, high: r.TempC, color: l.pal.Ink, bold: r.Governs,
			selected: slices.Contains(l.s.Selected, id), pointed: id == l.s.Pointed,
		}
		l.mark(&s, r)
		if r.Governs || r.Hottest || s.pointed || s.selected && len(l.s.Selected) <= 3 {
			named = append(named, s)
		} else if r.Over() {
			over = append(over, s)
		} else {
			others = append(others, s)
		}
	}
	return named, over, others
}

// fold joins steps of equal temperature, and ever less equal ones until they fit into the rows left.
func (l *ladder) fold(parts []step, rows int, word string) []step {
	sort.SliceStable(parts, func(i, j int) bool { return parts[i].temp > parts[j].temp })
	var out []step
	for tol := 1.0; ; tol *= 1.4 {
		out = nil
		for _, s := range parts {
			if n := len(out); n > 0 && out[n-1].high-s.low <= tol {
				g := &out[n-1]
				if s.close && !g.close {
					g.color = s.color
				}
				g.join(s)
				g.low = s.low
				g.selected = g.selected || s.selected
				continue
			}
			s.ids = append([]string(nil), s.ids...)
			out = append(out, s)
		}
		if len(out) <= rows || tol > 1e4 {
			break
		}
	}
	for i := range out {
		g := &out[i]
		g.temp = (g.low + g.high) / 2
		g.name = l.groupName(*g, word)
	}
	return out
}

// groupName names a group by what is in it when there is room, else by their number.
func (l *ladder) groupName(g step, word string) string {
	if len(g.ids) == 1 {
		return g.name
	}
	all := strings.Join(g.ids, ", ")
	if len(g.ids) <= 4 && l.hasRoom(all+" 100–") {
		return all
	}
	return strconv.Itoa(len(g.ids)) + " " + word
}

// hasRoom tells whether a name fits, with a number behind it.
func (l *ladder) hasRoom(name string) bool {
	return l.c.MeasureText(name+" 100", l.font()) <= l.w-l.text-4*l.k
}

// wallSteps are the holder's layers and its outer surface; equal ones share a label.
func (l *ladder) wallSteps() []step {
	var out []step
	for _, r := range l.s.Readings {
		if !ofHolder(r, l.s.Shapes) || !finite(r.TempC) {
			continue
		}
		s := step{ids: []string{r.ID}, name: readingName(r, l.s), temp: r.TempC, low: r.TempC, high: r.TempC, color: l.pal.Ink, bold: r.Governs}
		l.mark(&s, r)
		if r.Kind == "surface" && r.ID != "outside" && !r.Over() && !r.Governs && len(out) > 0 && out[len(out)-1].color == s.color && !out[len(out)-1].bold {
			g := &out[len(out)-1] // the outsides of bodies apart share one label
			g.join(s)
			g.name = "outsides"
			g.low, g.high = min(g.low, s.low), max(g.high, s.high)
			g.temp = (g.low + g.high) / 2
			continue
		}
		if n := len(out); n > 0 && math.Abs(out[n-1].low-s.temp) < 0.5 && out[n-1].color == s.color && l.hasRoom(joinNames(out[n-1].name, s.name)) {
			g := &out[n-1]
			g.join(s)
			g.name = joinNames(g.name, s.name)
			g.low, g.high = min(g.low, s.low), max(g.high, s.high)
			g.temp, g.bold = (g.low+g.high)/2, g.bold || s.bold
			continue
		}
		out = append(out, s)
	}
	return out
}

// joinNames lists two names, numbered layers of one thing as a range: "jacket 1–3".
func joinNames(a, b string) string {
	base, n, ok := cutNumber(b)
	if first, last, is := cutNumber(a); ok && is && last == n-1 {
		root, from, ranged := strings.Cut(first, "–")
		if !ranged && root == base {
			return fmt.Sprintf("%s %d–%d", base, last, n)
		}
		if r, f, ok := cutNumber(root); ranged && from == "" && ok && r == base {
			return fmt.Sprintf("%s %d–%d", base, f, n)
		}
	}
	return a + ", " + b
}

// cutNumber splits "jacket 2" into "jacket" and 2, "jacket 1–2" into "jacket 1–" and 2.
func cutNumber(s string) (base string, n int, ok bool) {
	i := strings.LastIndexAny(s, " –")
	if i < 0 {
		return s, 0, false
	}
	tail := strings.TrimPrefix(s[i:], "–")
	n, err := strconv.Atoi(strings.TrimSpace(tail))
	return strings.TrimSuffix(s[:len(s)-len(tail)], " "), n, err == nil
}

// limitSteps are the notches: one for every different limit, with what it belongs to when there are several.
func (l *ladder) limitSteps() []step {
	type notch struct {
		names         []string
		over, governs bool
	}
	found := map[float64]*notch{}
	var temps []float64
	for _, r := range l.s.Readings {
		if !r.LimitC.OK || !finite(r.LimitC.V) {
			continue
		}
		if found[r.LimitC.V] == nil {
			found[r.LimitC.V] = &notch{}
			temps = append(temps, r.LimitC.V)
		}
		n := found[r.LimitC.V]
		n.names, n.over, n.governs = append(n.names, readingName(r, l.s)), n.over || r.Over(), n.governs || r.Governs
	}
	var out []step
	for _, t := range temps {
		n := found[t]
		if l.sc.at(t) < -0.0001 || l.sc.at(t) > 1.0001 && !n.governs {
			continue // beyond the scale: nothing on it is near that limit
		}
		short := "limit " + wholeOrHalf(t)
		if l.sc.at(t) > 1.0001 {
			short += " ↑"
		}
		name := short
		if len(temps) > 1 && len(n.names) == 1 {
			name += " · " + n.names[0]
		} else if len(temps) > 1 {
			name += fmt.Sprintf(" · %d parts", len(n.names))
		}
		s := step{name: name, short: short, temp: t, low: t, high: t, limit: true, color: l.pal.Ink}
		if n.over {
			s.color = l.pal.Over
		}
		out = append(out, s)
	}
	return out
}

// wholeOrHalf writes an axis number.
func wholeOrHalf(t float64) string { return strings.TrimSuffix(degrees(t), "°") }
