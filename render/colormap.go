package render

import (
	"image/color"
	"math"
)

// ColorMapName and ColorMapSource name the colour map and its publication, for captions and papers. The map is even to the
// eye in its steps of lightness and reads the same with red-green blindness.
const (
	ColorMapName   = "cividis"
	ColorMapSource = "J. R. Nuñez, C. R. Anderton, R. S. Renslow: Optimizing colormaps with consideration for color vision deficiency to enable accurate interpretation of scientific data. PLoS ONE 13(7), e0199239 (2018)"
)

// mapKnots are rows (number of 255, red, green, blue) of the published table; straight lines between them stay within 1/255
// of the rows left out.
var mapKnots = [...][4]float64{
	{0, 0, 0.135112, 0.304751},
	{6, 0, 0.152673, 0.343704},
	{8, 0, 0.157932, 0.357521},
	{14, 0, 0.173420, 0.400353},
	{18, 0, 0.184550, 0.428802},
	{19, 0, 0.186915, 0.435532},
	{20, 0, 0.188769, 0.439563},
	{21, 0, 0.190950, 0.441085},
	{22, 0, 0.193366, 0.441561},
	{23, 0.003602, 0.195911, 0.441564},
	{26, 0.046205, 0.203903, 0.440196},
	{28, 0.068968, 0.209372, 0.438863},
	{31, 0.095645, 0.217643, 0.436593},
	{35, 0.124291, 0.228697, 0.433547},
	{40, 0.154261, 0.242475, 0.430120},
	{48, 0.195057, 0.264372, 0.425924},
	{56, 0.230871, 0.286134, 0.423498},
	{64, 0.263738, 0.307831, 0.422789},
	{72, 0.294669, 0.329531, 0.423716},
	{80, 0.324250, 0.351289, 0.426250},
	{90, 0.359916, 0.378641, 0.431501},
	{100, 0.394568, 0.406236, 0.438986},
	{110, 0.428462, 0.434140, 0.448864},
	{120, 0.461616, 0.462405, 0.461969},
	{124, 0.474812, 0.473832, 0.467681},
	{126, 0.481622, 0.479573, 0.469767},
	{130, 0.495913, 0.491076, 0.471751},
	{136, 0.517920, 0.508454, 0.472707},
	{144, 0.547840, 0.531895, 0.471704},
	{152, 0.578236, 0.555673, 0.468724},
	{160, 0.609105, 0.579816, 0.463638},
	{170, 0.648222, 0.610553, 0.454801},
	{180, 0.687957, 0.641966, 0.442886},
	{188, 0.720222, 0.667618, 0.430805},
	{196, 0.752886, 0.693766, 0.416472},
	{204, 0.785965, 0.720438, 0.399613},
	{212, 0.819499, 0.747659, 0.379785},
	{220, 0.853515, 0.775454, 0.356500},
	{228, 0.888081, 0.803839, 0.328770},
	{236, 0.923279, 0.832822, 0.295244},
	{242, 0.950178, 0.854933, 0.265085},
	{246, 0.968469, 0.869819, 0.241310},
	{250, 0.987293, 0.884718, 0.213336},
	{251, 0.992218, 0.888385, 0.205468},
	{252, 0.994847, 0.892954, 0.203445},
	{255, 0.995737, 0.909344, 0.217772},
}

// mapTable is the map in 256 steps; mapWords the same as the four bytes of an image.RGBA pixel, lowest first.
var mapTable, mapWords = func() (t [256]color.NRGBA, w [256]uint32) {
	k := 0
	for i := range t {
		for float64(i) > mapKnots[k+1][0] {
			k++
		}
		a, b := mapKnots[k], mapKnots[k+1]
		f := (float64(i) - a[0]) / (b[0] - a[0])
		at := func(j int) uint8 { return uint8(math.Round(255 * (a[j] + f*(b[j]-a[j])))) }
		t[i] = color.NRGBA{at(1), at(2), at(3), 255}
		w[i] = uint32(t[i].R) | uint32(t[i].G)<<8 | uint32(t[i].B)<<16 | 255<<24
	}
	return t, w
}()

// Color returns the map's colour for a temperature in °C, the ends' colours beyond the scale and a transparent one for NaN.
func (sc Scale) Color(t float64) color.NRGBA {
	x := sc.at(t)
	if math.IsNaN(x) {
		return color.NRGBA{}
	}
	return mapTable[int(math.Round(255*max(0, min(1, x))))]
}

// lightness returns CIE L* (0 … 100) of an sRGB colour: IEC 61966-2-1 for the linear parts, CIE 15 for L*.
func lightness(c color.NRGBA) float64 {
	y := luminance(c)
	if y <= 216.0/24389 {
		return y * 24389 / 27
	}
	return 116*math.Cbrt(y) - 16
}

// luminance returns the relative luminance (0 … 1) of an sRGB colour, IEC 61966-2-1.
func luminance(c color.NRGBA) float64 {
	lin := func(b uint8) float64 {
		v := float64(b) / 255
		if v <= 0.04045 {
			return v / 12.92
		}
		return math.Pow((v+0.055)/1.055, 2.4)
	}
	return 0.2126*lin(c.R) + 0.7152*lin(c.G) + 0.0722*lin(c.B)
}
