package main

import (
	"fmt"
	"io"
	"sync"
	"time"

	"rungwright/optimize"
)

// progressAfter is how long a run stays silent.
const progressAfter = time.Second

// progress draws one line on a terminal and redraws it in place. Its update
// may be called from any goroutine. The zero of out draws nothing.
type progress struct {
	mu       sync.Mutex
	out      io.Writer // nil: no line
	width    int
	now      func() time.Time
	began    time.Time
	drawn    time.Time // last time the line was drawn; zero: never
	phase    string
	phaseAt  time.Time
	before   int64 // done when the phase was first seen: most of a search is settled at once
	currency string
}

// newProgress is ready to draw where the streams allow it.
func newProgress(s *streams, currency string, now func() time.Time) *progress {
	p := &progress{width: s.width, now: now, began: now(), currency: currency}
	if s.progressShown() {
		p.out = s.err
	}
	return p
}

// redrawEvery keeps the line from flickering.
const redrawEvery = 150 * time.Millisecond

// update takes the state of the search and draws it when it is time.
func (p *progress) update(state optimize.Progress) {
	if p.out == nil {
		return
	}
	p.mu.Lock()
	defer p.mu.Unlock()
	now := p.now()
	if state.Phase != p.phase {
		p.phase, p.phaseAt, p.before = state.Phase, now, state.Done
	}
	if now.Sub(p.began) < progressAfter || now.Sub(p.drawn) < redrawEvery {
		return
	}
	p.drawn = now
	line := []rune(p.line(state, now.Sub(p.phaseAt)))
	if len(line) >= p.width {
		line = line[:p.width-1]
	}
	fmt.Fprintf(p.out, "\r\x1b[K%s", string(line))
}

// line says what is done, how much of it, what is known so far and about how
// long the rest would take; a search ends earlier when its answer is found.
func (p *progress) line(state optimize.Progress, spent time.Duration) string {
	text := state.Phase
	if state.Total > 0 {
		text += fmt.Sprintf(" %.0f %%", 100*float64(state.Done)/float64(state.Total))
	}
	switch {
	case state.HasBest:
		text += fmt.Sprintf(", best %s %s for the build", state.BestCost.StringFixed(2), p.currency)
	case state.Bound.IsPositive():
		text += fmt.Sprintf(", none below %s %s for the build", state.Bound.StringFixed(2), p.currency)
	}
	if left, ok := timeLeft(state.Done-p.before, state.Total-p.before, spent); ok {
		text += ", about " + left.String() + " left"
	}
	return text
}

// timeLeft assumes that the rest goes as fast as what is done; it says
// nothing before a twentieth is done.
func timeLeft(done, total int64, spent time.Duration) (time.Duration, bool) {
	if done <= 0 || done < total/20 || done > total {
		return 0, false
	}
	left := time.Duration(float64(spent) * float64(total-done) / float64(done))
	return max(left.Round(time.Second), time.Second), true
}

// end erases the line.
func (p *progress) end() {
	if p.out == nil {
		return
	}
	p.mu.Lock()
	defer p.mu.Unlock()
	if !p.drawn.IsZero() {
		fmt.Fprint(p.out, "\r\x1b[K")
	}
	p.out = nil
}
