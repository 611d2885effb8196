package gas

import (
	"math"
	"slices"
	"sync"
	"sync/atomic"
)

// Near a contact a surface sees hardly more than what is opposite, so that the shares of its patches jump where the patches opposite end. The
// patch that looks is divided there: where an end is nearer than closeBy times the length of the patch.
const closeBy = 0.4

// lookFrom finds what the patches of some discs see, and of the outline, which counts as a last disc. It reports whether it came to the end.
func (e *Enclosure) lookFrom(discs []int, threads int, stop func() bool) bool {
	var next atomic.Int64
	var stopped atomic.Bool
	work := func() {
		var y eye
		for k := int(next.Add(1)) - 1; k < len(discs); k = int(next.Add(1)) - 1 {
			if stopped.Load() || stop != nil && stop() {
				stopped.Store(true)
				return
			}
			if i := discs[k]; i < len(e.discs) {
				e.lookFromDisc(&y, i)
			} else {
				e.lookFromOutline(&y)
			}
		}
	}
	var all sync.WaitGroup
	for range min(threads, len(discs)) - 1 {
		all.Go(work)
	}
	work()
	all.Wait()
	return !stopped.Load()
}

func (e *Enclosure) lookFromDisc(y *eye, i int) {
	d := &e.discs[i]
	if b := e.bodies[i]; b != nil {
		e.lookFromRim(y, i, b.rim)
		return
	}
	if len(d.Cuts) < 2 {
		return
	}
	y.queue(e, i, d.C, d.R)
	stops := e.stops(y, i)
	for k := 1; k < len(d.Cuts); k++ {
		a, b := d.Cuts[k-1], d.Cuts[k]
		y.open(e)
		for a < b && !d.blank(k-1) {
			var m float64
			m, stops = upTo(stops, a, b)
			e.fromArc(y, d, a, m, (m-a)/(b-d.Cuts[k-1]))
			a = m
		}
		y.close(e, e.first[i]+k-1)
	}
}

// upTo returns the first stop between a and b, b if there is none, and the stops beyond.
func upTo(stops []float64, a, b float64) (float64, []float64) {
	least := (b - a) * 0.02
	for len(stops) > 0 && stops[0] < a+least {
		stops = stops[1:]
	}
	if len(stops) > 0 && stops[0] < b-least {
		return stops[0], stops[1:]
	}
	return b, stops
}

// fromArc looks from the Gauss points between two angles on d.
func (e *Enclosure) fromArc(y *eye, d *Disc, a, b, weight float64) {
	mid, half := (a+b)/2, (b-a)/2
	for _, g := range e.rule(weight) {
		s, c := math.Sincos(mid + half*g[0])
		normal := complex(c, s)
		y.look(e, d.C+scale(d.R, normal), normal, g[1]*weight, -1)
	}
}

// rule is the Gauss rule for a share of a patch.
func (e *Enclosure) rule(share float64) [][2]float64 {
	return nodes[min(e.points, int(math.Ceil(float64(e.points)*share+0.25)))-1]
}

// stops are the angles on disc i, rising from its first cut, at which it is divided besides.
func (e *Enclosure) stops(y *eye, i int) []float64 {
	d := &e.discs[i]
	longest := 0.0
	for k := 1; k < len(d.Cuts); k++ {
		longest = math.Max(longest, d.R*(d.Cuts[k]-d.Cuts[k-1]))
	}
	var at []float64
	add := func(z complex128) {
		if v := z - d.C; size(v)-d.R < closeBy*longest {
			t := math.Atan2(imag(v), real(v)) - d.Cuts[0]
			at = append(at, d.Cuts[0]+t-2*math.Pi*math.Floor(t/(2*math.Pi)))
		}
	}
	for _, o := range y.order {
		if o.near > closeBy*longest {
			break
		}
		j := int(o.disc)
		for _, z := range e.endsOf(j) {
			add(z)
		}
		if b := e.bodies[j]; b != nil {
			add(b.nearest(d.C))
			continue
		}
		add(e.discs[j].C + scale(-e.discs[j].R/size(e.discs[j].C-d.C), e.discs[j].C-d.C))
	}
	for _, s := range e.out.Segments {
		add(s.B)
	}
	slices.Sort(at)
	return at
}

func (e *Enclosure) lookFromOutline(y *eye) {
	y.queue(e, -1, 0, 0)
	from, _ := e.Patches(len(e.discs))
	for k := range e.out.Segments {
		s := e.out.Segments[k]
		if e.out.R > 0 {
			s.R, s.Centre = e.out.R, 0
		}
		p := newRail(&s, true)
		e.area[from+k] = p.length
		y.open(e)
		e.lookAlong(y, &p, -1, k)
		y.close(e, from+k)
	}
}

// lookFromRim lets disc i look, whose patches are rim.
func (e *Enclosure) lookFromRim(y *eye, i int, rim []Segment) {
	y.queue(e, i, e.discs[i].C, e.discs[i].R)
	for k := range rim {
		p := newRail(&rim[k], false)
		y.open(e)
		if !e.discs[i].blank(k) {
			e.lookAlong(y, &p, i, -1)
		}
		y.close(e, e.first[i]+k)
	}
}

// lookAlong looks from the Gauss points of a patch of disc i or, with i = −1, patch edge of the outline.
func (e *Enclosure) lookAlong(y *eye, p *rail, i, edge int) {
	stops := e.stopsOn(p, i)
	for a := -1.0; a < 1; {
		var m float64
		m, stops = upTo(stops, a, 1)
		weight := (m - a) / 2
		for _, g := range e.rule(weight) {
			at, normal := p.at((a+m)/2 + (m-a)/2*g[0])
			y.look(e, at, normal, g[1]*weight, edge)
		}
		a = m
	}
}
