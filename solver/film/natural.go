package film

import "math"

// Laws of natural convection.
var (
	morganLaw   = law{"Morgan's formula (1975) for natural convection of a horizontal cylinder", "Rayleigh number", 1e-10, 1e12}
	chuLaw      = law{"Churchill and Chu's formula (1975) for natural convection of a horizontal cylinder", "Rayleigh number", 1e-5, 1e12}
	verticalLaw = law{"Churchill and Chu's formula (1975) for natural convection of a vertical face", "Rayleigh number", 0.1, 1e12}
	upLaw       = law{"McAdams's formula (1954) for natural convection of a face that looks up", "Rayleigh number", 1, 1e11}
	downLaw     = law{"McAdams's formula (1954) for natural convection of a face that looks down", "Rayleigh number", 1e4, 1e10}
)

// Morgan returns the Nusselt number of a horizontal cylinder at the Rayleigh number ra on its diameter, properties at the mean of surface
// and ambient: V. T. Morgan, Advances in Heat Transfer 11 (1975) 199, 1e-10 to 1e12. Of his five power laws the largest counts; they
// cross within 10 % of the limits that he gives, where his own steps are up to 0.8 %, so that the answer is continuous.
func Morgan(ra float64) (nu float64, inRange bool) {
	for _, p := range [...][2]float64{{0.675, 0.058}, {1.02, 0.148}, {0.850, 0.188}, {0.480, 0.250}, {0.125, 0.333}} {
		nu = math.Max(nu, p[0]*math.Pow(ra, p[1]))
	}
	return nu, morganLaw.has(ra)
}

// ChurchillChu returns the Nusselt number of a horizontal cylinder: S. W. Churchill and H. H. S. Chu, International Journal of Heat and Mass
// Transfer 18 (1975) 1049, 1e-5 < ra < 1e12.
func ChurchillChu(ra, pr float64) (nu float64, inRange bool) {
	r := 0.60 + 0.387*math.Pow(ra, 1.0/6)/math.Pow(1+math.Pow(0.559/pr, 9.0/16), 8.0/27)
	return r * r, chuLaw.has(ra)
}

// VerticalPlate returns the Nusselt number of a vertical plate on its height: S. W. Churchill and H. H. S. Chu, International Journal of Heat
// and Mass Transfer 18 (1975) 1323, 0.1 < ra < 1e12.
func VerticalPlate(ra, pr float64) (nu float64, inRange bool) {
	r := 0.825 + 0.387*math.Pow(ra, 1.0/6)/math.Pow(1+math.Pow(0.492/pr, 9.0/16), 8.0/27)
	return r * r, verticalLaw.has(ra)
}

// PlateUp returns the Nusselt number of a warm plate that looks up (or a cold one that looks down) on area over perimeter, half the width
// of a long one: R. J. Goldstein, E. M. Sparrow and D. C. Jones, International Journal of Heat and Mass Transfer 16 (1973) 1025, 1 to 200;
// W. H. McAdams, Heat Transmission, 3rd edition 1954, as J. R. Lloyd and W. R. Moran, Journal of Heat Transfer 96 (1974) 443, confirm it,
// 1e4 to 1e11. The largest of their three power laws counts, which also fills the decades between.
func PlateUp(ra float64) (nu float64, inRange bool) {
	return math.Max(0.96*math.Pow(ra, 1.0/6), math.Max(0.54*math.Pow(ra, 0.25), 0.15*math.Cbrt(ra))), upLaw.has(ra)
}

// PlateDown returns the Nusselt number of a warm plate that looks down (or a cold one that looks up) on half the width: W. H. McAdams, 1954,
// 1e5 to 1e10; E. Radziemska and W. M. Lewandowski, Applied Energy 68 (2001) 347, from 1e4 on. The larger counts.
func PlateDown(ra float64) (nu float64, inRange bool) {
	return math.Max(0.52*math.Pow(ra, 0.2), 0.27*math.Pow(ra, 0.25)), downLaw.has(ra)
}

// slender is the factor by which the curvature of a vertical cylinder raises the Nusselt number of a plate of its height, gr the Grashof
// number on the height: C. O. Popiel, Heat Transfer Engineering 29 (2008) 521, after the laminar boundary layers of T. Cebeci (1974);
// 0.01 < pr < 100.
func slender(gr, pr, heightOverDiameter float64) float64 {
	b := 0.0571322 + 0.20305*math.Pow(pr, -0.43)
	c := 0.9165 - 0.0043*math.Sqrt(pr) + 0.01333*math.Log(pr) + 0.0004809/pr
	return 1 + b*math.Pow(math.Sqrt(32)*math.Pow(gr, -0.25)*heightOverDiameter, c)
}
