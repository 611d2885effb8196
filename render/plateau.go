package render

import (
	"math"

	"packrise/solver/section"
)

// A line of equal temperature says nothing where the temperature changes less than this share of the scale over some pixels either
// way: it would draw the last digits of the solution.
const (
	plateauShare = 5e-4
	plateauReach = 6
)

// outsidePlateaus cuts out of lines what runs in sheet metal of one temperature, such as a side that is held.
func (p *sectionPainter) outsidePlateaus(lines [][]section.Point) [][]section.Point {
	metal := wallMetal(p.s)
	if metal == nil {
		return lines
	}
	var out [][]section.Point
	for _, l := range lines {
		from := 0
		for i, q := range l {
			if at := p.v.ToMM(q.X, q.Y); !metal(at) || !p.plateau(at, metal) {
				continue
			}
			if i > from+1 {
				out = append(out, l[from:i])
			}
			from = i + 1
		}
		if len(l) > from+1 {
			out = append(out, l[from:])
		}
	}
	return out
}

// plateau tells whether all metal about a point (mm) has one temperature.
func (p *sectionPainter) plateau(q section.Point, metal func(section.Point) bool) bool {
	reach := plateauReach * p.k / p.v.PxPerMM
	low, high := math.Inf(1), math.Inf(-1)
	for _, d := range [4]section.Point{{X: reach}, {X: -reach}, {Y: reach}, {Y: -reach}} {
		at := section.Point{X: q.X + d.X, Y: q.Y + d.Y}
		if t := fieldAt(p.s.Field, at); finite(t) && metal(at) {
			low, high = min(low, t), max(high, t)
		}
	}
	return high-low < plateauShare*(p.sc.High-p.sc.Low)
}
