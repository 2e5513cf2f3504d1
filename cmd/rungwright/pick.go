package main

import (
	"context"
	"errors"
	"fmt"
	"path/filepath"
	"time"

	"github.com/spf13/cobra"

	"rungwright/catalog"
	"rungwright/catalog/demo"
	"rungwright/optimize"
)

// pickOptions is what the pick command was asked.
type pickOptions struct {
	supply    string // empty: the demo
	catalogs  []string
	out       string
	design    string
	workbook  string
	printOnly bool
	replace   bool
	cautions  bool
	format    string
	workers   int
}

func (a *app) pickCommand() *cobra.Command {
	var o pickOptions
	cmd := &cobra.Command{
		Use:   "pick [SUPPLY]",
		Short: "Choose the parts of a supply",
		Long: `Reads the targets of a supply, searches the catalog for the cheapest design that
meets them under every stated condition, and proves that nothing cheaper passes.
It prints the answer and writes design.yaml, which the other commands read, and
workbook.xlsx for the buyer and the design review.

Without SUPPLY it designs the demo supply. Without --catalog it uses the demo
catalog, whose makers, parts and prices are invented.

The files go into a folder named after the supply, or where --out says. With
--design or --workbook only the named files are written. An existing file with
other contents is kept unless --replace is given.`,
		Example: `  rungwright pick
  rungwright pick testdata/supplies/amplifier-rail-250v.yaml --out rail
  rungwright pick testdata/supplies/bench-rail-24v.yaml --print-only`,
		Args: atMostOne("one supply file"),
		RunE: a.runs(func(ctx context.Context, args []string) error {
			if len(args) == 1 {
				o.supply = args[0]
			}
			return pick(ctx, a.streams, &o)
		}),
	}
	f := cmd.Flags()
	f.StringArrayVar(&o.catalogs, flagCatalog, nil, "catalog `PATH`, a file or a folder; may be repeated, later ones add")
	f.StringVar(&o.out, flagOut, "", "`FOLDER` for design.yaml and workbook.xlsx")
	f.StringVar(&o.design, flagDesign, "", "write the design to this `FILE`")
	f.StringVar(&o.workbook, flagWorkbook, "", "write the workbook to this `FILE`")
	f.BoolVar(&o.printOnly, "print-only", false, "write no files")
	f.BoolVar(&o.replace, flagReplace, false, "replace existing files")
	f.IntVar(&o.workers, "workers", 0, "processor cores to use; 0 is all of them, and the answer does not depend on it")
	addCautions(cmd, &o.cautions)
	addFormat(cmd, &o.format)
	for _, named := range []string{flagDesign, flagWorkbook} {
		cmd.MarkFlagsMutuallyExclusive(flagOut, named)
		cmd.MarkFlagsMutuallyExclusive("print-only", named)
	}
	cmd.MarkFlagsMutuallyExclusive("print-only", flagOut)
	return cmd
}

func pick(ctx context.Context, s *streams, o *pickOptions) error {
	supply, err := readSupply(s, o.supply)
	if err != nil {
		return err
	}
	parts, err := pickCatalog(o.catalogs)
	if err != nil {
		return err
	}
	files, err := o.plan(supply, parts)
	if err != nil {
		return err
	}
	if len(o.catalogs) == 0 {
		fmt.Fprintln(s.err, "note: the demo catalog's parts are invented; give --"+flagCatalog+" for your own")
	}
	answer, stopped, err := search(ctx, s, o, supply, parts)
	if err != nil {
		return err
	}
	if answer.Design == nil {
		return printWhyNot(s, o, supply, answer, stopped)
	}
	saved := files.save(ctx, s, answer.Design, parts) // before printing, for the reader of a pipe may leave early
	if err := printPicked(s, o, answer, files, saved == nil); err != nil {
		return err
	}
	if saved == nil && stopped && !answer.Certificate.Proved {
		return errStopped
	}
	return saved
}

// search runs the search with its progress line. One that the user stopped
// still answers with what it has.
func search(ctx context.Context, s *streams, o *pickOptions, supply optimize.Supply, parts *catalog.Catalog) (answer optimize.Answer, stopped bool, err error) {
	line := newProgress(s, supply.Build.Currency, time.Now)
	defer line.end()
	answer, err = optimize.Pick(ctx, supply, parts, &optimize.Options{Progress: line.update, Workers: o.workers})
	if wrong, ok := errors.AsType[*optimize.InputError](err); ok {
		err = asInput(wrong)
	}
	return answer, ctx.Err() != nil, err
}

// readSupply reads the supply that the user named, or the demo.
func readSupply(s *streams, path string) (optimize.Supply, error) {
	name, data := demoSupplyName, demo.Supply
	if path != "" {
		var err error
		if name, data, err = readInput(s, path); err != nil {
			return optimize.Supply{}, err
		}
	}
	supply, err := optimize.ReadSupply(filepath.ToSlash(name), data)
	return supply, asInput(err)
}

// demoSupplyName is how messages and the design name the demo supply.
const demoSupplyName = "demo/supply.yaml"

// pickCatalog reads the catalogs, or takes the demo.
func pickCatalog(paths []string) (*catalog.Catalog, error) {
	if len(paths) > 0 {
		return readCatalog(paths)
	}
	return catalog.Demo(), nil
}
