// Package batch plans the treatment of a tank instead of a flow: how much of the
// product in all, and in which stages, since an overshoot cannot be taken back.
package batch

import (
	"fmt"

	"beckline/dosing"
)

// The stages: most first, then mix, measure and work the rest out afresh from
// the pH that is read, and feed that in equal parts (common practice, no source).
const (
	firstShare = 0.9
	restParts  = 3
)

// Plan is the treatment of one tank. Masses kg, volumes m3; Volume of product is
// 0 for solids and gases.
type Plan struct {
	TankVolume    float64
	PureMass      float64
	ProductMass   float64
	ProductVolume float64
	Stages        []Stage
}

// Stage is one feed of the plan and the pH to expect after it, if the readings
// and the product are what they were taken to be.
type Stage struct {
	Share         float64 // of the whole dose, this stage alone
	ProductMass   float64 // kg
	ProductVolume float64 // m3, 0 for solids and gases
	ExpectedPH    float64
}

// Of plans the solved dose of a result for a tank of so many m3 (above 0). The
// result must have a solved dose of a product. The error says what is missing,
// or is a *dosing.Problem from the water at a stage.
func Of(r *dosing.Result, tankVolume float64) (Plan, error) {
	st := r.Dose()
	if st == nil {
		return Plan{}, fmt.Errorf("batch: the result has no solved dose")
	}
	if !(tankVolume > 0) {
		return Plan{}, fmt.Errorf("batch: tank volume %g m3 is not above 0", tankVolume)
	}
	p := Plan{
		TankVolume:  tankVolume,
		PureMass:    st.Feed.PureMass * tankVolume,
		ProductMass: st.Feed.ProductMass * tankVolume,
	}
	if st.Feed.Density > 0 {
		p.ProductVolume = p.ProductMass / st.Feed.Density
	}
	given := 0.0
	for i := range restParts + 1 {
		share := firstShare
		if i > 0 {
			share = (1 - firstShare) / restParts
		}
		given += share
		pH, err := after(r, min(given, 1))
		if err != nil {
			return Plan{}, err
		}
		p.Stages = append(p.Stages, Stage{share, share * p.ProductMass, share * p.ProductVolume, pH})
	}
	return p, nil
}

// after is the finished pH with a share of the solved dose.
func after(r *dosing.Result, share float64) (float64, error) {
	c := r.Case
	c.Target, c.Notes = dosing.Target{}, nil
	c.Additions = append([]dosing.Addition(nil), c.Additions...)
	a := &c.Additions[r.Solved-1]
	a.Solve, a.Dose = false, dosing.Some(share*r.Dose().Dose)
	a.Feed.PumpCapacity = dosing.None
	res, err := dosing.Solve(c)
	if err != nil {
		return 0, err
	}
	return res.Finished().Figures.PH, nil
}
