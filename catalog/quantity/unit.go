package quantity

import "strings"

// scale turns a written number into the base unit: × 10^ten × times.
type scale struct {
	ten   int
	times float64 // zero: 1
}

// unit is one unit of a dimension and what may stand before it.
type unit struct {
	dimension Dimension
	symbols   []string // in normal spelling, see plainUnit
	scale     scale
	prefixes  string
}

// tens are the SI prefixes; centi is for metres alone.
var tens = map[rune]int{'f': -15, 'p': -12, 'n': -9, 'u': -6, 'm': -3, 'c': -2, 'k': 3, 'M': 6, 'G': 9, 'T': 12}

const (
	minute = 60
	hour   = 60 * minute
	day    = 24 * hour
	week   = 7 * day
)

var units = []unit{
	{Voltage, []string{"V"}, scale{}, "pnumkMG"},
	{Current, []string{"A"}, scale{}, "fpnumkMG"},
	{Resistance, []string{"Ω", "ohm", "ohms", "Ohm", "Ohms"}, scale{}, "numkKMGT"},
	{Capacitance, []string{"F"}, scale{}, "fpnum"},
	{Inductance, []string{"H"}, scale{}, "fpnumk"},
	{Frequency, []string{"Hz"}, scale{}, "numkMGT"},
	{Time, []string{"s"}, scale{}, "fpnumkM"},
	{Time, []string{"min", "minute", "minutes"}, scale{times: minute}, ""},
	{Time, []string{"h", "hour", "hours"}, scale{times: hour}, ""},
	{Time, []string{"d", "day", "days"}, scale{times: day}, ""},
	{Time, []string{"wk", "week", "weeks"}, scale{times: week}, ""},
	{Power, []string{"W"}, scale{}, "fpnumkMG"},
	{ApparentPower, []string{"VA"}, scale{}, "pnumkMG"},
	{Energy, []string{"J"}, scale{}, "fpnumkMG"},
	{Charge, []string{"C"}, scale{}, "fpnumk"},
	{Temperature, []string{"°C", "degC", "C"}, scale{}, ""},
	{TemperatureRise, []string{"K"}, scale{}, "um"},
	{ThermalResistance, []string{"K/W", "°C/W", "degC/W", "C/W"}, scale{}, "m"},
	{Length, []string{"m"}, scale{}, "fpnumck"},
	{Volume, []string{"m3"}, scale{}, ""},
	{Volume, []string{"l", "L"}, scale{ten: -3}, "m"},
	{Volume, []string{"cm3"}, scale{ten: -6}, ""},
	{Volume, []string{"mm3"}, scale{ten: -9}, ""},
	{Area, []string{"m2"}, scale{}, ""},
	{Area, []string{"cm2"}, scale{ten: -4}, ""},
	{Area, []string{"mm2"}, scale{ten: -6}, ""},
	{Proportion, []string{"%"}, scale{ten: -2}, ""},
	{Proportion, []string{"ppm"}, scale{ten: -6}, ""},
	{SlewRate, []string{"V/s"}, scale{}, "numkMG"},
	{SlewRate, []string{"V/ms"}, scale{ten: 3}, "numkMG"},
	{SlewRate, []string{"V/us"}, scale{ten: 6}, "numkMG"},
	{SlewRate, []string{"V/ns"}, scale{ten: 9}, "numkMG"},
}

// spellings holds every way to write a unit of each dimension.
var spellings = spell()

func spell() map[Dimension]map[string]scale {
	all := map[Dimension]map[string]scale{}
	for _, u := range units {
		if all[u.dimension] == nil {
			all[u.dimension] = map[string]scale{}
		}
		for _, symbol := range u.symbols {
			all[u.dimension][symbol] = u.scale
			for _, prefix := range u.prefixes {
				s := u.scale
				s.ten += prefixTen(prefix)
				all[u.dimension][string(prefix)+symbol] = s
			}
		}
	}
	return all
}

// prefixTen is the power of ten of a prefix. Kilo written K is the code
// letter of IEC 60062, so that ohms alone have it.
func prefixTen(prefix rune) int {
	if prefix == 'K' {
		prefix = 'k'
	}
	return tens[prefix]
}

// lookalike maps the characters that stand for the same sign: the micro sign
// and Greek mu, the ohm sign and Greek omega, the ordinal taken for a degree.
var lookalike = strings.NewReplacer("µ", "u", "μ", "u", "\u2126", "Ω", "º", "°", "℃", "°C",
	"^2", "2", "^3", "3", "²", "2", "³", "3", "° ", "°")

// plainUnit is a unit in the spelling of the table: one sign for each thing,
// no spaces about a stroke.
func plainUnit(text string) string {
	if before, after, ok := strings.Cut(text, "/"); ok {
		text = strings.TrimSpace(before) + "/" + strings.TrimSpace(after)
	}
	return lookalike.Replace(text)
}
