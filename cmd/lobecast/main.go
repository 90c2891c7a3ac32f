// Lobecast reviews a synthetic route by Hückel frontier orbitals. This package is
// the command line only: flags, files, exit statuses. The chemistry is in the
// packages frontier, rules and reactivity.
package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"os/signal"
	"syscall"
	"time"
)

func main() {
	// A closed pipe must come back as a write error, not as a signal.
	signal.Ignore(syscall.SIGPIPE)
	ctx, stop := signal.NotifyContext(context.Background(), syscall.SIGINT, syscall.SIGTERM)
	go func() {
		// What is being judged is finished and written. A read from a silent pipe, or a write
		// to one that nobody empties, does not see the interrupt: a second signal ends the
		// program at once, and so does a while without an end.
		<-ctx.Done()
		stop()
		time.Sleep(notice)
		fmt.Fprintln(os.Stderr, "lobecast: interrupted: what is under way is finished first; a second interrupt ends at once")
		time.Sleep(grace)
		fmt.Fprintln(os.Stderr, "lobecast: interrupted; what was written until now is kept")
		os.Exit(exitInterrupted)
	}()
	code := run(ctx, os.Args[1:], os.Stdin, os.Stdout, os.Stderr)
	os.Exit(code)
}

// After an interrupt a program that goes on says so, and what it judges may take a while to
// end.
const (
	notice = 2 * time.Second
	grace  = time.Minute
)

// The exit statuses; docs/report.md and the help list them.
const (
	exitOK          = 0
	exitRefused     = 1
	exitUsage       = 2
	exitFile        = 3
	exitInterrupted = 130
)

// errRefused says that some input was refused: the report that was written says
// which.
var errRefused = errors.New("some input was refused: see [[refused]] in the report")

// surveyRefused is errRefused in the words of a survey, whose output has no [[refused]]
// tables.
type surveyRefused struct{ lines int }

func (e surveyRefused) Error() string {
	return fmt.Sprintf("%d refused: see the records with status = refused", e.lines)
}
func (e surveyRefused) Is(target error) bool { return target == errRefused }

// fileError is a file that cannot be opened, parsed as what it should be, or written.
type fileError struct{ err error }

func (e fileError) Error() string { return e.err.Error() }
func (e fileError) Unwrap() error { return e.err }

// usageError is a command line that parsed but makes no sense.
type usageError struct{ msg string }

func (e usageError) Error() string { return e.msg }

// status maps an error of a command to its exit status.
func status(ctx context.Context, err error) int {
	var fe fileError
	var ue usageError
	switch {
	case err == nil:
		return exitOK
	case errors.Is(err, syscall.EPIPE), errors.Is(err, io.ErrClosedPipe):
		return exitOK
	case errors.Is(err, context.Canceled), ctx.Err() != nil:
		return exitInterrupted
	case errors.As(err, &ue):
		return exitUsage
	case errors.Is(err, errRefused):
		return exitRefused
	case errors.As(err, &fe):
		return exitFile
	}
	return exitRefused
}
