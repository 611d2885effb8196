package render

import (
	"image/color"
	"math"
	"testing"
)

// Rows of the published table that are not knots: Nuñez, Anderton & Renslow 2018 (PLoS ONE 13(7), e0199239), as distributed
// with its 256 values; number, red, green, blue.
var publishedRows = [][4]float64{
	{3, 0, 0.143951, 0.323982},
	{11, 0, 0.165621, 0.378769},
	{16, 0, 0.178802, 0.414764},
	{24, 0.017852, 0.198528, 0.441248},
	{33, 0.110658, 0.223170, 0.435067},
	{44, 0.175490, 0.253444, 0.427790},
	{63, 0.259740, 0.305120, 0.422810},
	{85, 0.342246, 0.364939, 0.428559},
	{104, 0.408226, 0.417357, 0.442570},
	{116, 0.448447, 0.451053, 0.456264},
	{128, 0.488697, 0.485318, 0.471008},
	{140, 0.532829, 0.520135, 0.472401},
	{165, 0.628576, 0.595104, 0.459641},
	{191, 0.732422, 0.677364, 0.425717},
	{208, 0.802667, 0.733978, 0.390153},
	{232, 0.905589, 0.818257, 0.312889},
	{248, 0.977780, 0.877281, 0.227954},
	{253, 0.995249, 0.898384, 0.207561},
	{254, 0.995503, 0.903866, 0.212370},
}

func TestMapFollowsThePublication(t *testing.T) {
	for _, row := range publishedRows {
		c := mapTable[int(row[0])]
		for i, got := range []uint8{c.R, c.G, c.B} {
			if d := float64(got)/255 - row[i+1]; math.Abs(d) > 1.6/255 {
				t.Errorf("row %g channel %d: %d, published %.1f", row[0], i, got, 255*row[i+1])
			}
		}
	}
}

// CIE L* must rise all the way and in even steps: within a third of the mean over any 1/16 of the scale.
func TestMapIsEven(t *testing.T) {
	first, last := lightness(mapTable[0]), lightness(mapTable[255])
	for i := 1; i < 256; i++ {
		if lightness(mapTable[i]) < lightness(mapTable[i-1])-0.25 { // rounding to bytes
			t.Errorf("lightness falls at %d", i)
		}
	}
	mean := (last - first) / 15.9375
	for i := 0; i+16 < 256; i += 8 {
		step := lightness(mapTable[i+16]) - lightness(mapTable[i])
		if step < mean*0.66 || step > mean*1.34 {
			t.Errorf("from %d: a step of %.2f in L*, %.2f on average", i, step, mean)
		}
	}
	if last-first < 70 {
		t.Errorf("the map spans only %.0f of 100 in lightness", last-first)
	}
}

// Seen with deuteranopia the colours must stay apart. The simulation is that of Viénot, Brettel & Mollon 1999 (Color Research
// and Application 24, 243–252): in linear RGB, red and green both become 0.29275·R + 0.70725·G (from memory).
func TestMapIsColourBlindSafe(t *testing.T) {
	seen := func(c color.NRGBA) color.NRGBA {
		lin := func(b uint8) float64 { return math.Pow(float64(b)/255, 2.2) }
		y := uint8(255 * math.Pow(0.29275*lin(c.R)+0.70725*lin(c.G), 1/2.2))
		return color.NRGBA{y, y, c.B, 255}
	}
	for i := 16; i < 256; i++ {
		if d := lightness(seen(mapTable[i])) - lightness(seen(mapTable[i-16])); d < 2.5 {
			t.Errorf("rows %d and %d differ by %.2f in L* to the colour-blind", i-16, i, d)
		}
	}
}

// White is 100, black 0, and sRGB mid grey #777777 has L* 50.0 (CIE 15 with IEC 61966-2-1; the value from a colour table, from
// memory, to 0.1).
func TestLightness(t *testing.T) {
	for _, c := range []struct {
		v    uint32
		want float64
	}{{0xffffff, 100}, {0, 0}, {0x777777, 50.0}} {
		if got := lightness(rgb(c.v)); math.Abs(got-c.want) > 0.1 {
			t.Errorf("%06x: L* %.2f, want %.1f", c.v, got, c.want)
		}
	}
}

func TestScaleColor(t *testing.T) {
	sc := Scale{20, 120}
	if sc.Color(-50) != mapTable[0] || sc.Color(500) != mapTable[255] || sc.Color(20) != mapTable[0] || sc.Color(120) != mapTable[255] {
		t.Error("the ends")
	}
	if sc.Color(math.NaN()).A != 0 {
		t.Error("an unknown temperature has a colour")
	}
	if sc.Color(70) != mapTable[128] {
		t.Errorf("the middle is %v", sc.Color(70))
	}
}
