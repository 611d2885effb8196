// Reference temperatures of sections with radiating surfaces that are not round: see README.md.
//
//	go run ./testdata/fe-shaped duct 1
//
// The number divides the lengths of all patches and elements. Files go to out/fe-shaped.
package main

import (
	"fmt"
	"os"
	"strconv"
)

func main() {
	made := map[string]func() section{"duct": duct, "flat": flatCable}
	if len(os.Args) != 3 || made[os.Args[1]] == nil {
		fmt.Fprintln(os.Stderr, "go run ./testdata/fe-shaped duct|flat fineness")
		os.Exit(2)
	}
	fine, err := strconv.ParseFloat(os.Args[2], 64)
	check(err)
	check(os.MkdirAll("out/fe-shaped", 0o755))
	check(os.Chdir("out/fe-shaped"))
	s := made[os.Args[1]]()
	patches := mesh(&s, fine)
	convert()
	r, t0, names := elements(&s, len(patches))
	e := radiate(&s, patches, r, t0)
	for m, name := range names {
		t := t0[len(patches)+m]
		for i := range e {
			t -= r[i][len(patches)+m] * e[i]
		}
		fmt.Printf("%s %.4f (without radiation %.3f)\n", name, t, t0[len(patches)+m])
	}
}

func check(err error) {
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}
