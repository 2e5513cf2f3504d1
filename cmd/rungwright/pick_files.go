package main

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"unicode"

	"golang.org/x/text/unicode/norm"

	"rungwright/catalog"
	"rungwright/cmd/rungwright/workbook"
	"rungwright/optimize"
)

// The names of the files in the output folder.
const (
	designName   = "design.yaml"
	workbookName = "workbook.xlsx"
)

// pickFiles is where the results go; an empty path is not written.
type pickFiles struct {
	design, workbook string
	replace          bool
}

// plan decides where the files go and refuses, before the search, what would
// be refused after it.
func (o *pickOptions) plan(supply optimize.Supply, parts *catalog.Catalog) (pickFiles, error) {
	f := pickFiles{design: o.design, workbook: o.workbook, replace: o.replace}
	switch {
	case o.printOnly:
		return f, nil
	case o.design == "" && o.workbook == "":
		folder := o.out
		if folder == "" {
			folder = slug(supply.Name)
		}
		f.design, f.workbook = filepath.Join(folder, designName), filepath.Join(folder, workbookName)
	}
	if f.design != "" && f.design == f.workbook {
		return f, badInput("give each its own name", "the design and the workbook cannot be the same file: %s", f.design)
	}
	replace := f.replace || f.repeats(supply, parts)
	for _, path := range []string{f.design, f.workbook} {
		if path == "" {
			continue
		}
		if err := inCatalog(path, o.catalogs); err != nil {
			return f, err
		}
		if err := mayWrite(path, replace, append([]string{o.supply}, o.catalogs...)...); err != nil {
			return f, err
		}
	}
	return f, nil
}

// repeats tells whether the design on disk came from the same inputs. The
// search may then find the same again, in which case nothing is overwritten;
// what it does find is compared when it is saved.
func (f pickFiles) repeats(supply optimize.Supply, parts *catalog.Catalog) bool {
	if info, err := os.Lstat(f.design); err != nil || !info.Mode().IsRegular() {
		return false
	}
	old, err := os.ReadFile(f.design)
	if err != nil {
		return false
	}
	for _, in := range append([]catalog.Input{supply.Input}, parts.Inputs...) {
		if !bytes.Contains(old, []byte(in.SHA256)) {
			return false
		}
	}
	return true
}

// inCatalog refuses to put a result into a folder that is read as a catalog.
func inCatalog(path string, catalogs []string) error {
	folder, err := os.Stat(filepath.Dir(path))
	if err != nil {
		return nil
	}
	for _, c := range catalogs {
		if info, err := os.Stat(c); err == nil && os.SameFile(info, folder) {
			return badInput("name a folder of its own for the results",
				"%s: would lie in the catalog folder %s and be read as a catalog next time", path, c)
		}
	}
	return nil
}

// save writes the files of a design.
func (f pickFiles) save(ctx context.Context, s *streams, d *optimize.Design, parts *catalog.Catalog) error {
	var outputs []output
	if f.design != "" {
		data, err := d.Encode()
		if err != nil {
			return err
		}
		outputs = append(outputs, output{f.design, data})
	}
	if f.workbook != "" {
		data, err := workbook.Write(d, workbook.Options{Suppliers: parts.Suppliers, Curves: curves(ctx, d)})
		if err != nil {
			return err
		}
		outputs = append(outputs, output{f.workbook, data})
	}
	return saveAll(s, f.replace, outputs...)
}

// slug makes a folder's name of a supply's: lower-case letters without their
// accents and digits, with dashes between.
func slug(name string) string {
	var b strings.Builder
	for _, r := range norm.NFKD.String(strings.ToLower(name)) {
		switch {
		case r >= 'a' && r <= 'z' || r >= '0' && r <= '9':
			b.WriteRune(r)
		case unicode.Is(unicode.Mn, r): // an accent, split off its letter
		case b.Len() > 0 && !strings.HasSuffix(b.String(), "-"):
			b.WriteByte('-')
		}
	}
	short := b.String()
	if len(short) > mostSlug {
		short = short[:mostSlug]
	}
	short = strings.Trim(short, "-")
	if short == "" {
		return "supply"
	}
	return short
}

// mostSlug keeps folder names handy.
const mostSlug = 60
