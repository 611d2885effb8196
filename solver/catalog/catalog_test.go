package catalog

import "testing"

func TestEveryRowGoesRound(t *testing.T) {
	c := Load()
	for _, group := range Groups {
		for _, id := range c.order(group) {
			text, ok := c.Row(group, id)
			if !ok {
				t.Fatalf("%s %s has no row", group, id)
			}
			if _, changed, err := c.With(group, id, text); err != nil || changed {
				t.Errorf("%s %s: changed %t, %v", group, id, changed, err)
			}
		}
	}
}
