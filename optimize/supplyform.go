package optimize

import (
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// written is a text that goes into a file as it is.
type written string

func (w written) String() string { return string(w) }

// exactly prints a quantity with as many digits as it takes to read the same
// number back, four at least.
func exactly[Q quantity.Quantity](v Q) written {
	text := ""
	for digits := 4; digits <= 17; digits++ {
		text = quantity.Format(float64(v), v.Dimension(), digits)
		if back, err := quantity.Read[Q](text); err == nil && back == v {
			break
		}
	}
	return written(text)
}

// put sets a key to a quantity; zero, which means not given, is left out.
func put[Q quantity.Quantity](d *form.Doc, key string, v Q) {
	if v != 0 {
		d.Set(key, exactly(v))
	}
}

// putText sets a key to a text; an empty one is left out.
func putText[S ~string](d *form.Doc, key string, text S) {
	if text != "" {
		d.Set(key, string(text))
	}
}

// form is the supply as ReadSupply reads it.
func (s Supply) form() *form.Doc {
	d := form.NewMap().Set("supply", s.Name)
	d.Set("output", s.Output.form()).Set("source", s.Source.form())
	d.Set("surroundings", s.Surroundings.form())
	d.Set("derating", s.Derating)
	d.Set("build", s.Build.form())
	d.Set("choose", s.Choose.form())
	if l := s.Limits.form(); s.Limits != (Limits{}) {
		d.Set("limits", l)
	}
	var extras form.List
	for _, x := range s.Extras {
		e := form.NewMap().Flow().Set("part", x.Part).Set("quantity", x.Quantity)
		putText(e, "ref", x.Ref)
		extras = append(extras, e)
	}
	return d.Set("extras", extras)
}

func (o Output) form() *form.Doc {
	d := form.NewMap().Set("voltage", exactly(o.Voltage)).Set("window", exactly(o.Window)).Set("polarity", polarityWord(o.Negative))
	load := form.NewMap().Flow()
	if o.Load.Resistance > 0 {
		load.Set("resistance", exactly(o.Load.Resistance))
	} else {
		load.Set("least", exactly(o.Load.Least)).Set("most", exactly(o.Load.Most))
	}
	d.Set("load", load)
	put(d, "ripple", o.Ripple)
	if o.Discharge != (Discharge{}) {
		d.Set("discharge", form.NewMap().Flow().Set("below", exactly(o.Discharge.Below)).Set("within", exactly(o.Discharge.Within)))
	}
	put(d, "rise", o.Rise)
	return d
}

func polarityWord(negative bool) string {
	if negative {
		return "negative"
	}
	return "positive"
}

func (s Source) form() *form.Doc {
	d := form.NewMap()
	putText(d, "part", s.Part)
	put(d, "peak", s.Peak)
	put(d, "no_load_rise", s.NoLoadRise)
	put(d, "line", s.Line)
	put(d, "frequency", s.Frequency)
	putText(d, "waveform", s.Waveform)
	put(d, "resistance", s.Resistance)
	put(d, "leakage", s.Leakage)
	put(d, "power", s.Power)
	if s.CentreTap {
		d.Set("centre_tap", true)
	}
	if s.Isolated {
		d.Set("isolated", true)
	}
	return d
}

func (s Surroundings) form() *form.Doc {
	d := form.NewMap().Flow().Set("ambient", exactly(s.Ambient))
	put(d, "altitude", s.Altitude)
	return d.Set("pollution_degree", s.PollutionDegree)
}

func (b Build) form() *form.Doc {
	d := form.NewMap().Flow().Set("units", b.Units)
	put(d, "spares", b.Spares)
	return d.Set("currency", b.Currency)
}

func (c Choose) form() *form.Doc {
	d := form.NewMap()
	putText(d, "least", c.Least)
	putText(d, "then", c.Then)
	var topologies form.List
	for _, t := range c.Topologies {
		topologies = append(topologies, string(t))
	}
	d.Set("topologies", topologies)
	if c.StagesMax > 0 {
		d.Set("stages", form.NewMap().Flow().Set("least", max(1, c.StagesMin)).Set("most", c.StagesMax))
	}
	putText(d, "mounting", c.Mounting)
	return d.Set("suppliers", words(c.Suppliers)).Set("avoid", words(c.Avoid))
}

func words(texts []string) form.List {
	var l form.List
	for _, t := range texts {
		l = append(l, t)
	}
	return l
}

func (l Limits) form() *form.Doc {
	d := form.NewMap()
	if l.Cost.Currency != "" {
		d.Set("cost", l.Cost)
	}
	put(d, "height", l.Height)
	put(d, "volume", l.Volume)
	put(d, "area", l.Area)
	put(d, "stored_energy", l.StoredEnergy)
	put(d, "efficiency", l.Efficiency)
	return d
}
