package optimize

import (
	"context"
	"fmt"
	"math/rand/v2"
	"os"
	"strconv"
	"testing"

	"rungwright/catalog"
)

// smallCatalog draws a few capacitors, diodes and resistors for a supply of a
// few hundred volts.
func smallCatalog(t *testing.T, r *rand.Rand) *catalog.Catalog {
	text := "parts:\n"
	offer := func(price float64) string {
		return fmt.Sprintf("    offers:\n      - {supplier: Oddmere, order_code: x, prices: [[1, %.3f EUR]]}\n", price)
	}
	for k := range 3 {
		nano := []float64{22, 47, 100, 220, 470, 1000}[r.IntN(6)]
		volts := []int{250, 400, 630}[r.IntN(3)]
		text += fmt.Sprintf("  - part: CAP-%d\n    maker: Hollin\n    kind: capacitor\n    technology: film\n    capacitance: %g nF\n    tolerance: 10 %%\n    voltage: %d V\n    temperature: {least: -40 °C, most: 105 °C}\n    size: {length: 10 mm, width: 5 mm, height: 10 mm}\n    mounting: through-hole\n    status: active\n", k, nano, volts)
		text += offer(0.05 + 0.5*r.Float64())
	}
	for k := range 2 {
		volts := []int{200, 400, 600}[r.IntN(3)]
		text += fmt.Sprintf("  - part: DIO-%d\n    maker: Hollin\n    kind: diode\n    type: ultrafast\n    reverse_voltage: %d V\n    average_current: 1 A\n    surge_current: 30 A\n    forward: [[1 mA, 0.55 V], [100 mA, 0.75 V], [1 A, 0.95 V]]\n    capacitance: {at: 4 V, value: %d pF}\n    recovery: {time: 50 ns, forward: 500 mA, reverse: 1 A}\n    thermal_resistance: 60 K/W\n    junction: 150 °C\n    temperature: {least: -40 °C, most: 125 °C}\n    size: {length: 5 mm, width: 3 mm, height: 3 mm}\n    mounting: through-hole\n    status: active\n", k, volts, 5+r.IntN(20))
		text += offer(0.02 + 0.2*r.Float64())
	}
	c, err := catalog.ReadBytes("small.yaml", []byte(text))
	if err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	return c
}

func smallSupply(t *testing.T, r *rand.Rand) Supply {
	text := fmt.Sprintf("supply: trial\noutput:\n  voltage: %d V\n  window: %d %%\n  load: {most: %.3g mA}\n  ripple: %.3g V\nsource: {peak: 100 V, line: 3 %%, frequency: 30 kHz, resistance: 10 ohm}\nchoose: {topologies: [half-wave], stages: {most: 3}}\nbuild: {units: 10}\n",
		[]int{190, 380, 560}[r.IntN(3)], 8+r.IntN(8), 0.5+4*r.Float64(), 1+10*r.Float64())
	s, err := ReadSupply("small.yaml", []byte(text))
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// TestBruteForce judges every combination of small random catalogs and demands
// that the search finds the same least cost, or nothing where nothing passes.
func TestBruteForce(t *testing.T) {
	trials := 3
	if testing.Short() {
		trials = 1
	}
	if n, err := strconv.Atoi(os.Getenv("RUNGWRIGHT_BRUTE")); err == nil { // minutes for dozens
		trials = n
	}
	found := 0
	for i := range trials {
		r := rand.New(rand.NewPCG(11, uint64(i)))
		c, s := smallCatalog(t, r), smallSupply(t, r)
		a, err := Pick(context.Background(), s, c, &Options{RunnersUp: -1})
		if err != nil {
			t.Fatal(err)
		}
		addsUp(t, &a.Certificate)
		least, which := bruteForce(t, s, c)
		switch {
		case a.Design == nil && least >= 0:
			t.Errorf("trial %d: the search finds nothing where %s costs %d", i, which, least)
		case a.Design != nil:
			found++
			if got := a.Design.BuildCost.Shift(2).IntPart(); got != least {
				t.Errorf("trial %d: the search says %d (%s), all combinations say %d (%s)", i, got, a.Design.Plan.Summary(), least, which)
			}
		}
	}
	t.Logf("%d trials, %d with an answer", trials, found)
	if found == 0 && trials > 2 {
		t.Error("no trial had an answer: they prove nothing")
	}
}

// bruteForce is the least build cost in cents over all combinations that pass,
// −1 when none does. It uses none of the search's arguments.
func bruteForce(t *testing.T, s Supply, c *catalog.Catalog) (least int64, which string) {
	e, err := newEvaluator(s, c, nil)
	if err != nil {
		t.Fatal(err)
	}
	p := e.pools()
	least = -1
	try := func(plan *Plan) {
		total, _, ok := e.purchases(plan)
		cents := total.Shift(2).IntPart()
		if !ok || least >= 0 && cents >= least {
			return
		}
		trial := &trial{plan: plan}
		if err := e.whole(context.Background(), trial); err != nil {
			t.Fatal(err)
		}
		if len(trial.failed) == 0 {
			least, which = cents, plan.Summary()
		}
	}
	for stages := 1; stages <= 3; stages++ {
		for _, d := range p.diodeGroups() {
			for _, spread := range patterns {
				for _, a := range p.capacitorGroups() {
					for _, b := range p.capacitorGroups() {
						if a.Part != b.Part && a.Pieces()+b.Pieces() > 2 || spread.second == nil && a != b {
							continue
						}
						plan := &Plan{Topology: "half-wave", Stages: stages, Capacitors: spread.spread("half-wave", stages, a, b)}
						for range plan.Topology.DiodeCount(stages) {
							plan.Diodes = append(plan.Diodes, d)
						}
						try(plan)
					}
				}
			}
		}
	}
	return least, which
}
