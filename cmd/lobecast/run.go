package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"syscall"

	"github.com/alecthomas/kong"
)

// command is what every Run method gets: streams, never the process's own.
type command struct {
	ctx    context.Context
	stdin  io.Reader
	stdout io.Writer
	stderr io.Writer
	read   []string // files that were read, which the output must not replace
}

// commandLine is the whole command line; one file of this package per command.
type commandLine struct {
	Review     reviewCommand     `cmd:"" help:"Judge every step of a route (the main job)."`
	Sites      sitesCommand      `cmd:"" help:"Rank the sites of attack of each structure."`
	Pair       pairCommand       `cmd:"" help:"Rank the adducts of a cycloaddition of two molecules."`
	Symmetry   symmetryCommand   `cmd:"" help:"Orbital-symmetry verdict of a pericyclic process."`
	Orbitals   orbitalsCommand   `cmd:"" help:"Matrix, levels, coefficients, charges, bond orders, free valences."`
	Survey     surveyCommand     `cmd:"" help:"Stream thousands to millions of structures or reactions."`
	Compare    compareCommand    `cmd:"" help:"What changed between two reviews of a route."`
	Page       pageCommand       `cmd:"" help:"Make a self-contained HTML page of a report."`
	Record     recordCommand     `cmd:"" help:"How often calls were right on published outcomes, by event."`
	Parameters parametersCommand `cmd:"" help:"List the parameter sets, or print one as TOML."`
	Completion completionCommand `cmd:"" help:"Print a completion script for a shell."`
	Manual     manualCommand     `cmd:"" help:"Print the manual page (man format)."`

	Version kong.VersionFlag `help:"Print the version and end."`
}

const description = `Reviews a synthetic route by Hückel frontier orbitals: which position reacts, how sure, and what the model cannot see.

Results go to standard output, everything else to standard error. Exit status: 0 everything was read and answered; 1 some input was refused (the report says which); 2 the command line is wrong; 3 a file cannot be opened, parsed or written; 130 interrupted.`

type exitCode int

// run is the whole program with its streams given, for tests too.
func run(ctx context.Context, args []string, stdin io.Reader, stdout, stderr io.Writer) (code int) {
	defer func() {
		switch r := recover().(type) {
		case nil:
		case exitCode:
			code = int(r)
		default:
			// An invariant of the program broke: say so instead of a stack of calls.
			fmt.Fprintf(stderr, "lobecast: internal fault: %v\nlobecast: please report it with the input that led to it\n", r)
			code = exitRefused
		}
	}()
	var line commandLine
	parser, err := newParser(&line, stdout, stderr)
	if err != nil {
		panic(err) // a mistake in the command structs
	}
	if len(args) == 0 {
		args = []string{"--help"}
	}
	parsed, err := parser.Parse(args)
	var pe *fs.PathError
	switch {
	case errors.Is(err, syscall.EPIPE): // of the help
		return exitOK
	case errors.As(err, &pe):
		fmt.Fprintf(stderr, "lobecast: cannot write: %v\n", err)
		return exitFile
	}
	if err != nil {
		fmt.Fprintf(stderr, "lobecast: %v\nlobecast: `lobecast --help` lists the commands, `lobecast COMMAND --help` explains one\n", err)
		return exitUsage
	}
	cmd := &command{ctx: ctx, stdin: stdin, stdout: stdout, stderr: stderr}
	err = parsed.Run(cmd, parser)
	code = status(ctx, err)
	if code == exitInterrupted {
		fmt.Fprintln(stderr, "lobecast: interrupted; what was done is kept")
	} else if err != nil && !errors.Is(err, syscall.EPIPE) && !errors.Is(err, io.ErrClosedPipe) {
		fmt.Fprintf(stderr, "lobecast: %s\n", printable(err.Error()))
	}
	return code
}

func newParser(line *commandLine, stdout, stderr io.Writer) (*kong.Kong, error) {
	return kong.New(line,
		kong.Name("lobecast"),
		kong.Description(description),
		kong.Writers(stdout, stderr),
		kong.Exit(func(c int) { panic(exitCode(c)) }),
		kong.ConfigureHelp(kong.HelpOptions{Compact: true, WrapUpperBound: 100}),
		kong.Vars{"version": programVersion()},
	)
}
