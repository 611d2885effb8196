package harmonic

import "math"

// treeOrder is the order of a cell's own expansion; with sources no nearer than apartBy half-diagonals beyond their rims it is good to about
// a ten-thousandth of what they vary by.
const (
	treeOrder = 8
	apartBy   = 2.5
	treeDepth = 7
	fewNear   = 2
)

// Tree evaluates a Cloud at very many points: a quadtree of cells, each with one expansion of all that is far from it and a short list of
// discs and images that are near. Safe for concurrent use once made.
type Tree struct {
	cloud *Cloud
	r     []float64 // radii as drawn: no medium inside
	cells []cell
}

// cell is a square; leaves have no kids.
type cell struct {
	mid    complex128
	half   float64
	kids   int32 // index of the first of four, 0 for a leaf
	solid  int32 // 1 + the disc that covers the cell, 0 if none does
	rim    bool  // too near the circle to expand the regular field about it
	near   []int32
	images []int32
	b      [treeOrder + 1]complex128
}

// NewTree covers the square of half-side side about mid. drawn are the discs' radii as drawn, at least those of the cloud.
func NewTree(c *Cloud, drawn []float64, mid complex128, side float64) *Tree {
	t := &Tree{cloud: c, r: drawn}
	root := cell{mid: mid, half: side}
	for j := range c.D {
		root.near = append(root.near, int32(j))
		if c.Circle != nil && c.Circle.RhoInf != 0 {
			root.images = append(root.images, int32(j))
		}
	}
	root.b[0] = complex(c.Level, 0)
	t.cells = append(t.cells, root)
	t.divide(0, 0)
	return t
}

// divide splits cell i until few sources are near.
func (t *Tree) divide(i, depth int) {
	c := t.cells[i]
	few := len(c.near)+len(c.images) <= fewNear && !t.atRim(&c)
	if c.solid > 0 || depth >= treeDepth || few && depth > 2 || t.outside(&c) {
		t.finish(&t.cells[i])
		return
	}
	first := len(t.cells)
	t.cells[i].kids = int32(first)
	for k := range 4 {
		d := cell{half: c.half / 2, mid: c.mid + complex((float64(k&1)-0.5)*c.half, (float64(k>>1)-0.5)*c.half)}
		t.inherit(&d, &c)
		t.cells = append(t.cells, d)
	}
	for k := range 4 {
		t.divide(first+k, depth+1)
	}
}

// outside tells whether a cell lies beyond the round wall.
func (t *Tree) outside(c *cell) bool {
	if t.cloud.Circle == nil {
		return false
	}
	return size(c.mid) > t.cloud.Circle.R+math.Sqrt2*c.half
}

// atRim tells whether a cell is so near the circle that the regular field, which may end there, has to be summed point by point.
func (t *Tree) atRim(c *cell) bool {
	return len(t.cloud.B) > 0 && size(c.mid)+2*math.Sqrt2*c.half > t.cloud.Circle.R
}

// inherit moves the parent's expansion and sorts its near sources into far ones, which are expanded, and near ones.
func (t *Tree) inherit(d, parent *cell) {
	rho := math.Sqrt2 * d.half
	shift(d.b[:], parent.b[:], (d.mid-parent.mid)/complex(2*rho, 0), 0.5)
	var g [treeOrder]complex128
	for _, j := range parent.near {
		l := size(d.mid - t.cloud.C[j])
		if l+rho <= t.r[j] {
			d.solid = j + 1
			return
		}
		if l > t.cloud.A[j]+apartBy*rho && l > t.r[j]+rho {
			t.cloud.direct(int(j), d.mid, rho, d.b[:], g[:])
			continue
		}
		d.near = append(d.near, j)
	}
	for n, v := range g {
		d.b[n+1] += scale(1/roots[n], v)
	}
	for _, j := range parent.images {
		if t.imageFar(int(j), d.mid, rho) {
			t.cloud.mirrored(int(j), d.mid, rho, d.b[:])
		} else {
			d.images = append(d.images, j)
		}
	}
}

// imageFar tells whether the image of disc j is far from a cell. It fills the mirrored disc, or, if the disc holds the origin, all beyond
// the mirrored circle.
func (t *Tree) imageFar(j int, at complex128, rho float64) bool {
	c, a, r := t.cloud.C[j], t.cloud.A[j], t.cloud.Circle.R
	d := real(c)*real(c) + imag(c)*imag(c) - a*a
	if d == 0 {
		d = 1e-12 * a * a
	}
	f := r * r / d
	l := size(at - scale(f, c))
	if d > 0 {
		return l > f*a+apartBy*rho
	}
	return l < -f*a-apartBy*rho
}

// finish adds to a leaf what is kept out of the sources.
func (t *Tree) finish(c *cell) {
	if c.solid > 0 {
		return
	}
	if c.rim = t.atRim(c); !c.rim && len(t.cloud.B) > 0 {
		t.cloud.shifted(c.mid, math.Sqrt2*c.half, c.b[:])
	}
}

// shift writes to dst the expansion src re-expanded about a centre moved by d, in units of the old radius, for a radius f times the old.
func shift(dst, src []complex128, d complex128, f float64) {
	copy(dst, src)
	for n := range dst {
		for m := len(dst) - 2; m >= n; m-- {
			dst[m] += d * dst[m+1]
		}
	}
	p := 1.0
	for n := range dst {
		dst[n] = scale(p, dst[n])
		p *= f
	}
}

// leaf returns the cell that z lies in.
func (t *Tree) leaf(z complex128) *cell {
	c := &t.cells[0]
	for c.kids > 0 {
		k := c.kids
		if real(z) > real(c.mid) {
			k++
		}
		if imag(z) > imag(c.mid) {
			k += 2
		}
		c = &t.cells[k]
	}
	return c
}

// At returns the medium's temperature at z, or the disc that z lies in, −1 if none.
func (t *Tree) At(z complex128) (temp float64, disc int) {
	c := t.leaf(z)
	if c.solid > 0 {
		return 0, int(c.solid) - 1
	}
	for _, j := range c.near {
		v := z - t.cloud.C[j]
		if real(v)*real(v)+imag(v)*imag(v) <= t.r[j]*t.r[j] {
			return 0, int(j)
		}
	}
	w := scale(1/(math.Sqrt2*c.half), z-c.mid)
	temp = real(c.b[0]) + Sum(c.b[1:], w)
	for _, j := range c.near {
		temp += t.cloud.disc(int(j), z)
	}
	for _, j := range c.images {
		temp += t.cloud.image(int(j), z)
	}
	if c.rim {
		temp += t.cloud.regular(z)
	}
	return temp, -1
}
