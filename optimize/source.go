package optimize

import (
	"fmt"
	"math"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// resolveSource fills the source from the catalog winding that it names, and
// turns what is known of its no-load rise into an open-circuit peak and a
// resistance.
func resolveSource(s Source, c *catalog.Catalog) (Source, *catalog.Part, error) {
	var part *catalog.Part
	if s.Part != "" {
		part = c.Find(s.Part)
		if part == nil {
			return s, nil, fmt.Errorf("source.part: %q is not in the catalog%s", s.Part, nearText(c, s.Part))
		}
		if part.Winding == nil {
			return s, nil, fmt.Errorf("source.part: %q is a %s, not a winding", s.Part, part.Kind)
		}
		s = fillSource(s, part.Winding)
		if err := frequencyFits(s, part); err != nil {
			return s, nil, err
		}
	}
	if s.NoLoadRise > 0 && s.Resistance == 0 && s.Power > 0 {
		// The rise is the drop of the rated current: R = rise·U²/S per end.
		u := float64(s.Peak) / math.Sqrt2
		s.Resistance = quantity.Ohms(float64(s.NoLoadRise) * u * u / float64(s.Power) * float64(ends(s)))
	}
	s.Peak *= quantity.Volts(1 + s.NoLoadRise)
	s.NoLoadRise = 0
	return s, part, nil
}

func ends(s Source) int {
	if s.CentreTap {
		return 2
	}
	return 1
}

func nearText(c *catalog.Catalog, number string) string {
	if near := c.Near(number, 1); len(near) > 0 {
		return fmt.Sprintf("; did you mean %q?", near[0].Number)
	}
	return ""
}

// fillSource takes what the supply leaves open from the winding.
func fillSource(s Source, w *catalog.Winding) Source {
	set := func(to *float64, from float64) {
		if *to == 0 {
			*to = from
		}
	}
	set((*float64)(&s.Peak), float64(w.Peak))
	set((*float64)(&s.NoLoadRise), float64(w.NoLoadRise))
	set((*float64)(&s.Power), float64(w.Power))
	set((*float64)(&s.Resistance), float64(w.Resistance))
	set((*float64)(&s.Leakage), float64(w.Leakage))
	set((*float64)(&s.Frequency), float64(w.FrequencyMin))
	s.CentreTap = w.CentreTap
	s.Isolated = s.Isolated || w.Isolated
	if s.Waveform == "" {
		s.Waveform = ladder.Sine
		if w.Waveform != "" {
			s.Waveform = ladder.Waveform(w.Waveform)
		}
	}
	return s
}

func frequencyFits(s Source, part *catalog.Part) error {
	w := part.Winding
	if s.Frequency < w.FrequencyMin || w.FrequencyMax > 0 && s.Frequency > w.FrequencyMax {
		return fmt.Errorf("source.frequency: %s is outside what %s is made for, %s to %s", s.Frequency, part.Number, w.FrequencyMin, w.FrequencyMax)
	}
	return nil
}
