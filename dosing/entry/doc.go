// Package entry turns a filled-in form, the words that a person typed on a
// command line, in a row of a table or on the screen, into a dosing.Case.
//
// It decides what must be given and which product is meant; what a number or a
// unit means is reading's business, what the water does is dosing's.
//
//	form.go     Form to Case, in the order in which problems are reported
//	readings.go which field fills what
//	target.go   exactly one target
//	product.go  products by name, strength, pump
//	addition.go PRODUCT=DOSE with its basis
//	tolerance.go  how far off each reading may be
//	units.go    the unit in which each reading was typed
//	product_at.go  a product at a strength, a dose of it, apart from any form
//	nearest.go  names near an unknown one
//	demo.go     the demo plant
//
// Every problem is a *dosing.Problem of kind BadInput whose Code is one of
// reading's codes or of: missing, unknown_field, two_targets, unknown_product,
// bad_strength, strength_terms, unknown_basis. Its Field is the command-line
// name.
//
// The notes of the Case are warnings: unusual_<field>, a value outside the usual
// band (Value and Limit are the value and the end of the band in the field's SI
// unit); unusual_dose, the same for a typed dose (of field the product's name,
// kg of the chemical's formula in m3 of water); basis_assumed, a bare dose where
// the trade has another habit.
package entry
