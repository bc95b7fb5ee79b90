package feed

import (
	"math"
	"slices"
)

// Density names a table of density by strength and temperature; "" where the
// product has none (solids, gases).
type Density string

// Row is one published density.
type Row struct {
	Strength float64 // kg of formula per kg of solution, 0 to 1
	KgPerM3  float64
	Source   string // where the figure stands, and whether it comes from memory
}

// isotherm is a table at one temperature, rows by rising strength.
type isotherm struct {
	kelvin float64
	rows   []Row
}

// tables holds the 20 C table of every substance; others what is published at
// other temperatures. The tables stand in bases.go, acids.go, coagulants.go and
// others.go.
var tables = map[Density][]Row{
	SodiumHydroxide:       sodiumHydroxide20,
	PotassiumHydroxide:    potassiumHydroxide20,
	SodiumCarbonate:       sodiumCarbonate20,
	MagnesiumHydroxide:    magnesiumHydroxide20,
	SulfuricAcid:          sulfuricAcid20,
	HydrochloricAcid:      hydrochloricAcid20,
	NitricAcid:            nitricAcid20,
	PhosphoricAcid:        phosphoricAcid20,
	AceticAcid:            aceticAcid20,
	FormicAcid:            formicAcid20,
	CitricAcid:            citricAcid20,
	LiquidAlum:            liquidAlum20,
	FerricChloride:        ferricChloride20,
	FerricSulfate:         ferricSulfate20,
	PolyaluminiumChloride: polyaluminiumChloride20,
	SodiumHypochlorite:    sodiumHypochlorite20,
	AquaAmmonia:           aquaAmmonia20,
	AmmoniumSulfate:       ammoniumSulfate20,
	FluorosilicicAcid:     fluorosilicicAcid20,
	SodiumSilicate:        sodiumSilicate20,
}

var others = map[Density][]isotherm{
	SodiumHydroxide:  {{283.15, sodiumHydroxide10}, {298.15, sodiumHydroxide25}},
	HydrochloricAcid: {{283.15, hydrochloricAcid10}},
}

// Found is a density as looked up.
type Found struct {
	KgPerM3       float64
	AtTemperature bool   // false: the density of 20 C, since none is published at the temperature asked for
	BeyondTable   bool   // the strength lies up to 0.02 above the last row: the last straight line carried on
	Source        string // of the rows that it lies between
}

// Tables returns the names of all density tables, sorted.
func Tables() []Density {
	names := make([]Density, 0, len(tables))
	for name := range tables {
		names = append(names, name)
	}
	slices.Sort(names)
	return names
}

// Rows returns the rows of the 20 C table, by rising strength; none for a name
// that is no table. The slice is the caller's.
func (d Density) Rows() []Row { return slices.Clone(tables[d]) }

// pastEnd is how far above its last row (kg/kg) a table is carried on, marked as
// such: products are delivered a little above their name (51 % for 50 %).
const pastEnd = 0.02

// Greatest returns the greatest strength, kg/kg, for which a density is given:
// 0.02 above the last row, at most 1. It is 0 for a name that is no table.
func (d Density) Greatest() float64 {
	rows := tables[d]
	if len(rows) == 0 {
		return 0
	}
	return min(1, rows[len(rows)-1].Strength+pastEnd)
}

// at20 looks up the density at 20 C; beyond tells that the strength lies above
// the last row.
func (d Density) at20(strength float64) (value float64, source string, beyond bool, err error) {
	rows := tables[d]
	if value, source, ok := interpolate(rows, strength); ok {
		return value, source, false, nil
	}
	// NaN and strengths outside fail this, and so are refused.
	if n := len(rows); n > 1 && strength > rows[n-1].Strength && strength <= d.Greatest() {
		a, b := rows[n-2], rows[n-1]
		share := (strength - a.Strength) / (b.Strength - a.Strength)
		return a.KgPerM3 + share*(b.KgPerM3-a.KgPerM3), join(a.Source, b.Source), true, nil
	}
	return 0, "", false, &OutOfTable{Density: d, Strength: strength, High: d.Greatest()}
}

// At returns the density at a temperature in K where one is published on both
// sides of it, on straight lines between strengths and between temperatures,
// and else the density at 20 C marked as such. Strength is kg/kg, from 0 to
// Greatest. The error is *OutOfTable.
func (d Density) At(strength, kelvin float64) (Found, error) {
	base, source, beyond, err := d.at20(strength)
	if err != nil {
		return Found{}, err
	}
	found := Found{KgPerM3: base, AtTemperature: true, BeyondTable: beyond, Source: source}
	if math.Abs(kelvin-referenceKelvin) <= sameTemperature {
		return found, nil
	}
	// Nearest temperatures on either side that have this strength.
	type known struct {
		kelvin, value float64
		source        string
	}
	below, above := known{kelvin: math.Inf(-1)}, known{kelvin: math.Inf(1)}
	place := func(p known) {
		if p.kelvin <= kelvin && p.kelvin > below.kelvin {
			below = p
		}
		if p.kelvin >= kelvin && p.kelvin < above.kelvin {
			above = p
		}
	}
	place(known{referenceKelvin, base, source})
	for _, t := range others[d] {
		if v, s, ok := interpolate(t.rows, strength); ok {
			place(known{t.kelvin, v, s})
		}
	}
	if math.IsInf(below.kelvin, 0) || math.IsInf(above.kelvin, 0) {
		found.AtTemperature = false
		return found, nil
	}
	found.KgPerM3 = below.value
	if above.kelvin > below.kelvin {
		found.KgPerM3 += (above.value - below.value) * (kelvin - below.kelvin) / (above.kelvin - below.kelvin)
	}
	found.Source = join(below.source, above.source)
	return found, nil
}

// Fraction turns kg of formula per m3 of product at 20 C, 0 or more, into kg per
// kg of product: the way to a strength that is stated by volume. The error is
// *OutOfTable, its Strength then being NaN.
func (d Density) Fraction(kgPerM3 float64) (float64, error) {
	rows := tables[d]
	for i := 1; i < len(rows); i++ {
		a, b := rows[i-1], rows[i]
		last := i == len(rows)-1
		if kgPerM3 < 0 || kgPerM3 > b.Strength*b.KgPerM3 && !last {
			continue
		}
		// On the segment density = p + q w, so q w^2 + p w = kgPerM3; the root
		// in this form has no cancellation and holds for q = 0.
		q := (b.KgPerM3 - a.KgPerM3) / (b.Strength - a.Strength)
		p := a.KgPerM3 - q*a.Strength
		w := 2 * kgPerM3 / (p + math.Sqrt(p*p+4*q*kgPerM3))
		if greatest := d.Greatest(); w >= 0 && w <= greatest*(1+rounding) { // false for NaN
			return min(w, greatest), nil
		}
	}
	return 0, &OutOfTable{Density: d, Strength: math.NaN(), High: d.Greatest()}
}

// GreatestMass returns the kg of formula per m3 of product at the greatest
// strength; 0 for a name that is no table.
func (d Density) GreatestMass() float64 {
	w := d.Greatest()
	value, _, _, err := d.at20(w)
	if err != nil {
		return 0
	}
	return w * value
}

// interpolate finds the value at a strength; false outside the rows.
func interpolate(rows []Row, strength float64) (value float64, source string, ok bool) {
	for i, b := range rows {
		if b.Strength == strength {
			return b.KgPerM3, b.Source, true
		}
		if b.Strength < strength {
			continue
		}
		if i == 0 {
			return 0, "", false
		}
		a := rows[i-1]
		share := (strength - a.Strength) / (b.Strength - a.Strength)
		return a.KgPerM3 + share*(b.KgPerM3-a.KgPerM3), join(a.Source, b.Source), true
	}
	return 0, "", false
}

// join names two sources, once where they are the same.
func join(a, b string) string {
	if a == b {
		return a
	}
	return a + "; " + b
}
