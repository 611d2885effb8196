package film

import (
	"fmt"
	"math"

	"packrise/solver/fluid"
)

const gravity = 9.80665 // m/s²

// near is the fluid close to a surface, at the mean of surface and ambient.
type near struct {
	fluid.State
	rise     float64 // K, of the surface over the ambient
	buoyancy float64 // Rayleigh number over length³, 1/m³
	up       float64 // 1 where the fluid at the surface rises, −1 where it sinks, between where it does both
}

func (n *near) rayleigh(length float64) float64 { return n.buoyancy * length * length * length }

// at looks the fluid up.
func (o Outside) at(surfaceK float64) near {
	mean := math.Max((surfaceK+o.AmbientK)/2, 20)
	n := near{rise: surfaceK - o.AmbientK}
	p := o.PressurePa
	if p == 0 {
		p = fluid.Atmosphere
	}
	n.State = fluid.Air(mean, p)
	net, size := n.Expansion, n.Expansion
	if o.Kind == Water {
		n.State = fluid.Water(mean)
		net, size = waterExpansion(o.AmbientK, surfaceK)
	}
	n.up = math.Copysign(net/size, n.rise*net)
	n.buoyancy = gravity * size * math.Abs(n.rise) / (n.Kinematic() * n.Diffusivity())
	return n
}

// waterExpansion is the mean of water's expansion between two temperatures and the mean of its size (three-point Gauss rule): about its densest,
// at 4 °C, warmer and colder water move against each other and neither stands still.
func waterExpansion(a, b float64) (net, size float64) {
	m, h := (a+b)/2, (b-a)/2*math.Sqrt(0.6)
	for _, p := range [...][2]float64{{m - h, 5. / 18}, {m, 8. / 18}, {m + h, 5. / 18}} {
		e := fluid.Water(p[0]).Expansion
		net += p[1] * e
		size += p[1] * math.Abs(e)
	}
	return net, size
}

// convect adds natural or forced convection, whichever is larger: the rule of overhead lines at low wind (IEEE 738), never above a sum of
// the two.
func (o Outside) convect(a *Answer, f Face, surfaceK float64) {
	n := o.at(surfaceK)
	natural := n.natural(o, f)
	h := natural
	if o.SpeedMS > 0 {
		if forced := n.forced(o, f); forced.h > natural.h {
			h = forced
		} else {
			a.say(fmt.Sprintf("natural convection is more than the flow of %s m/s brings and counts alone", short(o.SpeedMS)))
		}
	}
	a.Convective = h.h
	a.By = append(a.By, h.by)
	for _, s := range h.notes {
		a.say(s)
	}
	if !n.InRange && math.Abs(n.rise) > slightRise {
		a.say(o.propertyNote(surfaceK))
	}
}

// slightRise is a rise (K) below which nobody needs to know that a natural convection is out of its range: it carries next to nothing.
const slightRise = 1

func (o Outside) propertyNote(surfaceK float64) string {
	c := func(k float64) string { return short(math.Round(k - 273.15)) }
	mean := c((surfaceK + o.AmbientK) / 2)
	if o.Kind == Water {
		return "water at " + mean + " °C beside the surface is outside the range of its properties, 0 to 100 °C; ice and boiling are not reckoned"
	}
	return fmt.Sprintf("air at %s °C beside the surface is outside the range of its properties, %s to %s °C", mean, c(fluid.GasLowK), c(fluid.GasHighK))
}

// part is one way of convection.
type part struct {
	h     float64 // W/m²K
	by    string
	notes []string
}

// use turns a Nusselt number on a length into a coefficient.
func (n *near) use(l law, number, nu, length float64, in bool) part {
	p := part{h: nu * n.Conductivity / length, by: l.name}
	if !in && math.Abs(n.rise) > slightRise {
		p.notes = append(p.notes, l.note(number))
	}
	return p
}

// natural is the natural convection of a face.
func (n *near) natural(o Outside, f Face) part {
	switch {
	case f.Shape == Round && o.Vertical:
		return n.standing(o, f)
	case f.Shape == Round:
		return n.lying(o, f.DiameterM)
	case o.Vertical || f.Shape == Side:
		length := f.HeightM
		if o.Vertical {
			length = o.HeightM
		}
		ra := n.rayleigh(length)
		nu, in := VerticalPlate(ra, n.Prandtl())
		p := n.use(verticalLaw, ra, nu, length, in)
		if o.Vertical {
			p.notes = append(p.notes, hotTop)
		}
		return p
	}
	return n.level(f)
}

// level is the top or bottom of a box: a warm top is a face that looks up, a cold bottom is its mirror image.
func (n *near) level(f Face) part {
	length := f.WidthM / 2
	ra := n.rayleigh(length)
	away, inAway := PlateUp(ra)
	under, inUnder := PlateDown(ra)
	share := (1 + n.up) / 2
	if f.Shape == Bottom {
		share = 1 - share
	}
	nu := share*away + (1-share)*under
	if share > 0.5 {
		return n.use(upLaw, ra, nu, length, inAway)
	}
	return n.use(downLaw, ra, nu, length, inUnder)
}

// lying is a horizontal cylinder.
func (n *near) lying(o Outside, d float64) part {
	ra := n.rayleigh(d)
	if o.Cautious {
		nu, in := ChurchillChu(ra, n.Prandtl())
		return n.use(chuLaw, ra, nu, d, in)
	}
	nu, in := Morgan(ra)
	return n.use(morganLaw, ra, nu, d, in)
}

// hotTop is said of every vertical run: the local coefficient of a laminar boundary layer at the upper end is 3/4 of the mean.
const hotTop = "the film of a vertical run is the mean over its height: near the top the rise over the ambient can be a third larger"

// standing is a vertical cylinder: the plate of its height, raised by the curvature, but never better than the same cylinder lying, which also
// keeps it finite where the rise is small.
func (n *near) standing(o Outside, f Face) part {
	flat := n.lying(o, f.DiameterM)
	ra := n.rayleigh(o.HeightM)
	p := flat
	if ra > 0 {
		nu, in := VerticalPlate(ra, n.Prandtl())
		nu *= slender(ra/n.Prandtl(), n.Prandtl(), o.HeightM/f.DiameterM)
		up := n.use(verticalLaw, ra, nu, o.HeightM, in)
		if up.by += ", raised by curvature (Popiel 2008)"; up.h < flat.h {
			p = up
		}
	}
	p.notes = append(p.notes, hotTop)
	return p
}

// forced is the convection by a flow; a box counts as the cylinder of its perimeter.
func (n *near) forced(o Outside, f Face) part {
	d := f.across()
	re := o.SpeedMS * d / n.Kinematic()
	nu, in := ChurchillBernstein(re, n.Prandtl())
	p := part{h: nu * n.Conductivity / d, by: crossLaw.name}
	if !in {
		l := crossLaw
		l.low = 0.2 / n.Prandtl()
		p.notes = append(p.notes, l.note(re))
	}
	if f.Shape != Round {
		p.notes = append(p.notes, "in moving fluid the box counts as a cylinder of its perimeter")
	}
	if o.Along {
		p.h *= alongShare
		p.by += fmt.Sprintf(", × %g for a flow along the run (CIGRE 207)", alongShare)
	}
	return p
}
