package main

import (
	"fmt"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// mostProblems is how many problems of one file are printed.
const mostProblems = 50

// answer reads and solves one design; nil when it can't be, with the reasons on stderr and the status set.
func (a *app) answer(file, accuracy string, assumeIdle bool) *rating.Result {
	d, problems, err := section.Open(file)
	if err != nil {
		fmt.Fprintf(a.err, "%s: %v\n", file, err)
		a.worse(exitInput)
		return nil
	}
	if a.refused(file, problems) {
		return nil
	}
	r, problems, err := rating.NewEngine(a.cat).Solve(a.ctx, d, rating.Options{Accuracy: accuracies[accuracy], AssumeIdle: assumeIdle})
	if err != nil {
		fmt.Fprintf(a.err, "%s: %v\n", file, err)
		a.worse(exitProgram)
		return nil
	}
	if a.refused(file, problems) {
		return nil
	}
	a.worse(statusOf(r))
	return r
}

var accuracies = map[string]heat.Accuracy{"draft": heat.Draft, "standard": heat.Standard, "fine": heat.Fine}

// refused prints problems and tells whether one of them stops the work.
func (a *app) refused(file string, problems []section.Problem) bool {
	stop := false
	for i, p := range problems {
		if i == mostProblems {
			fmt.Fprintf(a.err, "%s: %d more problems\n", file, len(problems)-i)
		}
		if i < mostProblems {
			fmt.Fprintln(a.err, p.At(file))
		}
		stop = stop || p.Severity == section.Refused
	}
	if stop {
		a.worse(exitInput)
	}
	return stop
}

func statusOf(r *rating.Result) int {
	switch {
	case r.Status == heat.StoppedEarly || r.Status == heat.Cancelled:
		return exitProgram
	case r.Over() || len(r.Unassigned) > 0:
		return exitOver
	}
	return exitDone
}
