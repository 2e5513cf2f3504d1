package main

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"

	"rungwright/cmd/rungwright/savefile"
)

// output is a file to be written.
type output struct {
	path string
	data []byte
}

// mayWrite refuses, before any work is done, an output that cannot be
// written: a name that belongs to an input, a folder or a link, or one that is
// taken while replacing is not allowed.
func mayWrite(path string, replace bool, inputs ...string) error {
	if path == "-" {
		return badInput("results are printed there already; name a file", "%s: files cannot be written to standard output", path)
	}
	if err := notAnInput(path, inputs...); err != nil {
		return err
	}
	err := savefile.Check(path)
	if _, taken := errors.AsType[*savefile.ExistsError](err); taken && replace {
		return nil
	}
	err = refused(err)
	if _, told := errors.AsType[*inputError](err); err == nil || told {
		return err
	}
	return badInput("name another file for the result", "%s: cannot be written: %v", path, cause(err))
}

// cause is what a file operation failed of, without its name and path.
func cause(err error) error {
	if e, ok := errors.AsType[*fs.PathError](err); ok {
		return e.Err
	}
	return err
}

// notAnInput refuses an output that is also read, by whatever name.
func notAnInput(path string, inputs ...string) error {
	out, err := os.Stat(path)
	if err != nil {
		return nil
	}
	for _, input := range inputs {
		if in, err := os.Stat(input); err == nil && os.SameFile(in, out) {
			return badInput("name another file for the result", "%s: is read by this command and is not overwritten", path)
		}
	}
	return nil
}

// refused puts what savefile said into the user's words.
func refused(err error) error {
	if err == nil {
		return nil
	}
	if e, ok := errors.AsType[*savefile.ExistsError](err); ok {
		return badInput("give --"+flagReplace+" to replace it, or another name", "%s", e)
	}
	if e, ok := errors.AsType[*savefile.NotPlainError](err); ok {
		return badInput("name another file for the result", "%s, and is not written to", e)
	}
	if e, ok := errors.AsType[*fs.PathError](err); ok && errors.Is(err, fs.ErrPermission) {
		return badInput("name a folder that you may write to", "%s: no permission to write there", filepath.ToSlash(e.Path))
	}
	return err
}

// saveAll writes files and says what became of each on standard error.
// Folders that are missing are made, and unmade when nothing came into them.
func saveAll(s *streams, replace bool, outputs ...output) error {
	for _, o := range outputs {
		made, err := makeFolder(filepath.Dir(o.path))
		if err != nil {
			return refused(err)
		}
		outcome, err := savefile.Write(o.path, o.data, replace)
		if err != nil {
			removeEmpty(made)
			return refused(err)
		}
		fmt.Fprintf(s.err, "%s %s\n", outcome, filepath.ToSlash(o.path))
	}
	return nil
}

// makeFolder makes a folder and its parents, and lists those that were
// missing, the innermost first.
func makeFolder(dir string) (made []string, err error) {
	for d := dir; !exists(d); d = filepath.Dir(d) {
		made = append(made, d)
	}
	return made, os.MkdirAll(dir, 0o777)
}

// removeEmpty takes back folders that were made; one with contents stays.
func removeEmpty(made []string) {
	for _, d := range made {
		if os.Remove(d) != nil {
			return
		}
	}
}
