package main

import (
	"strings"

	"github.com/spf13/cobra"
)

// helpCommand replaces the library's own, for which an unknown topic is no
// mistake.
func (a *app) helpCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "help [COMMAND or TOPIC]",
		Short: "Explain a command or a topic",
		Example: `  rungwright help pick
  rungwright help exit-status`,
		RunE: func(cmd *cobra.Command, args []string) error {
			a.started = true
			found, rest, err := cmd.Root().Find(args)
			if err != nil || len(rest) > 0 {
				return badInput("rungwright help lists the commands and topics", "there is no help on %q", strings.Join(args, " "))
			}
			found.InitDefaultHelpFlag()
			return found.Help()
		},
	}
}

// usageTemplate follows the description of a command in its help.
const usageTemplate = `{{if .Runnable}}Usage: {{.UseLine}}
{{end}}{{if .HasAvailableSubCommands}}
Commands:{{range .Commands}}{{if .IsAvailableCommand}}
  {{rpad .Name 12}} {{.Short}}{{end}}{{end}}
{{end}}{{if .HasHelpSubCommands}}
Topics:{{range .Commands}}{{if .IsAdditionalHelpTopicCommand}}
  {{rpad .Name 12}} {{.Short}}{{end}}{{end}}
{{end}}{{if .HasExample}}
Examples:
{{.Example}}
{{end}}{{if .HasAvailableLocalFlags}}
Flags:
{{.LocalFlags.FlagUsagesWrapped 80 | trimTrailingWhitespaces}}
{{end}}`

// helpTopics are pages of text without a command.
func helpTopics() []*cobra.Command {
	return []*cobra.Command{
		{Use: "exit-status", Short: "What the exit status means", Long: exitStatusText},
		{Use: "screen", Short: "Where output goes and how it looks", Long: screenText},
		{Use: "files", Short: "How result files are written", Long: filesText},
	}
}

const exitStatusText = `The exit status tells a script how a command ended.

  0  done, and everything meets its limits
  1  stopped early (Ctrl-C, a full disk), or a fault of the program
  2  the command line or a file is wrong; the message says where, and how to
     mend it
  3  the question was good and the answer is no: no design meets the targets,
     a parts list breaks a limit, a circuit has no steady state`

const screenText = `Results go to standard output, everything else to standard error.

On a terminal, results are tables that fit 80 columns and use more when there
are more. In a pipe or a file they are lines of tab-separated values in base
units, each table under its heading line, with nothing rounded for the eye.
With --format json they are one JSON document whose keys carry the units.

Colour appears only on a terminal, never when NO_COLOR is set or TERM is dumb,
and never says anything that the text does not say.

A long run shows its progress on standard error after a second, when both
streams are terminals. Ctrl-C ends it with the best answer so far; a second
Ctrl-C ends it at once.`

const filesText = `A result file is written whole or not at all: first under a temporary name
beside it, then moved into place. When anything fails, nothing is left behind
and an old file stays as it was.

An existing file with the same contents is left alone. One with other contents
is replaced only with --replace. A symbolic link is never written through, and
a file that a command reads is never one that it writes.

A name of - as input means standard input.`
