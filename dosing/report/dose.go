package report

import (
	"beckline/dosing"
)

// A dose or a feed that is not zero is never shown as zero, however small.
var (
	asDose    = rounding{decimals: 3, significant: 3, never0: true}
	asFeed    = rounding{decimals: 4, significant: 3, never0: true}
	asPercent = rounding{decimals: 1, significant: 3, never0: true}
)

// doseSpec describes one figure of an addition.
type doseSpec struct {
	key, label, unit string
	shown            rounding
	value            func(*dosing.Station) Number
	text             func(*dosing.Station) string
}

var doseSpecs = []doseSpec{
	{key: "product", label: "product",
		text: func(s *dosing.Station) string { return s.Addition.Product.Name }},
	{key: "chemical", label: "chemical",
		text: func(s *dosing.Station) string { return s.Addition.Product.Chemical.Name }},
	{key: "basis", label: "basis of the dose",
		text: func(s *dosing.Station) string { return Basis(s.Addition.Product.Chemical) }},
	{key: "dose_mg_l", label: "dose", unit: "mg/L", shown: asDose,
		value: func(s *dosing.Station) Number {
			return Some(s.Dose * s.Addition.Product.Chemical.MolarMass * milli)
		}},
	{key: "product_mg_l", label: "dose as product", unit: "mg/L", shown: asDose,
		value: func(s *dosing.Station) Number { return Some(s.Feed.ProductMass * milli) }},
	{key: "pure_kg_d", label: "pure chemical", unit: "kg/d", shown: asFeed,
		value: func(s *dosing.Station) Number { return byFlow(s, s.Feed.PurePerSecond*secondsPerDay) }},
	{key: "feed_kg_d", label: "feed", unit: "kg/d", shown: asFeed,
		value: func(s *dosing.Station) Number { return byFlow(s, s.Feed.MassPerSecond*secondsPerDay) }},
	{key: "feed_lb_d", label: "feed", unit: "lb/d", shown: asFeed,
		value: func(s *dosing.Station) Number { return byFlow(s, s.Feed.MassPerSecond*secondsPerDay/kgPerPound) }},
	{key: "feed_l_h", label: "feed", unit: "L/h", shown: asFeed,
		value: func(s *dosing.Station) Number { return byVolume(s, litresPerM3*secondsPerHour) }},
	{key: "feed_ml_min", label: "feed", unit: "mL/min", shown: asFeed,
		value: func(s *dosing.Station) Number { return byVolume(s, litresPerM3*milli*60) }},
	{key: "feed_gal_h", label: "feed", unit: "US gal/h", shown: asFeed,
		value: func(s *dosing.Station) Number { return byVolume(s, litresPerM3*secondsPerHour/litresPerUSGallon) }},
	{key: "pump_percent", label: "pump", unit: "%", shown: asPercent,
		value: func(s *dosing.Station) Number {
			if !s.Feed.HasPump {
				return Number{}
			}
			return Some(s.Feed.PumpFraction * 100)
		}},
	{key: "trade_basis", label: "the trade's basis",
		text: func(s *dosing.Station) string {
			b, _ := TradeBasis(s.Addition.Product.Chemical)
			return b.Name
		}},
	{key: "trade_dose_mg_l", label: "dose on the trade's basis", unit: "mg/L", shown: asDose,
		value: func(s *dosing.Station) Number {
			b, ok := TradeBasis(s.Addition.Product.Chemical)
			if !ok {
				return Number{}
			}
			return Some(s.Dose * b.Mass * milli)
		}},
}

// Dose returns the figures of one addition in their fixed order, every key
// always there. The station must have an addition.
func Dose(s *dosing.Station) []Figure {
	figures := make([]Figure, len(doseSpecs))
	for i, d := range doseSpecs {
		figures[i] = Figure{Key: d.key, Label: d.label, Unit: d.unit, shown: d.shown}
		if d.text != nil {
			figures[i].Text, figures[i].IsText = d.text(s), true
		} else {
			figures[i].Value = d.value(s)
		}
	}
	return figures
}

// Basis names the substance whose mass a dose is given in.
func Basis(c dosing.Chemical) string { return "100 % " + c.Formula }

// TradeBasis is the other basis on which the trade states a chemical's dose,
// where it has one.
func TradeBasis(c dosing.Chemical) (dosing.Basis, bool) {
	for _, b := range c.Bases {
		if b.Habitual {
			return b, true
		}
	}
	return dosing.Basis{}, false
}

func byFlow(s *dosing.Station, v float64) Number {
	if !s.Feed.HasFlow {
		return Number{}
	}
	return Some(v)
}

// byVolume gives a volume rate: m3/s times a factor, none for solids and gases.
func byVolume(s *dosing.Station, factor float64) Number {
	if !s.Feed.HasFlow || !s.Feed.HasVolume {
		return Number{}
	}
	return Some(s.Feed.VolumePerSecond * factor)
}
