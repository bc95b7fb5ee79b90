package slips

import (
	"time"

	"beckline/dosing"
)

// Context is what may be known besides the case itself. Everything is optional;
// a check without its evidence says nothing. Values are SI.
type Context struct {
	Now       time.Time
	Last      *dosing.Case     // the last case that was accepted
	LastAt    time.Time        // when
	Usual     map[string]Usual // the plant's own readings, by command-line name ("alkalinity")
	Capacity  dosing.Optional  // m3/s that the plant can treat
	Confirmed []Confirmation
	Units     map[string]string // the unit in which a reading was typed (reading.Value.Unit), by command-line name

	ReadAt   map[string]time.Time // when each reading was taken, by command-line name
	Measured map[int]Water        // what was read at a station, by its index in the result (0 the raw water)
	SecondPH dosing.Optional      // the raw sample by another meter
	Online   []Timed              // the finished-water probe, oldest first
	Grab     dosing.Optional      // a grab sample beside the last of them, pH
	Sample   Sample
	Burette  *Burette
	Sources  []dosing.Source // waters of which the raw water is a blend

	Product  Product
	Pump     Pump
	Delivery *Delivery
	Batch    bool // a tank is neutralised, nothing flows
}

// Usual is what a reading of this plant commonly is. For a plant whose water
// follows the season it should be of the season.
type Usual struct {
	Median    float64
	Low, High float64 // hold about 95 of 100 readings
}

// Water is what was read of the water at a station.
type Water struct {
	PH         dosing.Optional
	Alkalinity dosing.Optional // eq/L
}

// Timed is one value of a recorder.
type Timed struct {
	At    time.Time
	Value float64
}

// Sample is how the raw sample was handled.
type Sample struct {
	Taken, Read time.Time
}

// Burette is one alkalinity titration as read.
type Burette struct {
	Start, End   dosing.Optional // mL on the burette, which reads downwards from 0
	Capacity     float64         // mL, 0 for 50
	PerML        float64         // eq/L of alkalinity for 1 mL of titre
	Duplicates   []float64       // eq/L, repeats of the same sample
	EqPerLitre   dosing.Optional // of the titrant, as typed
	SampleLitres dosing.Optional
}

// Product is what is known of the product in the day tank of the addition that
// is solved for (the last liquid feed where none is).
type Product struct {
	Density         dosing.Optional // kg/m3 as measured
	Kelvin          dosing.Optional // K of that sample
	DensityAt       time.Time       // when
	LotAt           time.Time       // when the present lot went in
	ActivePerVolume dosing.Optional // kg of the chemical in m3 of product, as the plant's own sums or the label have it
}

// Pump is its feed pump.
type Pump struct {
	Running          bool
	Manual           bool            // not paced, not interlocked
	FlowNow          dosing.Optional // m3/s of water at this moment
	Set              dosing.Optional // m3/s that it is set to
	Drawn            dosing.Optional // m3/s by drawdown
	Stroke, Speed    dosing.Optional // shares, now
	LastStroke       dosing.Optional // when the output was last accepted
	LastSpeed        dosing.Optional
	CalibratedStroke dosing.Optional // at the last drawdown
}

// Delivery is a truck at the gate.
type Delivery struct {
	Note    string          // catalogue name of the product on the delivery note
	Tank    string          // and of the tank whose fill point is open
	Density dosing.Optional // kg/m3 of a sample
	Kelvin  dosing.Optional
	Label   bool // the label on the vehicle was read and is that of the note
	Present bool // someone of the plant stands by
}
