// Package mix chooses among several chemicals at once: the mix of least cost
// that keeps the finished water within every limit.
//
// # Method
//
// Doses are the unknowns. Sodium, calcium, alkalinity and the other totals are
// linear in them, and so is the ratio of chloride to sulfate once multiplied out.
// A bound on the pH becomes a bound on the alkalinity less the alkalinity that
// the water has at that pH, which is nearly linear where the pH is not. What
// bends, bends for good reason (activities, ion pairs, saturation), so a linear
// program is solved about the doses of the last pass and the passes repeated
// until the doses stop: successive linear programming with a box about each pass
// (descend.go; Griffith & Stewart 1961, Management Science 7, 379-392; the box
// and its price on what is missed after Fletcher & Sainz de la Maza 1989,
// Mathematical Programming 43, 235-256, from memory).
//
// Limits on saturation make more than one valley: they can be met by a water of
// low pH and much carbon or of high pH and little. Where one of them binds the
// search starts from several pH and from mixes with each product in and out
// (search.go). Products that a pump feeds not at all or at no less than a least
// dose are decided by branching (branch.go).
//
// The linear programs are tiny, six doses under a dozen rows, and a mix takes
// some hundreds of them. The bounded simplex method written out for that size
// (simplex.go) takes about 1 us each without allocating; gonum's takes about
// 230 us in its standard form, too long for a mix in 5 ms, so gonum stands in the
// tests as the second opinion: both agree on random programs, feasible or not.
//
// Nothing is taken on trust: every mix is dosed into the readings and the
// finished water solved afresh, and its figures held to the limits (confirm.go).
//
// # Where to look
//
//	question and answer      task.go, quantity.go, answer.go, check.go
//	rows and their slopes    build.go, program.go
//	bounds of a dose         ceiling.go
//	search                   search.go, descend.go, cut.go, branch.go, simplex.go
//	what limits cost         explain.go
//	why there is no mix      conflict.go
package mix
