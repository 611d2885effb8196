package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"os/signal"

	"github.com/alecthomas/kong"

	"packrise/solver/catalog"
	"packrise/solver/rating"
)

// Exit statuses, a promise to scripts.
const (
	exitDone    = 0
	exitOver    = 1
	exitInput   = 2
	exitProgram = 3
)

const about = `Temperatures of loaded conductors that share one jacket, bundle, conduit or wireway, from a section document (YAML).

Exit status: 0 done and everything within its limit; 1 something is over its limit, no steady temperature exists, or a current is unknown
so that nothing can be called within; 2 the input is wrong (one line a problem on stderr); 3 the program failed or stopped early.

` + rating.Caution

// commands is the grammar of the command line.
type commands struct {
	Solve  solveCommand  `cmd:"" help:"Print every temperature, limit and margin of one or more designs."`
	Rate   rateCommand   `cmd:"" help:"Print how much each conductor may carry, how sure that is, and what code tables say."`
	Advise adviseCommand `cmd:"" help:"Print what to change first: single changes, ranked by the kelvins that they gain."`
	Draw   drawCommand   `cmd:"" help:"Write the picture of a design: section, heat map, ladder, sentence."`
}

// app is what a command needs from outside.
type app struct {
	ctx      context.Context
	out, err io.Writer
	cat      *catalog.Catalog
	status   int
}

// worse keeps the most serious status of several files.
func (a *app) worse(status int) { a.status = max(a.status, status) }

func main() { os.Exit(run(os.Args[1:], os.Stdout, os.Stderr)) }

// run is main with its surroundings as arguments. It returns the exit status.
func run(args []string, out, errs io.Writer) int {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt)
	defer stop()
	var c commands
	done := -1
	parser, err := kong.New(&c, kong.Name("packrise-cli"), kong.Description(about), kong.Writers(out, errs), kong.Exit(func(code int) { done = code }),
		kong.ConfigureHelp(kong.HelpOptions{WrapUpperBound: 110}))
	if err != nil {
		fmt.Fprintf(errs, "packrise-cli: %v\n", err)
		return exitProgram
	}
	if len(args) == 0 {
		args = []string{"--help"}
	}
	parsed, err := parser.Parse(args)
	if done >= 0 { // help was asked for and printed
		return done
	}
	if err != nil {
		fmt.Fprintf(errs, "packrise-cli: %v; packrise-cli --help shows what can be written\n", err)
		return exitInput
	}
	a := &app{ctx: ctx, out: out, err: errs, cat: catalog.Load()}
	if err := parsed.Run(a); err != nil {
		fmt.Fprintf(errs, "packrise-cli: %v\n", err)
		if errors.Is(err, errInput) {
			return exitInput
		}
		return exitProgram
	}
	return a.status
}

var errInput = errors.New("the input is wrong")
