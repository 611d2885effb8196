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
		for _, z := range e.ends[e.endOf[j]:][:len(e.discs[j].Cuts)] {
			add(z)
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
	for k, s := range e.out.Segments {
		y.open(e)
		mid, half := scale(0.5, s.A+s.B), scale(0.5, s.B-s.A)
		length := 2 * size(half)
		p := rail{mid: mid, half: half, inward: scale(2/length, complex(-imag(half), real(half)))}
		if p.r = e.out.R; p.r > 0 {
			p.arc = math.Asin(math.Min(1, length/2/p.r))
			length = 2 * p.arc * p.r
		}
		e.area[from+k] = length
		stops := e.stopsOn(&p, length)
		for a := -1.0; a < 1; {
			var m float64
			m, stops = upTo(stops, a, 1)
			weight := (m - a) / 2
			for _, g := range e.rule(weight) {
				at, normal := p.at((a+m)/2 + (m-a)/2*g[0])
				y.look(e, at, normal, g[1]*weight, k)
			}
			a = m
		}
		y.close(e, from+k)
	}
}

// rail is a patch of the outline, from −1 to 1.
type rail struct {
	mid, half, inward complex128
	r, arc            float64 // of an arc: radius, half its angle
}

// at returns a point of the patch and its inward normal.
func (p *rail) at(t float64) (z, normal complex128) {
	if p.arc == 0 {
		return p.mid + scale(t, p.half), p.inward
	}
	sin, cos := math.Sincos(p.arc * t)
	normal = p.inward * complex(cos, sin)
	return scale(-p.r, normal), normal
}

// stopsOn are the places on a patch of the outline, −1 to 1, at which it is divided besides.
func (e *Enclosure) stopsOn(p *rail, length float64) []float64 {
	var at []float64
	add := func(z complex128) {
		v := z - p.mid
		if p.arc > 0 {
			if t := (p.r - size(z)); t < closeBy*length {
				w := -z * complex(real(p.inward), -imag(p.inward))
				at = append(at, math.Atan2(imag(w), real(w))/p.arc)
			}
			return
		}
		w := v * complex(real(p.half), -imag(p.half))
		if imag(w) < closeBy*length*length/2 {
			at = append(at, 4*real(w)/(length*length))
		}
	}
	for j := range e.discs {
		d := &e.discs[j]
		if size(d.C-p.mid) > d.R+length {
			continue
		}
		for _, z := range e.ends[e.endOf[j]:][:len(d.Cuts)] {
			add(z)
		}
		if p.arc > 0 {
			add(scale(1+d.R/math.Max(size(d.C), 1e-300), d.C))
		} else {
			add(d.C - scale(d.R, p.inward))
		}
	}
	slices.Sort(at)
	return at
}
