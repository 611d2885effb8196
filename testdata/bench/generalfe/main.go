// Command generalfe solves sections of testdata/fe-cases with the general finite-element program FreeFem++ and with Packrise and compares temperatures and
// times. Run it by hand through testdata/bench/against-general-fe; README.md beside that tells what it does.
package main

import (
	"context"
	"encoding/csv"
	"fmt"
	"log"
	"math"
	"os"
	"path/filepath"
	"runtime"
	"slices"
	"strconv"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

const (
	folder  = "testdata/fe-cases"
	near    = 0.03 // K: what counts as an accuracy comparable to Packrise's at standard
	repeats = 7    // solves with FreeFem++ for the median
	ownRuns = 51   // the same with Packrise: they are short, and a busy machine scatters them more
)

var cases = []string{"c04_hex7_touch_wall_air", "c07_hex37_gap100um_filler", "c09_rect7_floor_air"}

// levels are the refinements: lengths of segments go with one over it. The last two give the extrapolation.
var levels = []float64{1, 1.2, 1.4, 1.7, 2, 2.4, 2.8, 4}

func main() {
	log.SetFlags(0)
	runtime.GOMAXPROCS(1) // FreeFem++ has one thread too
	published, err := readExpected(filepath.Join(folder, "expected.csv"))
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("One thread each, medians of %d solves with FreeFem++ and %d with Packrise. FreeFem++: quadratic triangles, the coarsest refinement within %.2f K of its own extrapolation.\n", repeats, ownRuns, near)
	for _, name := range cases {
		if err := compare(name, published[name]); err != nil {
			log.Fatalf("%s: %v", name, err)
		}
	}
}

// compare prints what one case gives.
func compare(name string, published []float64) error {
	d, problems, err := section.Open(filepath.Join(folder, name+".yaml"))
	if err != nil {
		return err
	}
	if len(problems) > 0 {
		return fmt.Errorf("%s", problems[0].Sentence())
	}
	ours, took, err := packrise(d)
	if err != nil {
		return err
	}
	runs := make([]feRun, len(levels))
	for k, level := range levels {
		if runs[k], err = freefem(d, level, 1); err != nil {
			return fmt.Errorf("refinement %g: %w", level, err)
		}
	}
	limit := extrapolate(runs[len(runs)-2:], levels[len(levels)-2:])
	fmt.Printf("\n%s: %d conductors\n", name, len(ours))
	fmt.Printf("  largest difference   Packrise − extrapolated FreeFem++   %.4f K\n", worst(ours, limit))
	fmt.Printf("                       Packrise − expected.csv             %.4f K\n", worst(ours, published))
	fmt.Printf("                       extrapolated − expected.csv         %.4f K\n", worst(limit, published))
	for k, r := range runs {
		fmt.Printf("  refinement %4.2f: %6d triangles, %7d unknowns, off by %.4f K, %7.3f s\n", levels[k], r.triangles, r.unknowns, worst(r.temps, limit), r.mesh+r.solve)
	}
	k := slices.IndexFunc(runs, func(r feRun) bool { return worst(r.temps, limit) <= near })
	if k < 0 {
		return fmt.Errorf("no refinement comes within %g K", near)
	}
	r, err := freefem(d, levels[k], repeats)
	if err != nil {
		return err
	}
	seconds := median(took)
	fmt.Printf("  FreeFem++ at refinement %g (off by %.4f K): mesh %.1f ms + assembly and solution %.1f ms = %.1f ms\n", levels[k], worst(r.temps, limit), r.mesh*1e3, r.solve*1e3, (r.mesh+r.solve)*1e3)
	fmt.Printf("  Packrise at standard  (off by %.4f K): %.2f ms, the fastest %.2f ms\n", worst(ours, limit), seconds*1e3, slices.Min(took)*1e3)
	fmt.Printf("  RATIO of times %.0f (without meshing %.0f), largest difference %.4f K\n", (r.mesh+r.solve)/seconds, r.solve/seconds, worst(ours, limit))
	return nil
}

// packrise solves with a new engine each time, so that nothing is kept from one solve to the next, and returns the temperatures in the order of the parts
// and the `seconds` of each.
func packrise(d *section.Document) (temps, took []float64, err error) {
	stock := catalog.Load()
	for range ownRuns {
		r, problems, err := rating.NewEngine(stock).Solve(context.Background(), d, rating.Options{})
		if err != nil {
			return nil, nil, err
		}
		if len(problems) > 0 {
			return nil, nil, fmt.Errorf("%s", problems[0].Sentence())
		}
		if r.Status != heat.Converged {
			return nil, nil, fmt.Errorf("ended with status %v in Packrise", r.Status)
		}
		byID := map[string]float64{}
		for _, c := range r.Conductors {
			byID[c.ID] = c.TempC
		}
		temps = temps[:0]
		for _, p := range d.Parts {
			temps = append(temps, byID[p.ID])
		}
		took = append(took, r.Seconds)
	}
	return temps, took, nil
}

// extrapolate takes errors to go with the square of the lengths (chords instead of arcs).
func extrapolate(runs []feRun, levels []float64) []float64 {
	out := make([]float64, len(runs[1].temps))
	f := 1 / (math.Pow(levels[1]/levels[0], 2) - 1)
	for i, t := range runs[1].temps {
		out[i] = t + f*(t-runs[0].temps[i])
	}
	return out
}

func worst(a, b []float64) (out float64) {
	if len(a) != len(b) {
		return math.NaN()
	}
	for i := range a {
		out = max(out, math.Abs(a[i]-b[i]))
	}
	return out
}

func median(v []float64) float64 {
	s := slices.Sorted(slices.Values(v))
	return s[len(s)/2]
}

// readExpected returns the temperatures of each case in the order of the file, which is that of the parts.
func readExpected(path string) (map[string][]float64, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		return nil, err
	}
	out := map[string][]float64{}
	for _, row := range rows[1:] {
		v, err := strconv.ParseFloat(row[2], 64)
		if err != nil {
			return nil, err
		}
		out[row[0]] = append(out[row[0]], v)
	}
	return out, nil
}
