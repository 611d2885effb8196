package quantity

import "testing"

// TestSpellingDistance: the textbook pair, a swap, and the ends.
func TestSpellingDistance(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want int
	}{{"kitten", "sitting", 3}, {"thhn", "thnh", 1}, {"pvc", "pvc", 0}, {"", "pvc", 3}, {"ambiant_c", "ambient_c", 1}} {
		if got := SpellingDistance(c.a, c.b); got != c.want {
			t.Errorf("%q, %q: %d, want %d", c.a, c.b, got, c.want)
		}
	}
}
