package slips

import (
	"math"

	"beckline/dosing"
)

const (
	densityWithin = 0.02 // a measured density off the table by more is another strength
	warmer        = 15.0 // K since the density was measured: half a per cent of it
	activeWithin  = 0.06 // of g/L as used against g/L by the table
	sameFigure    = 0.025
)

// product compares strength, density and volume of what is in the tank.
func (k *check) product() []Finding {
	at := k.station()
	if at == 0 {
		return nil
	}
	a := &k.c.Additions[at-1]
	p := &a.Product
	if p.Density == "" {
		return nil
	}
	var out []Finding
	if f, ok := k.density(at, p); ok {
		out = append(out, f)
	}
	if f, ok := k.weightForVolume(p); ok {
		out = append(out, f)
	}
	return append(out, k.oldDensity(a)...)
}

// density: the hydrometer says another strength than the label.
func (k *check) density(at int, p *dosing.Product) (Finding, bool) {
	x := &k.x.Product
	if !x.Density.Given {
		return Finding{}, false
	}
	kelvin := x.Kelvin.Or(293.15)
	gate, err := p.Density.CheckDelivery(p.Strength, x.Density.Value, kelvin)
	if err != nil || gate.Accept {
		return Finding{}, false
	}
	f := Finding{
		Code: StrengthDensity, Field: "strength", Value: dosing.Some(p.Strength), Weight: math.Pow(gate.Difference/0.005, 2),
		Cause: "is this " + p.Title + "?",
		Evidence: "its density is " + whole(x.Density.Value) + " kg/m3; at " + figures(kelvin-273.15, 2) + " °C " + figures(p.Strength*100, 3) +
			" % has " + whole(gate.Expected),
		Do: "stop the feed until a second hydrometer reading and the delivery note agree",
	}
	if !gate.HasFound || len(gate.Found.Others) > 0 {
		return f, true
	}
	found := gate.Found.Strength
	f.Meant = dosing.Some(found)
	f.Cause = "about " + figures(found*100, 2) + " % and not " + figures(p.Strength*100, 3) + " %: another strength in this tank?"
	times := found * x.Density.Value / (p.Strength * gate.Expected)
	f.Evidence += "; the same pump setting gives " + figures(times, 3) + " times the dose"
	if w, ok := k.with(at, times, k.last()); ok {
		f.Evidence += ", pH " + pH(w.PH)
	}
	if name := otherStrength(p, found); name != "" {
		f.Cause = "about " + figures(found*100, 2) + " % and not " + figures(p.Strength*100, 3) + " %: is " + name + " in this tank?"
	}
	return f, true
}

// otherStrength names a catalogue product of the same substance with a strength.
func otherStrength(p *dosing.Product, strength float64) string {
	for _, q := range dosing.Products() {
		if q.Chemical.Formula == p.Chemical.Formula && q.Density == p.Density && q.Name != p.Name && math.Abs(q.Strength/strength-1) < 0.05 {
			return q.Name
		}
	}
	return ""
}

// weightForVolume: per cent by weight taken for grams in 100 mL.
func (k *check) weightForVolume(p *dosing.Product) (Finding, bool) {
	found, err := p.Density.At(p.Strength, 293.15)
	if err != nil || p.Stated != dosing.ByWeight || found.KgPerM3 < 1100 {
		return Finding{}, false // under a tenth between the two: nothing to tell
	}
	right := p.Strength * found.KgPerM3 // kg/m3 = g/L
	wrong := p.Strength * 1000
	f := Finding{
		Code: WeightForVolume, Field: "strength", Value: dosing.Some(p.Strength), Meant: dosing.Some(p.Strength),
		Cause: "by weight or g/L? " + figures(p.Strength*100, 3) + " % by weight is " + whole(right) + " g/L, not " + whole(wrong),
		Do:    "use the density in the sum: g/L = 10 x per cent by weight x specific gravity",
	}
	if v := k.x.Product.ActivePerVolume; v.Given && math.Abs(v.Value/right-1) > activeWithin && math.Abs(v.Value/wrong-1) < sameFigure {
		f.Evidence = "the sums at hand use " + whole(v.Value) + " g/L"
		f.Weight = math.Pow((v.Value/right-1)/0.02, 2)
		return f, true
	}
	at := k.station()
	if k.r == nil || !k.x.Pump.Set.Given || !k.r.Stations[at].Feed.HasVolume {
		return Finding{}, false
	}
	need := k.r.Stations[at].Feed.VolumePerSecond
	over := k.x.Pump.Set.Value / need
	if need > 0 && math.Abs(over/(found.KgPerM3/1000)-1) < sameFigure && over > 1+activeWithin {
		f.Field, f.Code = "strength", WeightForVolume
		f.Evidence = "the pump is set to " + figures(over, 3) + " times the volume needed, which is the specific gravity"
		f.Weight = math.Pow((over-1)/0.03, 2)
		return f, true
	}
	return Finding{}, false
}

// oldDensity: a density measured on another lot, or at quite another
// temperature, is used for the present one.
func (k *check) oldDensity(a *dosing.Addition) []Finding {
	x := &k.x.Product
	if !a.Feed.Density.Given || x.DensityAt.IsZero() {
		return nil
	}
	f := Finding{Code: DensityOld, Field: "density", Value: a.Feed.Density, Do: "take a sample, read hydrometer and thermometer, enter both with the date"}
	if !x.LotAt.IsZero() && x.DensityAt.Before(x.LotAt) {
		f.Cause = "an old density for a new lot?"
		f.Evidence = "it was measured " + x.DensityAt.Format("2 Jan 2006") + "; the lot in the tank came " + x.LotAt.Format("2 Jan 2006")
		return []Finding{f}
	}
	if now := a.Feed.ProductKelvin; now.Given && x.Kelvin.Given && math.Abs(now.Value-x.Kelvin.Value) > warmer {
		f.Cause = "a density of another temperature?"
		f.Evidence = "it was measured at " + whole(x.Kelvin.Value-273.15) + " °C, the tank is at " + whole(now.Value-273.15) + " °C"
		return []Finding{f}
	}
	return nil
}
