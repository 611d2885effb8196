package ui

import (
	"testing"
)

func TestEveryDemoSolves(t *testing.T) {
	if testing.Short() {
		t.Skip("long under the race detector")
	}
	all := demoDesigns(demoFiles())
	if len(all) < 3 {
		t.Fatalf("%d demo designs, want three at least", len(all))
	}
	w, l := testWindow(t, testDesign(), usualSize)
	for _, d := range all {
		w.openDemo(d)
		l.solved(t, w.desk)
		if r, fresh := w.desk.Result(); !fresh || r.Governing == nil {
			s, _, _ := w.desk.Sentence()
			t.Errorf("%s: %s", d.title, s)
		}
	}
	if d, err := FirstDesign(); err != nil || d == nil {
		t.Error(err)
	}
}
