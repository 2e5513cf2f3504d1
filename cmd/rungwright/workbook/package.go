package workbook

import (
	"archive/zip"
	"bytes"
	"cmp"
	"errors"
	"io"
	"io/fs"
	"reflect"
	"slices"
	"strings"
	"time"

	"github.com/xuri/excelize/v2"
)

// save serialises the book so that equal books are equal bytes: the library
// writes streamed sheets and content types in map order.
func save(f *excelize.File) ([]byte, error) {
	sortByExtension(f.ContentTypes.Defaults)
	f.SetZipWriter(func(w io.Writer) excelize.ZipWriter {
		return &sortedZip{to: w, parts: map[string]*bytes.Buffer{}}
	})
	var out bytes.Buffer
	if err := f.Write(&out); err != nil {
		return nil, err
	}
	return out.Bytes(), nil
}

// sortByExtension sorts a slice of the library's unexported element type.
func sortByExtension[T any](s []T) {
	slices.SortFunc(s, func(a, b T) int {
		return cmp.Compare(reflect.ValueOf(a).FieldByName("Extension").String(), reflect.ValueOf(b).FieldByName("Extension").String())
	})
}

// sortedZip keeps the parts and writes them by name when it is closed, the
// two that readers look for first in front.
type sortedZip struct {
	to    io.Writer
	parts map[string]*bytes.Buffer
}

func (z *sortedZip) Create(name string) (io.Writer, error) {
	part := &bytes.Buffer{}
	z.parts[name] = part
	return part, nil
}

func (z *sortedZip) AddFS(fs.FS) error { return errors.New("workbook: file systems are not written") }

func (z *sortedZip) Close() error {
	names := make([]string, 0, len(z.parts))
	for name := range z.parts {
		names = append(names, name)
	}
	slices.SortFunc(names, func(a, b string) int { return cmp.Or(cmp.Compare(first(a), first(b)), cmp.Compare(a, b)) })
	w := zip.NewWriter(z.to)
	for _, name := range names {
		part, err := w.CreateHeader(&zip.FileHeader{Name: name, Method: zip.Deflate, Modified: time.Date(1980, 1, 1, 0, 0, 0, 0, time.UTC)})
		if err != nil {
			return err
		}
		if _, err := part.Write(amend(name, z.parts[name].Bytes())); err != nil {
			return err
		}
	}
	return w.Close()
}

func first(name string) int {
	switch name {
	case "[Content_Types].xml":
		return 0
	case "_rels/.rels":
		return 1
	}
	return 2
}

// amend mends what the library cannot say: it offers a logarithmic scale for
// the upright axis only.
func amend(name string, part []byte) []byte {
	if !strings.HasPrefix(name, "xl/charts/chart") || !bytes.Contains(part, []byte(logarithmic)) {
		return part
	}
	return bytes.Replace(part, []byte("<scaling>"), []byte(`<scaling><logBase val="10"></logBase>`), 1)
}

// logarithmic in a chart's axis title asks for that scale.
const logarithmic = ", logarithmic"
