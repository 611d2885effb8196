package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"time"

	"packrise/solver/section"
)

const patience = 5 * time.Minute // for one run of FreeFem++

// feRun is what one refinement gave: temperatures in the order of the parts, °C; medians of the times in seconds.
type feRun struct {
	temps               []float64
	mesh, solve         float64
	triangles, unknowns int
}

// script is the FreeFem++ input after the data. Each segment is a border of its own, so the mesh has exactly our nodes. The heat is spread over the polygons'
// area and the film over their perimeter, so both are right in total. The clock leaves out reading the input and printing.
const script = `
real[int] xa(n),ya(n),xb(n),yb(n),mx(marks),my(marks),mk(marks),mq(marks);
int[int] lab(n),cuts(n),metal(marks);
cuts=1;
{
ifstream f("section.txt");
for(int i=0;i<n;i++)f>>xa(i)>>ya(i)>>xb(i)>>yb(i)>>lab(i);
for(int i=0;i<marks;i++)f>>mx(i)>>my(i)>>mk(i)>>mq(i)>>metal(i);
}
border S(t=0,1;i){x=xa(i)*(1-t)+xb(i)*t;y=ya(i)*(1-t)+yb(i)*t;label=lab(i);}
for(int pass=0;pass<passes;pass++){
real t0=clock();
mesh Th=buildmesh(S(cuts),nbvx=200*n);
real t1=clock();
fespace Ph(Th,P0);
fespace Vh(Th,P2);
Ph reg=region;
int regions=int(reg[].max)+1;
real[int] kreg(regions),qreg(regions),areas(regions);
kreg=kfill;qreg=0;areas=0;
int[int] where(marks);
for(int e=0;e<Th.nt;e++)areas(Th[e].region)+=Th[e].area;
for(int i=0;i<marks;i++){where(i)=Th(mx(i),my(i)).region;kreg(where(i))=mk(i);qreg(where(i))=mq(i)/areas(where(i));}
Ph kk=kreg(region),qq=qreg(region);
real hh=film*1e-3*edge/int1d(Th,1)(1.);
varf va(u,v)=int2d(Th)(kk*(dx(u)*dx(v)+dy(u)*dy(v)))+int1d(Th,1)(hh*u*v);
varf vl(u,v)=int2d(Th)(qq*v)+int1d(Th,1)(hh*ambient*v);
matrix A=va(Vh,Vh);
set(A,solver=sparsesolver);
real[int] b=vl(0,Vh);
Vh T;
T[]=A^-1*b;
real t2=clock();
cout.precision(12);
cout<<"PASS "<<t1-t0<<" "<<t2-t1<<" "<<Th.nt<<" "<<Vh.ndof<<endl;
if(pass==passes-1)for(int i=0;i<marks;i++)if(metal(i)>0){
int w=where(i);
cout<<"TEMP "<<int2d(Th,w)(T)/areas(w)<<endl;
}
}
`

// input writes the script and its data, in whose order both must agree. Lengths are in mm, so a film goes in W/(m·mm·K) and conductivities stay as they are.
func input(m *model, passes int) (edp, data []byte) {
	var head, rows bytes.Buffer
	fmt.Fprintf(&head, "verbosity=0;\nint passes=%d,marks=%d,n=%d;\n", passes, len(m.marks), len(m.segments))
	fmt.Fprintf(&head, "real kfill=%.17g,film=%.17g,ambient=%.17g,edge=%.17g;\n", m.fillK, m.film, m.ambient, m.edge)
	head.WriteString(script)
	for i, s := range m.segments {
		a, b := m.nodes[s[0]], m.nodes[s[1]]
		fmt.Fprintf(&rows, "%.17g %.17g %.17g %.17g %d\n", a.X, a.Y, b.X, b.Y, choose(m.outside[i], 1, 2))
	}
	for _, k := range m.marks {
		fmt.Fprintf(&rows, "%.17g %.17g %.17g %.17g %d\n", k.at.X, k.at.Y, k.k, k.heat, choose(k.metal, 1, 0))
	}
	return head.Bytes(), rows.Bytes()
}

func choose(which bool, yes, no int) int {
	if which {
		return yes
	}
	return no
}

// freefem solves a design at a refinement, as often as passes says within one process.
func freefem(d *section.Document, level float64, passes int) (feRun, error) {
	m, err := build(d, level)
	if err != nil {
		return feRun{}, err
	}
	dir, err := os.MkdirTemp("", "general-fe-")
	if err != nil {
		return feRun{}, err
	}
	defer os.RemoveAll(dir)
	file := filepath.Join(dir, "section.edp")
	edp, data := input(m, passes)
	if err := errors.Join(os.WriteFile(file, edp, 0o600), os.WriteFile(filepath.Join(dir, "section.txt"), data, 0o600)); err != nil {
		return feRun{}, err
	}
	ctx, cancel := context.WithTimeout(context.Background(), patience)
	defer cancel()
	run := exec.CommandContext(ctx, "FreeFem++", "-nw", "-v", "0", file)
	run.Dir = dir
	run.Env = append(os.Environ(), "OMP_NUM_THREADS=1", "OPENBLAS_NUM_THREADS=1")
	text, err := run.CombinedOutput()
	if err != nil {
		return feRun{}, fmt.Errorf("FreeFem++: %w\n%s", err, text[max(0, len(text)-800):])
	}
	return results(string(text))
}

// results reads what the script printed.
func results(text string) (feRun, error) {
	var r feRun
	var mesh, solve []float64
	for line := range strings.Lines(text) {
		var a, b float64
		if n, _ := fmt.Sscanf(line, "PASS %g %g %d %d", &a, &b, &r.triangles, &r.unknowns); n == 4 {
			mesh, solve = append(mesh, a), append(solve, b)
		} else if n, _ := fmt.Sscanf(line, "TEMP %g", &a); n == 1 {
			r.temps = append(r.temps, a)
		}
	}
	if len(mesh) == 0 || len(r.temps) == 0 {
		return r, fmt.Errorf("FreeFem++ printed no temperatures:\n%s", text[max(0, len(text)-800):])
	}
	r.mesh, r.solve = median(mesh), median(solve)
	return r, nil
}
