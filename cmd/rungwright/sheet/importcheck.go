package sheet

import (
	"errors"
	"runtime"
	"slices"
	"strings"

	"golang.org/x/sync/errgroup"

	"rungwright/catalog"
	"rungwright/catalog/form"
)

// check reads every part back as a catalog would, and drops what it refuses.
func (im *Import) check() {
	why := make([]error, len(im.records))
	var g errgroup.Group
	g.SetLimit(runtime.GOMAXPROCS(0))
	const share = 256
	for from := 0; from < len(im.records); from += share {
		to := min(from+share, len(im.records))
		g.Go(func() error {
			refuse(im.records[from:to], why[from:to])
			return nil
		})
	}
	_ = g.Wait() // the functions return no error
	var d doubts
	kept := im.records[:0:0]
	for i, r := range im.records {
		if why[i] == nil {
			kept = append(kept, r)
			continue
		}
		refused, ok := errors.AsType[form.Problems](why[i])
		if !ok {
			d.wrong(r.at, r.number, "%v", why[i])
		}
		for _, p := range refused {
			d.wrong(r.at, r.number, "%s: %s", cut(r.number), strings.NewReplacer(`"parts.`, `"`).Replace(strings.TrimPrefix(p.Text, "parts.")))
		}
	}
	im.records = kept
	im.Unread = append(im.Unread, d.sorted()...)
	slices.SortStableFunc(im.Unread, func(a, b Doubt) int { return comparePlaces(a.Place, b.Place) })
	slices.SortFunc(im.records, func(a, b *record) int { return strings.Compare(a.number, b.number) })
	im.Parts = len(im.records)
}

// refuse notes for each record why a catalog would not take it. Records are
// tried together, and apart only where something is wrong with them.
func refuse(records []*record, why []error) {
	err := tryRead(records)
	switch {
	case err == nil:
	case len(records) == 1:
		why[0] = err
	default:
		half := len(records) / 2
		refuse(records[:half], why[:half])
		refuse(records[half:], why[half:])
	}
}

func tryRead(records []*record) error {
	_, err := catalog.ReadBytes("row", catalogText("", records))
	return err
}

// catalogText is a catalog file.
func catalogText(title string, records []*record) []byte {
	list := form.List{}
	for _, r := range records {
		list = append(list, r.doc())
	}
	doc := form.NewMap()
	if title != "" {
		doc.Set("catalog", title)
	}
	return doc.Set("parts", list).Bytes()
}

// partsPerFile keeps each file well within what a YAML file may hold.
const partsPerFile = 20_000

// files are the catalog files.
func (im *Import) files() [][]byte {
	var out [][]byte
	for share := range slices.Chunk(im.records, partsPerFile) {
		out = append(out, catalogText(im.Title, share))
	}
	return out
}
