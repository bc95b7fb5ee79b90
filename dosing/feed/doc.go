// Package feed turns a dose of a pure substance into what the feed equipment
// moves: mass and volume of the product as delivered, and the share of a pump's
// output. Everything is SI; the caller knows units and words.
//
//	rates.go      Compute: strength, mass, volume
//	pump.go       the pump's share, its turndown, a pump that is too small
//	density.go    density by strength and temperature: looking it up
//	bases.go, acids.go, coagulants.go, others.go   the density tables themselves
//	freezing.go   the temperature at which a product starts to freeze or crystallise
//
// A strength outside its table is refused, never extrapolated.
package feed
