// Package dosing answers the operator's question: which dose of which product
// brings this water to that target, and what comes of it. Solve turns a Case
// into a Result; every rendering shows that Result and computes nothing.
//
// What is where:
//
//	case.go, result.go     what goes in, what comes out; SI units throughout
//	problem.go             a refusal or a "no", typed; sentences are report's
//	raw.go                 readings to the raw water: hardness forms, ionic strength, organic acids
//	solve.go, steps.go     the train: each addition, chlorine's reactions, aeration, limestone
//	target.go, reach.go    the dose for a target; the nearest value where there is none
//	pair.go, pairscan.go   two doses for two targets: Newton, and the certain way behind it
//	figures.go             everything shown of one water
//	warnings.go, checks.go what to say beside the numbers; proof that they close
//	chemicals.go           one row a pure substance
//	products.go            one row a product as delivered
//	strength.go            a product at another strength
//
// A new chemical or product is a row in its table, not a function.
package dosing
