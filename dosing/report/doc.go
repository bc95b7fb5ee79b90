// Package report turns a dosing.Result into what people and scripts read:
// JSON, CSV cells, text, the slip, and the sentences for warnings and
// refusals. It computes no chemistry: every figure is a figure of the Result
// in the unit that its key names.
//
// Where things are:
//
//	figure.go     one figure: key, label, unit, value, and how it is rounded for people
//	water.go      the figures of a water, in their fixed order
//	dose.go       the figures of an addition, in their fixed order
//	document.go   Document, the whole answer
//	json.go       the JSON form
//	columns.go    the CSV columns
//	text.go       the text for people
//	slip.go       the plain slip and the line for the shift log
//	sentence.go   a sentence for each warning
//	problem.go    a line and a JSON object for each refusal; problem_*.go their words
//	margin.go ways.go slips.go   what speaks for and against a dose
//	sheet.go      the answer of a command that is about something else than a water
//	bench.go trim.go drawdown.go store.go thinning.go   such answers
//	equipment.go  a sentence for each code of the feed equipment
package report
