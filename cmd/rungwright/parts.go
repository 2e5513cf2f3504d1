package main

import "github.com/spf13/cobra"

// partsCommand is the parent of what keeps a catalog.
func (a *app) partsCommand() *cobra.Command {
	cmd := &cobra.Command{
		Use:   "parts",
		Short: "Keep a parts catalog",
		Example: `  rungwright parts check testdata/catalogs/drawer.yaml
  rungwright help parts check`,
		Args: cobra.NoArgs,
		RunE: func(cmd *cobra.Command, _ []string) error { return cmd.Help() },
	}
	cmd.AddCommand(a.partsCheckCommand())
	return cmd
}
