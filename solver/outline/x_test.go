package outline

import (
	"fmt"
	"math"
	"testing"
)

func TestX(t *testing.T) {
	r, rods := steel()
	r.Layers[0].K = 2
	for _, f := range []float64{1, 2, 4} {
		w := solveWhole(r, rods, f, true)
		s := w.wall
		// residual along edge 0 at points
		e := &s.edges[0]
		fmt.Println("f", f)
		for j := e.first; j < e.end; j++ {
			p := &s.panels[j]
			fmt.Printf("%.4f-%.4f:", (p.along-p.half)*1e3, (p.along+p.half)*1e3)
			for _, tt := range []float64{-.99, -.9, -.5, 0, .5, .9, .99} {
				z := p.at(tt)
				// flux pv: others panels
				dens := 0.0
				for k := range p.p {
					v, _ := legendre(k, tt)
					dens += w.y[p.dof+k] * v
				}
				fl := 0.0
				for i := range s.panels {
					if s.panels[i].edge == 0 {
						continue
					}
					q := &s.panels[i]
					g := &rules[24]
					for a, x := range g.x {
						d := 0.0
						for k := range q.p {
							d += g.p[a][k] * w.y[q.dof+k]
						}
						dz := z - q.at(x)
						fl += -q.half * d / (2 * math.Pi) * (-imag(dz)) / (real(dz)*real(dz) + imag(dz)*imag(dz))
					}
				}
				h := 1e-7
				fl += -(s.sourcesAt(w.src, z+complex(0, h)) - s.sourcesAt(w.src, z-complex(0, h))) / (2 * h)
				fmt.Printf(" %.0f/%.0f", dens, dens+s.rows[0].flux*fl)
			}
			fmt.Println()
		}
	}
}

func TestY(t *testing.T) {
	for _, f := range []float64{1, 2, 4, 8} {
		all := [4]Side{held(0), held(0), held(0), held(0)}
		s := New(Rect{W: 0.03, H: 0.02, MediumK: 1e6 * .2, Layers: []Layer{{.2, .003}}, Sides: all}, []Disc{point(0.015 + 0.01i)}, f)
		src := s.bare(1)
		y := s.Respond(src, false)
		fmt.Println(f, s.n, 1/(.2*s.InWall(y, src, 0.004+0.004i)))
		r := Rect{W: 0.04, H: 0.03, MediumK: 0.3, Sides: [4]Side{insulated, held(70), insulated, held(10)}}
		s = New(r, nil, f)
		y = s.Respond(Sources{}, true)
		for _, x := range []float64{0, .0001, .0003, .001, .002, .003, .005, .01} {
			fmt.Printf(" %.4f", s.At(y, complex(.04-x, 0))-(70-60*x/.04))
		}
		fmt.Println()
		const thick, h, k = 2e-4, 30.0, 50.0
		r = Rect{W: 0.06, H: 0.03, MediumK: 1e-4, Layers: []Layer{{k, thick}}}
		r.Sides = [4]Side{film(h, 0), film(h, 0), film(h, 0), held(1)}
		s = New(r, nil, f)
		y = s.Respond(Sources{}, true)
		m, l := math.Sqrt(h/(k*thick)), 0.06+0.015+1.5*thick
		for x, z := range map[float64]complex128{0.01: complex(0.01, -thick/2), 0.05: complex(0.05, 0.03+thick/2), 0.075: complex(0.06+thick/2, 0.015)} {
			want := math.Cosh(m*(l-x-thick)) / math.Cosh(m*l)
			fmt.Print(x, " ", s.InWall(y, Sources{}, z)/want, " ")
		}
		fmt.Println()
	}
}
