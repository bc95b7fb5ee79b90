package check

import (
	"fmt"

	"beckline/dosing/feed"
)

// Units of the sources, exact by definition.
const (
	m3PerMegagallon = 3785.411784 // US
	kgPerPound      = 0.45359237
	m3PerGallon     = 3.785411784e-3 // US
	secondsPerDay   = 86400
)

// feedRow computes a feed from flow, dose and strength.
func feedRow(r record) Outcome {
	o := Outcome{
		Name: fmt.Sprintf("%s: %s MGD, %s mg/L, %s %%", r["case"], r["flow_mgd"], r["dose_mg_l"], r["strength_percent"]),
		Unit: "lb/d", Published: r.number("value"),
	}
	o.Tolerance = o.Published * r.number("relative_tolerance")
	in := feed.Input{
		PureMass: r.number("dose_mg_l") / 1000,
		Strength: r.number("strength_percent") / 100,
		Form:     feed.Solid,
		Flow:     r.number("flow_mgd") * m3PerMegagallon / secondsPerDay,
	}
	volume := r["quantity"] == "feed_gal_d"
	if volume {
		o.Unit = "US gal/d"
		in.Form = feed.Liquid
		in.Density = feed.SodiumHypochlorite
		in.KgPerM3 = r.number("density_lb_gal") * kgPerPound / m3PerGallon
	}
	rates, err := feed.Compute(in)
	if err != nil {
		o.Err = err
		return o
	}
	o.Value = rates.MassPerSecond * secondsPerDay / kgPerPound
	if volume {
		o.Value = rates.VolumePerSecond * secondsPerDay / m3PerGallon
	}
	return o
}
