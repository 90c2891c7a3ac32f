package survey

import (
	"context"
	"fmt"
	"io"
	"runtime"
	"strings"
	"sync"
)

// Input is one file of a run.
type Input struct {
	Name string
	Open func() (io.ReadCloser, error)
}

// Summary counts what happened.
type Summary struct {
	Read, Judged, NotJudged, Refused, Written int
}

// String is the summary in one line.
func (s Summary) String() string {
	return fmt.Sprintf("%d lines: %d judged, %d not judged, %d refused; %d records written", s.Read, s.Judged, s.NotJudged, s.Refused, s.Written)
}

// batch is a run of items that one worker judges, and then their records.
type batch struct {
	order   int
	items   []item
	results []Result // only where records are kept (Top)
	text    []byte
	sum     Summary
	err     error // of reading, after the items
}

const (
	batchSize = 64 // items
	ahead     = 4  // batches per worker that may be in flight
)

// Run judges all inputs and writes one record for each line to out, in order. Lines up
// to that of last (the last record of an output that is resumed) are passed over. done
// is told of progress now and then; it may be nil.
//
// The error is one of reading, of writing, or of the context; the records before it
// are written. header says whether CSV output begins with its header.
func Run(ctx context.Context, inputs []Input, out io.Writer, last Mark, header bool, opt Options, done func(lines int)) (Summary, error) {
	workers := opt.Workers
	if workers <= 0 {
		workers = runtime.GOMAXPROCS(0)
	}
	ctx, cancel := context.WithCancel(ctx)
	defer cancel()
	work := make(chan *batch, workers)
	finished := make(chan *batch, workers*ahead)
	tickets := make(chan struct{}, workers*ahead) // bounds what is in flight

	go func() {
		defer close(work)
		feed(ctx, inputs, last, opt, work, tickets)
	}()
	var wg sync.WaitGroup
	for range workers {
		wg.Add(1)
		go func() {
			defer wg.Done()
			for b := range work {
				b.judge(&opt)
				finished <- b
			}
		}()
	}
	go func() {
		wg.Wait()
		close(finished)
	}()

	var total Summary
	var failure error
	top := &doubtful{n: opt.Top}
	waiting := map[int]*batch{}
	next := 0
	head := ""
	switch {
	case opt.Brief:
		head = BriefHeader
	case opt.CSV && header:
		head = Header
	}
	if head != "" {
		if _, err := io.WriteString(out, head); err != nil {
			failure = writeError(err)
			cancel()
		}
	}
	for b := range finished {
		waiting[b.order] = b
		for {
			b, ready := waiting[next]
			if !ready {
				break
			}
			delete(waiting, next)
			next++
			<-tickets
			if failure != nil {
				continue
			}
			total.add(b.sum)
			if opt.Top > 0 {
				for _, r := range b.results {
					top.add(r)
				}
			} else if len(b.text) > 0 {
				if _, err := out.Write(b.text); err != nil {
					failure = writeError(err)
					cancel()
				}
			}
			if b.err != nil && failure == nil {
				failure = b.err
			}
			if done != nil {
				done(total.Read)
			}
		}
	}
	if opt.Top > 0 {
		var text []byte
		for _, r := range top.sorted() {
			text = opt.append(text, &r)
			total.Written++
		}
		if _, err := out.Write(text); err != nil && failure == nil {
			failure = writeError(err)
		}
	}
	if failure == nil {
		failure = ctx.Err()
	}
	return total, failure
}

func writeError(err error) error { return fmt.Errorf("cannot write the output: %w", err) }

// feed reads the inputs into batches.
func feed(ctx context.Context, inputs []Input, last Mark, opt Options, work chan<- *batch, tickets chan<- struct{}) {
	line, order := 0, 0
	send := func(b *batch) bool {
		b.order = order
		select {
		case tickets <- struct{}{}:
		case <-ctx.Done():
			return false
		}
		order++
		work <- b
		return true
	}
	b := &batch{}
	for _, in := range inputs {
		err := func() error {
			f, err := in.Open()
			if err != nil {
				return err
			}
			defer f.Close()
			next, err := open(f, in.Name)
			if err != nil {
				return err
			}
			for {
				it, err := next()
				if err == io.EOF {
					return nil
				}
				if err != nil {
					return err
				}
				line++
				it.line = line
				if it.mol == nil && it.err == nil && blank(it.text) {
					if line == last.Line {
						return last.foreign("nothing")
					}
					continue
				}
				if line == last.Line {
					if err := last.belongs(&it, opt.Shard); err != nil {
						return err
					}
				}
				if line <= last.Line || !opt.Shard.takes(line) {
					continue
				}
				b.items = append(b.items, it)
				if len(b.items) == batchSize {
					if !send(b) {
						return ctx.Err()
					}
					b = &batch{}
				}
			}
		}()
		if ctx.Err() != nil {
			return
		}
		if err != nil {
			b.err = err
			break
		}
	}
	if b.err == nil && line < last.Line {
		b.err = fmt.Errorf("the output file belongs to another input: it holds a record of line %d, and the input ends at line %d; give the input it was made from, or another -o", last.Line, line)
	}
	if len(b.items) > 0 || b.err != nil {
		send(b)
	}
}

// blank tells whether a line holds nothing to judge: white space or a comment.
func blank(s string) bool {
	s = strings.TrimSpace(s)
	return s == "" || s == "#" || strings.HasPrefix(s, "# ")
}

func (b *batch) judge(opt *Options) {
	for i := range b.items {
		r := judge(&b.items[i], opt)
		b.sum.Read++
		switch r.Status {
		case Judged:
			b.sum.Judged++
		case NotJudged:
			b.sum.NotJudged++
		default:
			b.sum.Refused++
		}
		if !opt.Where.Keeps(&r) {
			continue
		}
		if opt.Top > 0 {
			b.results = append(b.results, r)
			continue
		}
		b.sum.Written++
		b.text = opt.append(b.text, &r)
	}
}

func (o *Options) append(text []byte, r *Result) []byte {
	switch {
	case o.Brief:
		return r.appendBrief(text)
	case o.CSV:
		return r.appendCSV(text)
	}
	return r.appendTOML(text)
}

func (s *Summary) add(t Summary) {
	s.Read += t.Read
	s.Judged += t.Judged
	s.NotJudged += t.NotJudged
	s.Refused += t.Refused
	s.Written += t.Written
}
