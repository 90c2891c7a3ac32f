package main

import (
	"fmt"
	"strings"

	"github.com/alecthomas/kong"
)

type manualCommand struct{}

func (k *manualCommand) Help() string {
	return `The page is made from the command line itself:

  lobecast manual > lobecast.1 && man ./lobecast.1`
}

func (k *manualCommand) Run(c *command, parser *kong.Kong) error {
	var b strings.Builder
	app := parser.Model
	fmt.Fprintf(&b, ".TH LOBECAST 1 \"\" \"%s\"\n.SH NAME\nlobecast \\- review a synthetic route by Hückel frontier orbitals\n", roff(programName()))
	b.WriteString(".SH SYNOPSIS\n.B lobecast\n.I COMMAND\n[options]\n.SH DESCRIPTION\n")
	paragraphs(&b, description)
	b.WriteString(".SH COMMANDS\n")
	for _, node := range app.Leaves(true) {
		fmt.Fprintf(&b, ".SS %s\n%s\n", roff(usageOf(node)), roff(node.Help))
		if node.Detail != "" {
			b.WriteString(".PP\n")
			paragraphs(&b, node.Detail)
		}
		for _, p := range node.Positional {
			fmt.Fprintf(&b, ".TP\n.I %s\n%s\n", roff(strings.ToUpper(p.Name)), roff(p.Help))
		}
		for _, f := range commandFlags(node) {
			if f.Name == "help" || f.Name == "version" {
				continue
			}
			fmt.Fprintf(&b, ".TP\n.B %s\n%s\n", roff(flagOf(f)), roff(f.Help))
		}
	}
	b.WriteString(`.SH EXIT STATUS
.TP
.B 0
everything was read and answered; not judged with its reason is an answer
.TP
.B 1
some input was refused; the report is still written and says which
.TP
.B 2
the command line is wrong
.TP
.B 3
a file cannot be opened, parsed as what it should be, or written
.TP
.B 130
interrupted; what was done is kept
.SH CAUTION
A prediction of position is no safety assessment. Follow the safety data sheets, local codes and a qualified chemist's hazard review.
`)
	return deliver(c, "", []byte(b.String()))
}

func usageOf(node *kong.Node) string {
	s := node.Name
	for _, p := range node.Positional {
		name := strings.ToUpper(p.Name)
		if p.IsCumulative() {
			name += " ..."
		}
		if !p.Required {
			name = "[" + name + "]"
		}
		s += " " + name
	}
	return s
}

func flagOf(f *kong.Flag) string {
	s := "--" + f.Name
	if !f.IsBool() {
		s += "=" + f.FormatPlaceHolder()
	}
	if f.Short != 0 {
		s = fmt.Sprintf("-%c, %s", f.Short, s)
	}
	return s
}

// paragraphs writes text with its indented lines kept as they are.
func paragraphs(b *strings.Builder, text string) {
	for _, p := range strings.Split(strings.TrimSpace(text), "\n\n") {
		if strings.HasPrefix(p, "  ") {
			b.WriteString(".PP\n.nf\n.RS\n")
			for _, line := range strings.Split(p, "\n") {
				b.WriteString(roff(strings.TrimSpace(line)) + "\n")
			}
			b.WriteString(".RE\n.fi\n")
			continue
		}
		b.WriteString(".PP\n" + roff(p) + "\n")
	}
}

// roff escapes text for the manual page.
func roff(s string) string {
	s = strings.NewReplacer(`\`, `\e`, "-", `\-`, "'", `\(aq`).Replace(s)
	if strings.HasPrefix(s, ".") {
		s = `\&` + s
	}
	return s
}
