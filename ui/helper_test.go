package ui

import (
	"context"
	"os"
	"slices"
	"sync"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

func TestMain(m *testing.M) {
	os.Setenv("LANG", "en_US.UTF-8")
	test.NewApp().Settings().SetTheme(NewTheme(LookLight))
	os.Exit(m.Run())
}

// loop stands for the window's goroutine in tests: what hops to it waits until the test lets it run, so that nothing is touched from two goroutines.
type loop struct {
	mu     sync.Mutex
	waits  []func()
	timers []*timer
	came   chan struct{}
}

// timer runs when the test lets time pass.
type timer struct {
	in      time.Duration
	f       func()
	stopped bool
}

func newLoop() *loop { return &loop{came: make(chan struct{}, 1)} }

func (l *loop) hop(f func()) {
	l.mu.Lock()
	l.waits = append(l.waits, f)
	l.mu.Unlock()
	select {
	case l.came <- struct{}{}:
	default:
	}
}

func (l *loop) after(d time.Duration, f func()) func() {
	l.mu.Lock()
	defer l.mu.Unlock()
	t := &timer{in: d, f: f}
	l.timers = append(l.timers, t)
	return func() {
		l.mu.Lock()
		defer l.mu.Unlock()
		t.stopped = true
	}
}

// pass lets time pass and runs what is due.
func (l *loop) pass(d time.Duration) {
	l.mu.Lock()
	var due []*timer
	l.timers = slices.DeleteFunc(l.timers, func(t *timer) bool {
		t.in -= d
		if t.in <= 0 && !t.stopped {
			due = append(due, t)
		}
		return t.in <= 0 || t.stopped
	})
	l.mu.Unlock()
	for _, t := range due {
		t.f()
	}
	l.run()
}

// run runs what waits, and what that brings.
func (l *loop) run() {
	for {
		l.mu.Lock()
		if len(l.waits) == 0 {
			l.mu.Unlock()
			return
		}
		f := l.waits[0]
		l.waits = l.waits[1:]
		l.mu.Unlock()
		f()
	}
}

// until runs what comes until the condition holds.
func (l *loop) until(t *testing.T, what string, ok func() bool) {
	t.Helper()
	end := time.After(20 * time.Second)
	for {
		l.run()
		if ok() {
			return
		}
		select {
		case <-l.came:
		case <-end:
			t.Fatalf("waited in vain for %s", what)
		}
	}
}

// rooms are the program's own with the test's loop.
func (l *loop) rooms(r Rooms) Rooms {
	r.Hop, r.After = l.hop, l.after
	if r.Rate == nil {
		r.Rate = noRatings
	}
	return r
}

// noRatings never rates: most tests are about something else, and ratings take seconds.
func noRatings(ctx context.Context, _ *section.Document, _ *rating.Result, _ study.Options) (*study.Ratings, error) {
	<-ctx.Done()
	return nil, ctx.Err()
}

// testCatalog is read once.
var testCatalog = sync.OnceValue(catalog.Load)

// testDesk is a desk on d with the program's own engine, which is closed when the test ends. Wait for answers with l.until(t, "…", …).
func testDesk(t *testing.T, d *section.Document) (*Desk, *loop) {
	t.Helper()
	return testDeskWith(t, d, Rooms{})
}

func testDeskWith(t *testing.T, d *section.Document, r Rooms) (*Desk, *loop) {
	t.Helper()
	fyne.CurrentApp().Settings().SetTheme(NewTheme(LookLight)) // other tests start apps of their own
	l := newLoop()
	k := NewDeskWith(testCatalog(), d, l.rooms(r))
	t.Cleanup(k.Close)
	return k, l
}

// solved runs the loop until the desk has its standard answer and the picture of it, if there is a canvas, is in sight.
func (l *loop) solved(t *testing.T, k *Desk) {
	t.Helper()
	l.until(t, "an answer", func() bool { return !k.Solving() && !k.Draft() && k.answer.unsaid == 0 })
}

// testDesign is a jacket of 20 mm with three cores of 4 mm at 16 A and one filler.
func testDesign() *section.Document {
	core := func(id string, x, y float64) section.Part {
		return section.Part{
			ID: id, Kind: section.Core,
			Conductor: &section.Conductor{DiameterMM: section.Some(2.0)},
			Layers:    []section.Layer{{Material: "pvc", ThicknessMM: 1}},
			At:        section.Some(section.Point{X: x, Y: y}), LimitC: section.Some(70.0),
		}
	}
	return &section.Document{
		Title:        "Three and a filler",
		Surroundings: section.Surroundings{Kind: section.FixedFilm, AmbientC: section.Some(30.0), FilmWM2K: section.Some(9.0)},
		Holder: section.Holder{
			Kind: section.Jacket, InsideMM: section.Some(20.0), Fill: "pvc",
			Layers: []section.Layer{{Material: "pvc", ThicknessMM: 1.5}},
		},
		Parts: []section.Part{
			core("L1", -4, 0), core("L2", 4, 0), core("L3", 0, 5),
			{ID: "F1", Kind: section.Rod, Diameter: section.Some(3.0), Material: "pvc", At: section.Some(section.Point{X: 0, Y: -5})},
		},
		Loads: []section.Load{{ID: "motor", Conductors: []string{"L1", "L2", "L3"}, CurrentA: section.Some(16.0)}},
	}
}

// fakeSolver answers when the test says so.
type fakeSolver struct {
	started chan *section.Document
	finish  chan struct{}
	seen    []rating.Options
}

func newFakeSolver() *fakeSolver {
	return &fakeSolver{started: make(chan *section.Document, 100), finish: make(chan struct{})}
}

// solve waits for finish, or for the end of the context, which shows in the status.
func (f *fakeSolver) solve(ctx context.Context, d *section.Document, o rating.Options) (*rating.Result, []section.Problem, error) {
	f.seen = append(f.seen, o)
	f.started <- d
	select {
	case <-f.finish:
		return &rating.Result{Title: d.Title, Shapes: fakeShapes(d)}, nil, nil
	case <-ctx.Done():
		return &rating.Result{Title: d.Title, Status: heat.Cancelled}, nil, nil
	}
}

// fakeShapes draws every part as a disc of 4 mm, rods by their diameter.
func fakeShapes(d *section.Document) []section.Shape {
	r := d.Holder.InsideMM.V / 2
	shapes := []section.Shape{{Kind: d.Holder.Kind, Rings: []section.Ring{{Material: "pvc", R0: r, R1: r + 1.5}}}}
	for _, p := range d.Parts {
		radius := 2.0
		if p.Diameter.OK {
			radius = p.Diameter.V / 2
		}
		shapes = append(shapes, section.Shape{ID: p.ID, Kind: p.Kind, At: p.At.V, Unset: !p.At.OK, Rings: []section.Ring{{R1: radius}}})
	}
	return shapes
}

func fakeOutline(d *section.Document, _ *catalog.Catalog) ([]section.Shape, []section.Problem) {
	return fakeShapes(d), nil
}

// heard collects what a desk tells.
type heard struct{ all []Changed }

func listenTo(k *Desk) *heard {
	h := &heard{}
	k.Listen(func(c Changed) { h.all = append(h.all, c) })
	return h
}

// told returns what came since the last call.
func (h *heard) told() Changed {
	var sum Changed
	for _, c := range h.all {
		sum |= c
	}
	h.all = nil
	return sum
}

func moveTo(id string, x, y float64, gesture int) section.Edit {
	return section.Edit{
		Name: "move " + id, Object: id, Gesture: gesture,
		Do: func(d *section.Document) *section.Document { return section.Move(d, id, section.Point{X: x, Y: y}) },
	}
}

// at returns where a part stands in the document.
func at(t *testing.T, k *Desk, id string) section.Point {
	t.Helper()
	p := section.Find(k.Document(), id)
	if p == nil || !p.At.OK {
		t.Fatalf("%s has no place", id)
	}
	return p.At.V
}
