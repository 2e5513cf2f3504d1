package savefile

import (
	"bytes"
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"sync"
	"testing"
)

// only fails unless the folder holds exactly the named files: nothing
// temporary may stay behind.
func only(t *testing.T, dir string, names ...string) {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, e := range entries {
		got = append(got, e.Name())
	}
	if fmt.Sprint(got) != fmt.Sprint(names) {
		t.Errorf("folder holds %q, want %q", got, names)
	}
}

func mustWrite(t *testing.T, path, text string, replace bool, want Outcome) {
	t.Helper()
	got, err := Write(path, []byte(text), replace)
	if err != nil || got != want {
		t.Fatalf("Write = %q, %v; want %q", got, err, want)
	}
	if have, _ := os.ReadFile(path); string(have) != text {
		t.Fatalf("file holds %q, want %q", have, text)
	}
}

func TestWriteThenAgain(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "design.yaml")
	mustWrite(t, path, "one", false, Created)
	mustWrite(t, path, "one", false, Unchanged)
	_, err := Write(path, []byte("two"), false)
	if _, ok := errors.AsType[*ExistsError](err); !ok {
		t.Fatalf("other bytes: %v, want an ExistsError", err)
	}
	if have, _ := os.ReadFile(path); string(have) != "one" {
		t.Fatalf("a refused write changed the file to %q", have)
	}
	mustWrite(t, path, "two", true, Replaced)
	only(t, dir, "design.yaml")
}

func TestReplaceKeepsPermissions(t *testing.T) {
	path := filepath.Join(t.TempDir(), "design.yaml")
	if err := os.WriteFile(path, []byte("old"), 0o640); err != nil {
		t.Fatal(err)
	}
	mustWrite(t, path, "new", true, Replaced)
	if info, _ := os.Stat(path); info.Mode().Perm() != 0o640 {
		t.Errorf("mode %v, want 0640", info.Mode().Perm())
	}
}

func TestNeverThroughLinkOrFolder(t *testing.T) {
	dir, outside := t.TempDir(), filepath.Join(t.TempDir(), "precious")
	if err := os.WriteFile(outside, []byte("precious"), 0o666); err != nil {
		t.Fatal(err)
	}
	link, folder := filepath.Join(dir, "link"), filepath.Join(dir, "sub")
	if err := os.Symlink(outside, link); err != nil {
		t.Skip("this system makes no symbolic links:", err)
	}
	if err := os.Mkdir(folder, 0o777); err != nil {
		t.Fatal(err)
	}
	for _, path := range []string{link, folder} {
		for _, replace := range []bool{false, true} {
			_, err := Write(path, []byte("x"), replace)
			if _, ok := errors.AsType[*NotPlainError](err); !ok {
				t.Errorf("Write(%s, replace=%t) = %v, want a NotPlainError", filepath.Base(path), replace, err)
			}
		}
	}
	if have, _ := os.ReadFile(outside); string(have) != "precious" {
		t.Errorf("the file behind the link now holds %q", have)
	}
	only(t, dir, "link", "sub")
}

// TestTwoRunsAtOnce: of many runs that write different bytes under one new
// name exactly one wins, and its file is whole.
func TestTwoRunsAtOnce(t *testing.T) {
	for round := range 20 {
		dir := t.TempDir()
		path := filepath.Join(dir, "design.yaml")
		outcomes := make([]Outcome, 8)
		var wait sync.WaitGroup
		for i := range outcomes {
			wait.Go(func() { outcomes[i], _ = Write(path, contents(i), false) })
		}
		wait.Wait()
		winners := 0
		for i, o := range outcomes {
			if o == Created {
				winners++
				if have, _ := os.ReadFile(path); !bytes.Equal(have, contents(i)) {
					t.Fatalf("round %d: the winner's file does not hold what it wrote", round)
				}
			}
		}
		if winners != 1 {
			t.Fatalf("round %d: %d winners, want 1", round, winners)
		}
		only(t, dir, "design.yaml")
	}
}

func contents(i int) []byte { return bytes.Repeat([]byte{byte('a' + i)}, 100_000) }

func TestFailureLeavesNothing(t *testing.T) {
	dir := t.TempDir()
	if _, err := Write(filepath.Join(dir, "absent", "x"), nil, false); err == nil {
		t.Error("a missing folder was accepted")
	}
	only(t, dir)
}

func TestCheck(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "design.yaml")
	for _, free := range []string{path, filepath.Join(dir, "absent", "design.yaml")} {
		if err := Check(free); err != nil {
			t.Errorf("Check(%s) = %v, want nil", free, err)
		}
	}
	mustWrite(t, path, "one", false, Created)
	if _, ok := errors.AsType[*ExistsError](Check(path)); !ok {
		t.Error("Check did not see the file")
	}
	if _, ok := errors.AsType[*NotPlainError](Check(dir)); !ok {
		t.Error("Check did not see the folder")
	}
}
