package optimize

import "container/heap"

// class is an argument by which combinations leave the search.
type class int

const (
	cutRepeated  class = iota // one part in two slots: counted where the frame has it in one
	cutBalance                // the charge balance leaves too little, whatever the rest
	cutEstimate               // the corrected estimate misses by more than its guard
	cutSimulated              // simulated and found to break something
	classes
)

// node stands for every combination of a frame that starts with the choices
// before its depth and has at its depth the choice at[depth] or a later one.
type node struct {
	f       *frame
	least   int64 // no combination of the node weighs less
	depth   int
	at      [maxSlots]int32
	pair    *match // of the capacitors and the diode, once both are chosen
	settled bool   // a leaf that passed and is not the answer
}

// maxSlots is the most slots of a frame.
const maxSlots = 6

// before is the order of the search: by weight, then by frame and choices.
func (n *node) before(m *node) bool {
	if n.least != m.least {
		return n.least < m.least
	}
	if n.f.id != m.f.id {
		return n.f.id < m.f.id
	}
	for d := range n.at {
		if n.at[d] != m.at[d] {
			return n.at[d] < m.at[d]
		}
	}
	return n.depth < m.depth
}

// frontier is a heap of nodes that together hold every combination not yet
// settled.
type frontier []*node

func (q frontier) Len() int           { return len(q) }
func (q frontier) Less(i, j int) bool { return q[i].before(q[j]) }
func (q frontier) Swap(i, j int)      { q[i], q[j] = q[j], q[i] }
func (q *frontier) Push(x any)        { *q = append(*q, x.(*node)) }
func (q *frontier) Pop() any {
	old := *q
	x := old[len(old)-1]
	old[len(old)-1] = nil
	*q = old[:len(old)-1]
	return x
}

// root is the node of a whole frame; nil when it has no combination.
func (f *frame) root() *node {
	if f.empty() {
		return nil
	}
	n := &node{f: f}
	n.weigh()
	return n
}

// weigh sets the least weight of the node's combinations.
func (n *node) weigh() {
	n.least = n.f.beyond[n.depth]
	for d := 0; d <= n.depth; d++ {
		n.least += n.f.slots[d].candidates[n.at[d]].weight
	}
}

// here is the candidate at the node's depth.
func (n *node) here() *candidate { return &n.f.slots[n.depth].candidates[n.at[n.depth]] }

// chosen is the candidate of an earlier depth.
func (n *node) chosen(d int) *candidate { return &n.f.slots[d].candidates[n.at[d]] }

// skip moves the node past candidates that a cheap test cuts, counting them,
// and tells whether any is left.
func (n *node) skip(test func(*node) (class, bool)) bool {
	for int(n.at[n.depth]) < len(n.f.slots[n.depth].candidates) {
		c, cut := test(n)
		if !cut {
			return true
		}
		n.f.cut[c][n.depth]++
		n.at[n.depth]++
	}
	return false
}

// sibling holds the later candidates of the node's depth; nil when there is
// none.
func (n *node) sibling() *node {
	if int(n.at[n.depth])+1 >= len(n.f.slots[n.depth].candidates) {
		return nil
	}
	s := *n
	s.at[n.depth]++
	s.weigh()
	return &s
}

// child is the first combination below the node's candidate.
func (n *node) child() *node {
	c := *n
	c.depth++
	c.at[c.depth] = 0
	return &c
}

// leaf tells whether the node's depth is the last.
func (n *node) leaf() bool { return n.depth == len(n.f.slots)-1 }

func (q *frontier) add(n *node) {
	if n != nil {
		heap.Push(q, n)
	}
}

func (q *frontier) take() *node { return heap.Pop(q).(*node) }
