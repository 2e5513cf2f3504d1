package main

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
)

// standardInput is how a place in standard input is named.
const standardInput = "stdin"

// maxInput is the most bytes that a supply, circuit or design file may have.
const maxInput = 16 << 20

// readInput reads a file that the user named, or standard input for "-", and
// gives the name to use in messages. Folders, devices, pipes and files beyond
// what a YAML file may hold are refused before they are read.
func readInput(s *streams, path string) (name string, data []byte, err error) {
	if path == "-" {
		data, err = readLimited(s.in, standardInput)
		return standardInput, data, err
	}
	info, err := os.Stat(path)
	if err != nil {
		return path, nil, cannotRead(path, err)
	}
	switch {
	case info.IsDir():
		return path, nil, badInput("name a file in it", "%s: is a folder, not a file", path)
	case !info.Mode().IsRegular():
		return path, nil, badInput("to read from another program, give - and pipe into standard input", "%s: is no plain file", path)
	case info.Size() > maxInput:
		return path, nil, tooLarge(path)
	}
	f, err := os.Open(path)
	if err != nil {
		return path, nil, cannotRead(path, err)
	}
	defer f.Close()
	data, err = readLimited(f, path)
	return path, data, err
}

func readLimited(r io.Reader, name string) ([]byte, error) {
	data, err := io.ReadAll(io.LimitReader(r, maxInput+1))
	if err != nil {
		return nil, cannotRead(name, err)
	}
	if len(data) > maxInput {
		return nil, tooLarge(name)
	}
	return data, nil
}

func tooLarge(name string) error {
	return badInput("check that it is the file you meant", "%s: is larger than the %d MB that such a file may have", name, maxInput>>20)
}

// cannotRead says why in plain words, the path once and in front.
func cannotRead(path string, err error) error {
	hint := ""
	switch {
	case errors.Is(err, fs.ErrNotExist):
		err = errors.New("no such file")
		hint = "check the spelling and the folder"
	case errors.Is(err, fs.ErrPermission):
		err = errors.New("no permission to read it")
	default:
		err = cause(err)
	}
	return &inputError{fmt.Errorf("%s: %w", path, err), hint}
}
