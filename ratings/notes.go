package ratings

// notes are the assumptions behind a reading, a bit each: a search makes no
// text.
type notes uint32

const (
	coreRiseAssumed notes = 1 << iota
	noHeatFigure
	noOutline
	lossHeating
	hotFilm
	belowRippleRange
	aboveRippleTemperature
	noMultipliers
	noRippleForLife
	coolLife
	noHighest
	aboveKnee
	noKnee
	capacitiveLoad
	peakFromAverage
	surgeTimeAssumed
	pulseTimeAssumed
	shortSurge
	noLeakage
	leakageDoubles
	runaway
	noStoredCharge
	resistorMaxAssumed
	workingVoltageAssumed
	hotSpotIsAmbient
)

var noteTexts = []string{
	"the sheet gives no inner rise at the rated ripple; 5 K assumed",
	"the sheet gives no loss figure, so that self-heating is not counted",
	"the sheet gives no outline, so that self-heating is not counted",
	"self-heating from the loss figure and the outline, 10 W/(m²K) in still air (common practice, no source)",
	"above 85 °C film loses rated voltage, typically 1.25 % per kelvin (from memory); the sheet gives no figure and none is counted",
	"below the lowest frequency on the sheet, the rating is taken to fall with the square root of the frequency",
	"above the temperature of the ripple rating, the rating is taken to fall to nothing at the highest temperature, as the room for heat does",
	"the sheet gives no frequency multipliers; none is counted above its frequency",
	"the sheet gives no ripple rating, so that the wear by ripple is not counted",
	"below 60 °C the ten-degree rule goes beyond where makers say it holds",
	"the sheet gives no highest temperature; the policy's own figure counts alone",
	"above the ambient of the rating, the current falls in a line to nothing at the highest junction temperature",
	"the sheet does not say up to which ambient the current holds; none is assumed",
	"makers ask for 20 % less average current into capacitors (from memory)",
	"the sheet gives no repetitive peak; a multiple of the average current is allowed",
	"the sheet gives no time for its surge current; 8.3 ms assumed",
	"the length of the start-up pulse is not known; it is taken as long as the rated surge",
	"equal I²t is a rule of thumb that makers give down to about 1 ms; this pulse is shorter",
	"the sheet gives no leakage, so that its heat is not counted",
	"the sheet gives one leakage; it is taken to double every 10 K (common practice, no source)",
	"thermal runaway: the leakage heats the junction faster than it cools",
	"a Schottky diode stores no charge",
	"the sheet gives no highest temperature; 125 °C assumed",
	"the sheet gives no working voltage; 25 V assumed, that of the smallest chips (from memory)",
	"the sheet gives no temperature rise; the hot spot is at least at the ambient",
}

// texts are the notes in words, in the order above.
func (n notes) texts() []string {
	var out []string
	for i, text := range noteTexts {
		if n&(1<<i) != 0 {
			out = append(out, text)
		}
	}
	return out
}
