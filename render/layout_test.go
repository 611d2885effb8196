package render

import (
	"math"
	"math/rand/v2"
	"sort"
	"strings"
	"testing"
	"unicode/utf8"
)

func TestSpread(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 3))
	for range 2000 {
		n := 1 + rng.IntN(14)
		want, height := make([]float64, n), make([]float64, n)
		total := 0.0
		for i := range want {
			want[i], height[i] = 400*rng.Float64(), 5+20*rng.Float64()
			total += height[i]
		}
		sort.Float64s(want)
		got := spread(want, height, 0, 400)
		if total > 400 {
			continue
		}
		for i := range got {
			if got[i] < height[i]/2-1e-9 || got[i] > 400-height[i]/2+1e-9 {
				t.Fatalf("label %d at %g of %v", i, got[i], height)
			}
			if i > 0 && got[i]-got[i-1] < (height[i]+height[i-1])/2-1e-9 {
				t.Fatalf("labels %d and %d overlap: %v", i-1, i, got)
			}
		}
		cost := func(y []float64) float64 {
			sum := 0.0
			for i := range y {
				sum += (y[i] - want[i]) * (y[i] - want[i])
			}
			return sum
		}
		// no other arrangement that fits may be better: try small moves of runs of labels
		for range 30 {
			a := rng.IntN(n)
			b, d := a+rng.IntN(n-a), rng.NormFloat64()
			moved := append([]float64(nil), got...)
			for i := a; i <= b; i++ {
				moved[i] += d
			}
			if fits(moved, height, 0, 400) && cost(moved) < cost(got)-1e-6 {
				t.Fatalf("moving %d … %d by %g is better (%g < %g)", a, b, d, cost(moved), cost(got))
			}
		}
	}
	if got := spread([]float64{10, 11, 12}, []float64{20, 20, 20}, 0, 30); got[0] < 9 || got[2] > 21 || !sort.Float64sAreSorted(got) {
		t.Errorf("too many labels: %v", got)
	}
	if len(spread(nil, nil, 0, 1)) != 0 {
		t.Error("nothing to spread")
	}
}

func fits(y, height []float64, lo, hi float64) bool {
	for i := range y {
		if y[i] < lo+height[i]/2 || y[i] > hi-height[i]/2 || i > 0 && y[i]-y[i-1] < (height[i]+height[i-1])/2 {
			return false
		}
	}
	return true
}

func mono(s string) float64 { return float64(utf8.RuneCountInString(s)) }

func TestWrap(t *testing.T) {
	text := "Radiation and convection between the parts left out: too hot"
	for width := 1.0; width < 80; width += 3 {
		lines := Wrap(text, width, 0, mono)
		for _, l := range lines {
			if mono(l) > width {
				t.Errorf("width %g: %q", width, l)
			}
		}
		if got := strings.ReplaceAll(strings.Join(lines, ""), " ", ""); got != strings.ReplaceAll(text, " ", "") {
			t.Errorf("width %g: lost something: %q", width, lines)
		}
	}
	if got := Wrap("one two three four", 9, 2, mono); len(got) != 2 || got[0] != "one two" || got[1] != "three fo…" {
		t.Errorf("two lines at most: %q", got)
	}
	if got := Wrap("a\nb", 9, 0, mono); len(got) != 2 {
		t.Errorf("a line break: %q", got)
	}
	if got := Wrap("", 9, 0, mono); len(got) != 1 || got[0] != "" {
		t.Errorf("nothing: %q", got)
	}
}

func TestElide(t *testing.T) {
	for _, c := range []struct {
		width float64
		want  string
	}{{20, "Übertemperatur"}, {14, "Übertemperatur"}, {6, "Übert…"}, {1, "…"}, {0.5, ""}, {-3, ""}} {
		if got := Elide("Übertemperatur", c.width, mono); got != c.want {
			t.Errorf("%g: %q, want %q", c.width, got, c.want)
		}
	}
	if got := Elide("one, two", 5, mono); got != "one…" {
		t.Errorf("a comma before the dots: %q", got)
	}
}

// The hatching of a ring covers just the ring: its length times its distance is the area.
func TestHatchSpans(t *testing.T) {
	d, in := disc{50, 60, 30}, disc{50, 60, 12}
	const s = math.Sqrt2 / 2
	const gap = 0.5
	length := 0.0
	for n := -400; n < 400; n++ {
		x, y := float64(n)*gap/2, float64(n)*gap/2
		for _, c := range minus(chord(d, x, y, s, -s), chord(in, x, y, s, -s)) {
			length += c.b - c.a
			for _, u := range []float64{c.a + 1e-6, (c.a + c.b) / 2, c.b - 1e-6} {
				if r := math.Hypot(x+u*s-50, y-u*s-60); r > 30 || r < 12 {
					t.Fatalf("a line at radius %g", r)
				}
			}
		}
	}
	if got, want := length*gap*s, math.Pi*(900-144); math.Abs(got-want) > 0.01*want {
		t.Errorf("hatched area %.0f, want %.0f", got, want)
	}
	if got := across(box{0, 0, 10, 10}, 5, 5, s, -s); len(got) != 1 || math.Abs(got[0].b-got[0].a-10*math.Sqrt2) > 1e-9 {
		t.Errorf("the diagonal of a square: %v", got)
	}
	if got := across(box{0, 0, 10, 10}, 30, 30, s, -s); got != nil {
		t.Errorf("a line past a square: %v", got)
	}
}

// Coverage of a row of pixels adds up to the area of any outline.
func TestCoverRow(t *testing.T) {
	for name, o := range map[string]outline{
		"disc": {round: &disc{20.4, 21.7, 15}}, "rect": {rect: &box{3.25, 4.5, 30.75, 22.25}}, "apart": {parts: []disc{{12, 12, 8}, {31, 28, 6.5}}},
	} {
		sum := 0.0
		row := make([]uint8, 44)
		for y := -2; y < 44; y++ {
			o.coverRow(row, -2, y)
			for _, c := range row {
				sum += float64(c) / 255
			}
		}
		want := math.Pi * 225
		switch name {
		case "rect":
			want = 27.5 * 17.75
		case "apart":
			want = math.Pi * (64 + 42.25)
		}
		if math.Abs(sum-want) > 0.004*want {
			t.Errorf("%s covers %.2f, want %.2f", name, sum, want)
		}
	}
}
