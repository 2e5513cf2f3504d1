package optimize

import (
	"fmt"
	"slices"
	"strconv"

	"rungwright/catalog"
	"rungwright/optimize/ladder"
)

// Group is what fills one position: series × parallel pieces of one part.
type Group struct {
	Part             *catalog.Part
	Series, Parallel int
}

// Single is a group of one piece.
func Single(p *catalog.Part) Group { return Group{p, 1, 1} }

// Pieces is how many parts the group takes.
func (g Group) Pieces() int { return g.Series * g.Parallel }

// Plan is a choice of parts for every position: what the search decides and
// what Evaluate judges.
type Plan struct {
	Topology   ladder.Topology
	Stages     int
	Capacitors []Group // in the order C1, C2 …
	Diodes     []Group // in the order D1, D2 …
	Bleeder    Group   // resistors in series across the output; no part: none
	Surge      Group   // resistors in series with each winding end; no part: none
}

// placing is one group with the positions that it fills.
type placing struct {
	group Group
	refs  []string
	role  Role
}

// times is the number of positions.
func (p *placing) times() int { return len(p.refs) }

// placings lists the plan's groups: equal ones together, in the order of their
// first position.
func (p *Plan) placings() []placing {
	var out []placing
	add := func(g Group, ref string, role Role) {
		for i := range out {
			if out[i].group == g {
				if out[i].role != role {
					out[i].role = RoleLadder
				}
				out[i].refs = append(out[i].refs, ref)
				return
			}
		}
		out = append(out, placing{g, []string{ref}, role})
	}
	smoothing := p.Topology.SmoothingColumn(p.Stages)
	for i, g := range p.Capacitors {
		role := RoleCoupling
		if smoothing[i] {
			role = RoleSmoothing
		}
		add(g, "C"+strconv.Itoa(i+1), role)
	}
	for i, g := range p.Diodes {
		add(g, "D"+strconv.Itoa(i+1), RoleRectifier)
	}
	next := 1
	if p.Surge.Part != nil {
		for range p.Topology.WindingEnds() {
			add(p.Surge, "R"+strconv.Itoa(next), RoleSurge)
			next++
		}
	}
	if p.Bleeder.Part != nil {
		add(p.Bleeder, "R"+strconv.Itoa(next), RoleBleeder)
	}
	return out
}

// refsOf names the pieces of a position: "C3", or "C3A", "C3B" for a group.
func refsOf(ref string, pieces int) []string {
	if pieces == 1 {
		return []string{ref}
	}
	var out []string
	for k := range pieces {
		out = append(out, ref+letters(k))
	}
	return out
}

// letters counts A, B … Z, AA, AB ….
func letters(k int) string {
	if k < 26 {
		return string(rune('A' + k))
	}
	return letters(k/26-1) + string(rune('A'+k%26))
}

// Summary is the plan in a line: "half-wave, 4 stages, 8 × QLF-HV-103-3K …".
func (p *Plan) Summary() string {
	text := fmt.Sprintf("%s, %d stage", p.Topology, p.Stages)
	if p.Stages != 1 {
		text += "s"
	}
	for _, x := range p.placings() {
		text += fmt.Sprintf(", %d × %s", x.times()*x.group.Pieces(), x.group.Part.Number)
	}
	return text
}

// pattern is a way to spread two groups over the capacitor positions: where
// second is true, the second group stands. A pattern without second is
// uniform.
type pattern struct {
	name   string
	second func(t ladder.Topology, stages int) []bool
}

// patterns are the spreads that the search tries. A new one is a line here.
var patterns = []pattern{
	{name: "uniform"},
	{"first coupling capacitor its own", ladder.Topology.FirstCoupling},
	{"by column", ladder.Topology.SmoothingColumn},
}

// spread fills the positions of a pattern.
func (p pattern) spread(t ladder.Topology, stages int, first, second Group) []Group {
	out := slices.Repeat([]Group{first}, t.CapacitorCount(stages))
	for i, other := range p.isSecond(t, stages) {
		if other {
			out[i] = second
		}
	}
	return out
}

// isSecond tells for each position whether the second group stands there.
func (p pattern) isSecond(t ladder.Topology, stages int) []bool {
	if p.second == nil {
		return make([]bool, t.CapacitorCount(stages))
	}
	return p.second(t, stages)
}

// counts is how many positions each group fills.
func (p pattern) counts(t ladder.Topology, stages int) (first, second int) {
	for _, other := range p.isSecond(t, stages) {
		if other {
			second++
		} else {
			first++
		}
	}
	return first, second
}
