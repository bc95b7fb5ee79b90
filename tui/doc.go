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
//	train.go     chemicals added, taken off, moved
//	paste.go     one value or a whole row of readings
//	page.go      help, sheets, the slip
//
// What was entered is a sheet (sheet.go, with stations.go and units.go);
// evaluate.go turns it into figures or into what is wrong. Model.View draws:
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
