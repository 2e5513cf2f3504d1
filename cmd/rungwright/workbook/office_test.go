package workbook

import (
	"context"
	"os"
	"os/exec"
	"path/filepath"
	"syscall"
	"testing"
	"time"
)

// An independent office suite recalculates what we wrote: Debian's
// libreoffice-calc-nogui, headless, with hard recalculation forced, for by
// default it would believe the cached values.

const recalculate = `<?xml version="1.0" encoding="UTF-8"?>
<oor:items xmlns:oor="http://openoffice.org/2001/registry" xmlns:xs="http://www.w3.org/2001/XMLSchema" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">
<item oor:path="/org.openoffice.Office.Calc/Formula/Load"><prop oor:name="OOXMLRecalcMode" oor:op="fuse"><value>0</value></prop></item>
<item oor:path="/org.openoffice.Office.Common/Security/Scripting"><prop oor:name="DisableMacrosExecution" oor:op="fuse"><value>true</value></prop></item>
</oor:items>`

// office recalculates every file that the tests need, all in one run, for the
// start takes seconds, and returns the folder with the results. It skips the
// test where the suite is missing, and fails instead where RUNGWRIGHT_CI is set.
func office(t *testing.T) string {
	t.Helper()
	program, err := exec.LookPath("soffice")
	if err != nil {
		if os.Getenv("RUNGWRIGHT_CI") != "" {
			t.Fatal("libreoffice-calc-nogui is not installed, and RUNGWRIGHT_CI forbids to skip")
		}
		t.Skip("SKIPPED: libreoffice-calc-nogui is not installed, so no formula was checked by an independent program")
	}
	if officeFolder == "" {
		if officeFolder, err = os.MkdirTemp("", "rungwright-office-"); err != nil {
			t.Fatal(err)
		}
		runOffice(t, program, officeFolder, officeFiles(t))
	}
	return filepath.Join(officeFolder, "out")
}

var officeFolder string

func TestMain(m *testing.M) {
	code := m.Run()
	if officeFolder != "" {
		os.RemoveAll(officeFolder)
	}
	os.Exit(code)
}

func runOffice(t *testing.T, program, dir string, files map[string][]byte) {
	t.Helper()
	profile := filepath.Join(dir, "profile")
	put(t, filepath.Join(profile, "user", "registrymodifications.xcu"), []byte(recalculate))
	args := []string{"-env:UserInstallation=file://" + profile, "--headless", "--norestore", "--nolockcheck", "--nodefault", "--nologo",
		"--convert-to", "xlsx:Calc MS Excel 2007 XML", "--outdir", filepath.Join(dir, "out")}
	for _, name := range sortedKeys(files) {
		file := filepath.Join(dir, name)
		put(t, file, files[name])
		args = append(args, file)
	}
	run(t, program, args)
}

// recalculatedFile is what the office suite made of a file; it ends with
// status zero even when it fails, so the file itself must be there.
func recalculatedFile(t *testing.T, name string) []byte {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(office(t), name+".xlsx"))
	if err != nil {
		t.Fatal("the office suite wrote nothing: ", err)
	}
	return data
}

func put(t *testing.T, name string, data []byte) {
	t.Helper()
	if err := os.MkdirAll(filepath.Dir(name), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(name, data, 0o644); err != nil {
		t.Fatal(err)
	}
}

// run ends the whole group of processes when it takes too long: the launcher
// leaves its child behind otherwise.
func run(t *testing.T, program string, args []string) {
	t.Helper()
	ctx, cancel := context.WithTimeout(context.Background(), 90*time.Second)
	defer cancel()
	cmd := exec.CommandContext(ctx, program, args...)
	cmd.SysProcAttr = &syscall.SysProcAttr{Setpgid: true}
	cmd.Cancel = func() error { return syscall.Kill(-cmd.Process.Pid, syscall.SIGKILL) }
	cmd.WaitDelay = 5 * time.Second
	if said, err := cmd.CombinedOutput(); err != nil {
		t.Fatalf("%s: %v\n%s", program, err, said)
	}
}
