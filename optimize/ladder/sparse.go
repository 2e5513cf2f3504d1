package ladder

import "sort"

// sparse is the pattern of a symmetric matrix and of its LDLᵀ factors without
// pivoting, which exist because the matrices here are quasi-definite. Nodes
// are eliminated in minimum-degree order, so that a ladder of any topology
// fills in hardly at all and a solve is linear in the stages.
type sparse struct {
	n     int
	order []int      // order[k] is the unknown eliminated k-th
	place []int      // the inverse
	first []int32    // first[k]… are column k's entries below the diagonal
	row   []int32    // their rows, in elimination order
	steps []subtract // the updates of the factorisation, pivot by pivot
	until []int32    // until[k] is the end of pivot k's updates
}

// subtract is target −= value[a]·value[b]/pivot.
type subtract struct{ target, a, b int32 }

// newSparse orders and factors symbolically; pairs are the off-diagonal
// entries, in any order and orientation.
func newSparse(n int, pairs []branch) *sparse {
	near := make([]map[int]bool, n)
	for i := range near {
		near[i] = map[int]bool{}
	}
	for _, p := range pairs {
		if p.a != p.b && p.a >= 0 && p.b >= 0 {
			near[p.a][p.b], near[p.b][p.a] = true, true
		}
	}
	s := &sparse{n: n, place: make([]int, n), first: make([]int32, n+1)}
	columns := s.eliminate(near)
	for k, rows := range columns {
		s.first[k] = int32(len(s.row))
		for _, r := range rows {
			s.row = append(s.row, int32(s.place[r]))
		}
		sort.Slice(s.row[s.first[k]:], func(i, j int) bool { return s.row[int(s.first[k])+i] < s.row[int(s.first[k])+j] })
	}
	s.first[n] = int32(len(s.row))
	s.schedule()
	return s
}

// eliminate picks the least-connected node again and again (the lowest index
// among equals) and joins its neighbours.
func (s *sparse) eliminate(near []map[int]bool) [][]int {
	done := make([]bool, s.n)
	columns := make([][]int, 0, s.n)
	for k := range s.n {
		best := -1
		for i := range s.n {
			if !done[i] && (best < 0 || len(near[i]) < len(near[best])) {
				best = i
			}
		}
		done[best] = true
		s.order = append(s.order, best)
		s.place[best] = k
		var rows []int
		for j := range near[best] {
			rows = append(rows, j)
			delete(near[j], best)
		}
		sort.Ints(rows)
		for _, i := range rows {
			for _, j := range rows {
				if i != j {
					near[i][j] = true
				}
			}
		}
		columns = append(columns, rows)
	}
	return columns
}

// schedule lists the arithmetic of the factorisation. Values are held as the
// n diagonals followed by the entries of row.
func (s *sparse) schedule() {
	for k := range s.n {
		for x := s.first[k]; x < s.first[k+1]; x++ {
			for y := s.first[k]; y <= x; y++ {
				s.steps = append(s.steps, subtract{s.slot(int(s.row[x]), int(s.row[y])), int32(s.n) + x, int32(s.n) + y})
			}
		}
		s.until = append(s.until, int32(len(s.steps)))
	}
}

// slot is where the entry of two places in elimination order is held.
func (s *sparse) slot(i, j int) int32 {
	if i == j {
		return int32(i)
	}
	lo, hi := min(i, j), max(i, j)
	for x := s.first[lo]; x < s.first[lo+1]; x++ {
		if int(s.row[x]) == hi {
			return int32(s.n) + x
		}
	}
	panic("ladder: entry outside the matrix pattern")
}

// at is where the entry of unknowns i and j is held.
func (s *sparse) at(i, j int) int32 { return s.slot(s.place[i], s.place[j]) }

// size is how many values a matrix holds.
func (s *sparse) size() int { return s.n + len(s.row) }

// factor overwrites the values of a matrix by those of its factors; false
// when a pivot vanishes. The columns keep L·D; solve divides.
func (s *sparse) factor(v []float64) bool {
	x := int32(0)
	for k := range s.n {
		d := v[k]
		if d == 0 || d != d {
			return false
		}
		inv := 1 / d
		for ; x < s.until[k]; x++ {
			t := s.steps[x]
			v[t.target] -= v[t.a] * v[t.b] * inv
		}
		v[k] = inv
	}
	return true
}

// solve overwrites b, in elimination order, by the solution.
func (s *sparse) solve(v, b []float64) {
	n := int32(s.n)
	for k := range s.n {
		t := b[k] * v[k]
		for x := s.first[k]; x < s.first[k+1]; x++ {
			b[s.row[x]] -= v[n+x] * t
		}
	}
	for k := s.n - 1; k >= 0; k-- {
		t := b[k]
		for x := s.first[k]; x < s.first[k+1]; x++ {
			t -= v[n+x] * b[s.row[x]]
		}
		b[k] = t * v[k]
	}
}

// solveMany does the same for the w columns of a row-major matrix whose rows
// stand in elimination order.
func (s *sparse) solveMany(v, b []float64, w int) {
	for k := range s.n {
		bk := b[k*w : k*w+w]
		for x := s.first[k]; x < s.first[k+1]; x++ {
			subtractRow(b[int(s.row[x])*w:], bk, v[s.n+int(x)]*v[k])
		}
	}
	for k := s.n - 1; k >= 0; k-- {
		bk := b[k*w : k*w+w]
		for x := s.first[k]; x < s.first[k+1]; x++ {
			subtractRow(bk, b[int(s.row[x])*w:int(s.row[x])*w+w], v[s.n+int(x)])
		}
		for j := range bk {
			bk[j] *= v[k]
		}
	}
}

// subtractRow is to −= f·from over the length of from.
func subtractRow(to, from []float64, f float64) {
	to = to[:len(from)]
	for j, x := range from {
		to[j] -= f * x
	}
}
