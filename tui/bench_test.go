package tui

import (
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/tui/painter"
)

// BenchmarkEvaluate computes everything that the screen shows of a sheet.
func BenchmarkEvaluate(b *testing.B) {
	s := newSheet(entry.Demo(), true)
	for b.Loop() {
		evaluate(s, dosing.Solve)
	}
}

// BenchmarkDraw draws a frame of 80 × 24.
func BenchmarkDraw(b *testing.B) {
	m := newModel(newSheet(entry.Demo(), true), dosing.Solve, fullLook)
	for b.Loop() {
		m.draw()
	}
}

// BenchmarkFrame draws a frame and finds what changed when a figure did.
func BenchmarkFrame(b *testing.B) {
	m := newModel(newSheet(entry.Demo(), true), dosing.Solve, fullLook)
	d := painter.NewDiffer(fullLook.attributesOf(), true)
	bytes := 0
	for b.Loop() {
		m.toPlace(1 - 2*m.row[0])
		bytes = len(d.Frame(m.draw()))
	}
	b.ReportMetric(float64(bytes), "bytes/frame")
}
