// Package latest runs the newest request beside the caller: a request made while another runs replaces any that waits.
package latest

import "context"

// Runner does one job at a time on its own goroutine; the newest request wins.
type Runner[Req, Res any] struct{}

// New starts a runner. work runs on the runner's goroutine; done is called there after each job with its request's revision (the caller hops to
// its own goroutine).
func New[Req, Res any](work func(context.Context, Req) Res, done func(rev uint64, req Req, res Res)) *Runner[Req, Res] {
	panic("latest: not built")
}

// Ask queues a request and returns its revision. With interrupt the running job's context ends; without, the running job is left to finish first.
func (r *Runner[Req, Res]) Ask(req Req, interrupt bool) uint64 { panic("latest: not built") }

// Close ends the runner and waits for the running job.
func (r *Runner[Req, Res]) Close() { panic("latest: not built") }
