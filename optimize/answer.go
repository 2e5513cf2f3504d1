package optimize

import (
	"cmp"
	"fmt"
	"maps"
	"math"
	"slices"
	"strings"
)

// WhyNot explains that nothing fits.
type WhyNot struct {
	Text    []string
	Targets []TargetGap
	Nearest *Design // the simulated design that came nearest, with what it breaks
	Missing []string
}

// TargetGap is how far one target alone must give.
type TargetGap struct {
	Name   string
	Wanted string
	Best   string // what the nearest design reaches
}

// answer writes up what the walk found.
func (w *walk) answer() Answer {
	rest := w.cert.Combinations - w.cert.Dominated - w.cert.Bounded - w.cert.Estimated - int64(w.cert.Simulated)
	w.cert.Dearer = rest
	w.cert.Rejected = w.cheapest
	if w.best != nil {
		w.cert.Proved = true
	}
	w.cert.Text = w.certificateText()
	a := Answer{Design: w.best, Certificate: w.cert}
	if w.best == nil {
		a.Why = w.whyNot()
		return a
	}
	w.best.Certificate, w.best.RunnersUp = w.cert, w.runners
	return a
}

// certificateText is the certificate in lines that one can read.
func (w *walk) certificateText() []string {
	c := &w.cert
	lines := []string{
		fmt.Sprintf("%s combinations of topology, stages, capacitors, diodes and bleeder", grouped(c.Combinations)),
		fmt.Sprintf("%s cut because a part cannot bear its place, or the source cannot reach the output", grouped(c.Dominated)),
		fmt.Sprintf("%s cut by bounds that no steady state breaks", grouped(c.Bounded)),
		fmt.Sprintf("%s cut by the estimate, whose mean output is trusted to %.1f %%", grouped(c.Estimated), 100*c.Guard),
		fmt.Sprintf("%d simulated at every corner until one passed", c.Simulated),
		fmt.Sprintf("%d of the simulated designs erred beyond the guard", c.GuardBroken),
	}
	switch {
	case w.best != nil:
		lines = append(lines, fmt.Sprintf("%s not lighter than the answer", grouped(c.Dearer)))
	case c.Proved:
		lines = append(lines, "nothing is left untried: no design of the catalog passes")
	default:
		lines = append(lines, fmt.Sprintf("stopped early: %s untried, none of them below %s %s for the build", grouped(c.Dearer), w.money(w.bound), w.e.terms.Currency))
	}
	if c.Rejected != "" {
		lines = append(lines, "cheapest that was simulated and rejected: "+c.Rejected)
	}
	return lines
}

// grouped is a whole number with thin groups of three.
func grouped(n int64) string {
	s := fmt.Sprint(n)
	for i := len(s) - 3; i > 0; i -= 3 {
		s = s[:i] + " " + s[i:]
	}
	return s
}

// whyNot explains an empty answer.
func (w *walk) whyNot() *WhyNot {
	why := &WhyNot{}
	if !w.cert.Proved {
		why.Text = append(why.Text, "the search was stopped before anything passed")
	} else {
		why.Text = append(why.Text, "no combination of the catalog's parts meets the targets")
	}
	why.Text = append(why.Text, w.e.obstacles(w)...)
	for _, k := range slices.SortedFunc(maps.Keys(w.causes), func(a, b string) int {
		return cmp.Or(cmp.Compare(w.causes[b], w.causes[a]), cmp.Compare(a, b))
	}) {
		why.Text = append(why.Text, fmt.Sprintf("%d simulated designs broke: %s", w.causes[k], k))
	}
	if w.nearest != nil {
		why.Nearest = w.e.design(w.nearest)
		why.Text = append(why.Text, "nearest: "+w.nearest.plan.Summary())
		for _, f := range w.nearest.failed {
			why.Text = append(why.Text, "  it breaks "+f)
		}
	}
	return why
}

// obstacles are reasons that need no simulation.
func (e *evaluator) obstacles(w *walk) []string {
	var out []string
	reach, which := 0.0, ""
	for _, t := range e.topologies() {
		v := float64(t.OutputFactor(e.mostStages(t))) * float64(e.supply.Source.Peak) * (1 - float64(e.supply.Source.Line))
		if v > reach {
			reach, which = v, fmt.Sprintf("%s of %d stages", t, e.mostStages(t))
		}
	}
	if len(e.topologies()) == 0 {
		out = append(out, "the topologies asked for need a centre-tapped source")
	} else if reach < e.supply.lowest() {
		out = append(out, fmt.Sprintf("even a %s gives at most %s at low line where %s is wanted: allow more stages or a higher source", which, volts(reach), volts(e.supply.lowest())))
	}
	p := e.pools()
	for kind, n := range map[string]int{"capacitor": len(p.capacitors), "diode": len(p.diodes)} {
		if n == 0 {
			out = append(out, "the catalog has no "+kind+" that mounting, height, temperature, supplier and status allow")
		}
	}
	slices.Sort(out)
	if e.supply.Output.Discharge.Below > 0 && len(e.bleeders(&p)) == 0 {
		out = append(out, "no resistor of the catalog makes a bleeder string for the highest output")
	}
	return out
}

// gap is how far a trial misses, as the sum of what its corners and targets
// exceed, in shares of what is wanted.
func (e *evaluator) gap(t *trial) float64 {
	sum := 0.0
	over := func(got, limit float64) {
		if limit > 0 && got > limit {
			sum += got/limit - 1
		}
	}
	if len(t.corners) < len(e.conditions) {
		sum += 1 // what was not simulated cannot be praised
	}
	for k := range t.corners {
		v := math.Abs(t.corners[k].Steady.MeanV)
		over(v, e.supply.highest())
		over(e.supply.lowest(), v)
		over(t.corners[k].Steady.RippleV, float64(e.supply.Output.Ripple))
	}
	for _, s := range t.stresses {
		over(s.Ratio, 1)
	}
	return sum + 0.1*float64(len(t.failed))
}

// cause is a failure without its figures, for counting.
func cause(failure string) string {
	head, tail, ok := strings.Cut(failure, ": ")
	if !ok {
		return failure
	}
	for _, word := range []string{"output", "ripple", "no steady state"} {
		if strings.HasPrefix(tail, word) {
			sense := ""
			if strings.Contains(tail, "below") {
				sense = " too low"
			} else if strings.Contains(tail, "above") {
				sense = " too high"
			}
			return word + sense + " at " + head
		}
	}
	if what, _, ok := strings.Cut(tail, " at "); ok {
		return what + " over its limit"
	}
	return head
}
