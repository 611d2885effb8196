package render

import "slices"

// Sizes of the bars of bands beside the colour bar, in pixels at scale 1.
const (
	bandLanes = 4   // bars that overlap stand beside each other, so many at most
	bandWide  = 3.0 // of one bar
	bandPitch = 4.5
)

// bands draws how sure each temperature is, a grey bar from P5 to P95, under the lines that lead to the labels. The governing one stands first.
func (l *ladder) bands(steps []step) {
	order := make([]int, 0, len(steps))
	for i, s := range steps {
		if s.banded && !s.limit {
			order = append(order, i)
		}
	}
	slices.SortStableFunc(order, func(a, b int) int {
		switch {
		case steps[a].bold == steps[b].bold:
			return 0
		case steps[a].bold:
			return -1
		}
		return 1
	})
	var lanes [bandLanes][][2]float64
	for _, i := range order {
		s := &steps[i]
		y0, y1 := l.y(s.band[1]), l.y(s.band[0])
		y1 = max(y1, y0+l.k)
		lane := 0
		for lane < bandLanes-1 && slices.ContainsFunc(lanes[lane], func(o [2]float64) bool { return y0 < o[1]+l.k && o[0] < y1+l.k }) {
			lane++
		}
		lanes[lane] = append(lanes[lane], [2]float64{y0, y1})
		shade := alpha(l.pal.Quiet, 0.45)
		if s.bold {
			shade = alpha(l.pal.Quiet, 0.8)
		}
		rectangle(l.c, l.bar1+(2+float64(lane)*bandPitch)*l.k, y0, bandWide*l.k, y1-y0)
		l.c.Fill(shade)
	}
}
