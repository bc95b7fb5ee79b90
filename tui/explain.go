package tui

import (
	"beckline/dosing"
	"beckline/dosing/report"
)

// explanation says what a figure means, how it is found and where that is
// from.
type explanation struct{ means, formula, source string }

// explanations are by the key of the figure in the report.
var explanations = map[string]explanation{
	"ph": {"Acidity as a meter reads it: the activity of the hydrogen ion. One unit is a factor of ten.",
		"pH = -log a(H+)", "Standard Methods 4500-H+, from memory"},
	"alkalinity_mg_l_caco3": {"The acid that the water takes up until all carbonate is CO2. It adds up when waters mix or chemicals go in; pH does not.",
		"HCO3 + 2 CO3 + OH - H, with ion pairs and weak bases, in eq/L times 50 043 mg CaCO3", "Standard Methods 2320"},
	"temperature_c": {"Temperature of the water in the process; every constant depends on it.", "as entered", ""},
	"dic_mmol_l": {"All dissolved carbon dioxide, bicarbonate and carbonate together.",
		"from pH, alkalinity and temperature, or as measured", "constants: Plummer and Busenberg 1982"},
	"free_co2_mg_l": {"Dissolved carbon dioxide: what air strips and what caustic uses up first.",
		"a(CO2) = a(H+) a(HCO3-) / K1", "K1: Plummer and Busenberg 1982"},
	"ionic_strength_mol_l": {"How much salt shields the ions from each other; it sets the activity coefficients (Davies).",
		"1.6e-5 x conductivity in uS/cm, or 2.5e-5 x TDS in mg/L, or half the sum of c z2", "Snoeyink and Jenkins, Water Chemistry, from memory; Davies equation: Standard Methods 2330"},
	"saturation_index": {"Above 0 the water can deposit calcite, below 0 it dissolves it. It says which way, not how much.",
		"log( a(Ca) a(CO3) / K of calcite )", "Standard Methods 2330, from memory; K: Plummer and Busenberg 1982"},
	"saturation_index_aragonite": {"The same for aragonite, a form of calcium carbonate that dissolves a little more easily.",
		"log( a(Ca) a(CO3) / K of aragonite )", "K: Plummer and Busenberg 1982"},
	"ccpp_mg_l_caco3": {"How much calcium carbonate comes out (above 0) or would dissolve (below 0) until the index is 0.",
		"x that makes the index 0 when x of Ca and of carbon and 2 x of alkalinity are taken out", "Standard Methods 2330, from memory"},
	"buffer_intensity_meq_l_ph": {"How much strong base moves the pH by one. Little buffer: a small slip of dose moves the pH far.",
		"d alkalinity / d pH at constant totals", "textbook"},
	"chloride_sulfate_mass_ratio": {"Chloride over sulfate by mass, watched where lead and galvanic couples are.",
		"mg/L Cl / mg/L SO4", "classes: USGS SIR 2016-5092, as quoted"},
	"larson_ratio": {"Chloride and sulfate over alkalinity, watched where iron and steel are.",
		"(Cl + SO4) / alkalinity, all in meq/L", "Larson and Skold 1958"},
	"dose_mg_l": {"The mass of the chemical's own formula in a litre of water that brings the finished water to the target. It is checked by solving the finished water afresh.",
		"alkalinity at the target = alkalinity before + equivalents x dose", "the alkalinity balance; equivalents from the formula"},
	"product_mg_l": {"The same as product delivered.", "dose / strength", "operator arithmetic"},
	"pure_kg_d":    {"Mass of the pure chemical in a day.", "mg/L x m3/h x 24 / 1000", "the pounds formula in metric units: Pennsylvania DEP operator maths"},
	"feed_kg_d":    {"Mass of product in a day.", "pure mass / strength", "the same"},
	"feed_lb_d":    {"Mass of product in a day.", "mg/L x MGD x 8.34 / strength", "Pennsylvania DEP operator maths"},
	"feed_l_h":     {"Volume of product in an hour.", "mass / density at the product's temperature", "published density tables"},
	"feed_ml_min":  {"Volume of product in a minute, as a drawdown tube reads it.", "mass / density", "the same"},
	"feed_gal_h":   {"Volume of product in an hour, US gallons.", "mass / density; 1 US gallon = 3.785411784 L", "the same"},
	"pump_percent": {"Share of the pump's output at 100 %, which is best taken from a drawdown, not the nameplate.",
		"feed / output at 100 %", "operator arithmetic"},
}

// text is the explanation in lines.
func (e explanation) text() string {
	if e.means == "" {
		return "As entered, with what the chemicals on the line bring."
	}
	text := e.means + "\nFound by: " + e.formula + "."
	if e.source != "" {
		text += "\nSource: " + e.source + "."
	}
	return text
}

// showFigures lists every figure of the station walked to; the marked one is
// explained.
func (m *Model) showFigures() {
	st := m.station()
	s := m.water(st)
	if s == nil {
		m.note = "no figures for this station yet"
		return
	}
	var figures []report.Figure
	if s.Addition != nil && s.Addition.Process == dosing.ChemicalFeed && st.kind != finishedStation {
		figures = append(figures, report.Dose(s)...)
	}
	figures = append(figures, report.Water(&s.Figures)...)
	l := list{title: "figures of " + st.title, pick: func(*Model, string) {}}
	if m.old {
		l.title = "OLD figures of " + st.title
	}
	for _, f := range figures {
		if shown := f.ShowUnit(); shown != "-" {
			c := choice{name: f.Label, detail: shown}
			if !f.IsText {
				c.explain = explanations[f.Key].text()
			}
			l.all = append(l.all, c)
		}
	}
	m.openList(l, "")
}
