package main

import (
	"fmt"
	"sort"
	"strings"

	"github.com/alecthomas/kong"
)

type completionCommand struct {
	Shell string `arg:"" enum:"bash,zsh,fish" help:"bash, zsh or fish."`
}

func (k *completionCommand) Help() string {
	return `The script is made from the command line itself, so it never lags behind.

  lobecast completion bash > ~/.local/share/bash-completion/completions/lobecast`
}

func (k *completionCommand) Run(c *command, parser *kong.Kong) error {
	var b strings.Builder
	switch k.Shell {
	case "bash":
		completeBash(&b, parser.Model)
	case "zsh":
		b.WriteString("#compdef lobecast\nautoload -U +X bashcompinit && bashcompinit\n")
		completeBash(&b, parser.Model)
	case "fish":
		completeFish(&b, parser.Model)
	}
	return deliver(c, "", []byte(b.String()))
}

// commandFlags are the visible flags of a command, by name.
func commandFlags(node *kong.Node) []*kong.Flag {
	var flags []*kong.Flag
	for _, group := range node.AllFlags(true) {
		flags = append(flags, group...)
	}
	sort.Slice(flags, func(i, j int) bool { return flags[i].Name < flags[j].Name })
	return flags
}

// choices are the words an enumerated value may take.
func choices(v *kong.Value) []string {
	var list []string
	for _, w := range strings.Split(v.Enum, ",") {
		if w = strings.TrimSpace(w); w != "" {
			list = append(list, w)
		}
	}
	return list
}

func completeBash(b *strings.Builder, app *kong.Application) {
	var names []string
	for _, node := range app.Leaves(true) {
		names = append(names, node.Name)
	}
	b.WriteString("_lobecast() {\n  local word=\"${COMP_WORDS[COMP_CWORD]}\" before=\"${COMP_WORDS[COMP_CWORD-1]}\" words=\"\"\n")
	fmt.Fprintf(b, "  if [ \"$COMP_CWORD\" -eq 1 ]; then\n    words=%q\n  else\n    case \"${COMP_WORDS[1]}:$before\" in\n", strings.Join(names, " ")+" --help --version")
	for _, node := range app.Leaves(true) {
		for _, f := range commandFlags(node) {
			if w := choices(f.Value); len(w) > 0 {
				fmt.Fprintf(b, "      %s:--%s) words=%q ;;\n", node.Name, f.Name, strings.Join(w, " "))
			}
		}
		var flags []string
		for _, f := range commandFlags(node) {
			flags = append(flags, "--"+f.Name)
		}
		for _, p := range node.Positional {
			flags = append(flags, choices(p)...)
		}
		fmt.Fprintf(b, "      %s:*) words=%q ;;\n", node.Name, strings.Join(flags, " "))
	}
	b.WriteString("    esac\n  fi\n  COMPREPLY=($(compgen -W \"$words\" -- \"$word\"))\n}\ncomplete -o default -F _lobecast lobecast\n")
}

func completeFish(b *strings.Builder, app *kong.Application) {
	quote := func(s string) string {
		return "'" + strings.ReplaceAll(strings.ReplaceAll(s, `\`, `\\`), "'", `\'`) + "'"
	}
	for _, node := range app.Leaves(true) {
		fmt.Fprintf(b, "complete -c lobecast -n __fish_use_subcommand -a %s -d %s\n", node.Name, quote(node.Help))
		for _, f := range commandFlags(node) {
			fmt.Fprintf(b, "complete -c lobecast -n '__fish_seen_subcommand_from %s' -l %s -d %s", node.Name, f.Name, quote(f.Help))
			if f.Short != 0 {
				fmt.Fprintf(b, " -s %c", f.Short)
			}
			if w := choices(f.Value); len(w) > 0 {
				fmt.Fprintf(b, " -xa %s", quote(strings.Join(w, " ")))
			} else if !f.IsBool() {
				b.WriteString(" -r")
			}
			b.WriteString("\n")
		}
	}
}
