package gas

import (
	"math"
	"slices"
)

// Disc is a round surface with centre C and radius R. Its patches lie between Cuts, angles (rad) that rise by at most 2π in all; what they
// leave out hides what is behind it and is no surface. With a Rim it is a convex surface of any form.
type Disc struct {
	C     complex128
	R     float64
	Cuts  []float64
	Blank []bool    // patches that are no surface and see nothing either; nil: none
	Rim   []Segment // patches about C, counterclockwise, each from the end of the one before, within R of C; Cuts are not read then
}

// blank tells whether patch k is none.
func (d *Disc) blank(k int) bool { return k < len(d.Blank) && d.Blank[k] }

// patches is how many the disc has.
func (d *Disc) patches() int {
	if d.Rim != nil {
		return len(d.Rim)
	}
	return max(0, len(d.Cuts)-1)
}

// Segment is a patch of an outline or a rim: straight, or an arc of radius R about Centre.
type Segment struct {
	A, B, Centre complex128
	R            float64
}

// Outline encloses the discs. Its patches stand counterclockwise, straight or curved; all are arcs of radius R about the origin if R > 0. Together
// they bound a convex space; where one does not begin at the end of the one before, discs must fill the gap.
type Outline struct {
	R        float64
	Segments []Segment
}

// Enclosure is what the patches see of each other. Patches are numbered disc by disc, then along the outline. Not safe for concurrent use.
type Enclosure struct {
	discs  []Disc
	out    Outline
	points int
	first  []int        // patch of each disc, then of the outline, then their number
	ends   []complex128 // cuts of all discs as points
	endOf  []int        // where each disc's begin, and their number
	bodies []*body      // of discs with a rim, nil of others
	gap    []bool       // a segment does not begin where the one before ends

	area []float64
	path []float64
	raw  [][]sight // what each patch sees, before reciprocity is enforced
	sparse
}

// sight is a share f of what a patch sees.
type sight struct {
	patch int32
	f     float64
}

// NewEnclosure finds the view factors from the given number of Gauss points per patch (1 to 5), on up to threads goroutines. It asks stop now and
// then, nil for never, and returns nil if that asks for an end.
func NewEnclosure(discs []Disc, out Outline, points, threads int, stop func() bool) *Enclosure {
	e := &Enclosure{discs: append([]Disc(nil), discs...), out: out, points: min(max(points, 1), len(nodes))}
	n, m := 0, 0
	for i := range discs {
		d := &discs[i]
		e.first, e.endOf = append(e.first, n), append(e.endOf, m)
		n += d.patches()
		if m += len(d.Cuts); d.Rim != nil {
			m += len(d.Rim) - len(d.Cuts)
		}
	}
	e.bodies = make([]*body, len(discs))
	e.first = append(e.first, n, n+len(out.Segments))
	n += len(out.Segments)
	e.endOf = append(e.endOf, m)
	e.ends = make([]complex128, m)
	e.area, e.path, e.raw = make([]float64, n), make([]float64, n), make([][]sight, n)
	for k, s := range out.Segments {
		e.gap = append(e.gap, s.A != out.Segments[(k+len(out.Segments)-1)%len(out.Segments)].B)
	}
	all := make([]int, len(discs)+1)
	for i := range all {
		all[i] = len(discs) - i // the outline first: it takes longest
		if i > 0 {
			e.place(all[i])
		}
	}
	if !e.lookFrom(all, threads, stop) {
		return nil
	}
	e.close()
	return e
}

// place works out the ends and areas of a disc's patches.
func (e *Enclosure) place(i int) {
	d := &e.discs[i]
	if d.Rim != nil {
		e.placeRim(i)
		return
	}
	for k, t := range d.Cuts {
		s, c := math.Sincos(t)
		e.ends[e.endOf[i]+k] = d.C + complex(d.R*c, d.R*s)
		if k > 0 {
			e.area[e.first[i]+k-1] = d.R * (t - d.Cuts[k-1])
		}
	}
}

// endsOf are the ends of disc i's patches.
func (e *Enclosure) endsOf(i int) []complex128 { return e.ends[e.endOf[i]:e.endOf[i+1]] }

// Len is the number of patches.
func (e *Enclosure) Len() int { return len(e.area) }

// Patches returns the first patch of disc i and the one after its last; the outline counts as a last disc.
func (e *Enclosure) Patches(i int) (from, to int) { return e.first[i], e.first[i+1] }

// Area of a patch, m² per metre of run.
func (e *Enclosure) Area(k int) float64 { return e.area[k] }

// Seen is the share of all round it that patch k finds before view factors are made complete: 1 where surfaces close up.
func (e *Enclosure) Seen(k int) float64 {
	sum := 0.0
	for _, s := range e.raw[k] {
		sum += s.f
	}
	return sum
}

// Path is the mean free path over a patch, m: the mean distance of what it sees, each by its view factor.
func (e *Enclosure) Path(k int) float64 { return e.path[k] }

// Move puts disc i elsewhere and looks anew from the discs that saw it, see it now, or both.
func (e *Enclosure) Move(i int, c complex128, threads int) {
	dirty := make([]bool, len(e.discs)+1)
	e.seen(i, dirty)
	e.discs[i].C = c
	e.place(i)
	e.lookFrom([]int{i}, 1, nil)
	e.seen(i, dirty)
	dirty[i] = false
	var again []int
	for j := len(dirty) - 1; j >= 0; j-- {
		if dirty[j] {
			again = append(again, j)
		}
	}
	e.lookFrom(again, threads, nil)
	e.close()
}

// seen marks what disc i sees and what sees it.
func (e *Enclosure) seen(i int, by []bool) {
	from, to := e.Patches(i)
	for j := range by {
		a, b := e.Patches(j)
		for k := a; k < b && !by[j]; k++ {
			for _, s := range e.raw[k] {
				if p := int(s.patch); p >= from && p < to {
					by[j] = true
					break
				}
			}
		}
	}
	for k := from; k < to; k++ {
		for _, s := range e.raw[k] {
			by[e.owner(int(s.patch))] = true
		}
	}
}

// owner is the disc of a patch.
func (e *Enclosure) owner(patch int) int {
	lo, hi := 0, len(e.discs)
	for lo < hi {
		if m := (lo + hi + 1) / 2; e.first[m] <= patch {
			lo = m
		} else {
			hi = m - 1
		}
	}
	return lo
}

// nodes are the Gauss–Legendre rules of one to five points on [−1, 1], with half the weights (Abramowitz and Stegun, table 25.4).
var nodes = [...][][2]float64{
	{{0, 1}},
	{{-0.5773502691896257, 0.5}, {0.5773502691896257, 0.5}},
	{{-0.7745966692414834, 5.0 / 18}, {0, 4.0 / 9}, {0.7745966692414834, 5.0 / 18}},
	{{-0.8611363115940526, 0.1739274225687269}, {-0.3399810435848563, 0.3260725774312731}, {0.3399810435848563, 0.3260725774312731}, {0.8611363115940526, 0.1739274225687269}},
	{{-0.9061798459386640, 0.1184634425280945}, {-0.5384693101056831, 0.2393143352496832}, {0, 0.2844444444444444}, {0.5384693101056831, 0.2393143352496832}, {0.9061798459386640, 0.1184634425280945}},
}

func scale(f float64, z complex128) complex128 { return complex(f*real(z), f*imag(z)) }
func size(z complex128) float64                { return math.Sqrt(real(z)*real(z) + imag(z)*imag(z)) }

// Centre is that of disc i.
func (e *Enclosure) Centre(i int) complex128 { return e.discs[i].C }

// Alike tells whether the enclosure is that of the discs, wherever they are, and the outline, looked at from as many points.
func (e *Enclosure) Alike(discs []Disc, out Outline, points int) bool {
	if len(discs) != len(e.discs) || out.R != e.out.R || points != e.points || !slices.Equal(out.Segments, e.out.Segments) {
		return false
	}
	for i := range discs {
		if o := &e.discs[i]; o.R != discs[i].R || !slices.Equal(o.Cuts, discs[i].Cuts) || !slices.Equal(o.Blank, discs[i].Blank) || !slices.Equal(o.Rim, discs[i].Rim) {
			return false
		}
	}
	return true
}
