package optimize

import (
	"math"

	"rungwright/catalog"
	"rungwright/optimize/order"
)

// weigh is what so many pieces of a part in each unit weigh in the objective,
// in whole units so that sums are exact: the build's cost in minor units of
// the currency, mm³, mm², or pieces. ok is false when the part cannot be had
// or its size is not known.
func (e *evaluator) weigh(p *catalog.Part, perUnit int) (int64, bool) {
	cost, ok := e.price(p, perUnit)
	if !ok {
		return 0, false
	}
	switch e.supply.Choose.Least {
	case LeastVolume:
		v := math.Ceil(float64(p.Size.Volume()) * 1e9)
		return int64(v) * int64(perUnit), v > 0
	case LeastArea:
		v := math.Ceil(float64(p.Size.Area()) * 1e6)
		return int64(v) * int64(perUnit), v > 0
	case LeastParts:
		return int64(perUnit), true
	}
	return cost, true
}

// price is the build's cost of so many pieces per unit in minor units.
func (e *evaluator) price(p *catalog.Part, perUnit int) (int64, bool) {
	key := priceKey{p, perUnit}
	e.mu.Lock()
	found, ok := e.prices[key]
	e.mu.Unlock()
	if ok {
		return found.minor, found.ok
	}
	one, ok := order.Cheapest(p, e.pieces(perUnit), e.terms)
	minor := one.Cost.Shift(int32(order.Digits(e.terms.Currency))).Round(0).IntPart()
	e.mu.Lock()
	e.prices[key] = priced{minor, ok}
	e.mu.Unlock()
	return minor, ok
}

type priceKey struct {
	part    *catalog.Part
	perUnit int
}

type priced struct {
	minor int64
	ok    bool
}
