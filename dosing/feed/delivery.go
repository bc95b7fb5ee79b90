package feed

import "math"

// Load is a delivery as on the note: its mass or its volume, and the density.
type Load struct {
	Mass    float64 // kg; 0 where the volume is given
	Volume  float64 // m3; 0 where the mass is given
	KgPerM3 float64 // 500 to 3000
}

// Room says whether a load fits.
type Room struct {
	Volume float64 // m3 of the load
	Space  float64 // m3 free below the fill mark
	After  float64 // m3 in the store when all of it is in
	Over   float64 // m3 that do not fit
	Codes  []string
}

// Takes works out whether a load fits into a store (Full must be known). The
// error is *BadInput of field "tank", "load" or "density".
func (t Tank) Takes(l Load) (Room, error) {
	if err := t.check(); err != nil {
		return Room{}, err
	}
	if !(t.Full > 0) {
		return Room{}, &BadInput{Field: "tank", Value: t.Full, Low: 0, High: math.MaxFloat64}
	}
	volume, err := l.volume()
	if err != nil {
		return Room{}, err
	}
	r := Room{Volume: volume, Space: max(t.Full-t.Volume, 0), After: t.Volume + volume}
	r.Over = max(r.Volume-r.Space, 0)
	if r.Over > rounding*r.Volume {
		r.Codes = append(r.Codes, CodeLoadDoesNotFit)
	} else {
		r.Over = 0
	}
	if t.Volume > t.Full*(1+rounding) {
		r.Codes = append(r.Codes, CodeStoreOverFull)
	}
	return r, nil
}

func (l Load) volume() (float64, error) {
	if !(l.KgPerM3 >= leastDensity && l.KgPerM3 <= greatestDensity) {
		return 0, &BadInput{Field: "density", Value: l.KgPerM3, Low: leastDensity, High: greatestDensity}
	}
	given := l.Mass
	if l.Mass > 0 == (l.Volume > 0) || l.Mass < 0 || l.Volume < 0 || math.IsInf(l.Mass+l.Volume, 0) || math.IsNaN(l.Mass+l.Volume) {
		return 0, &BadInput{Field: "load", Value: given, Low: 0, High: math.MaxFloat64}
	}
	if l.Volume > 0 {
		return l.Volume, nil
	}
	return l.Mass / l.KgPerM3, nil
}

// Storage is how long a store lasts and how it compares with what is asked of
// stores.
type Storage struct {
	Seconds     float64 // from what is in it now
	FullSeconds float64 // from full; 0 where Full is not known
	Loads       float64 // usable volume over one load; 0 without a load
	OrderIn     float64 // s until an order must go out for the load to come in time; below 0 it is late
	Codes       []string
}

// Keeps tells how long a store feeds a mean rate (m3/s, above 0). lead is the
// time from order to delivery, s; load one delivery in m3, 0 where not known.
// The error is *BadInput of field "tank", "feed", "lead" or "load".
func (t Tank) Keeps(rate, lead, load float64) (Storage, error) {
	if err := t.check(); err != nil {
		return Storage{}, err
	}
	for _, f := range []struct {
		field   string
		value   float64
		allowed bool
	}{{"feed", rate, rate > 0}, {"lead", lead, lead >= 0}, {"load", load, load >= 0}} {
		if !f.allowed || math.IsInf(f.value, 0) {
			return Storage{}, &BadInput{Field: f.field, Value: f.value, Low: 0, High: math.MaxFloat64}
		}
	}
	s := Storage{Seconds: max(t.Volume-t.Heel, 0) / rate}
	s.OrderIn = s.Seconds - lead
	if t.Full > 0 {
		usable := max(t.Full-t.Heel, 0)
		s.FullSeconds = usable / rate
		if s.FullSeconds < storageSeconds {
			s.Codes = append(s.Codes, CodeStorageUnder30)
		}
		if load > 0 {
			s.Loads = usable / load
			if s.Loads < storageLoads {
				s.Codes = append(s.Codes, CodeStorageUnder1p5)
			}
		}
	}
	return s, nil
}

// densityWithin is how far the density of a delivery may be from the note's
// (common practice, no source): hydrometer, sample and lot together.
const densityWithin = 0.02

// Gate is the check of a sample before the hose goes on.
type Gate struct {
	Expected   float64 // kg/m3 for the note's strength at the sample's temperature
	Difference float64 // measured over expected, less one
	Accept     bool
	Found      Strength // what the density says, where the table tells; see HasFound
	HasFound   bool
	Codes      []string
}

// CheckDelivery compares the density of a sample (kg/m3, at K) with the strength
// on the delivery note (kg/kg) of a product of this table. A difference of over
// 2 % is not the product or the strength on the note: stop. Errors: *BadInput,
// *OutOfTable for a strength that the table does not reach.
func (d Density) CheckDelivery(strength, kgPerM3, kelvin float64) (Gate, error) {
	if !(kgPerM3 >= leastDensity && kgPerM3 <= greatestDensity) {
		return Gate{}, &BadInput{Field: "density", Value: kgPerM3, Low: leastDensity, High: greatestDensity}
	}
	at, err := d.atTemperature(strength, kelvin)
	if err != nil {
		return Gate{}, err
	}
	g := Gate{Expected: at.KgPerM3, Difference: kgPerM3/at.KgPerM3 - 1}
	g.Accept = math.Abs(g.Difference) <= densityWithin
	if !g.Accept {
		g.Codes = append(g.Codes, CodeDensityOff)
	}
	if !at.AtTemperature {
		g.Codes = append(g.Codes, CodeDensityAt20C)
	}
	if found, err := d.StrengthAt(kgPerM3, kelvin); err == nil {
		g.Found, g.HasFound = found, true
	}
	return g, nil
}
