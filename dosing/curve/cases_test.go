package curve_test

import (
	"beckline/carbonate"
	"beckline/dosing"
)

func mg(v float64, c carbonate.Component) dosing.Optional {
	return dosing.Some(v * 1e-3 / c.MolarMass())
}

func product(name string) dosing.Product {
	p, ok := dosing.ProductByName(name)
	if !ok {
		panic(name)
	}
	return p
}

// upland is a soft upland water with alum ahead of caustic to pH 8.40.
func upland() dosing.Case {
	alum := product("alum-dry")
	return dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(6.9), Alkalinity: dosing.Some(24 / 50043.5), Kelvin: dosing.Some(281.15),
			Calcium: mg(7.2, carbonate.Calcium), Magnesium: mg(1.5, carbonate.Magnesium), Sulfate: mg(6, carbonate.Sulfate),
			Chloride: mg(8, carbonate.Chloride), Sodium: mg(6, carbonate.Sodium), Conductivity: dosing.Some(78e-4), Flow: dosing.Some(240. / 3600),
		},
		Additions: []dosing.Addition{
			{Product: alum, Dose: dosing.Some(22e-3 / alum.Chemical.MolarMass)},
			{Product: product("caustic-25"), Solve: true, Feed: dosing.FeedSetup{PumpCapacity: dosing.Some(20 / 3.6e6)}},
		},
		Target: dosing.Target{Kind: dosing.TargetPH, Value: 8.4},
	}
}

// wash is a spent alkaline wash water to be brought down with sulfuric acid.
func wash() dosing.Case {
	return dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(11.5), Alkalinity: dosing.Some(620 / 50043.5), Kelvin: dosing.Some(305.15),
			Calcium: mg(18, carbonate.Calcium), TDS: dosing.Some(1.9),
		},
		Additions: []dosing.Addition{{Product: product("sulfuric-93"), Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 7.5},
	}
}
