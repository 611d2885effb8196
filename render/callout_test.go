package render

import (
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"strings"
	"testing"

	"packrise/solver/section"
)

// planned lays out the labels of a scene without drawing.
func planned(s Scene, w, h int, st Style) *sectionPainter {
	p := newSectionPainter(NewRecorder(float64(w), float64(h)), s, FitView(s.Shapes, w, h, st), ScaleOf(s), st)
	p.planScaleBar()
	p.planCallouts()
	return p
}

// crossable is how far (pixels at device scale 1) a leader may graze a part: less than half the outline's width.
const crossable = 0.5

// checkCallouts checks every label of a plan by its own measure: steps along the leaders, corners of the boxes.
func checkCallouts(t *testing.T, name string, p *sectionPainter) {
	t.Helper()
	for i, c := range p.called {
		id := strings.Fields(c.head)[0]
		for _, s := range p.shapes {
			if related(s.ID, id) || s.Depth > 0 && !related(s.ID[:strings.LastIndexByte(s.ID, '/')], id) {
				continue
			}
			d := p.disc(s)
			eachStep(c.path, 0.25, func(q section.Point) {
				if in := d.r - math.Hypot(q.X-d.x, q.Y-d.y); in > crossable*p.k {
					t.Fatalf("%s: the leader of %s runs %.2f px deep through %s", name, id, in, s.ID)
				}
			})
		}
		if !c.box.within(p.frame) {
			t.Errorf("%s: label %q %v leaves the picture %v", name, c.head, c.box, p.frame)
		}
		end := c.path[len(c.path)-1]
		eachStep([]section.Point{{X: c.box.x0, Y: c.box.y0}, {X: c.box.x1, Y: c.box.y0}, {X: c.box.x1, Y: c.box.y1}, {X: c.box.x0, Y: c.box.y1}, {X: c.box.x0, Y: c.box.y0}, end}, 1, func(q section.Point) {
			if q != (section.Point{X: c.box.x0, Y: c.box.y0}) && insideOutline(p.edge, q) {
				t.Errorf("%s: label %q reaches into the section at %v", name, c.head, q)
			}
		})
		for _, o := range p.called[:i] {
			if o.box.meets(c.box) {
				t.Errorf("%s: labels %q and %q overlap", name, o.head, c.head)
			}
			eachStep(o.path, 0.5, func(q section.Point) {
				if q.X > c.box.x0 && q.X < c.box.x1 && q.Y > c.box.y0 && q.Y < c.box.y1 {
					t.Errorf("%s: the leader of %q runs through label %q", name, o.head, c.head)
				}
			})
		}
	}
}

// related tells whether one id is the other or lies inside it.
func related(a, b string) bool {
	return a == b || strings.HasPrefix(a, b+"/") || strings.HasPrefix(b, a+"/")
}

// eachStep calls f along a line at steps of at most d.
func eachStep(line []section.Point, d float64, f func(section.Point)) {
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		n := int(math.Hypot(b.X-a.X, b.Y-a.Y)/d) + 1
		for j := 0; j <= n; j++ {
			u := float64(j) / float64(n)
			f(section.Point{X: a.X + u*(b.X-a.X), Y: a.Y + u*(b.Y-a.Y)})
		}
	}
}

func insideOutline(o outline, q section.Point) bool {
	if o.rect != nil {
		return q.X > o.rect.x0 && q.X < o.rect.x1 && q.Y > o.rect.y0 && q.Y < o.rect.y1
	}
	discs := o.parts
	if o.round != nil {
		discs = []disc{*o.round}
	}
	for _, d := range discs {
		if math.Hypot(q.X-d.x, q.Y-d.y) < d.r {
			return true
		}
	}
	return false
}

// shuffled gives a scene random temperatures, one limit and new marks, so that any part can govern.
func shuffled(s Scene, rng *rand.Rand) Scene {
	s.Readings = append([]section.Reading(nil), s.Readings...)
	limit := 70 + 30*rng.Float64()
	hot, n := -1, 0
	for i := range s.Readings {
		r := &s.Readings[i]
		r.Governs, r.Hottest = false, false
		if r.Kind != section.Core {
			continue
		}
		n++
		r.TempC, r.LimitC = 40+45*rng.Float64(), section.Some(limit)
		if hot < 0 || r.TempC > s.Readings[hot].TempC {
			hot = i
		}
	}
	if n > 0 {
		s.Readings[hot].Governs, s.Readings[hot].Hottest = true, true
	}
	s.Field = nil
	return s
}

func TestLeadersCrossNothing(t *testing.T) {
	rng := rand.New(rand.NewPCG(11, 4))
	rounds := 12
	if testing.Short() {
		rounds = 3
	}
	if os.Getenv("PACKRISE_SOAK") != "" {
		rounds = 300
	}
	placed, wantedAll, bent := 0, 0, 0
	for round := range rounds {
		for name, s := range map[string]Scene{
			"loose": looseScene(3+rng.IntN(25), rng.Uint64()), "hex": hexScene(2 + rng.IntN(60)), "wireway": wirewayScene(2 + rng.IntN(40)),
			"nested": nestedScene(), "bundle": bundleScene(2 + rng.IntN(30)),
		} {
			s = shuffled(s, rng)
			w, h := 420+rng.IntN(900), 320+rng.IntN(600)
			p := planned(s, w, h, Style{Scale: 1 + rng.Float64()*0.5})
			label := fmt.Sprintf("round %d %s %d×%d", round, name, w, h)
			checkCallouts(t, label, p)
			for _, q := range p.called {
				if len(q.path) > 2 {
					bent++
				}
			}
			wantedAll += len(p.wantCallouts())
			placed += len(p.called)
		}
	}
	t.Logf("%d of %d labels placed, %d on bent leaders", placed, wantedAll, bent)
	if float64(placed) < 0.9*float64(wantedAll) {
		t.Errorf("only %d of %d labels found a place", placed, wantedAll)
	}
}

// A part in the midst of discs that touch has no clear ray in general; the leader runs along the gaps.
func TestLeadersFromTheMiddle(t *testing.T) {
	for _, n := range []int{7, 19, 37, 61, 91} {
		s := hexScene(n)
		for i := range s.Readings {
			r := &s.Readings[i]
			r.Governs, r.Hottest = r.ID == "L1", false
		}
		p := planned(s, 900, 700, Style{})
		checkCallouts(t, fmt.Sprint("hex", n), p)
		if !p.outside["L1"] {
			t.Errorf("hex%d: no label for the part in the middle", n)
		}
	}
}

func TestGapsLeadOut(t *testing.T) {
	// three touching discs round a small one that touches all three: closed in, with three gates of no width
	r := 10.0
	in := r * (2/math.Sqrt(3) - 1)
	target := disc{0, 0, in}
	var others []disc
	for i := range 3 {
		sin, cos := math.Sincos(0.123 + 2*pi*float64(i)/3)
		others = append(others, disc{2 * r / math.Sqrt(3) * cos, 2 * r / math.Sqrt(3) * sin, r})
	}
	if leads := straightLeads(target, others, 0.001); len(leads) != 0 {
		t.Fatalf("straight ways out of a closed cell: %v", leads)
	}
	g := newGaps(append([]disc{target}, others...), 0.01)
	g.build()
	leads := append(g.straight(0), g.from(0)...)
	if len(leads) == 0 {
		t.Fatal("no way through the points of contact")
	}
	for _, l := range leads {
		last := l.pts[len(l.pts)-1]
		path := append(append([]section.Point(nil), l.pts...), section.Point{X: last.X + 100*l.dx, Y: last.Y + 100*l.dy})
		eachStep(path, 0.05, func(q section.Point) {
			for _, d := range others {
				if in := d.r - math.Hypot(q.X-d.x, q.Y-d.y); in > 0.02 {
					t.Fatalf("a leader runs %.3f deep", in)
				}
			}
		})
	}
}

// Descartes' circle theorem: three unit circles that touch each other leave room for one of radius 2/√3 − 1 between them and
// lie in one of radius 2/√3 + 1.
func TestTouchThree(t *testing.T) {
	var d [3]disc
	for i := range d {
		sin, cos := math.Sincos(2 * pi * float64(i) / 3)
		d[i] = disc{5 + 2/math.Sqrt(3)*cos, -3 + 2/math.Sqrt(3)*sin, 1}
	}
	got := touchThree(d[0], d[1], d[2])
	if len(got) != 1 || math.Abs(got[0].r-(2/math.Sqrt(3)-1)) > 1e-9 || math.Hypot(got[0].x-5, got[0].y+3) > 1e-9 {
		t.Errorf("got %v", got)
	}
	if got := touchThree(disc{0, 0, 1}, disc{3, 0, 1}, disc{6, 0, 1}); got != nil {
		t.Errorf("three in a row: %v", got)
	}
}

func TestCalloutWords(t *testing.T) {
	for _, c := range []struct {
		t    float64
		want string
	}{{92.01, "over by 2 K"}, {90.04, "over by 0.1 K"}, {90, "margin 0 K"}, {89.96, "margin 0.1 K"}, {86.4, "margin 4 K"}, {78, "margin 12 K"}} {
		if got := marginText(section.Reading{TempC: c.t, LimitC: section.Some(90.0)}); got != c.want {
			t.Errorf("%g °C: %q, want %q", c.t, got, c.want)
		}
	}
	s := overScene()
	p := planned(s, 800, 600, Style{})
	over := 0
	for _, r := range s.Readings {
		if r.Over() {
			over++
		}
	}
	if len(p.called) < min(over, mostCalls) {
		t.Errorf("%d over, %d labels", over, len(p.called))
	}
	s.Stale = true
	if p := planned(s, 800, 600, Style{}); len(p.called) != 0 {
		t.Error("a stale scene has labels with numbers")
	}
}

// A layer of the wall that governs is labelled from the wall.
func TestWallCallout(t *testing.T) {
	for name, s := range map[string]Scene{"round": hexScene(7), "rect": wirewayScene(9)} {
		for i := range s.Readings {
			r := &s.Readings[i]
			r.Governs = r.Kind == "layer"
			if r.Governs {
				r.TempC = math.Round(r.TempC)
				r.LimitC = section.Some(r.TempC - 3)
			}
		}
		p := planned(s, 800, 600, Style{})
		if len(p.called) == 0 || p.called[0].sub[0] != "over by 3 K" {
			t.Fatalf("%s: %+v", name, p.called)
		}
		start := p.called[0].path[0]
		if !insideOutline(p.edge, start) {
			t.Errorf("%s: the leader starts outside the wall", name)
		}
		for _, s := range p.shapes {
			if d := p.disc(s); math.Hypot(start.X-d.x, start.Y-d.y) < d.r {
				t.Errorf("%s: the leader of the wall starts in %s", name, s.ID)
			}
		}
	}
}
