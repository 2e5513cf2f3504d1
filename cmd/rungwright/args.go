package main

import (
	"fmt"

	"github.com/spf13/cobra"
)

// exactly asks for so many arguments and says which when they are not given.
func exactly(n int, what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if len(args) != n {
			return fmt.Errorf("%s needs %s; %d arguments were given", cmd.CommandPath(), what, len(args))
		}
		return nil
	}
}

// atLeastOne asks for one argument or more.
func atLeastOne(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if len(args) == 0 {
			return fmt.Errorf("%s needs %s", cmd.CommandPath(), what)
		}
		return nil
	}
}

// atMostOne asks for no argument or one.
func atMostOne(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if len(args) > 1 {
			return fmt.Errorf("%s takes %s only; %d arguments were given", cmd.CommandPath(), what, len(args))
		}
		return nil
	}
}
