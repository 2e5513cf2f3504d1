// Package catalog holds the parts that a supply can be built from: their
// ratings, sizes and offers, read from YAML and checked. Values are SI in
// quantity types, money is exact decimal.
package catalog

import (
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// Catalog is everything that was read: parts in the order of part number,
// suppliers in that of name, files in the order read.
type Catalog struct {
	Title     string // the first that a file gives
	Parts     []*Part
	Suppliers []Supplier
	Inputs    []Input

	index map[string]*Part // by numberKey; nil in a catalog made by hand
}

// Input is a file that was read, with the SHA-256 of its bytes in hex.
type Input struct {
	Name   string // as the user named it, forward slashes
	SHA256 string
}

// Part is one orderable part. Exactly one of the pointers at the end is set,
// the one that Kind names.
type Part struct {
	Number      string
	Maker       string
	Kind        Kind
	Description string // the user's words, may be empty; Title always says something
	Mounting    Mounting
	Status      Status
	Size        Size
	Temperature Range // of the part's body or ambient, as its sheet says
	Offers      []Offer
	Place       form.Place

	Capacitor *Capacitor
	Diode     *Diode
	Resistor  *Resistor
	Winding   *Winding
	Other     *Other
}

// Kind names what a part is.
type Kind string

// The part kinds.
const (
	KindCapacitor Kind = "capacitor"
	KindDiode     Kind = "diode"
	KindResistor  Kind = "resistor"
	KindWinding   Kind = "winding" // transformer winding or inverter module
	KindOther     Kind = "other"
)

// Mounting is how a part is fitted.
type Mounting string

// The mountings.
const (
	ThroughHole  Mounting = "through-hole"
	SurfaceMount Mounting = "surface-mount"
	Chassis      Mounting = "chassis"
)

// Status is the maker's word on the part's life.
type Status string

// The life-cycle states; only Active and NotForNew may be chosen, and the
// latter only when nothing forbids it.
const (
	Active    Status = "active"
	NotForNew Status = "not for new designs"
	LastBuy   Status = "last buy"
	Obsolete  Status = "obsolete"
)

// Size is the part's outline; zero where unknown.
type Size struct{ Length, Width, Height quantity.Meters }

// Volume is length × width × height.
func (s Size) Volume() quantity.CubicMeters {
	return quantity.CubicMeters(s.Length * s.Width * s.Height)
}

// Area is length × width, the board area under the part.
func (s Size) Area() quantity.SquareMeters { return quantity.SquareMeters(s.Length * s.Width) }

// Range is an operating temperature range.
type Range struct{ Least, Most quantity.Celsius }

// Supplier is who sells; the charges apply to each order placed with it.
type Supplier struct {
	Name          string
	Currency      string
	Delivery      quantity.Money // charge per order, zero when free
	FreeAbove     quantity.Money // order value above which delivery is free; zero: never
	SmallOrderFee quantity.Money // charged when the goods are below SmallOrder
	SmallOrder    quantity.Money
	Place         form.Place
}

// Offer is one supplier's way to sell a part.
type Offer struct {
	Supplier  string
	OrderCode string
	Stock     int // pieces on the shelf; -1 when not stated
	LeadDays  int // for what is not on the shelf; -1 when not stated
	Least     int // minimum order quantity, at least 1
	Multiple  int // order multiple, at least 1
	Prices    []Break
	Place     form.Place
}

// Break is a unit price from a quantity upward; breaks rise in quantity.
type Break struct {
	Quantity int
	Price    quantity.Money
}
