// Package savefile puts result files on disk whole or not at all. The bytes go
// to a temporary name in the same folder, are synced and then moved into
// place, so that no reader and no power cut ever sees half a file, and an old
// file is kept whenever anything fails.
package savefile

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
)

// Outcome says what became of a file.
type Outcome string

// The outcomes.
const (
	Created   Outcome = "wrote"
	Replaced  Outcome = "replaced"
	Unchanged Outcome = "unchanged" // the same bytes were there already
)

// ExistsError says that another file of that name is there already and that
// nobody allowed its replacement.
type ExistsError struct{ Path string }

func (e *ExistsError) Error() string {
	return fmt.Sprintf("%s: a file with other contents is there already", e.Path)
}

// NotPlainError says that the name belongs to something that is no plain
// file, which is never written to.
type NotPlainError struct{ Path, Kind string }

func (e *NotPlainError) Error() string { return fmt.Sprintf("%s: is %s", e.Path, e.Kind) }

// Write saves data under path, whose folder must exist. An existing file with
// the same bytes is left alone; one with other bytes gives an *ExistsError
// unless replace. A symbolic link of that name is never followed: it gives a
// *NotPlainError, as folders and devices do.
func Write(path string, data []byte, replace bool) (Outcome, error) {
	root, err := os.OpenRoot(filepath.Dir(path))
	if err != nil {
		return "", err
	}
	defer root.Close()
	return write(root, filepath.Base(path), path, data, replace)
}

func write(root *os.Root, name, path string, data []byte, replace bool) (Outcome, error) {
	old, err := inspect(root, name, path)
	if err != nil {
		return "", err
	}
	if old != nil && same(root, name, old, data) {
		return Unchanged, nil
	}
	if old != nil && !replace {
		return "", &ExistsError{path}
	}
	temp, err := writeTemp(root, name, data, old)
	if err != nil {
		return "", err
	}
	defer root.Remove(temp) // gone already after a rename
	if old != nil {
		err = root.Rename(temp, name)
	} else {
		err = place(root, temp, name)
	}
	if errors.Is(err, fs.ErrExist) { // another run was quicker
		return raced(root, name, path, data)
	}
	if err != nil {
		return "", err
	}
	syncFolder(root)
	if old != nil {
		return Replaced, nil
	}
	return Created, nil
}

// Check tells what Write would refuse without looking at contents: nil, a
// *NotPlainError, an *ExistsError when a file is there, or an error of the
// folder other than its absence.
func Check(path string) error {
	root, err := os.OpenRoot(filepath.Dir(path))
	if errors.Is(err, fs.ErrNotExist) {
		return nil
	}
	if err != nil {
		return err
	}
	defer root.Close()
	old, err := inspect(root, filepath.Base(path), path)
	if err == nil && old != nil {
		return &ExistsError{path}
	}
	return err
}

// inspect gives what stands under the name, nil when nothing does.
func inspect(root *os.Root, name, path string) (fs.FileInfo, error) {
	info, err := root.Lstat(name)
	if errors.Is(err, fs.ErrNotExist) {
		return nil, nil
	}
	if err != nil {
		return nil, err
	}
	switch mode := info.Mode(); {
	case mode.IsRegular():
		return info, nil
	case mode.IsDir():
		return nil, &NotPlainError{path, "a folder"}
	case mode&fs.ModeSymlink != 0:
		return nil, &NotPlainError{path, "a symbolic link"}
	}
	return nil, &NotPlainError{path, "no plain file"}
}

// same compares without reading a file of another size.
func same(root *os.Root, name string, info fs.FileInfo, data []byte) bool {
	if info.Size() != int64(len(data)) {
		return false
	}
	have, err := root.ReadFile(name)
	return err == nil && bytes.Equal(have, data)
}

// raced answers when a file appeared under the name while ours was written.
func raced(root *os.Root, name, path string, data []byte) (Outcome, error) {
	if info, err := root.Lstat(name); err == nil && info.Mode().IsRegular() && same(root, name, info, data) {
		return Unchanged, nil
	}
	return "", &ExistsError{path}
}
