// Package margin says how far a dose may be off: it carries the tolerance of
// each reading to the dose, the feed and the finished pH, and names the reading
// that is most worth repeating.
//
// A tolerance is the half-width of a 95 % interval. Errors are taken as
// independent and normal; a range runs from the 2.5 to the 97.5 percentile.
// There are two ways to it: first order, from slopes at the answer (JCGM
// 100:2008, clause 5), and draws of the true readings through the whole model
// (JCGM 101:2008, clause 7, with Latin hypercube samples). First order is
// always made; it says where it is not good enough, and draws are used there.
//
//	readings and their tolerances   tolerance.go, readings.go
//	the answer                      margin.go
//	the raw water of true readings  model.go
//	the train and its doses         train.go, route.go, search.go
//	slopes                          firstorder.go, trust.go, band.go
//	draws                           draws.go, design.go, summary.go
//
// What is dosed besides the solved addition, demand, and what a tower or a
// contactor does are taken as exactly as stated.
package margin
