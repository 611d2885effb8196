package rating_test

import (
	"fmt"
	"math"
	"strconv"
	"testing"

	"packrise/solver/section"
)

const arrayUnit = "k/k₀"

// arrayFamily is the fifth check of practitioners: the conductivity of a square array of cylinders, from one cell between two held sides.
func arrayFamily(t testing.TB) family {
	f := family{
		name: "square array of cylinders", unit: arrayUnit, low: 0.98, high: 1.02,
		source:     "Rayleigh's multipole method (Perrins, McKenzie and McPhedran 1979), series converged to all digits given",
		conditions: "conduction alone",
		drawn:      "one cell as a wireway without layers, sides insulated, bottom and top held; metal or a rod in a solid of 0.2 W/mK",
	}
	for _, row := range open(t, "array_conductivity.csv").rows {
		k, share := row[1], row[2]
		if row[0] != "square" || k != "inf" && k != "100" && k != "10" && k != "0.1" {
			continue
		}
		want, err := strconv.ParseFloat(row[3], 64)
		if err != nil {
			t.Fatal(err)
		}
		name := fmt.Sprintf("%s × k₀, %s of the area", k, share)
		if k == "inf" {
			name = fmt.Sprintf("metal, %s of the area", share)
		}
		f.rows = append(f.rows, comparison{name: name, published: want, compute: func(r *rig) (float64, error) { return r.array(k, share) }, quick: k == "inf"})
	}
	return f
}

// array computes the conductivity of the array over that of the medium between the cylinders.
func (r *rig) array(k, share string) (float64, error) {
	const cell, medium, hot, cold = 20.0, 0.2, 40.0, 20.0 // mm, W/mK, °C
	area, err := strconv.ParseFloat(share, 64)
	if err != nil {
		return 0, err
	}
	d := cell * math.Sqrt(4*area/math.Pi)
	part, cylinder := fmt.Sprintf("{id: P, kind: core, conductor: {diameter_mm: %.9f, class: solid}, at_mm: [10, 10]}", d), 1.0
	loads := "loads: [{id: none, conductors: [P], current_a: 0}]\n"
	if k != "inf" {
		if cylinder, err = strconv.ParseFloat(k, 64); err != nil {
			return 0, err
		}
		part, loads = fmt.Sprintf("{id: P, kind: rod, material: cylinder, diameter_mm: %.9f, at_mm: [10, 10]}", d), ""
	}
	text := fmt.Sprintf(`packrise: 1
surroundings: {kind: fixed-wall, ambient_c: %g}
holder: {kind: wireway, width_mm: %g, height_mm: %g, fill: medium, sides: {left: insulated, right: insulated, bottom: {fixed_c: %g}, top: {fixed_c: %g}}}
parts: [%s]
%smaterials: {medium: {k_w_mk: %g}, cylinder: {k_w_mk: %g}}
`, cold, cell, cell, cold, hot, part, loads, medium, medium*cylinder)
	d2, problems := section.Read([]byte(text))
	for _, p := range problems {
		return 0, fmt.Errorf("%s", p.At("section"))
	}
	res, err := r.solve(d2)
	if err != nil {
		return 0, err
	}
	return res.Sides["bottom"] / (medium * (hot - cold)), nil
}
