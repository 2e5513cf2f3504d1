package main

import (
	"strings"
	"testing"
)

func TestSlug(t *testing.T) {
	for name, want := range map[string]string{
		"Harbour air ioniser, emitter rail": "harbour-air-ioniser-emitter-rail",
		"Lüfter — 6 kV (Prüfling)":          "lufter-6-kv-prufling",
		"../../etc/passwd":                  "etc-passwd",
		"...":                               "supply",
		"高圧":                                "supply",
		strings.Repeat("ab ", 40):           strings.Trim(strings.Repeat("ab-", 20), "-"),
	} {
		if got := slug(name); got != want {
			t.Errorf("slug(%q) = %q, want %q", name, got, want)
		}
	}
}
