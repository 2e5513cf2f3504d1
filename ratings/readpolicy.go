package ratings

import (
	"crypto/sha256"
	"embed"
	"encoding/hex"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"rungwright/catalog/form"
)

//go:embed policy/*.yaml
var shipped embed.FS

// DefaultPolicy is the shipped policy that holds when none is named.
const DefaultPolicy = "general"

// mostPolicyBytes bounds a policy file.
const mostPolicyBytes = 1 << 20

// PolicyNames lists the shipped policies by name.
func PolicyNames() []string {
	entries, err := fs.ReadDir(shipped, "policy")
	if err != nil {
		panic("ratings: " + err.Error())
	}
	var names []string
	for _, e := range entries { // sorted by name
		names = append(names, strings.TrimSuffix(e.Name(), ".yaml"))
	}
	return names
}

// ReadPolicy returns a shipped policy by name, or reads a file. Mistakes come
// back all at once as form.Problems.
func ReadPolicy(nameOrFile string) (*Policy, error) {
	if data, err := shipped.ReadFile("policy/" + nameOrFile + ".yaml"); err == nil {
		return ReadPolicyBytes(nameOrFile+".yaml", data)
	}
	data, err := loadPolicy(nameOrFile)
	if err != nil {
		return nil, form.Problems{{Place: form.Place{File: filepath.ToSlash(nameOrFile)}, Text: err.Error()}}
	}
	return ReadPolicyBytes(filepath.ToSlash(nameOrFile), data)
}

// ReadPolicyBytes reads a policy from data; name stands for it in messages.
func ReadPolicyBytes(name string, data []byte) (*Policy, error) {
	var r form.Report
	top := form.ParseWithin(name, data, form.Limits{Bytes: mostPolicyBytes}, &r)
	var p *Policy
	if top != nil {
		p = policyOf(top)
	}
	if err := r.Err(); err != nil {
		return nil, err
	}
	sum := sha256.Sum256(data)
	p.SHA256 = hex.EncodeToString(sum[:])
	return p, nil
}

func loadPolicy(name string) ([]byte, error) {
	f, err := os.Open(name)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, notAPolicy(name)
	case err != nil:
		return nil, errors.New("cannot be opened; check that it may be read")
	}
	defer f.Close()
	info, err := f.Stat()
	switch {
	case err != nil || !info.Mode().IsRegular():
		return nil, errors.New("is not a plain file; name a policy file or a shipped policy")
	case info.Size() > mostPolicyBytes:
		return nil, fmt.Errorf("has %d bytes; a policy file may have %d", info.Size(), mostPolicyBytes)
	}
	data, err := io.ReadAll(io.LimitReader(f, mostPolicyBytes+1))
	if err != nil {
		return nil, errors.New("cannot be read to its end")
	}
	return data, nil
}

// notAPolicy says what a name could have been.
func notAPolicy(name string) error {
	names := PolicyNames()
	list := strings.Join(names, ", ")
	if near := form.Nearest(name, names); near != "" {
		return fmt.Errorf("no such policy or file; did you mean %q? shipped are %s", near, list)
	}
	return fmt.Errorf("no such policy or file; shipped are %s", list)
}
