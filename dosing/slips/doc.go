// Package slips looks for the slips of the pen, the bench and the shift that a
// plant's numbers betray: a unit taken for another, a decimal point, a meter
// off, a product in the wrong tank. Each finding names the likely cause in plain
// words, the evidence, and what to do. Nothing is refused here, and what a
// person has confirmed is not asked again.
//
//	check.go      Check: the one entrance
//	finding.go    what comes out, and its codes
//	context.go    what may be known besides the case
//	evidence.go   how well a set of readings fits together: ions, conductivity, limits, history
//	meant.go      what else a number may have meant, reading by reading
//	weigh.go      typed against meant
//	doses.go      the same for doses: basis, dry or liquid, decimal point
//	product.go    strength against density and volume, lots, cold
//	pump.go       running without water, manual, stroke and speed, drawdown
//	meters.go     two meters, online against grab, a flat line
//	sample.go     how long a sample stood, old and reused readings, a blend's pH
//	burette.go    start and end, duplicates, the titrant
//	delivery.go   before the hose goes on
//	batch.go      the last drops of acid; lime that did not dissolve
//	letters.go    check letters for a line that is copied by hand
//
// A check needs evidence: a number that is merely rare is reading's business,
// which asks for it to be confirmed. Bounds are common practice, no source,
// unless a line says otherwise.
package slips
