package main

import (
	"bufio"
	"fmt"
	"math"
	"math/cmplx"
	"os"
	"os/exec"
)

type patch struct {
	a, b complex128
	area float64
	body int
}

func (s *stroke) span() float64 { a := cmplx.Phase((s.b - s.c) / (s.a - s.c)); return math.Abs(a) }
func (s *stroke) length() float64 {
	if s.arc {
		return cmplx.Abs(s.a-s.c) * s.span()
	}
	return cmplx.Abs(s.b - s.a)
}

func (s *stroke) at(u float64) complex128 {
	if s.arc {
		return s.c + (s.a-s.c)*cmplx.Rect(1, u*s.span())
	}
	return s.a + complex(u, 0)*(s.b-s.a)
}

// mesh writes the geometry, one curve to a patch, and calls gmsh.
func mesh(s *section, fine float64) []patch {
	const sub = 3 // elements to a patch

	f, err := os.Create("x.geo")
	check(err)
	w := bufio.NewWriter(f)
	points, curves := 0, 0
	point := func(z complex128) int {
		points++
		fmt.Fprintf(w, "Point(%d) = {%.15g, %.15g, 0};\n", points, real(z), imag(z))
		return points
	}
	var patches []patch
	for bi := range s.bodies {
		b := &s.bodies[bi]
		first := curves + 1
		start := point(b.s[0].a)
		last := start
		for si := range b.s {
			st := &b.s[si]
			n := max(1, int(math.Ceil(st.length()/(b.h/fine))))
			if st.arc {
				n = max(n, int(math.Ceil(st.span()/(math.Pi/2)*6*fine)))
			}
			cc := 0
			if st.arc {
				cc = point(st.c)
			}
			// patches are denser towards the ends of straight strokes
			place := func(u float64) float64 {
				if st.arc {
					return u
				}
				return (1-math.Cos(math.Pi*u))/2*0.7 + 0.3*u
			}
			for k := range n {
				za, zb := st.at(place(float64(k)/float64(n))), st.at(place(float64(k+1)/float64(n)))
				p := start
				if !(si == len(b.s)-1 && k == n-1) {
					p = point(zb)
				}
				curves++
				if st.arc {
					fmt.Fprintf(w, "Circle(%d) = {%d, %d, %d};\n", curves, last, cc, p)
				} else {
					fmt.Fprintf(w, "Line(%d) = {%d, %d};\n", curves, last, p)
				}
				m := sub
				if b.rad == 0 {
					m = max(2, sub-1)
				}
				fmt.Fprintf(w, "Transfinite Curve{%d} = %d;\n", curves, m+1)
				last = p
				if b.rad > 0 {
					fmt.Fprintf(w, "Physical Curve(%d) = {%d};\n", 100+len(patches), curves)
					area := cmplx.Abs(zb - za)
					if st.arc {
						area = st.length() / float64(n)
					}
					patches = append(patches, patch{za, zb, area, bi})
				}
			}
		}
		fmt.Fprintf(w, "Curve Loop(%d) = {%d:%d};\n", bi+1, first, curves)
		if bi == s.outside {
			fmt.Fprintf(w, "Physical Curve(1) = {%d:%d};\n", first, curves)
		}
	}
	for i, g := range s.regions {
		fmt.Fprintf(w, "Plane Surface(%d) = {%d", i+1, g.out+1)
		for _, h := range g.holes {
			fmt.Fprintf(w, ", %d", h+1)
		}
		fmt.Fprintf(w, "};\nPhysical Surface(%d) = {%d};\n", i+1, i+1)
	}
	w.Flush()
	f.Close()
	if out, err := exec.Command("gmsh", "-2", "-format", "msh2", "-v", "2", "x.geo", "-o", "x.msh").CombinedOutput(); err != nil {
		panic(string(out))
	}
	return patches
}
