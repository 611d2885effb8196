package rating

import (
	"fmt"
	"math"
	"math/rand/v2"

	"packrise/solver/catalog"
	"packrise/solver/pack"
	"packrise/solver/section"
)

// seed of every placing, so that the same design is always laid out the same way.
const seed = 1

// sized resolves for placing: every part of the top level with its size. The error is one sentence.
func sized(d *section.Document, cat *catalog.Catalog) (*scene, []int, error) {
	s, problems := resolve(d, cat)
	top := s.children(-1)
	if len(top) == 0 {
		return nil, nil, fmt.Errorf("there is nothing to place")
	}
	if s.formed(-1, top) {
		return nil, nil, fmt.Errorf("parts that are not round, and parts in a flat jacket, are placed by hand: write at_mm")
	}
	for _, i := range top {
		if !(s.parts[i].outer() > 0) {
			for _, p := range problems {
				if p.Severity == section.Refused && p.Rule != "unplaced" {
					return nil, nil, fmt.Errorf("%s", p.Sentence())
				}
			}
			return nil, nil, fmt.Errorf("%s has no size yet", s.parts[i].id)
		}
	}
	return &s, top, nil
}

func (s *scene) at(top []int, discs []pack.Disc) map[string]section.Point {
	out := make(map[string]section.Point, len(top))
	for k, i := range top {
		out[s.parts[i].id] = section.Point{X: discs[k].X, Y: discs[k].Y}
	}
	return out
}

// Settle returns the places of the top-level parts after falling to the bottom of the holder. A bundle, which has no bottom, is laid up; of bodies
// apart those without a place are put in a row.
func Settle(d *section.Document, cat *catalog.Catalog) (map[string]section.Point, error) {
	s, top, err := sized(d, cat)
	if err != nil {
		return nil, err
	}
	if s.apart() {
		return s.inRow(top), nil
	}
	box := s.box(-1)
	if box == (pack.Box{}) {
		return LayUp(d, cat)
	}
	discs, err := pack.Settle(s.discs(top), box, seed)
	if err != nil {
		return nil, fmt.Errorf("settle: %w", err)
	}
	return s.at(top, discs), nil
}

// LayUp places the parts of a round holder or bundle in concentric layers, in the document's order from the centre outwards. The error says
// by how much they do not fit.
func LayUp(d *section.Document, cat *catalog.Catalog) (map[string]section.Point, error) {
	s, top, err := sized(d, cat)
	if err != nil {
		return nil, err
	}
	if s.apart() {
		return nil, fmt.Errorf("lay up: bodies apart lie where they are drawn; use settle to put those without a place in a row, or an open bundle")
	}
	box := s.box(-1)
	if box.W > 0 {
		return nil, fmt.Errorf("lay up: a wireway is a rectangle; use settle")
	}
	radii := make([]float64, len(top))
	for k, i := range top {
		radii[k] = s.parts[i].outer() / mm
	}
	discs, r := pack.LayUp(radii)
	if box.R > 0 && r > box.R+touching {
		return nil, fmt.Errorf("lay up: the layers need ⌀ %s mm inside and there are %s mm; use settle, or a larger %s", digits(2*r, 2), digits(2*box.R, 2), s.holder.kind)
	}
	return s.at(top, discs), nil
}

// MakeRoom pushes the others apart so that the part held stays where it is; ok is false if there is no room.
func MakeRoom(d *section.Document, cat *catalog.Catalog, held string) (at map[string]section.Point, ok bool) {
	s, top, err := sized(d, cat)
	if err != nil {
		return nil, false
	}
	var placed []int
	hold := -1
	for _, i := range top {
		if s.parts[i].unset {
			continue
		}
		if s.parts[i].id == held {
			hold = len(placed)
		}
		placed = append(placed, i)
	}
	for _, i := range placed { // as written: bundles have their origin anywhere, and what is solved lies apart by a clearance
		at := s.parts[i].src.At.V
		s.parts[i].x, s.parts[i].y = at.X*mm, at.Y*mm
	}
	discs, ok := pack.PushApart(s.discs(placed), s.box(-1), hold, 0)
	if !ok {
		return nil, false
	}
	return s.at(placed, discs), true
}

// Jostle moves every part of the top level by up to mm millimetres (number n of many ways, the same each time) and pushes overlaps apart: how
// the section may lie elsewhere along the run. ok is false if there is no room for that, or if something is not round.
func Jostle(d *section.Document, cat *catalog.Catalog, n int, mm float64) (at map[string]section.Point, ok bool) {
	s, top, err := sized(d, cat)
	if err != nil {
		return nil, false
	}
	for _, i := range top {
		if !s.parts[i].src.At.OK {
			return nil, false
		}
	}
	discs := s.discs(top)
	random := rand.New(rand.NewPCG(seed, uint64(n)))
	for k := range discs {
		angle, far := 2*math.Pi*random.Float64(), mm*math.Sqrt(random.Float64())
		discs[k].X += far * math.Cos(angle)
		discs[k].Y += far * math.Sin(angle)
	}
	moved, ok := pack.PushApart(discs, s.box(-1), -1, 0)
	if !ok {
		return nil, false
	}
	return s.at(top, moved), true
}
