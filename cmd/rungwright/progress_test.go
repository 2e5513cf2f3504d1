package main

import (
	"strings"
	"testing"
	"time"

	"github.com/shopspring/decimal"

	"rungwright/optimize"
)

// clock is a time that the test moves.
type clock struct{ at time.Time }

func (c *clock) now() time.Time       { return c.at }
func (c *clock) pass(d time.Duration) { c.at = c.at.Add(d) }

func state(done int64) optimize.Progress {
	return optimize.Progress{Phase: "simulating", Done: done, Total: 100,
		BestCost: decimal.RequireFromString("12.345"), HasBest: true}
}

func TestProgressWaitsDrawsAndErases(t *testing.T) {
	p, c := pretendTerminal(80), &clock{time.Unix(0, 0)}
	line := newProgress(&p.streams, "EUR", c.now)
	line.update(state(20))
	c.pass(900 * time.Millisecond)
	line.update(state(25))
	if p.errText.Len() > 0 {
		t.Errorf("drawn before a second had passed: %q", p.errText.String())
	}
	c.pass(1100 * time.Millisecond)
	line.update(state(30)) // 10 of 80 in 2 s, for 20 were done from the start
	want := "\r\x1b[Ksimulating 30 %, best 12.35 EUR for the build, about 14s left"
	if got := p.errText.String(); got != want {
		t.Errorf("got  %q\nwant %q", got, want)
	}
	c.pass(10 * time.Millisecond)
	line.update(state(31))
	if got := p.errText.String(); got != want {
		t.Errorf("redrawn after 10 ms: %q", got)
	}
	line.end()
	if !strings.HasSuffix(p.errText.String(), "\r\x1b[K") {
		t.Errorf("not erased: %q", p.errText.String())
	}
	line.update(state(40))
	if !strings.HasSuffix(p.errText.String(), "\r\x1b[K") {
		t.Errorf("drawn after its end: %q", p.errText.String())
	}
}

func TestNoProgressUnlessBothAreTerminals(t *testing.T) {
	for _, ends := range [][2]bool{{false, true}, {true, false}, {false, false}} {
		p, c := pretendTerminal(80), &clock{time.Unix(0, 0)}
		p.outTerminal, p.errTerminal = ends[0], ends[1]
		line := newProgress(&p.streams, "EUR", c.now)
		c.pass(5 * time.Second)
		line.update(state(50))
		line.end()
		if p.errText.Len() > 0 {
			t.Errorf("terminals %v: drew %q", ends, p.errText.String())
		}
	}
}

func TestProgressLineIsOneLine(t *testing.T) {
	p, c := pretendTerminal(20), &clock{time.Unix(0, 0)}
	line := newProgress(&p.streams, "EUR", c.now)
	c.pass(2 * time.Second)
	line.update(state(50))
	text := strings.TrimPrefix(p.errText.String(), "\r\x1b[K")
	if len(text) >= 20 {
		t.Errorf("%d characters on a screen of 20: %q", len(text), text)
	}
}
