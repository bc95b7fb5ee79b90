package working

import "beckline/dosing"

const litresPerHour = 3.6e6 // of 1 m3/s

// feeds works the feeds of the doses that were asked for. dose is the name under
// which the sheet has each.
func (b *builder) feeds(r *dosing.Result) {
	for _, st := range r.Doses() {
		b.feed(r, st)
	}
}

func (b *builder) feed(r *dosing.Result, st *dosing.Station) {
	p := &st.Addition.Product
	c := &p.Chemical
	f := &st.Feed
	b.section("7  FEED OF "+upper(p.Title), "")
	b.given("d", "dose, from above", st.Dose, molar, "")
	mass := factor(c.MolarMass)
	b.step("mg_d", "dose", "d * "+mass+" * 1000", "mg/L as "+c.Formula, mass+" g/mol", f.PureMass*1000)
	b.given("s", "strength", p.Strength, "kg/kg", p.StrengthText)
	b.step("mg_p", "dose of product as delivered", "mg_d / s", "mg/L", "", f.ProductMass*1000)
	if !f.HasFlow {
		return
	}
	b.given("Q", "flow of water", r.Case.Readings.Flow.Value*3600, "m3/h", "reading")
	b.step("kg_d", "product a day", "mg_p * Q * 24 / 1000", "kg/d", "1 mg/L is 1 g/m3", f.MassPerSecond*86400)
	if !f.HasVolume {
		return
	}
	b.given("rho", "density of the product", f.Density, "kg/m3", f.DensitySource)
	b.step("L_h", "product by volume", "kg_d / rho * 1000 / 24", "L/h", "", f.VolumePerSecond*litresPerHour)
	b.step("mL_min", "the same, in a drawdown", "L_h * 1000 / 60", "mL/min", "", f.VolumePerSecond*6e7)
	if f.HasPump {
		b.given("pump", "output of the pump at 100 %", st.Addition.Feed.PumpCapacity.Value*litresPerHour, "L/h", "given")
		b.step("pct", "pump setting", "L_h / pump * 100", "%", "", f.PumpFraction*100)
	}
}
