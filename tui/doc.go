// Package tui is the screen: the water's path as a line of stations, the fields
// of the station walked to, and the answer. It computes nothing of its own:
// every figure is one of the Result, in the words and units of report.
//
// A key goes from run.go through guard.go to Model.Update, is looked up in the
// table of keys.go, and ends in one of
//
//	walking.go   arrows, nudging, undo
//	typing.go    what is typed into a field, and the question about unusual values
//	choose.go    lists: products, targets, figures
//	train.go     steps added, taken off, moved
//	paste.go     one value or a whole row of readings
//	page.go      help, sheets, the slip
//	export.go    the answer in other forms, copied or written to a file
//
// What was entered is a sheet (sheet.go, with stations.go, feedentry.go and
// units.go); case.go makes a case of it, in a plant's own terms where a plant file
// was given, and evaluate.go turns that into figures or into what is wrong:
// trust.go says how far off they may be, limits.go which limits they pass.
// Model.View draws:
//
//	draw.go, small.go      layout; a terminal that is too small
//	line.go, answer.go     the stations; the setting, large
//	fields.go, right.go    the fields; beside them curve.go or profile.go
//	message.go, safety.go, bottom.go
//	speak.go               the same as sentences, for a screen reader or a dumb terminal
//	look.go                what the terminal can show
//
// Rooms below: canvas (the grid), painter (the grid to the terminal, only what
// changed), console (raw mode, size, whole keys), draft (what was typed, on
// disk), quiet (no question to the terminal), vt (a terminal for tests).
//
// Golden screens are in testdata; go test ./tui -update writes them anew.
package tui
