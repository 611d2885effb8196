package rules

import "testing"

func TestShipped(t *testing.T) {
	if ids := Shipped().IDs(); len(ids) < 11 {
		t.Errorf("only %v", ids)
	}
}
