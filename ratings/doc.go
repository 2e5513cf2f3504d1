// Package ratings judges parts: derating policies, stress against limit,
// hazards with their cautions, life and failure-rate figures. Values are SI
// in quantity's units, ratios are fractions, temperatures °C.
//
// # How a stress is judged
//
// Judge takes a policy, a part and every way a circuit uses it, and gives
// each stress at its worst use. The limit is the maker's rating times the
// policy's share, or the policy's own figure for temperatures and times.
// A stress is over when it passes its limit by more than a billionth, which
// is the room for rounding: a part at exactly its limit passes.
//
// # When something is missing
//
//   - The policy forbids the part, or has no rule for its first rating
//     (a capacitor's voltage, a diode's reverse voltage, a resistor's power):
//     the part is over, whatever the stress.
//   - The policy has no rule for another rating: the maker's rating counts in
//     full (a diode's average current at 80 %, as makers ask for into
//     capacitors), and the Rule says so.
//   - The sheet does not give the rating: the stress comes back Unjudged, with
//     a Note that says what is missing. It does not count as over; a caller
//     that must be sure refuses Unjudged ones too.
//
// # What the figures are worth
//
// The documents' figures were written down from memory and are marked so.
// Whoever certifies buys and reads the standards. Local codes and licensed
// practice come first.
package ratings
