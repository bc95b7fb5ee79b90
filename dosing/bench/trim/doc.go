// Package trim corrects a running feed: from the pH of the finished water as
// read it finds the dose that should be set, what may explain the difference,
// and the steps on which to go to a new setting.
//
//	input.go    what is known: the case, the reading, the tolerances
//	cause.go    the causes that are weighed, and the two-minute test of each
//	size.go     how large each would have to be to explain the reading alone
//	explain.go  the ranking and the corrected dose
//	steps.go    a plan of steps: size, wait, expected pH, when to stop
//	limits.go   the plant's own limits, and passing them for a stated reason
//
// Everything is SI with amounts in mol/L. Errors are *dosing.Problem.
package trim
