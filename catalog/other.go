package catalog

import "rungwright/catalog/form"

// Other is a fixed extra line: board, fuse, connector, enclosure, potting.
type Other struct {
	Category string // board | fuse | connector | enclosure | potting | hardware
}

func readOther(p *Part, m *form.Map) {
	m.Require("category")
	p.Other = &Other{Category: m.Choice("category", "board", "fuse", "connector", "enclosure", "potting", "hardware")}
}

func otherTitle(p *Part) string {
	if p.Description != "" {
		return p.Description
	}
	return join(p.Other.Category, p.Number)
}
