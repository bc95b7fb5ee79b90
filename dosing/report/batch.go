package report

import (
	"fmt"
	"strings"

	"beckline/dosing/batch"
)

// BatchAdvice is what to do between the stages of a tank.
const BatchAdvice = "mix, measure, work out afresh before the next stage"

var asTank = rounding{decimals: 3, significant: 3, never0: true}

// WithBatch returns the document with the plan of a tank in it.
func (d Document) WithBatch(p batch.Plan) Document {
	d.batch = &p
	return d
}

// batchJSON is the plan for programs: m3, kg, L; volumes null for solids and gases.
func batchJSON(p *batch.Plan) object {
	litres := func(v float64) Number {
		if v == 0 {
			return Number{}
		}
		return Some(v * litresPerM3)
	}
	var o object
	o.add("tank_m3", Some(p.TankVolume))
	o.add("pure_kg", Some(p.PureMass))
	o.add("product_kg", Some(p.ProductMass))
	o.add("product_l", litres(p.ProductVolume))
	stages := make([]object, len(p.Stages))
	for i, s := range p.Stages {
		stages[i].add("share_percent", Some(s.Share*100))
		stages[i].add("product_kg", Some(s.ProductMass))
		stages[i].add("product_l", litres(s.ProductVolume))
		stages[i].add("expected_ph", Some(s.ExpectedPH))
	}
	o.add("stages", stages)
	o.add("advice", BatchAdvice)
	return o
}

// writeBatch is the plan for people.
func (d Document) writeBatch(b *strings.Builder) {
	p := d.batch
	s := d.result.Dose()
	amount := func(kg, m3 float64) string {
		text := asTank.write(kg) + " kg"
		if m3 > 0 {
			text = asTank.write(m3*litresPerM3) + " L = " + text
		}
		return text
	}
	fmt.Fprintf(b, "For %s m3: %s of %s in all\n", Significant(p.TankVolume, 4), amount(p.ProductMass, p.ProductVolume), s.Addition.Product.Name)
	for i, stage := range p.Stages {
		fmt.Fprintf(b, "  %d. %s (%s %%), then expect pH %s\n", i+1, amount(stage.ProductMass, stage.ProductVolume),
			Significant(stage.Share*100, 2), asPH.write(stage.ExpectedPH))
	}
	b.WriteString("  " + strings.ToUpper(BatchAdvice[:1]) + BatchAdvice[1:] + ": with --ph as read and\n  the alkalinity as titrated. An overshoot cannot be taken back.\n")
}
