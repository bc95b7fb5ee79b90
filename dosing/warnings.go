package dosing

import (
	"cmp"
	"slices"

	"beckline/carbonate"
)

// Bounds of the warnings. Those without a source are common practice.
const (
	testedLowPH, testedHighPH       = 4.3, 11.0
	scaleIndex                      = 0.5
	scaleCCPP                       = 15e-3 / carbonate.MolarMassCaCO3 // mol/L: 15 mg/L as CaCO3
	coagulationAlkalinity           = 10e-3 / carbonate.MolarMassCaCO3 // eq/L: 5 mg/L as CaCO3
	aluminiumLowPH, aluminiumHighPH = 5.5, 8.5                         // Al(OH)3 least soluble near 6 to 7
	ironLowPH                       = 5.0
	lowBuffer                       = 1e-4           // eq/L per pH
	useLevel                        = 0.1            // kg/m3 of a caustic or an acid where no certified level is entered
	hoclLow, hoclHigh               = 278.15, 308.15 // K, range of Morris's data
)

// warn looks along the line for what an operator must know.
func (r *run) warn() {
	r.warnWater(&r.res.Stations[0], "raw")
	for i := 1; i < len(r.res.Stations); i++ {
		st := &r.res.Stations[i]
		before := r.res.Stations[i-1].Figures.Water.Totals[carbonate.Monochloramine]
		if st.Figures.Water.Totals[carbonate.Monochloramine] > before {
			r.add(Warning{Code: "chloramine_formed", Field: st.Addition.Product.Name})
		}
		r.warnWater(st, st.Addition.Product.Name)
		r.warnAddition(st)
	}
	fin := r.res.Finished()
	if fin.Addition != nil && fin.Figures.BufferIntensity < lowBuffer {
		r.add(Warning{Code: "low_buffer", Value: fin.Figures.BufferIntensity, Limit: lowBuffer})
	}
}

func (r *run) add(w Warning) { r.warnings = append(r.warnings, w) }

func (r *run) warnWater(st *Station, where string) {
	f := &st.Figures
	if f.PH < testedLowPH || f.PH > testedHighPH {
		r.add(Warning{Code: "ph_outside_tested_range", Field: where, Value: f.PH})
	}
	if f.SaturationIndex.Value > scaleIndex || f.CCPP.Value > scaleCCPP {
		r.add(Warning{Code: "may_scale", Field: where, Value: f.SaturationIndex.Value, Limit: scaleIndex})
	}
	// More carbon dioxide than water holds under the pure gas cannot be in an open
	// sample: pH and alkalinity contradict each other.
	if f.FreeCO2 > r.k.Henry {
		r.add(Warning{Code: "co2_above_saturation", Field: where, Value: f.FreeCO2, Limit: r.k.Henry})
	}
	if f.Water.Totals[carbonate.Chlorine] > 0 && (f.Water.Kelvin < hoclLow || f.Water.Kelvin > hoclHigh) {
		r.add(Warning{Code: "chlorine_constant_extrapolated", Field: where, Value: f.Water.Kelvin})
	}
}

func (r *run) warnAddition(st *Station) {
	p := &st.Addition.Product
	chem := &p.Chemical
	f := &st.Figures
	name := p.Name
	for _, code := range st.Feed.Codes {
		w := Warning{Code: code, Field: name}
		if code == "product_may_freeze" && st.Feed.Freezing.Known {
			w.Limit = st.Feed.Freezing.Kelvin
		}
		r.add(w)
	}
	for _, code := range p.Warns {
		r.add(Warning{Code: code, Field: name})
	}
	if chem.Coagulant != NotCoagulant {
		if f.Alkalinity < coagulationAlkalinity {
			r.add(Warning{Code: "low_alkalinity_for_coagulation", Field: name, Value: f.Alkalinity, Limit: coagulationAlkalinity})
		}
		aluminium := chem.Coagulant == Aluminium && (f.PH < aluminiumLowPH || f.PH > aluminiumHighPH)
		if aluminium || chem.Coagulant == Iron && f.PH < ironLowPH {
			r.add(Warning{Code: "coagulant_ph_outside", Field: name, Value: f.PH})
		}
	}
	switch chem.Formula {
	case "Ca(OH)2", "CaO", "Mg(OH)2":
		r.add(Warning{Code: "taken_as_dissolved", Field: name})
	}
	if hasOrganics(&f.Water) && !r.known.organics {
		r.add(Warning{Code: "organic_acid_alkalinity", Field: name})
	}
	if most := st.Addition.Feed.MaximumUse; most.Given {
		if st.Feed.ProductMass > most.Value {
			r.add(Warning{Code: "over_use_level", Field: name, Value: st.Feed.ProductMass, Limit: most.Value})
		}
	} else if isCausticOrAcid(chem) && st.Feed.PureMass > useLevel {
		r.add(Warning{Code: "over_use_level", Field: name, Value: st.Feed.PureMass, Limit: useLevel})
	}
	if usual := usualDose(chem); st.Feed.PureMass > usual && (usual < useLevel || !isCausticOrAcid(chem)) {
		r.add(Warning{Code: "unusual_dose", Field: name, Value: st.Feed.PureMass, Limit: usual})
	}
}

// usualDoses are the doses, kg/m3 of the component that counts, above which a
// drinking-water plant would look twice.
var usualDoses = []struct {
	of   carbonate.Component
	most float64
}{
	{carbonate.Chlorine, 0.005},   // as Cl2; common practice, no source
	{carbonate.Fluoride, 0.0015},  // as F; WHO guideline value, from memory
	{carbonate.Ammonia, 0.002},    // as N; common practice, no source
	{carbonate.Phosphate, 0.0016}, // as P, 5 mg/L as PO4; common practice, no source
}

// usualDose is the dose above which a drinking-water plant would look twice,
// kg/m3 of the chemical.
func usualDose(c *Chemical) float64 {
	for _, u := range usualDoses {
		if n := c.Adds[u.of]; n > 0 {
			return u.most * c.MolarMass / (n * u.of.MolarMass())
		}
	}
	return useLevel
}

// isCausticOrAcid: hydroxides and acids proper, not carbonates, coagulants,
// chlorine, ammonia or fluorides, which have limits of their own kind.
func isCausticOrAcid(c *Chemical) bool {
	switch c.Formula {
	case "NaOH", "KOH", "Ca(OH)2", "CaO", "Mg(OH)2",
		"H2SO4", "HCl", "HNO3", "H3PO4", "CH3COOH", "HCOOH", "C6H8O7":
		return true
	}
	return false
}

// sortWarnings sorts by code, then field, and drops repeats.
func sortWarnings(ws []Warning) []Warning {
	slices.SortStableFunc(ws, func(a, b Warning) int {
		return cmp.Or(cmp.Compare(a.Code, b.Code), cmp.Compare(a.Field, b.Field))
	})
	return slices.CompactFunc(ws, func(a, b Warning) bool { return a.Code == b.Code && a.Field == b.Field })
}
