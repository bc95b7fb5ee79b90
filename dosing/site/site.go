package site

import (
	"beckline/dosing"
)

// Site is a plant file that has been read and found right.
type Site struct {
	Path     string // of the file, as it was given
	Currency string // in which prices are; "" where none is named
	Units    Units
	Products []*Product // in the order of the file, as are the following
	Pumps    []*Pump
	Tanks    []*Tank
	Sources  []*Source
	Lines    []*Line
	Start    *Line  // the line that opens
	Notes    []Note // what looks odd and was accepted
	rows     []Row
}

// Note is something in the file to look at twice.
type Note struct {
	Line int
	Key  string
	Text string
}

// Product is a chemical as this plant buys it.
type Product struct {
	Name        string // by which the file and the command line call it
	Title       string
	Catalogue   string          // name in the catalogue
	Strength    string          // as typed, "" for the catalogue's
	Temperature string          // of the product in its tank, as typed, "" for 20 C
	Density     dosing.Optional // kg/m3, as measured
	DensityOn   string          // date of that, YYYY-MM-DD
	Price       dosing.Optional // per kg as delivered, in the site's currency
	MaximumUse  dosing.Optional // kg of product per m3 of water, the certified maximum use level
	line        int
	product     dosing.Product
}

// Dosing is the product as the solver takes it: the catalogue's, at this plant's
// strength and under its own name.
func (p *Product) Dosing() dosing.Product { return p.product }

// Pump is a feed pump.
type Pump struct {
	Name     string
	Capacity string          // as typed
	Output   dosing.Optional // m3/s at 100 %
	Product  string          // the product it feeds, "" where not said
}

// Tank is a tank of product.
type Tank struct {
	Name    string
	Kind    string  // day or bulk
	Volume  float64 // m3 that can be used
	Product string  // "" where not said
}

// Source is a raw water.
type Source struct {
	Name     string
	Title    string
	Readings map[string]string // by reading field name, as typed
}

// Share is a source of a line and its part of the flow, in any one unit.
type Share struct {
	Source *Source
	Parts  float64 // above 0
}

// Line is one treatment line.
type Line struct {
	Name     string
	Plant    string
	Title    string
	Shares   []Share           // one source, or several to be blended; none where the readings are typed
	Readings map[string]string // of this line: flow, and what differs from its source, as typed
	Product  string            // own or catalogue name, "" where not said
	Pump     *Pump             // nil where not said
	Tanks    []*Tank
	Add      []string          // PRODUCT=DOSE ahead of the solved dose, own names allowed
	Targets  map[string]string // by target field name (target-ph), as typed
	Approved string            // by whom and when the targets were approved, as typed

	Capacity dosing.Optional // m3/s, the most that the works can pass
	Contact  dosing.Optional // m3 from the feed point to the first consumer or the end of contact
	Sensor   dosing.Optional // m3 from the feed point to the sensor

	Limits     map[string]Band // hard stops of readings, by field name, narrower than the built-in ones
	Usual      map[string]Band // outside these a reading is called unusual
	Finished   map[string]Band // of the finished water, by the names of FinishedNames
	Change     Change
	Tolerances map[string]Tolerance // of readings, by field name

	site *Site
}

// Band is a range in SI. An end that is not given does not bind.
type Band struct {
	Low, High dosing.Optional
	Line      int // of the file
}

// Holds reports whether a value lies in the band; the ends do, also where
// rounding alone has moved them.
func (b Band) Holds(v float64) bool {
	return !(b.Low.Given && v < b.Low.Value-rounding(b.Low.Value)) && !(b.High.Given && v > b.High.Value+rounding(b.High.Value))
}

func rounding(v float64) float64 { return 1e-9 * max(v, -v) }

// Change is the most that is altered in one step before the water is measured
// again.
type Change struct {
	PH   float64 // pH
	Dose float64 // fraction of the dose
}

// usualChange is 0.3 pH or 10 % of the dose (common practice, no source).
var usualChange = Change{PH: 0.3, Dose: 0.10}

// Tolerance is how far off a reading may be: the larger of the two.
type Tolerance struct {
	Absolute float64 // SI
	Relative float64 // fraction of the reading
}

// Of is the tolerance of a reading, SI.
func (t Tolerance) Of(reading float64) float64 {
	return max(t.Absolute, t.Relative*max(reading, -reading))
}

// LineNamed finds a line, nil where there is none of the name.
func (s *Site) LineNamed(name string) *Line {
	for _, l := range s.Lines {
		if l.Name == name {
			return l
		}
	}
	return nil
}

// ProductNamed finds one of the plant's own products, nil where there is none of
// the name.
func (s *Site) ProductNamed(name string) *Product {
	for _, p := range s.Products {
		if p.Name == name {
			return p
		}
	}
	return nil
}

// Site is the plant file that the line is in.
func (l *Line) Site() *Site { return l.site }
