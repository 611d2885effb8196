package outline

import "testing"

// Older processors do the same.
func TestNarrowLanes(t *testing.T) {
	defer func(b bool) { wider = b }(wider)
	wider = false
	TestLanes(t)
}
