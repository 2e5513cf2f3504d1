package catalog

import (
	"cmp"
	"crypto/sha256"
	"encoding/hex"
	"io/fs"
	"path"
	"runtime"
	"slices"
	"sync"

	"golang.org/x/sync/errgroup"

	"rungwright/catalog/demo"
	"rungwright/catalog/form"
)

// Read reads catalogs from files and folders (every *.yaml and *.yml in
// them, by name); later ones add. A file named more than once is read once.
// All mistakes come back at once as form.Problems.
func Read(paths ...string) (*Catalog, error) {
	var r form.Report
	files := find(paths, &r)
	return assemble(readAll(files), &r)
}

// ReadBytes reads a catalog from data; name stands for it in messages.
func ReadBytes(name string, data []byte) (*Catalog, error) {
	return assemble([]*piece{readPiece(name, data)}, &form.Report{})
}

// Demo returns the embedded invented catalog. It is shared by all callers,
// who must not change it.
func Demo() *Catalog { return readDemo() }

var readDemo = sync.OnceValue(func() *Catalog {
	entries, err := fs.ReadDir(demo.Files, ".")
	if err != nil {
		panic("catalog: " + err.Error())
	}
	var pieces []*piece
	for _, e := range entries {
		if e.Name() == demo.SupplyName {
			continue
		}
		data, err := fs.ReadFile(demo.Files, e.Name())
		if err != nil {
			panic("catalog: " + err.Error())
		}
		pieces = append(pieces, readPiece(path.Join("demo", e.Name()), data))
	}
	c, err := assemble(pieces, &form.Report{})
	if err != nil {
		panic("catalog: the embedded demo catalog has mistakes:\n" + err.Error())
	}
	return c
})

// piece is what one file holds.
type piece struct {
	title     string
	parts     []*Part
	suppliers []Supplier
	input     Input
	report    form.Report
}

// readAll reads the files on all cores; each has its own slot, so that the
// order of the result is that of the files.
func readAll(files []string) []*piece {
	pieces := make([]*piece, len(files))
	var g errgroup.Group
	g.SetLimit(runtime.GOMAXPROCS(0))
	for i, name := range files {
		g.Go(func() error {
			pieces[i] = readFile(name)
			return nil
		})
	}
	_ = g.Wait() // the functions return no error
	return pieces
}

func readFile(name string) *piece {
	data, err := load(name)
	if err != nil {
		p := new(piece)
		p.report.Add(form.Place{File: name}, "%v", err)
		return p
	}
	return readPiece(name, data)
}

func readPiece(name string, data []byte) *piece {
	sum := sha256.Sum256(data)
	p := &piece{input: Input{Name: name, SHA256: hex.EncodeToString(sum[:])}}
	top := form.Parse(name, data, &p.report)
	if top == nil {
		return p
	}
	if !top.Has("parts") && !top.Has("suppliers") {
		top.Problem("", "this is no catalog, which has the key parts or suppliers%s", insteadOf(top))
		return p
	}
	p.title = text(top, "catalog", mostName)
	for _, m := range top.Maps("suppliers") {
		p.suppliers = append(p.suppliers, readSupplier(m))
	}
	for _, m := range top.Maps("parts") {
		p.parts = append(p.parts, readPart(m))
	}
	top.Done()
	return p
}

// insteadOf names the kind of file that was given for a catalog.
func insteadOf(top *form.Map) string {
	for _, key := range []string{"supply", "circuit", "design", "policy"} {
		if top.Has(key) {
			return "; it looks like a " + key + " file"
		}
	}
	return ""
}

// assemble joins the pieces, checks what only the whole can show, and sorts.
func assemble(pieces []*piece, r *form.Report) (*Catalog, error) {
	c := &Catalog{index: map[string]*Part{}}
	for _, p := range pieces {
		r.Merge(&p.report)
		c.Title = cmp.Or(c.Title, p.title)
		c.Parts = append(c.Parts, p.parts...)
		c.Suppliers = append(c.Suppliers, p.suppliers...)
		c.Inputs = append(c.Inputs, p.input)
	}
	c.checkParts(r)
	c.checkSuppliers(r)
	if err := r.Err(); err != nil {
		return nil, err
	}
	slices.SortFunc(c.Parts, func(a, b *Part) int { return cmp.Compare(a.Number, b.Number) })
	slices.SortFunc(c.Suppliers, func(a, b Supplier) int { return cmp.Compare(a.Name, b.Name) })
	return c, nil
}

// isYAML tells a catalog file by its name.
func isYAML(name string) bool { return path.Ext(name) == ".yaml" || path.Ext(name) == ".yml" }
