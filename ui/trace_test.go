package ui

import (
	"bytes"
	"strings"
	"testing"

	"fyne.io/fyne/v2/test"
)

func TestTraceTellsScripts(t *testing.T) {
	var out bytes.Buffer
	l := newLoop()
	w := NewWindow(test.NewTempApp(t), Options{Catalog: testCatalog(), Document: testDesign(), Trace: &out, Rooms: l.rooms(Rooms{})})
	t.Cleanup(w.Close)
	w.win.Resize(usualSize)
	l.solved(t, w.desk)
	l.until(t, "the places", func() bool { return strings.Contains(out.String(), "placed 4 parts") })
	for _, want := range []string{"title Three and a filler – Packrise\n", "part L1 at ", "solved rev 1: "} {
		if !strings.Contains(out.String(), want) {
			t.Errorf("%q lacks %q", out.String(), want)
		}
	}
}
