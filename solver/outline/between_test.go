package outline

import (
	"math"
	"testing"
)

func TestGap(t *testing.T) {
	bar := Bar(20, 5, 0.5, 1)
	for name, c := range map[string]struct {
		got, want float64
	}{
		"circles":          {Circle(2).Gap(Circle(3).Placed(0, 6+8i)), 5},
		"circles overlap":  {Circle(2).Gap(Circle(3).Placed(0, 4)), -1},
		"bar and circle":   {bar.Gap(Circle(2).Placed(0, 3+7i)), 7 - 3.5 - 2},
		"corner to circle": {bar.Gap(Circle(1).Placed(0, 9.5+3+2i+4i)), 5 - 1 - 1.5}, // the arc's centre is 9.5 + 2i
		"sectors' flats":   {Sector(6, math.Pi/2, 1, 1).Gap(Sector(6, math.Pi/2, 1, 1).Placed(math.Pi/2, complex(-0.3*math.Sqrt2/2, 0.3*math.Sqrt2/2))), 0.3 - 2},
		"in a circle":      {Circle(2).Placed(0, 3).Room(Circle(6)), 1},
		"beyond a circle":  {Circle(2).Placed(0, 5i).Room(Circle(6)), -1},
		"in a box":         {Circle(2).Placed(0, 4+2.5i).Room(Box(10, 10, 0)), 0.5},
		"in a flat":        {Circle(2.2).Placed(0, -3.5).Room(Flat(11.4, 4.4, 0)), 0},
		// README of the reference sections: the bar rests with its two lower corners.
		"bar in a conduit": {Bar(20, 5, 0.5, 1).Placed(0, -13.8745078663875i).Room(Circle(20)), 0},
	} {
		closeTo(t, name, c.got, c.want, 1e-9)
	}
	closeTo(t, "reach of a bar", bar.Reach(), math.Hypot(9.5, 2)+1.5, 1e-12)
	closeTo(t, "reach of a circle", Circle(3).Placed(0, 4i).Reach(), 7, 1e-12)
}
