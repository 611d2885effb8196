package latest

import (
	"context"
	"sync"
)

// Runner does one job at a time on its own goroutine; the newest request wins.
type Runner[Req, Res any] struct {
	work func(context.Context, Req) Res
	done func(rev uint64, req Req, res Res)

	mu      sync.Mutex
	rev     uint64             // of the newest request
	waiting *request[Req]      // replaced by a newer one, never queued behind
	cancel  context.CancelFunc // of the running job, nil while idle
	closed  bool

	wake  chan struct{} // holds one token while a request waits
	ended chan struct{} // closed when the goroutine has gone
}

type request[Req any] struct {
	rev uint64
	req Req
}

// New starts a runner. work runs on the runner's goroutine; done is called there after each job with its request's revision (the caller hops to
// its own goroutine). An interrupted job's result is delivered too, whatever work returned by then: the caller drops it by its revision. Revisions
// come in rising order.
func New[Req, Res any](work func(context.Context, Req) Res, done func(rev uint64, req Req, res Res)) *Runner[Req, Res] {
	r := &Runner[Req, Res]{
		work:  work,
		done:  done,
		wake:  make(chan struct{}, 1),
		ended: make(chan struct{}),
	}
	go r.loop()
	return r
}

// Ask queues a request and returns its revision. With interrupt the running job's context ends; without, the running job is left to finish first.
// After Close it does nothing and returns 0.
func (r *Runner[Req, Res]) Ask(req Req, interrupt bool) uint64 {
	r.mu.Lock()
	defer r.mu.Unlock()
	if r.closed {
		return 0
	}
	r.rev++
	r.waiting = &request[Req]{rev: r.rev, req: req}
	if interrupt && r.cancel != nil {
		r.cancel()
	}
	r.signal()
	return r.rev
}

// Close ends the runner and waits for the running job, whose done is still called. A request that waits is dropped. It must not be called from
// within work or done.
func (r *Runner[Req, Res]) Close() {
	r.mu.Lock()
	r.closed = true
	r.waiting = nil
	if r.cancel != nil {
		r.cancel()
	}
	r.signal()
	r.mu.Unlock()
	<-r.ended
}

// signal wakes the goroutine; a token that is already there is enough.
func (r *Runner[Req, Res]) signal() {
	select {
	case r.wake <- struct{}{}:
	default:
	}
}

func (r *Runner[Req, Res]) loop() {
	defer close(r.ended)
	for range r.wake {
		next, ctx, cancel, closed := r.take()
		if closed {
			return
		}
		if next == nil {
			continue
		}
		res := r.work(ctx, next.req)
		r.release(cancel)
		r.done(next.rev, next.req, res)
	}
}

// take claims the waiting request and opens its context.
func (r *Runner[Req, Res]) take() (*request[Req], context.Context, context.CancelFunc, bool) {
	r.mu.Lock()
	defer r.mu.Unlock()
	if r.closed {
		return nil, nil, nil, true
	}
	next := r.waiting
	if next == nil {
		return nil, nil, nil, false
	}
	r.waiting = nil
	ctx, cancel := context.WithCancel(context.Background())
	r.cancel = cancel
	return next, ctx, cancel, false
}

// release ends the job's context.
func (r *Runner[Req, Res]) release(cancel context.CancelFunc) {
	r.mu.Lock()
	defer r.mu.Unlock()
	cancel()
	r.cancel = nil
}
