package main

import (
	"context"
	"fmt"
	"os"
	"os/signal"
	"runtime/debug"
	"syscall"

	"github.com/spf13/cobra"
)

// run is one invocation: it executes the command line and returns the exit
// status.
func run(args []string, s *streams) (status int) {
	defer func() {
		if fault := recover(); fault != nil { // Go's own status would say that the input is wrong
			fmt.Fprintf(s.err, "rungwright: a fault of the program, not of your input: %v\n%s", fault, debug.Stack())
			status = exitUnexpected
		}
	}()
	ctx, stop := interruptible()
	defer stop()
	app := &app{streams: s}
	root := app.root()
	root.SetArgs(args)
	root.SetOut(s.out)
	root.SetErr(s.err)
	cmd, err := root.ExecuteContextC(ctx)
	if flush := s.out.Flush(); err == nil && flush != nil {
		err = &outputError{flush}
	}
	report(s, err)
	if err != nil && !app.started {
		fmt.Fprintf(s.err, "hint: see %s --help\n", cmd.CommandPath())
	}
	return exitStatus(err, app.started)
}

// interruptible gives a context that the first Ctrl-C, or a scheduler's polite
// end, cancels, so that the best answer so far can be shown; the second one
// ends the program at once.
func interruptible() (context.Context, context.CancelFunc) {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	context.AfterFunc(ctx, stop) // gives Ctrl-C its usual meaning back
	return ctx, stop
}

// app is what the commands share.
type app struct {
	streams *streams
	started bool // a command's own work began: later errors are not usage
}

// runs wraps a command's work. An error before it began is a mistake in the
// command line.
func (a *app) runs(work func(ctx context.Context, args []string) error) func(*cobra.Command, []string) error {
	return func(cmd *cobra.Command, args []string) error {
		a.started = true
		return work(cmd.Context(), args)
	}
}

// root builds the command tree.
func (a *app) root() *cobra.Command {
	root := &cobra.Command{
		Use:   "rungwright",
		Short: "Choose and prove the parts of voltage multiplier supplies",
		Long: `Rungwright chooses the parts of DC supplies made with diode-capacitor voltage
multipliers, proves that nothing cheaper in the catalog passes, and writes the
files that a colleague and a buyer need.`,
		Example: `  rungwright pick
  rungwright help exit-status`,
		Version:       version(),
		SilenceErrors: true,
		SilenceUsage:  true,
		Args:          cobra.NoArgs,
		RunE:          func(cmd *cobra.Command, _ []string) error { return cmd.Help() },
	}
	root.SetUsageTemplate(usageTemplate)
	root.SetHelpCommand(a.helpCommand())
	root.SetVersionTemplate("{{.Version}}\n")
	root.AddCommand(a.pickCommand(), a.solveCommand(), a.partsCommand())
	root.AddCommand(helpTopics()...)
	return root
}
