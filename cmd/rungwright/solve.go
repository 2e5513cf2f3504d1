package main

import (
	"context"
	"os"

	"github.com/spf13/cobra"

	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/ladder"
)

// solveOptions is what the solve command was asked.
type solveOptions struct {
	circuit   string
	format    string
	waves     string
	replace   bool
	cautions  bool
	regulate  bool
	load      quantity.Value[quantity.Amps]
	peak      quantity.Value[quantity.Volts]
	frequency quantity.Value[quantity.Hertz]
}

func (a *app) solveCommand() *cobra.Command {
	var o solveOptions
	cmd := &cobra.Command{
		Use:   "solve CIRCUIT",
		Short: "Simulate a circuit given by values, without a catalog",
		Long: `Finds the periodic steady state of a multiplier whose parts are given by their
values: mean output and ripple, and the stress of every capacitor, diode and
winding end. CIRCUIT is a YAML file, or - for standard input:

  circuit:
    topology: half-wave   # half-wave, full-wave, bridge-doubler, parallel-fed,
                          # odd-multiple or bipolar
    stages: 3
    source: {peak: 240 V, frequency: 25 kHz, resistance: 12 ohm, waveform: sine}
    capacitors: [22 nF, 22 nF, 10 nF, 10 nF, 4.7 nF, 4.7 nF]  # or one for all
    diode: {saturation_current: 10 nA, ideality: 1.9,
            series_resistance: 0.12 ohm, junction_capacitance: 12 pF}
    load: {current: 1.2 mA}  # or {resistance: 1 Mohm}

C1, C3 … couple and C2, C4 … smooth in a half-wave ladder, counted from the
source.`,
		Example: `  rungwright solve testdata/circuits/three-stage.yaml
  rungwright solve testdata/circuits/three-stage.yaml --load "2 mA"
  rungwright solve testdata/circuits/mains-doubler.yaml --regulation
  rungwright solve testdata/circuits/electrode.yaml --format json
  rungwright solve testdata/circuits/three-stage.yaml --waves waves.csv`,
		Args: exactly(1, "a circuit file, or - for standard input"),
		RunE: a.runs(func(ctx context.Context, args []string) error {
			o.circuit = args[0]
			return solve(ctx, a.streams, &o)
		}),
	}
	addCautions(cmd, &o.cautions)
	addFormat(cmd, &o.format)
	f := cmd.Flags()
	f.Var(&o.load, "load", `constant load current instead of the file's load, such as "1.2 mA"`)
	f.Var(&o.peak, "peak", `source peak instead of the file's, such as "240 V"`)
	f.Var(&o.frequency, "frequency", `source frequency instead of the file's, such as "25 kHz"`)
	f.BoolVar(&o.regulate, "regulation", false, "solve from no load to 125 % of the load as well")
	f.StringVar(&o.waves, "waves", "", "write one period of the waveforms to this CSV `FILE`")
	f.BoolVar(&o.replace, flagReplace, false, "replace an existing file")
	return cmd
}

// override puts what the command line gave into the circuit.
func (o *solveOptions) override(c *ladder.Circuit) {
	if o.load.Given {
		c.Load = ladder.Load{Current: float64(o.load.Q)}
	}
	if o.peak.Given {
		c.Source.Peak = float64(o.peak.Q)
	}
	if o.frequency.Given {
		c.Source.Frequency = float64(o.frequency.Q)
	}
}

func solve(ctx context.Context, s *streams, o *solveOptions) error {
	name, data, err := readInput(s, o.circuit)
	if err != nil {
		return err
	}
	c, err := optimize.ReadCircuit(name, data)
	if err != nil {
		return asInput(err)
	}
	o.override(&c)
	if bad := c.Check(); len(bad) > 0 { // of the overrides: the file passed
		return badInput("", "the circuit cannot be solved with these flags: %v", bad[0])
	}
	if o.waves != "" {
		if err := mayWrite(o.waves, o.replace, o.circuit); err != nil {
			return err
		}
	}
	return o.answer(ctx, s, c)
}

// answer solves the circuit, saves what was asked and prints the result.
func (o *solveOptions) answer(ctx context.Context, s *streams, c ladder.Circuit) error {
	a, err := ladder.Solve(ctx, c, &ladder.Settings{Waves: o.waves != ""})
	if err != nil {
		return err
	}
	var curve ladder.Regulation
	if o.regulate {
		if curve, err = regulation(ctx, c, a); err != nil {
			return err
		}
	}
	if o.waves != "" {
		if err := saveAll(s, o.replace, output{o.waves, wavesCSV(a)}); err != nil {
			return err
		}
	}
	if o.format == formatJSON {
		return printJSON(s, solvedJSON(c, a, curve))
	}
	printCautions(s, circuitCautions(c, a), o.cautions)
	printSolved(s, c, a, curve)
	return nil
}

// exists tells whether something stands under the path.
func exists(path string) bool {
	_, err := os.Lstat(path)
	return err == nil
}
