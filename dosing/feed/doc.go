// Package feed turns a dose of a pure substance into what the feed equipment
// moves: mass and volume of the product as delivered, and the share of a pump's
// output. Everything is SI; the caller knows units and words.
//
//	rates.go      Compute: strength, mass, volume
//	pump.go       the pump's share, its turndown, a pump that is too small
//	density.go    density by strength and temperature: looking it up
//	bases.go, acids.go, coagulants.go, others.go   the density tables themselves
//	freezing.go, freezing_points.go   the temperature at which a product starts to freeze or crystallise
//	calibration.go, setting.go   a pump by its drawdowns: the line, a setting, what one step does
//	gravity.go    strength from a specific gravity and a temperature
//	dilution.go, heat.go   thinning a product: masses, volumes, heat
//	tank.go       how long a day tank lasts; volumes of cylinders
//	delivery.go   does a load fit, how long a store lasts, is it the product on the note
//	carrier.go    scale that carrier water makes in the line of a base
//
// A strength outside its table is refused, never extrapolated.
package feed
