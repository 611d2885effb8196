package ui

import (
	"context"
	"math"
	"strings"
	"sync"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// ratedDesign is benchDesign with nothing unknown, a device and a stated terminal.
var ratedDesign = strings.Replace(benchDesign, "loads:\n", "loads:\n  - {id: lamp, conductors: [N1], current_a: 2, protection: {kind: breaker, rating_a: 10}, terminals: {rated_a: 24}}\n", 1)

// newRatedBench opens a desk on a design with the program's own answers and ratings, all there.
func newRatedBench(t testing.TB, design string) *bench {
	t.Helper()
	d, problems := section.Read([]byte(design))
	if d == nil {
		t.Fatalf("the test's design is refused: %v", problems)
	}
	b := &bench{t: t, hops: make(chan func(), 1000)}
	b.open(d, Rooms{Rate: rateOnce})
	b.rated()
	return b
}

var (
	rateStudy = sync.OnceValue(func() *study.Study { return study.New(benchCatalog()) })
	rateMu    sync.Mutex
	rateKnown = map[string]*study.Ratings{}
)

// rateOnce is the program's own rating, made once for designs that are written alike.
func rateOnce(ctx context.Context, d *section.Document, base *rating.Result, o study.Options) (*study.Ratings, error) {
	rateMu.Lock()
	defer rateMu.Unlock()
	key, err := section.Write(d)
	if err != nil {
		return nil, err
	}
	if r := rateKnown[string(key)]; r != nil {
		return r, nil
	}
	r, err := rateStudy().Rate(ctx, d, base, o)
	if err == nil {
		rateKnown[string(key)] = r
	}
	return r, err
}

// rated brings the ratings to the window, to the last stage.
func (b *bench) rated() {
	b.wait()
	for b.Rating() {
		(<-b.hops)()
	}
}

func TestWireListShowsRatings(t *testing.T) {
	b := newRatedBench(t, ratedDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1000, 300)
	r := b.Ratings()
	row := &l.rows[l.row("L1")]
	if want := strings.TrimSuffix(study.Amps(36*r.All.Rely.Factor), " A"); wireRely.text(row) != want {
		t.Errorf("to rely on %q, want %q", wireRely.text(row), want)
	}
	if want := strings.TrimSuffix(study.Amps(36*r.All.Nominal.Factor), " A"); wireNominal.text(row) != want {
		t.Errorf("nominal %q, want %q", wireNominal.text(row), want)
	}
	low, high, _ := r.Band(0)
	if row.band != bandWords(low, high) || !(low < row.temp && row.temp < high) {
		t.Errorf("band %q of %g to %g", row.band, low, high)
	}
	for _, id := range []string{"F1", "conduit"} { // what carries nothing has a band and no amperes
		if row := &l.rows[l.row(id)]; row.band == "" || wireRely.text(row) != "" || wireLowest.text(row) != "" {
			t.Errorf("%s: band %q, to rely on %q, lowest %q", id, row.band, wireRely.text(row), wireLowest.text(row))
		}
	}
	for _, c := range []wireColumn{wireBand, wireRely, wireNominal, wireLowest} {
		if !l.layout.shown[c] {
			t.Errorf("the column %s is not shown", wireHeads[c].name)
		}
	}
}

// The lowest current says on hover what it was compared with.
func TestWireListTellsWhyTheLowest(t *testing.T) {
	b := newRatedBench(t, ratedDesign)
	l := NewWireList(b.Desk)
	c := b.show(l, 1000, 300)
	i := 0
	for i < len(b.Ratings().Lowest) && b.Ratings().Lowest[i].ID != "N1" {
		i++
	}
	low := b.Ratings().Lowest[i]
	l.body.MouseMoved(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: cellAt(l, "N1", wireLowest)}})
	c.Capture()
	got := l.rows[l.row("N1")].because
	for _, want := range []string{"Lowest: " + study.Amps(low.A), " computed", "24 A by its terminal"} {
		if !strings.Contains(got, want) {
			t.Errorf("%q lacks %q", got, want)
		}
	}
	if math.IsNaN(low.A) || low.A > low.Computed || low.A > 24 {
		t.Errorf("lowest %g, computed %g", low.A, low.Computed)
	}
}

// Old currents stay, greyed, while they are worked out anew; none are shown of a design that can't be rated.
func TestWireListGreysOldRatings(t *testing.T) {
	b := newRatedBench(t, ratedDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1000, 300)
	was := wireRely.text(&l.rows[l.row("L1")])
	if err := enter(b, inputOf(b, "limit", "F1"), "80"); err != nil {
		t.Fatal(err)
	}
	if row := &l.rows[l.row("L1")]; !l.agedRatings || wireRely.text(row) != was {
		t.Errorf("greyed %v, to rely on %q after %q", l.agedRatings, wireRely.text(row), was)
	}
	b.rated()
	if l.agedRatings {
		t.Error("new currents are greyed")
	}
	if err := enter(b, inputOf(b, "current", "L10"), "unknown"); err != nil {
		t.Fatal(err)
	}
	b.rated()
	if row := &l.rows[l.row("L1")]; wireRely.text(row) != "" || l.layout.shown[wireRely] {
		t.Errorf("with an unknown current L1 may carry %q", wireRely.text(row))
	}
}

func TestWireListIsCloseByItsBand(t *testing.T) {
	r := wireRow{solved: true, temp: 88, limit: section.Some(90.0), wireRated: unrated}
	if r.close() {
		t.Error("close without a band")
	}
	r.upper = 91
	if !r.close() {
		t.Error("a band over the limit is not close")
	}
	r.temp = 90.5
	if r.close() || !r.over() {
		t.Error("what is over is called close")
	}
}

// At the narrowest window all columns fit in sight.
func TestWireListFitsNarrowWindows(t *testing.T) {
	b := newRatedBench(t, ratedDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1024, 200)
	if l.layout.width > 1024 {
		t.Errorf("the columns take %g of 1024", l.layout.width)
	}
}
