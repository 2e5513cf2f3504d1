package savefile

import (
	"errors"
	"fmt"
	"io/fs"
	"math/rand/v2"
	"os"
)

// writeTemp writes and syncs a new file beside name, with the permissions of
// old where there is one, and returns its name. It leaves nothing behind when
// it fails.
func writeTemp(root *os.Root, name string, data []byte, old fs.FileInfo) (string, error) {
	mode := fs.FileMode(0o666)
	if old != nil {
		mode = old.Mode().Perm()
	}
	f, temp, err := create(root, name, mode)
	if err != nil {
		return "", err
	}
	_, err = f.Write(data)
	if err == nil && old != nil {
		err = f.Chmod(mode)
	}
	if err == nil {
		err = f.Sync()
	}
	if closing := f.Close(); err == nil {
		err = closing
	}
	if err != nil {
		root.Remove(temp)
		return "", err
	}
	return temp, nil
}

// create opens a new file under a name that no other run uses.
func create(root *os.Root, name string, mode fs.FileMode) (*os.File, string, error) {
	for try := 0; ; try++ {
		temp := fmt.Sprintf(".%s.%08x.part", name, rand.Uint32())
		f, err := root.OpenFile(temp, os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
		if err == nil || !errors.Is(err, fs.ErrExist) || try == 20 {
			return f, temp, err
		}
	}
}

// place gives the finished file its name, and fails with fs.ErrExist when the
// name is taken: a hard link does that in one step. File systems without hard
// links first claim the name with an empty file.
func place(root *os.Root, temp, name string) error {
	err := root.Link(temp, name)
	if err == nil || errors.Is(err, fs.ErrExist) {
		return err
	}
	claim, err := root.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
	if err != nil {
		return err
	}
	claim.Close()
	if err := root.Rename(temp, name); err != nil {
		root.Remove(name)
		return err
	}
	return nil
}

// syncFolder makes the new name last through a power cut; not every system
// can, and the file is whole in any case.
func syncFolder(root *os.Root) {
	if d, err := root.Open("."); err == nil {
		d.Sync()
		d.Close()
	}
}
