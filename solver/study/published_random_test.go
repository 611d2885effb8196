package study

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// dice draws random small sections.
type dice struct{ *rand.Rand }

func (d dice) in(a, b float64) float64 { return a + (b-a)*d.Float64() }

func (d dice) of(words ...string) string { return words[d.IntN(len(words))] }

// surroundings of any kind.
func (d dice) surroundings() string {
	s := fmt.Sprintf("ambient_c: %.1f", d.in(-20, 55))
	air := fmt.Sprintf(", altitude_m: %.0f, sun_w_m2: %.0f", d.in(0, 8000)*float64(d.IntN(2)), d.in(0, 900)*float64(d.IntN(2)))
	switch d.IntN(7) {
	case 0:
		return "{kind: moving-air, " + s + air + fmt.Sprintf(", air_speed_m_s: %.2f}", d.in(0.1, 5))
	case 1:
		return "{kind: buried, " + s + fmt.Sprintf(", depth_m: %.2f, soil_w_mk: %.2f}", d.in(0.4, 2), d.in(0.3, 2))
	case 2:
		return "{kind: fixed-film, " + s + fmt.Sprintf(", film_w_m2k: %.1f}", d.in(2, 50))
	case 3:
		return "{kind: vacuum, " + s + "}"
	}
	return "{kind: still-air, " + s + air + "}"
}

// inWireway is what fills a wireway: air, whose radiation takes the longest, in long runs alone.
func inWireway() string {
	if soaking {
		return "air"
	}
	return "pvc"
}

// most wires of a section.
func most() int {
	if soaking {
		return 6
	}
	return 4
}

// section draws a few wires of random sizes, limits and currents in a holder of any kind. Some limits lie below the ambient, some loads are zero.
func (d dice) section(t testing.TB) *section.Document {
	around := d.surroundings()
	n := 1 + d.IntN(most())
	size, fill := d.in(25, 40), d.of("air", "pvc", "air")
	holder := map[int]string{
		0: "{kind: open-bundle}",
		1: fmt.Sprintf("{kind: conduit, inside_mm: %.1f, layers: [{material: %s, thickness_mm: 1.5}]}", size, d.of("pvc", "galvanised-steel")),
		2: fmt.Sprintf("{kind: jacket, inside_mm: %.1f, fill: %s, layers: [{material: rubber, thickness_mm: 2}]}", size, fill),
		3: fmt.Sprintf("{kind: wireway, width_mm: %.1f, height_mm: %.1f, fill: %s, layers: [{material: painted-steel, thickness_mm: 1.5}]}", 1.5*size, size, inWireway()),
		4: "{kind: none}",
	}[d.IntN(5)]
	if strings.Contains(holder, "none") {
		n = 1
	}
	var b strings.Builder
	fmt.Fprintf(&b, "packrise: 1\nsurroundings: %s\nholder: %s\nparts:\n", around, holder)
	for i := range n {
		at := ""
		if n == 1 {
			at = ", at_mm: [0, 0]"
			if strings.Contains(holder, "wireway") {
				at = ""
			}
		}
		limit := d.in(60, 90)
		if d.IntN(15) == 0 {
			limit = d.in(-10, 40)
		}
		fmt.Fprintf(&b, "  - {id: W%d, kind: core, conductor: {size: %s, class: flexible}, layers: [{material: %s, thickness_mm: %.2f}], limit_c: %.1f%s%s}\n",
			i+1, d.of("0.75 mm2", "1.5 mm2", "2.5 mm2", "6 mm2", "10 mm2"), d.of("xlpe", "epr"), d.in(0.5, 1.2), limit, d.of("", "", "", ", role: spare"), at)
	}
	b.WriteString("loads:\n")
	for i := 0; i < n; {
		k := min(n-i, 1+d.IntN(3))
		a := d.in(0, 40) * float64(min(1, d.IntN(5)))
		if d.IntN(12) == 0 {
			a *= 20 // more than anything here bears
		}
		fmt.Fprintf(&b, "  - {id: l%d, conductors: [%s], current_a: %.3f, frequency_hz: %s}\n", i+1, numbered("W", i+1, i+k), a, d.of("0", "50", "60", "400"))
		i += k
	}
	doc := read(t, b.String())
	if doc.Parts[0].At.OK {
		return doc
	}
	put := rating.LayUp
	if k := doc.Holder.Kind; k == section.Conduit || k == section.Wireway {
		put = rating.Settle
	}
	at, err := put(doc, cat)
	if err != nil {
		t.Fatalf("%v\n%s", err, b.String())
	}
	return moved(doc, at)
}

// TestRandomRatings: a valid section with known currents is always rated; what can be relied on is no more than nominal; at the nominal currents nothing
// is over and something is within 0.1 K of its limit, unless nothing steady exists above or nothing is ever reached; at what is relied on P95 is
// inside every limit and the margin is kept.
func TestRandomRatings(t *testing.T) {
	n := 30
	switch {
	case testing.Short():
		n = 6
	case soaking:
		n = 500
	}
	kinds := map[string]int{}
	for seed := range n {
		d := dice{rand.New(rand.NewPCG(uint64(seed), 41))}.section(t)
		text := func() string { b, _ := section.Write(d); return string(b) }
		s := New(cat)
		r, err := ratedSeed(t, s, d)
		if err != nil {
			t.Errorf("seed %d: %v\n%s", seed, err, text())
			continue
		}
		if problem := holds(t, s, d, r, kinds); problem != "" {
			t.Errorf("seed %d: %s\n%s", seed, problem, text())
		}
	}
	t.Log(kinds)
}

// ratedSeed rates in full in long runs and where there are few wires, else what decides the currents of all together.
func ratedSeed(t *testing.T, s *Study, d *section.Document) (*Ratings, error) {
	if soaking || len(d.Parts) < 3 {
		return s.Rate(context.Background(), d, nil, Options{})
	}
	return rated(t, d, true), nil
}

func holds(t *testing.T, s *Study, d *section.Document, r *Ratings, kinds map[string]int) string {
	if !(r.All.Rely.Factor <= r.All.Nominal.Factor) {
		return fmt.Sprintf("%.5f to rely on, %.5f nominal", r.All.Rely.Factor, r.All.Nominal.Factor)
	}
	for _, l := range r.Loads {
		if !(l.Rely.Factor <= l.Nominal.Factor*(1+1e-9)) {
			return fmt.Sprintf("%s: %.5f to rely on, %.5f nominal", l.ID, l.Rely.Factor, l.Nominal.Factor)
		}
	}
	for _, l := range r.Lowest {
		for rule, a := range map[string]float64{Computed: l.Computed, "terminal": l.Terminal} {
			if l.Because == rule && l.A != a || rule == Computed && l.A > a {
				return fmt.Sprintf("%s: lowest %.4f A because of %s; %s %.4f A", l.ID, l.A, l.Because, rule, a)
			}
		}
	}
	n := r.All.Nominal
	switch {
	case n.Unbounded:
		kinds["unbounded"]++
		return ""
	case n.Hopeless:
		kinds["hopeless"]++
		if at, err := s.solve(context.Background(), scaleAll(d, 0), Options{}); err != nil || !at.Over() && at.Status == heat.Converged {
			return fmt.Sprintf("said to be over with nothing on: %v", err)
		}
		return ""
	}
	at, err := s.solve(context.Background(), scaleAll(d, n.Factor), Options{})
	if err != nil || at.Status != heat.Converged {
		return fmt.Sprintf("at nominal: %v %v", err, at)
	}
	_, k, _ := closest(things(at), nominal)
	switch {
	case k < 0:
		return fmt.Sprintf("%.4f K over at nominal", -k)
	case n.Runaway:
		kinds["runaway"]++
		if past, err := s.solve(context.Background(), scaleAll(d, n.Factor*1.01), Options{}); err == nil && past.Status == heat.Converged {
			if _, k, _ := closest(things(past), nominal); k >= 0 {
				return "1 % above a ceiling said to be a runaway is steady and within"
			}
		}
	case k > closeK+0.01: // a second solution at standard accuracy differs a little
		return fmt.Sprintf("%.3f K left at nominal", k)
	default:
		kinds["limit"]++
	}
	return reliable(s, d, r)
}

// reliable holds P95 at what is relied on, found anew there.
func reliable(s *Study, d *section.Document, r *Ratings) string {
	f := r.All.Rely.Factor
	if f <= 0 || math.IsInf(f, 1) || len(d.Parts) > 2 && !soaking {
		return ""
	}
	there := scaleAll(d, f)
	at, err := s.solve(context.Background(), there, Options{})
	if err != nil {
		return err.Error()
	}
	b, err := s.Bands(context.Background(), there, at, Options{})
	if err != nil {
		return err.Error()
	}
	const found = 0.1 // K, bands are found anew within a twentieth of the current
	for i, x := range things(at) {
		if !x.limit.OK || math.IsNaN(x.tempC) {
			continue
		}
		if over := x.tempC + math.Max(b.Spreads[i].HighK, r.MarginK) - x.limit.V; over > found {
			return fmt.Sprintf("%s: %.2f °C, +%.2f K, margin %g K, limit %.1f °C at what is relied on: %.2f K over", x.id, x.tempC, b.Spreads[i].HighK, r.MarginK, x.limit.V, over)
		}
	}
	return ""
}
