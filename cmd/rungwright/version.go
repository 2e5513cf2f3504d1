package main

import (
	"fmt"
	"runtime"
	"runtime/debug"
)

// version tells what was built: the module's version or revision, and the
// compiler.
func version() string {
	release := "unreleased"
	revision := ""
	if info, ok := debug.ReadBuildInfo(); ok {
		if v := info.Main.Version; v != "" && v != "(devel)" {
			release = v
		}
		for _, s := range info.Settings {
			if s.Key == "vcs.revision" {
				revision = ", revision " + s.Value[:min(12, len(s.Value))]
			}
		}
	}
	return fmt.Sprintf("rungwright %s%s, %s for %s/%s", release, revision, runtime.Version(), runtime.GOOS, runtime.GOARCH)
}
