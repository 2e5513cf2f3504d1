package optimize

import (
	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/optimize/ladder"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

// Design is the hinge: pick writes it and every other command reads it.
type Design struct {
	Supply      Supply
	Topology    ladder.Topology
	Stages      int
	Plan        Plan
	Lines       []Line
	Circuit     ladder.Circuit // nominal
	Corners     []Corner
	Targets     []Target
	Stresses    []ratings.Stress // worst first
	Cautions    []ratings.Caution
	Failed      []string // what it breaks, in words; empty: it passes
	StoredJ     float64
	DischargeS  float64 // to below the touch voltage; infinite without a bleeder
	StartUp     ladder.StartUp
	UnitCost    decimal.Decimal // of the whole build, per unit
	BuildCost   decimal.Decimal
	Currency    string
	Certificate Certificate
	RunnersUp   []RunnerUp
	Inputs      []catalog.Input
	Notes       []string // what a reader should know, such as inputs that have changed since
}

// Role is what a line is for.
type Role string

// The roles.
const (
	RoleCoupling  Role = "coupling"
	RoleSmoothing Role = "smoothing"
	RoleLadder    Role = "coupling and smoothing" // one part for both
	RoleRectifier Role = "rectifier"
	RoleBleeder   Role = "bleeder"
	RoleSurge     Role = "surge resistor"
	RoleBalance   Role = "balancing"
	RoleFilter    Role = "filter"
	RoleSource    Role = "source"
	RoleExtra     Role = "extra"
)

// Line is one part with the positions it fills. A position made of a group
// has Series × Parallel pieces.
type Line struct {
	Part     *catalog.Part
	Refs     []string // positions, "C1"
	Role     Role
	Series   int
	Parallel int
	Purchase order.Purchase
}

// PerUnit is how many pieces one unit needs.
func (l Line) PerUnit() int { return len(l.Refs) * max(1, l.Series) * max(1, l.Parallel) }

// Corner is a condition under which the design was simulated.
type Corner struct {
	Name    string // "full load, low line"
	LoadA   float64
	Line    float64 // source factor: 0.92 for −8 %
	Ambient float64
	Steady  ladder.Steady
}

// Target is one wish of the supply against the design's answer.
type Target struct {
	Name   string // "output voltage, least"
	Unit   string
	Wanted string // "5.38 kV or more"
	Got    float64
	Limit  float64
	Met    bool
	Corner string
}

// Certificate says what was proved and how.
type Certificate struct {
	Combinations int64 // in the whole space
	Dominated    int64
	Bounded      int64 // cut by the optimistic bound
	Estimated    int64 // cut by the estimate with its guard
	Dearer       int64 // not cheaper than the answer
	Simulated    int
	Guard        float64 // how far the estimate may err
	GuardBroken  int     // simulated designs in which it erred further
	Proved       bool
	Text         []string // readable lines
	Rejected     string   // the cheapest rejected design and what it broke
}

// RunnerUp is another design that passes.
type RunnerUp struct {
	Summary  string
	UnitCost decimal.Decimal
	Note     string
}
