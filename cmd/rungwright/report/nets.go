package report

import "math"

// nets tells which points of a drawing are joined, from what is drawn: wires,
// flags of one name, earths. The node voltages are found by it, so that a
// voltage stands where the drawn circuit has it.
type nets struct {
	parent []int
	number map[spot]int
	flags  map[string]int
}

// spot is a point of a row, in hundredths of a point.
type spot struct {
	row  int
	x, y int64
}

// earthNet is the number of the net that is earthed.
const earthNet = 0

func netsOf(rows []*row) *nets {
	n := &nets{parent: []int{earthNet}, number: map[spot]int{}, flags: map[string]int{}}
	for r, row := range rows {
		for _, w := range row.wires {
			n.join(n.at(r, w.a), n.at(r, w.b))
		}
		for _, p := range row.parts { // so that numbers do not hang on who asks first
			n.at(r, p.a)
			n.at(r, p.b)
		}
		for _, e := range row.earths {
			n.join(n.at(r, e), earthNet)
		}
		for _, f := range row.flags {
			here := n.at(r, f.at)
			if first, met := n.flags[f.name]; met {
				n.join(first, here)
			} else {
				n.flags[f.name] = here
			}
		}
	}
	return n
}

// at is the net of a point.
func (n *nets) at(row int, p point) int {
	s := spot{row, int64(math.Round(p.x * 100)), int64(math.Round(p.y * 100))}
	k, met := n.number[s]
	if !met {
		k = len(n.parent)
		n.number[s] = k
		n.parent = append(n.parent, k)
	}
	return n.root(k)
}

func (n *nets) root(k int) int {
	for n.parent[k] != k {
		k = n.parent[k]
	}
	return k
}

// join makes one net of two; the earth stays the root of its own.
func (n *nets) join(a, b int) {
	a, b = n.root(a), n.root(b)
	n.parent[max(a, b)] = min(a, b)
}

// step is a known difference of voltage between two nets.
type step struct {
	high, low int
	volts     float64
}

// spread walks known differences from earth and gives each net that it
// reaches its voltage.
func spread(steps []step) map[int]float64 {
	v := map[int]float64{earthNet: 0}
	for changed := true; changed; {
		changed = false
		for _, s := range steps {
			high, hasHigh := v[s.high]
			low, hasLow := v[s.low]
			switch {
			case hasLow && !hasHigh:
				v[s.high], changed = low+s.volts, true
			case hasHigh && !hasLow:
				v[s.low], changed = high-s.volts, true
			}
		}
	}
	return v
}

// voltages are the mean voltages of the nets: across a capacitor as given,
// across source and series resistor the source's mean.
func (s *sheet) voltages(n *nets) map[int]float64 {
	if s.labels.CapacitorV == nil {
		return nil
	}
	mean := 0.0
	for _, p := range s.circuit.Source.Points {
		mean += p * s.circuit.Source.Peak / float64(len(s.circuit.Source.Points))
	}
	var steps []step
	for r, row := range s.rows {
		for _, p := range row.parts {
			x := step{high: n.at(r, p.a), low: n.at(r, p.b)}
			switch {
			case p.kind == capacitor && p.index < len(s.labels.CapacitorV):
				x.volts = s.labels.CapacitorV[p.index]
			case p.kind == source:
				x.volts = mean
			case p.kind == series:
			default:
				continue
			}
			steps = append(steps, x)
		}
	}
	return spread(steps)
}
