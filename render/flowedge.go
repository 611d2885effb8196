package render

import (
	"math"

	"packrise/solver/section"
)

// conducting is what a field may tell besides: the conductivity (W/mK) of what lies between the parts and of the holder's layers,
// from the inside outwards.
type conducting interface{ LayerK() []float64 }

// flowEdge is where heat may come into a section from outside: the outer surface, or the inside face of a rectangle's sheet metal.
type flowEdge struct {
	pieces []flowPiece // normals inwards
	heat   float64     // W/m that comes in
}

// edgeOf finds the heat that comes in through the outline. Without a field that knows its conductivities there is none.
func edgeOf(s Scene, reach float64) (e flowEdge) {
	c, ok := s.Field.(conducting)
	if !ok {
		return e
	}
	points, k := outerFace(s, c.LayerK())
	if len(points) == 0 || !(k > 0) {
		return e
	}
	e.pieces = piecesOf(points)
	for i := range e.pieces {
		n := &e.pieces[i].normal
		n.X, n.Y = -n.X, -n.Y
	}
	weigh(e.pieces, s.Field, reach)
	for _, p := range e.pieces {
		e.heat += k / (0.98 * reach) * max(0, p.flow)
	}
	return e
}

// outerFace returns the outline through which heat comes in and the conductivity just inside it.
func outerFace(s Scene, k []float64) (points []section.Point, inside float64) {
	if len(k) == 0 {
		return nil, 0
	}
	if o := outlineOf(s.Shapes); o.rect != nil {
		h := holderOf(s.Shapes)
		for i, r := range h.Rings {
			if r.Metal {
				return cut(boxLoop(o.rect.grown(r.R0 - h.OuterR()))), k[min(i, len(k)-1)]
			}
		}
	}
	return surfaceLoop(s), k[len(k)-1]
}

// boxLoop is a box as a polygon, counterclockwise.
func boxLoop(b box) []section.Point {
	return []section.Point{{X: b.x0, Y: b.y0}, {X: b.x1, Y: b.y0}, {X: b.x1, Y: b.y1}, {X: b.x0, Y: b.y1}}
}

// weigh sets the flow of pieces by the fall of the temperature along their normals.
func weigh(pieces []flowPiece, f Field, reach float64) {
	for i := range pieces {
		p := &pieces[i]
		mid := section.Point{X: (p.a.X + p.b.X) / 2, Y: (p.a.Y + p.b.Y) / 2}
		far := section.Point{X: mid.X + reach*p.normal.X, Y: mid.Y + reach*p.normal.Y}
		near := section.Point{X: mid.X + 0.02*reach*p.normal.X, Y: mid.Y + 0.02*reach*p.normal.Y}
		density := fieldAt(f, near) - fieldAt(f, far)
		if !finite(density) { // beyond the outside
			density = 0
		}
		p.flow = density * between(p.a, p.b)
	}
}

// seedsOn returns n places on pieces and the ways along the normals there, so that between each and the next the same heat leaves.
// They stand evenly about the place where least does.
func seedsOn(pieces []flowPiece, n int) (at, out []section.Point) {
	total, least, from := 0.0, math.Inf(1), 0
	for i, p := range pieces {
		total += max(0, p.flow)
		if density := p.flow / between(p.a, p.b); density < least-1e-6*math.Abs(least) {
			least, from = density, i
		}
	}
	if !(total > 0) {
		return nil, nil
	}
	sum := 0.0
	for k := range pieces {
		p := pieces[(from+k)%len(pieces)]
		flow := max(0, p.flow)
		for len(at) < n {
			want := (float64(len(at)) + 0.5) / float64(n) * total
			if want > sum+flow {
				break
			}
			u := (want - sum) / flow
			at = append(at, section.Point{X: p.a.X + u*(p.b.X-p.a.X), Y: p.a.Y + u*(p.b.Y-p.a.Y)})
			out = append(out, p.normal)
		}
		sum += flow
	}
	return at, out
}
