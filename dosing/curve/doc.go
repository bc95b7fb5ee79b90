// Package curve answers one plan many times over, across temperatures, raw
// alkalinities, a table of waters, or doses, and shows the answers as a text
// table, CSV rows or a picture.
//
//	axis.go        what an axis shows, and in which unit
//	series.go      the answers along one line
//	vary.go        across temperatures, alkalinities, waters
//	titration.go   across doses: the titration curve of a water
//	text.go        as a table of text
//	csv.go         as rows
//	picture.go     as SVG or PNG
//	marks.go       the target and the working point in a picture
//	ticks.go       the numbers along its axes
//
// Every point is one dosing.Solve; nothing here computes chemistry. A point
// without an answer keeps its place with its problem and leaves a gap.
package curve
