package main

import (
	"bufio"
	"fmt"
	"os"
	"os/exec"
)

// convert rewrites gmsh's mesh as FreeFem++'s own.
func convert() {
	f, _ := os.Open("x.msh")
	r := bufio.NewReader(f)
	out, _ := os.Create("y.msh")
	w := bufio.NewWriter(out)
	word := func() (s string) { fmt.Fscan(r, &s); return s }
	num := func() (n int) { fmt.Fscan(r, &n); return n }
	for word() != "$Nodes" {
	}
	n := num()
	x := make([][2]string, n+1)
	for range n {
		i := num()
		x[i] = [2]string{word(), word()}
		word()
	}
	for word() != "$Elements" {
	}
	var edges, tris [][4]int
	used := make([]int, n+1)
	for range num() {
		num()
		kind := num()
		tags := make([]int, num())
		for k := range tags {
			tags[k] = num()
		}
		switch kind {
		case 1:
			edges = append(edges, [4]int{num(), num(), tags[0]})
		case 2:
			t := [4]int{num(), num(), num(), tags[0]}
			tris = append(tris, t)
			used[t[0]], used[t[1]], used[t[2]] = 1, 1, 1
		case 15:
			num()
		default:
			panic(kind)
		}
	}
	k := 0
	for i := range used {
		if used[i] > 0 {
			k++
			used[i] = k
		}
	}
	fmt.Fprintln(w, k, len(tris), len(edges))
	for i, v := range x {
		if used[i] > 0 {
			fmt.Fprintln(w, v[0], v[1], 0)
		}
	}
	for _, t := range tris {
		fmt.Fprintln(w, used[t[0]], used[t[1]], used[t[2]], t[3])
	}
	for _, e := range edges {
		fmt.Fprintln(w, used[e[0]], used[e[1]], e[2])
	}
	w.Flush()
	out.Close()
}

// elements finds the rises of patches and metals for 1 W/m into each patch, their temperatures without radiation, and the names of the metals.
func elements(s *section, n int) (r [][]float64, t0 []float64, names []string) {
	f, _ := os.Create("x.edp")
	w := bufio.NewWriter(f)
	fmt.Fprintf(w, "mesh Th = readmesh(\"y.msh\");\nfespace Vh(Th, P2);\nfespace Ph(Th, P0);\nPh k = 0, q = 0;\nint reg;\nreal area;\n")
	var heated []int
	for i, g := range s.regions {
		fmt.Fprintf(w, "k = k + %g*(region == %d);\narea = int2d(Th, %d)(1.);\nq = q + %g/area*(region == %d);\n", g.k, i+1, i+1, g.q, i+1)
		if g.q > 0 {
			heated = append(heated, i+1)
			names = append(names, g.name)
		}
	}
	m := len(heated)
	fmt.Fprintf(w, "real h = %g, ta = %g;\nint n = %d, m = %d;\nint[int] heated = [", s.film, s.ta, n, m)
	for i, v := range heated {
		if i > 0 {
			fmt.Fprint(w, ", ")
		}
		fmt.Fprint(w, v)
	}
	fmt.Fprint(w, `];
varf a(u, v) = int2d(Th)(k*(dx(u)*dx(v) + dy(u)*dy(v))) + int1d(Th, 1)(h*u*v);
matrix A = a(Vh, Vh);
set(A, solver = sparsesolver);
varf l(u, v) = int2d(Th)(q*v) + int1d(Th, 1)(h*ta*v);
real[int] b = l(0, Vh);
real[int] t = A^-1*b;
real[int, int] M(Vh.ndof, n + m);
for (int i = 0; i < n + m; i++) {
	if (i < n) {
		real len = int1d(Th, 100 + i)(1.);
		varf p(u, v) = int1d(Th, 100 + i)(v/len);
		real[int] c = p(0, Vh);
		M(:, i) = c;
	} else {
		int g = heated[i - n];
		real ar = int2d(Th, g)(1.);
		varf p(u, v) = int2d(Th, g)(v/ar);
		real[int] c = p(0, Vh);
		M(:, i) = c;
	}
}
ofstream out("x.txt");
out.precision(14);
real[int] c = M'*t;
for (int j = 0; j < n + m; j++) out << c[j] << endl;
for (int i = 0; i < n; i++) {
	real[int] bi = M(:, i);
	real[int] ti = A^-1*bi;
	c = M'*ti;
	for (int j = 0; j < n + m; j++) out << c[j] << endl;
}
cout << "dof " << Vh.ndof << endl;
`)
	w.Flush()
	f.Close()
	out, err := exec.Command("FreeFem++", "-nw", "-v", "0", "x.edp").CombinedOutput()
	if err != nil {
		panic(string(out))
	}
	fmt.Print(string(out[max(0, len(out)-60):]))
	g, _ := os.Open("x.txt")
	rd := bufio.NewReader(g)
	read := func() []float64 {
		v := make([]float64, n+m)
		for j := range v {
			if _, err := fmt.Fscan(rd, &v[j]); err != nil {
				panic(err)
			}
		}
		return v
	}
	t0 = read()
	for range n {
		r = append(r, read())
	}
	return r, t0, names
}
