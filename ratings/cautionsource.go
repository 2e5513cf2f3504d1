package ratings

import "fmt"

const fromTransformer = "IEC 61558 series; from memory"

// directFed counts a mains source as direct until its sheet says otherwise.
func directFed(h Hazard) (Caution, bool) {
	return Caution{
		Title:  "nothing isolates this circuit from the mains",
		Text:   "The source is at mains frequency and no word says that it is isolated. Then every part, the output and its ground included, is live, whatever the output voltage. Feed it by a safety isolating transformer, or treat all of it as mains.",
		Source: fromTransformer,
	}, h.MainsFed && !h.Isolated
}

func mainsIsolation(h Hazard) (Caution, bool) {
	return Caution{
		Title:  "the mains side",
		Text:   "The winding is isolated by its maker's word; check that the transformer is a safety isolating one. Connect the core and the enclosure to the protective earth, and put a fuse in the primary.",
		Source: fromTransformer,
	}, h.MainsFed && h.Isolated
}

func sourceIsolation(h Hazard) (Caution, bool) {
	return Caution{
		Title:  "the source's isolation is not known",
		Text:   fmt.Sprintf("No word says that the source of %s peak is isolated from what feeds it. Until its sheet does, what feeds it counts as hazardous live.", volts(h.SourcePeakV)),
		Source: fromTouch,
	}, !h.MainsFed && !h.Isolated && h.live()
}
