package catalog

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"slices"

	"rungwright/catalog/form"
)

// find lists the files that the paths name, folders opened, each file once.
func find(paths []string, r *form.Report) []string {
	var files []string
	for _, p := range paths {
		for _, name := range findOne(p, r) {
			if name = filepath.ToSlash(name); !slices.Contains(files, name) {
				files = append(files, name)
			}
		}
	}
	return files
}

func findOne(p string, r *form.Report) []string {
	info, err := os.Stat(p)
	if err != nil || !info.IsDir() {
		return []string{filepath.Clean(p)} // reading it tells what is wrong
	}
	entries, err := os.ReadDir(p)
	if err != nil {
		r.Add(form.Place{File: filepath.ToSlash(p)}, "%v", plainly(err))
	}
	var files []string
	for _, e := range entries { // sorted by name
		if isYAML(e.Name()) && !e.IsDir() {
			files = append(files, filepath.Join(p, e.Name()))
		}
	}
	if err == nil && len(files) == 0 {
		r.Add(form.Place{File: filepath.ToSlash(p)}, "the folder holds no catalog; put *.yaml files in it, or name another")
	}
	return files
}

// load reads a plain file of bounded size.
func load(name string) ([]byte, error) {
	info, err := os.Stat(name)
	switch {
	case err != nil:
		return nil, plainly(err)
	case !info.Mode().IsRegular():
		return nil, errors.New("is not a plain file; name a catalog file or a folder")
	case info.Size() > form.MaxBytes:
		return nil, fmt.Errorf("has %d bytes; a catalog file may have %d, so split it into several in a folder", info.Size(), form.MaxBytes)
	}
	f, err := os.Open(name)
	if err != nil {
		return nil, plainly(err)
	}
	defer f.Close()
	data, err := io.ReadAll(io.LimitReader(f, form.MaxBytes+1))
	if err != nil {
		return nil, plainly(err)
	}
	return data, nil
}

// plainly says why a file cannot be read, without the name, which stands in
// front of the message already.
func plainly(err error) error {
	switch e, ok := errors.AsType[*fs.PathError](err); {
	case errors.Is(err, fs.ErrNotExist):
		return errors.New("no such file; check the spelling and the folder")
	case errors.Is(err, fs.ErrPermission):
		return errors.New("no permission to read it")
	case ok:
		return e.Err
	}
	return err
}
