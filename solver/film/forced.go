package film

import "math"

var crossLaw = law{"Churchill and Bernstein's formula (1977) for a cylinder in cross flow", "Reynolds number", 0.3, 1e7}

// ChurchillBernstein returns the Nusselt number of a cylinder in cross flow, properties at the mean of surface and ambient: S. W. Churchill and
// M. Bernstein, Journal of Heat Transfer 99 (1977) 300, for re·pr above 0.2 and re up to 1e7.
func ChurchillBernstein(re, pr float64) (nu float64, inRange bool) {
	nu = 0.3 + 0.62*math.Sqrt(re)*math.Cbrt(pr)/math.Pow(1+math.Pow(0.4/pr, 2.0/3), 0.25)*math.Pow(1+math.Pow(re/282000, 0.625), 0.8)
	return nu, re*pr >= 0.2 && re <= crossLaw.high
}

// alongShare is the Nusselt number of air that moves along a run over that of the same air across it: the wind-angle law of overhead lines at
// 0° (V. T. Morgan; CIGRE technical brochure 207, A1 = 0.42; from memory). On long boxes it is within a fifth of the turbulent plate of
// 3 to 10 m.
const alongShare = 0.42
