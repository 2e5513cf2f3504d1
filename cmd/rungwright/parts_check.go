package main

import (
	"context"
	"fmt"

	"github.com/spf13/cobra"

	"rungwright/catalog"
)

// partsCheckOptions is what parts check was asked.
type partsCheckOptions struct {
	paths  []string
	format string
}

func (a *app) partsCheckCommand() *cobra.Command {
	var o partsCheckOptions
	cmd := &cobra.Command{
		Use:   "check PATH...",
		Short: "Read catalogs and report every mistake in them",
		Long: `Reads catalog files, or every YAML file of a folder, as one catalog, and counts
what is in it. Every mistake is reported with its file, line and column and how
to mend it; the exit status is then 2.`,
		Example: `  rungwright parts check testdata/catalogs/drawer.yaml`,
		Args:    atLeastOne("a catalog file or folder"),
		RunE: a.runs(func(_ context.Context, args []string) error {
			o.paths = args
			return partsCheck(a.streams, &o)
		}),
	}
	addFormat(cmd, &o.format)
	return cmd
}

func partsCheck(s *streams, o *partsCheckOptions) error {
	c, err := readCatalog(o.paths)
	if err != nil {
		return err
	}
	fmt.Fprintf(s.err, "no mistakes in %s, %s, %s\n", plural(len(c.Inputs), "file"), plural(len(c.Parts), "part"), plural(len(c.Suppliers), "supplier"))
	counts := count(c)
	if o.format == formatJSON {
		return printJSON(s, counts)
	}
	t := table{columns: []column{words("kind", "kind"), {title: "parts", key: "parts", right: true},
		{title: "offers", key: "offers", right: true}}}
	for _, k := range counts.Kinds {
		t.add(string(k.Kind), k.Parts, k.Offers)
	}
	s.printTable(t)
	return nil
}

// counted is what a catalog holds.
type counted struct {
	Files     int         `json:"files"`
	Parts     int         `json:"parts"`
	Suppliers int         `json:"suppliers"`
	Kinds     []kindCount `json:"kinds"`
}

type kindCount struct {
	Kind   catalog.Kind `json:"kind"`
	Parts  int          `json:"parts"`
	Offers int          `json:"offers"`
}

func count(c *catalog.Catalog) counted {
	out := counted{Files: len(c.Inputs), Parts: len(c.Parts), Suppliers: len(c.Suppliers)}
	for _, kind := range []catalog.Kind{catalog.KindCapacitor, catalog.KindDiode, catalog.KindResistor,
		catalog.KindWinding, catalog.KindOther} {
		k := kindCount{Kind: kind}
		for _, p := range c.Parts {
			if p.Kind == kind {
				k.Parts++
				k.Offers += len(p.Offers)
			}
		}
		out.Kinds = append(out.Kinds, k)
	}
	return out
}

// plural counts things: "1 file", "3 files".
func plural(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return fmt.Sprintf("%d %ss", n, thing)
}

// readCatalog reads catalogs that the user named.
func readCatalog(paths []string) (*catalog.Catalog, error) {
	for _, p := range paths {
		if p == "-" {
			return nil, badInput("write it to a file first", "a catalog is not read from standard input")
		}
	}
	c, err := catalog.Read(paths...)
	return c, asInput(err)
}
