// Package bench fits a jar titration: from readings of pH after known doses it
// finds what the sample and the product really are, how well that is known, and
// whether the model describes the jar at all.
//
//	titration.go  the readings: points, burette volumes, tolerances
//	unknown.go    what can be fitted, where each starts and may go
//	model.go      pH after a dose, with the fitted figures put in
//	acid.go       a weak acid that the water model does not name
//	fit.go        least squares by Levenberg and Marquardt's method
//	interval.go   standard errors and 95 % intervals from the Jacobian
//	report.go     the outcome, and the dose or pH that follows from it
//	order.go      readings out of order, not settled, or standing alone
//	reasons.go    why a jar and the model part
//	words.go      reasons and slips in plain words, with what tells them
//
// Trim of a running plant is in the room trim below this one.
//
// Everything is SI with amounts in mol/L; a dose is mol of the reagent's
// formula, by its label, in a litre of the sample. Errors are *dosing.Problem.
package bench
