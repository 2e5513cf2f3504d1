package main

import (
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// The flags that several commands share; each means the same everywhere.
const (
	flagFormat   = "format"
	flagCatalog  = "catalog"
	flagOut      = "out"
	flagReplace  = "replace"
	flagWorkbook = "workbook"
	flagDesign   = "design"
	flagCautions = "cautions"
)

// The formats of results.
const (
	formatText = "text"
	formatJSON = "json"
)

// addFormat gives a command the --format flag.
func addFormat(cmd *cobra.Command, to *string) {
	*to = formatText
	cmd.Flags().Var(&choiceFlag{to, []string{formatText, formatJSON}}, flagFormat, "how results are printed: text or json")
}

// addCautions gives a command the --cautions flag.
func addCautions(cmd *cobra.Command, to *bool) {
	cmd.Flags().BoolVar(to, flagCautions, false, "show every caution in full")
}

// choiceFlag takes one of a few words.
type choiceFlag struct {
	value *string
	words []string
}

var _ pflag.Value = (*choiceFlag)(nil)

func (f *choiceFlag) String() string { return *f.value }
func (f *choiceFlag) Type() string   { return "WORD" }

func (f *choiceFlag) Set(text string) error {
	if !slices.Contains(f.words, text) {
		return fmt.Errorf("give one of %s", strings.Join(f.words, ", "))
	}
	*f.value = text
	return nil
}
