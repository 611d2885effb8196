package catalog

import (
	"slices"
	"testing"

	"pgregory.net/rapid"

	"packrise/solver/quantity"
)

func TestNearest(t *testing.T) {
	c := Load()
	for _, k := range []struct{ group, id, want string }{
		{"material", "pcv", "pvc"},
		{"material", "PVC", "pvc"},
		{"material", "polypropilen", "polypropylene"},
		{"material", "galvanized steel", "galvanised-steel"},
		{"material", "wool", "mineral-wool"},
		{"type", "thnn", "thwn"},
		{"type", "h07vk", "h07v-k"},
		{"wire", "thhn-13", "thhn-3"},
		{"holder", "emt1", "emt-1"},
		{"holder", "emt 1 1/4", "emt-1-1/4"},
		{"metal", "aluminum", "aluminium"},
	} {
		near := c.Nearest(k.group, k.id, 4)
		if !slices.Contains(near, k.want) {
			t.Errorf("nearest to %s %q: %v, want %s among them", k.group, k.id, near, k.want)
		}
	}
	if near := c.Nearest("material", "zzzzzzzz", 3); len(near) != 0 {
		t.Errorf("zzzzzzzz is like %v", near)
	}
	if near := c.Nearest("nonsense", "pvc", 3); len(near) != 0 {
		t.Error(near)
	}
	if near := c.Nearest("material", "pvc", 0); len(near) != 0 {
		t.Error(near)
	}
	if near := c.Nearest("type", "thhn", 1); !slices.Equal(near, []string{"thhn"}) {
		t.Error(near)
	}
}

// distance is a metric but for the triangle (optimal string alignment): zero only for equals, the same both ways, one for each slip of the pen.
func TestDistance(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want int
	}{{"", "", 0}, {"", "abc", 3}, {"kitten", "sitting", 3}, {"pvc", "pcv", 1}, {"ca", "abc", 3}, {"ß", "s", 1}} {
		if got := quantity.SpellingDistance(c.a, c.b); got != c.want {
			t.Errorf("quantity.SpellingDistance(%q, %q) = %d, want %d", c.a, c.b, got, c.want)
		}
	}
	rapid.Check(t, func(t *rapid.T) {
		a, b := rapid.StringMatching(`[a-c]{0,6}`).Draw(t, "a"), rapid.StringMatching(`[a-c]{0,6}`).Draw(t, "b")
		d := quantity.SpellingDistance(a, b)
		if d != quantity.SpellingDistance(b, a) || (d == 0) != (a == b) || d > max(len(a), len(b)) || d < max(len(a)-len(b), len(b)-len(a)) {
			t.Fatalf("%q %q %d", a, b, d)
		}
	})
}
