package locale

import "testing"

func TestMissing(t *testing.T) {
	for _, c := range []struct {
		all, lang, want string
	}{
		{"", "", "LANG"},
		{"", "C", "LANG"},
		{"", "C.UTF-8", "LANG"},
		{"POSIX", "de_DE.UTF-8", "LC_ALL"},
		{"", "de_DE.UTF-8", ""},
		{"fr_FR.UTF-8", "C", ""},
	} {
		got, _ := missing(func(k string) string {
			if k == "LC_ALL" {
				return c.all
			}
			return c.lang
		})
		if got != c.want {
			t.Errorf("LC_ALL=%q LANG=%q: %q, want %q", c.all, c.lang, got, c.want)
		}
	}
}
