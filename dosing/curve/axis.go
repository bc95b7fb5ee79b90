package curve

import (
	"beckline/carbonate"
	"beckline/dosing"
)

// Axis is what one axis of a picture or column of a table shows: a label, a
// unit, and the way there from SI. A plant that speaks other units replaces
// Unit, Factor and Offset.
type Axis struct {
	Label    string  // "dose of sodium hydroxide"
	Unit     string  // "mg/L as NaOH"; "" where there is none, as for pH
	Factor   float64 // shown = SI * Factor + Offset
	Offset   float64
	Decimals int // that a reader can use
}

// In turns an SI value into the axis's unit.
func (a Axis) In(si float64) float64 { return si*a.Factor + a.Offset }

// Title is the label with its unit.
func (a Axis) Title() string {
	if a.Unit == "" {
		return a.Label
	}
	return a.Label + " (" + a.Unit + ")"
}

const milligramsCaCO3 = 1000 * carbonate.MolarMassCaCO3 // per mol of CaCO3

func temperatureAxis() Axis {
	return Axis{Label: "temperature of the water", Unit: "\u00b0C", Factor: 1, Offset: -273.15, Decimals: 1}
}

func alkalinityAxis(of string) Axis {
	return Axis{Label: "alkalinity of the " + of, Unit: "mg/L as CaCO3", Factor: milligramsCaCO3 / 2, Decimals: 1}
}

func waterAxis() Axis { return Axis{Label: "water", Factor: 1} }

func doseAxis(p *dosing.Product) Axis {
	c := &p.Chemical
	return Axis{Label: "dose of " + c.Name, Unit: "mg/L as " + c.Formula, Factor: 1000 * c.MolarMass, Decimals: 2}
}

// figureAxis is the figure of the finished water that a target is about; pH
// where there is no target.
func figureAxis(kind dosing.TargetKind) Axis {
	switch kind {
	case dosing.TargetAlkalinity:
		return alkalinityAxis("finished water")
	case dosing.TargetSaturationIndex:
		return Axis{Label: "calcite saturation index of the finished water", Factor: 1, Decimals: 2}
	case dosing.TargetDIC:
		return Axis{Label: "inorganic carbon of the finished water", Unit: "mmol/L", Factor: 1000, Decimals: 3}
	case dosing.TargetCCPP:
		return Axis{Label: "CCPP of the finished water", Unit: "mg/L as CaCO3", Factor: milligramsCaCO3, Decimals: 1}
	}
	return Axis{Label: "pH of the finished water", Factor: 1, Decimals: 2}
}

// figure reads what figureAxis shows.
func figure(kind dosing.TargetKind, f *dosing.Figures) dosing.Optional {
	switch kind {
	case dosing.TargetAlkalinity:
		return dosing.Some(f.Alkalinity)
	case dosing.TargetSaturationIndex:
		return f.SaturationIndex
	case dosing.TargetCCPP:
		return f.CCPP
	case dosing.TargetDIC:
		return dosing.Some(f.DIC)
	}
	return dosing.Some(f.PH)
}
