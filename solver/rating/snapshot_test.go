package rating_test

import (
	"strings"
	"testing"

	"packrise/assets"
	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestSnapshot: a design saved with the rows that it used reads back, gives the same numbers and keeps its own rows when they differ from the
// catalogue's, saying so.
func TestSnapshot(t *testing.T) {
	data, err := assets.Designs.ReadFile("designs/nine-in-emt.yaml")
	if err != nil {
		t.Fatal(err)
	}
	cat := catalog.Load()
	d, _ := section.Read(data)
	kept := rating.Snapshot(d, cat)
	if len(kept.StockUsed) < 5 || len(d.StockUsed) != 0 {
		t.Fatalf("%d rows kept, %d in the original", len(kept.StockUsed), len(d.StockUsed))
	}
	out, err := section.Write(kept)
	if err != nil {
		t.Fatal(err)
	}
	again := parse(t, string(out))
	a, b := solve(t, d, rating.Options{}), solve(t, again, rating.Options{})
	for i := range a.Conductors {
		if a.Conductors[i].TempC != b.Conductors[i].TempC {
			t.Errorf("%s: %v, from the saved rows %v", a.Conductors[i].ID, a.Conductors[i].TempC, b.Conductors[i].TempC)
		}
	}
	if second, err := section.Write(rating.Snapshot(again, cat)); err != nil || string(second) != string(out) {
		t.Errorf("a second snapshot differs (%v):\n%s\nfrom\n%s", err, second, out)
	}
	// another edition of the row: a hotter limit for the wire type
	old := parse(t, strings.ReplaceAll(string(out), "dry_c: 90", "dry_c: 80"))
	r := solve(t, old, rating.Options{})
	if r.Conductors[0].LimitC.V != 80 || !strings.Contains(strings.Join(r.Notes, "; "), "has changed since this design was saved") {
		t.Errorf("limit %v, notes %q", r.Conductors[0].LimitC, r.Notes)
	}
}
