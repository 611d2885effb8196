package harmonic

import "testing"

// Older processors do the same.
func TestNarrowKernels(t *testing.T) {
	defer func(b bool) { wider = b }(wider)
	wider = false
	TestKernels(t)
}
