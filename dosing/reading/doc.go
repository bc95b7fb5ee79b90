// Package reading turns what a person typed, with or without a unit, into a
// value in SI, and an SI value back into text.
//
// One table drives it all: every reading, target and setting of the command
// line, the CSV columns and the screen is a Field with its names, its bare
// unit, the other units it accepts, its limits and its rounding. A new reading
// is one entry there.
//
//	clean.go           what may be shown of what was typed
//	number.go          digits, signs, separators, exponents
//	unit.go            spellings of units
//	definitions.go     gallons, grains, degrees of hardness, molar masses
//	units_water.go     pH, temperature, alkalinity, hardness, conductivity
//	units_amount.go    concentrations
//	units_feed.go      flow, pumps, strength
//	field.go           parsing by field
//	fields_*.go        the table
//	limits.go          hard stops and usual bands
//	show.go            values back to text, in any accepted unit
//	dose.go            PRODUCT=DOSE
//	error.go           refusals
//
// Limits and usual bands are common practice, no source, unless a line says
// otherwise.
package reading
