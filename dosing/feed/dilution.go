package feed

import "math"

// Codes of a dilution.
const (
	CodeDilutionHeats   = "dilution_heats"         // it warms by so much, or for a caustic or acid by an amount not known here
	CodeDilutionHot     = "dilution_hot"           // it may pass 50 C: in portions, with cooling
	CodeDilutionBoils   = "dilution_may_boil"      // it may pass 90 C: not in one go
	CodeDilutionFreezes = "dilution_may_freeze"    // the made strength is below its crystallisation point at the water's temperature
	CodeProductToWater  = "add_product_to_water"   // always the product into the water, never the water into the product
	CodeScaleWithWater  = "dilution_water_hardens" // a base makes scale of hard water: soften it
)

const (
	hotKelvin  = 273.15 + 50
	boilKelvin = 273.15 + 90
	leastWater = 273.15
	mostWater  = 373.15
)

// Dilution is a concentrated product to be thinned with water. Exactly one of
// Make and Use is above 0.
type Dilution struct {
	Product       Density
	From, To      float64 // kg/kg; To above 0 and below From
	Make          float64 // m3 of the weaker solution wanted
	Use           float64 // m3 of the product to be used up
	ProductKelvin float64 // 0 is 293.15
	WaterKelvin   float64 // 0 is 293.15
}

// Diluted is what to put together. Volumes are at 20 C; they do not add up, the
// masses do.
type Diluted struct {
	ProductMass, ProductVolume float64 // kg, m3
	WaterMass, WaterVolume     float64
	Mass, Volume               float64 // of the weaker solution
	Shrinks                    float64 // m3 by which it is less than the two volumes together
	Heat                       Heat
	FreezingFrom, FreezingTo   Freezing
	Codes                      []string
}

// Dilute works by mass: what is dissolved stays, water makes up the rest.
// Errors: *BadInput (field "strength", "make", "product-temperature",
// "water-temperature"), *OutOfTable.
func Dilute(in Dilution) (Diluted, error) {
	if in.ProductKelvin == 0 {
		in.ProductKelvin = referenceKelvin
	}
	if in.WaterKelvin == 0 {
		in.WaterKelvin = referenceKelvin
	}
	if err := in.check(); err != nil {
		return Diluted{}, err
	}
	strong, err := in.Product.At(in.From, referenceKelvin)
	if err != nil {
		return Diluted{}, err
	}
	weak, err := in.Product.At(in.To, referenceKelvin)
	if err != nil {
		return Diluted{}, err
	}
	var d Diluted
	if in.Make > 0 {
		d.Mass = in.Make * weak.KgPerM3
		d.ProductMass = d.Mass * in.To / in.From
	} else {
		d.ProductMass = in.Use * strong.KgPerM3
		d.Mass = d.ProductMass * in.From / in.To
	}
	d.WaterMass = d.Mass - d.ProductMass
	d.ProductVolume = d.ProductMass / strong.KgPerM3
	d.WaterVolume = d.WaterMass / WaterAt20C
	d.Volume = d.Mass / weak.KgPerM3
	d.Shrinks = d.ProductVolume + d.WaterVolume - d.Volume
	d.FreezingFrom, d.FreezingTo = in.Product.Freezing(in.From), in.Product.Freezing(in.To)
	d.Heat = in.heat(&d)
	d.codes(&in)
	return d, nil
}

func (in Dilution) check() error {
	for _, f := range []struct {
		field     string
		value     float64
		low, high float64
	}{
		{"strength", in.From, 0, 1},
		{"strength", in.To, 0, in.From},
		{"product-temperature", in.ProductKelvin, leastKelvin, greatestKelvin},
		{"water-temperature", in.WaterKelvin, leastWater, mostWater},
	} {
		if !(f.value >= f.low && f.value <= f.high) {
			return &BadInput{Field: f.field, Value: f.value, Low: f.low, High: f.high}
		}
	}
	if !(in.To > 0 && in.To < in.From) {
		return &BadInput{Field: "strength", Value: in.To, Low: 0, High: in.From}
	}
	one := in.Make
	if in.Make <= 0 {
		one = in.Use
	}
	if in.Make > 0 == (in.Use > 0) || in.Make < 0 || in.Use < 0 || math.IsInf(one, 0) || math.IsNaN(in.Make+in.Use) {
		return &BadInput{Field: "make", Value: one, Low: 0, High: math.MaxFloat64}
	}
	return nil
}

func (d *Diluted) codes(in *Dilution) {
	note := func(code string) { d.Codes = append(d.Codes, code) }
	if heats[in.Product] {
		note(CodeDilutionHeats)
	}
	switch final := d.Heat.FinalKelvin; {
	case final > boilKelvin:
		note(CodeDilutionBoils)
	case final > hotKelvin || d.Heat.AtLeast:
		// What is not counted may well make up the rest.
		note(CodeDilutionHot)
	}
	if d.FreezingTo.Known && min(in.WaterKelvin, in.ProductKelvin) < d.FreezingTo.Kelvin {
		note(CodeDilutionFreezes)
	}
	if d.FreezingFrom.Known && in.ProductKelvin < d.FreezingFrom.Kelvin {
		note(CodeProductMayFreeze)
	}
	if in.Product == SodiumHydroxide || in.Product == PotassiumHydroxide || in.Product == SodiumCarbonate {
		note(CodeScaleWithWater)
	}
	note(CodeProductToWater)
}
