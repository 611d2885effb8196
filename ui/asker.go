package ui

import (
	"context"
	"errors"
	"path/filepath"

	"packrise/solver/section"
	"packrise/solver/study"
	"packrise/ui/latest"
)

// asker answers one long question at a time beside the window, with studies of its own. Another question takes the place of the one before; an
// answer about a design that has changed since is dropped.
type asker struct {
	desk   *Desk
	runner *latest.Runner[*question, any]
	study  *study.Study // touched on the runner's goroutine alone
	now    *question    // under way; nil: none
	ended  bool
}

// question is what is asked, and who wants to know. Its functions are called on the window's goroutine, except work.
type question struct {
	work func(ctx context.Context, s *study.Study, d *section.Document, o study.Options) (any, error) // on the runner's goroutine
	told func(done, of int)                                                                           // how far it is; nil: nobody cares
	then func(answer any, err error)                                                                  // the end of it
	drop func()                                                                                       // called instead where it was dropped: cancelled, replaced, or another design; may be nil

	doc *section.Document
	dir string
	rev uint64
	out any
	err error
}

func newAsker(k *Desk) *asker {
	a := &asker{desk: k}
	a.runner = latest.New(a.work, a.done)
	k.Listen(func(c Changed) {
		if c&ChangedDocument != 0 && a.now != nil && a.now.rev != k.Revision() {
			a.cancel()
		}
	})
	return a
}

// close ends what runs and waits for it.
func (a *asker) close() {
	if a.ended {
		return
	}
	a.ended, a.now = true, nil
	a.runner.Close()
}

// ask puts a question about the document as it is, and returns it for cancelling.
func (a *asker) ask(q question) *question {
	a.cancel()
	a.desk.long()
	q.doc, q.rev = a.desk.Document(), a.desk.Revision()
	q.dir = a.desk.folder()
	a.now = &q
	a.runner.Ask(&q, true)
	return &q
}

// withdraw drops a question if it is still the one under way.
func (a *asker) withdraw(q *question) {
	if q != nil && a.now == q {
		a.cancel()
	}
}

// cancel drops the question that is under way, whosever it is.
func (a *asker) cancel() {
	q := a.now
	if q == nil {
		return
	}
	a.now = nil
	a.runner.Ask(nil, true)
	if q.drop != nil {
		q.drop()
	}
}

// asks tells whether a question is under way.
func (a *asker) asks(q *question) bool { return !a.desk.closed && a.now == q }

func (a *asker) work(ctx context.Context, q *question) any {
	if q == nil {
		return nil
	}
	if a.study == nil {
		a.study = study.New(a.desk.cat)
	}
	o := study.Options{Dir: q.dir}
	if q.told != nil {
		o.Progress = func(done, of int) {
			if ctx.Err() == nil {
				a.desk.rooms.Hop(func() {
					if a.asks(q) {
						q.told(done, of)
					}
				})
			}
		}
	}
	q.out, q.err = q.work(ctx, a.study, q.doc, o)
	return nil
}

func (a *asker) done(_ uint64, q *question, _ any) {
	if q == nil {
		return
	}
	a.desk.rooms.Hop(func() {
		if a.asks(q) {
			a.now = nil
			q.then(q.out, q.err)
		}
	})
}

// askWords says why a question has no answer, in sentences.
func askWords(err error) string {
	var refused *study.Refusal
	if errors.As(err, &refused) {
		return problemList("", refused.Problems)
	}
	return sentence(err)
}

// folder is where the design's file lies, "" for none: there its own rule files are looked for.
func (k *Desk) folder() string {
	if k.path == "" {
		return ""
	}
	return filepath.Dir(k.path)
}
