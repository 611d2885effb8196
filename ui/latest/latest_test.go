package latest

import (
	"context"
	"slices"
	"sync"
	"testing"
)

// job lets a test decide when a piece of work ends.
type job struct {
	name    int
	started chan struct{}
	finish  chan struct{}
}

func newJob(name int) job {
	return job{name: name, started: make(chan struct{}), finish: make(chan struct{})}
}

// desk runs jobs and keeps what came back.
type desk struct {
	mu   sync.Mutex
	revs []uint64
	got  []string
	came chan struct{}
}

func (d *desk) work(ctx context.Context, j job) string {
	close(j.started)
	select {
	case <-j.finish:
		return "finished"
	case <-ctx.Done():
		return "interrupted"
	}
}

func (d *desk) done(rev uint64, _ job, res string) {
	d.mu.Lock()
	d.revs = append(d.revs, rev)
	d.got = append(d.got, res)
	d.mu.Unlock()
	d.came <- struct{}{}
}

func (d *desk) want(t *testing.T, revs []uint64, got []string) {
	t.Helper()
	d.mu.Lock()
	defer d.mu.Unlock()
	if !slices.Equal(d.revs, revs) || !slices.Equal(d.got, got) {
		t.Errorf("came back: revisions %v %v, want %v %v", d.revs, d.got, revs, got)
	}
}

func start() (*desk, *Runner[job, string]) {
	d := &desk{came: make(chan struct{}, 100)}
	return d, New(d.work, d.done)
}

func TestNewestWaitingRequestWins(t *testing.T) {
	d, r := start()
	defer r.Close()
	a, b, c := newJob(1), newJob(2), newJob(3)
	r.Ask(a, false)
	<-a.started
	r.Ask(b, false)
	if rev := r.Ask(c, false); rev != 3 {
		t.Errorf("the third request has revision %d, want 3", rev)
	}
	close(a.finish)
	<-c.started // b, which waited, was replaced
	close(c.finish)
	<-d.came
	<-d.came
	d.want(t, []uint64{1, 3}, []string{"finished", "finished"})
	select {
	case <-b.started:
		t.Error("a replaced request was run")
	default:
	}
}

func TestInterruptEndsTheRunningJob(t *testing.T) {
	d, r := start()
	defer r.Close()
	a, b := newJob(1), newJob(2)
	r.Ask(a, false)
	<-a.started
	r.Ask(b, true)
	<-b.started // without the interrupt this would wait for ever: nobody finishes a
	close(b.finish)
	<-d.came
	<-d.came
	d.want(t, []uint64{1, 2}, []string{"interrupted", "finished"})
}

func TestCloseInterruptsAndWaits(t *testing.T) {
	d, r := start()
	a, b := newJob(1), newJob(2)
	r.Ask(a, false)
	<-a.started
	r.Ask(b, false)
	r.Close()
	d.want(t, []uint64{1}, []string{"interrupted"})
	if rev := r.Ask(newJob(3), true); rev != 0 {
		t.Errorf("a closed runner took a request as revision %d", rev)
	}
	r.Close() // a second time does no harm
	select {
	case <-r.ended:
	default:
		t.Error("the goroutine outlived Close")
	}
}

func TestIdleRunnerCloses(t *testing.T) {
	d, r := start()
	r.Close()
	d.want(t, nil, nil)
}

// TestLastRequestIsAlwaysAnswered floods the runner from several goroutines: whatever is dropped on the way, the newest request of all comes back.
func TestLastRequestIsAlwaysAnswered(t *testing.T) {
	var mu sync.Mutex
	var last uint64
	answered := make(chan uint64, 1000)
	r := New(
		func(_ context.Context, n int) int { return 2 * n },
		func(rev uint64, req, res int) {
			if res != 2*req {
				t.Errorf("request %d came back with %d", req, res)
			}
			answered <- rev
		})
	var wg sync.WaitGroup
	for g := range 4 {
		wg.Add(1)
		go func() {
			defer wg.Done()
			for i := range 200 {
				rev := r.Ask(1000*g+i, i%3 == 0)
				mu.Lock()
				last = max(last, rev)
				mu.Unlock()
			}
		}()
	}
	wg.Wait()
	previous := uint64(0)
	for rev := range answered {
		if rev <= previous {
			t.Fatalf("revision %d came after %d", rev, previous)
		}
		previous = rev
		if rev == last {
			break
		}
	}
	r.Close()
}
