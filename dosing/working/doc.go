// Package working writes the worked sheet of a result: every step with its
// formula, its source, the numbers put in, the unit and the outcome, so that an
// inspector can redo it with a calculator.
//
// The sheet is made by working its own formulas: each is evaluated with full
// precision and must give the number that the answer holds, or no sheet is made.
// So it cannot drift from the computation. Numbers are shown with as many digits
// as it takes for the line, worked as it stands, to give the outcome shown.
//
//	expressions                     expression.go
//	the sheet and its text          sheet.go, layout.go
//	making and checking of steps    builder.go
//	readings, constants             readings.go, constants.go
//	the raw water, a blend          raw.go, blend.go
//	a water at its pH               water.go, acids.go
//	the train, dose, feed           train.go, additions.go, dose.go, feed.go
//	indices                         figures.go
package working
