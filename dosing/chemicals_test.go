package dosing

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"beckline/carbonate"
)

// atomicMass holds abridged standard atomic masses (IUPAC, from memory).
var atomicMass = map[string]float64{
	"H": 1.008, "C": 12.011, "N": 14.007, "O": 15.999, "F": 18.998, "Na": 22.990, "Mg": 24.305, "Al": 26.982,
	"Si": 28.085, "P": 30.974, "S": 32.06, "Cl": 35.453, "K": 39.098, "Ca": 40.078, "Fe": 55.845,
}

// gramsPerMole adds up a formula such as Al2(SO4)3.14.3H2O: what follows the
// first point is a number and what it multiplies.
func gramsPerMole(t *testing.T, formula string) float64 {
	t.Helper()
	if main, rest, ok := strings.Cut(formula, "."); ok {
		end := strings.IndexFunc(rest, func(r rune) bool { return r != '.' && (r < '0' || r > '9') })
		n, err := strconv.ParseFloat(rest[:end], 64)
		if err != nil {
			t.Fatalf("%s: %v", formula, err)
		}
		return gramsPerMole(t, main) + n*gramsPerMole(t, rest[end:])
	}
	var total float64
	for i := 0; i < len(formula); {
		var part float64
		if formula[i] == '(' {
			end := i + strings.IndexByte(formula[i:], ')')
			part = gramsPerMole(t, formula[i+1:end])
			i = end + 1
		} else {
			end := i + 1
			for end < len(formula) && formula[end] >= 'a' && formula[end] <= 'z' {
				end++
			}
			mass, ok := atomicMass[formula[i:end]]
			if !ok {
				t.Fatalf("%s: no element %q", formula, formula[i:end])
			}
			part, i = mass, end
		}
		digits := i
		for digits < len(formula) && formula[digits] >= '0' && formula[digits] <= '9' {
			digits++
		}
		if digits > i {
			n, _ := strconv.Atoi(formula[i:digits])
			part *= float64(n)
		}
		total, i = total+part, digits
	}
	return total
}

// Whatever a chemical adds to the alkalinity is the charge of what it adds: the
// proton condition's reference species and its inert ions balance each other.
func TestChargeIdentity(t *testing.T) {
	all := Chemicals()
	for _, p := range Products() {
		all = append(all, p.Chemical)
	}
	for _, c := range all {
		var charge float64
		for i, n := range c.Adds {
			if n < 0 {
				t.Errorf("%s takes away %g of %s", c.Name, -n, carbonate.Component(i).Name())
			}
			charge += n * carbonate.Component(i).ReferenceCharge()
		}
		if math.Abs(charge-c.Equivalents) > 1e-12 {
			t.Errorf("%s: %g eq a mole, its totals carry %g", c.Name, c.Equivalents, charge)
		}
		if c.Adds == (carbonate.Totals{}) {
			t.Errorf("%s adds nothing", c.Name)
		}
	}
}

// What a mole adds, by the reaction with water (textbook stoichiometry); the
// charge identity alone would let two errors cancel.
func TestTotalsAdded(t *testing.T) {
	const (
		na, k, ca, mg, c     = carbonate.Sodium, carbonate.Potassium, carbonate.Calcium, carbonate.Magnesium, carbonate.Carbon
		cl, so4, no3, p      = carbonate.Chloride, carbonate.Sulfate, carbonate.Nitrate, carbonate.Phosphate
		f, si, n, ocl        = carbonate.Fluoride, carbonate.Silica, carbonate.Ammonia, carbonate.Chlorine
		acetate, formate, ci = carbonate.Acetate, carbonate.Formate, carbonate.Citrate
	)
	want := map[string]carbonate.Totals{
		"NaOH": {na: 1}, "KOH": {k: 1}, "Ca(OH)2": {ca: 1}, "CaO": {ca: 1}, "Mg(OH)2": {mg: 1},
		"Na2CO3": {na: 2, c: 1}, "NaHCO3": {na: 1, c: 1}, "CO2": {c: 1}, "CaCO3": {ca: 1, c: 1},
		"H2SO4": {so4: 1}, "HCl": {cl: 1}, "HNO3": {no3: 1}, "H3PO4": {p: 1},
		"CH3COOH": {acetate: 1}, "HCOOH": {formate: 1}, "C6H8O7": {ci: 1},
		"Al2(SO4)3.14.3H2O": {so4: 3}, "FeCl3": {cl: 3}, "Fe2(SO4)3": {so4: 3}, "Al2O3": {cl: 1.5},
		"Cl2": {ocl: 1, cl: 1}, "NaOCl": {ocl: 1, cl: 1, na: 2}, "Ca(OCl)2": {ocl: 2, ca: 1},
		"NH3": {n: 1}, "(NH4)2SO4": {n: 2, so4: 1},
		"H2SiF6": {f: 6, si: 1}, "Na2SiF6": {f: 6, si: 1, na: 2}, "NaF": {f: 1, na: 1}, "Na2O.3.3SiO2": {na: 2, si: 3.3},
	}
	for _, c := range Chemicals() {
		if w, ok := want[c.Formula]; !ok || c.Adds != w {
			t.Errorf("%s adds %v, want %v", c.Formula, c.Adds, w)
		}
		delete(want, c.Formula)
	}
	if len(want) > 0 {
		t.Errorf("chemicals that are missing: %v", want)
	}
}

func TestMolarMasses(t *testing.T) {
	seen := map[string]bool{}
	for _, c := range Chemicals() {
		if seen[c.Formula] {
			t.Errorf("%s stands twice", c.Formula)
		}
		seen[c.Formula] = true
		want := gramsPerMole(t, c.Formula)
		if c.Formula == "Al2O3" {
			want /= 2 // stated per mole of aluminium
		}
		if math.Abs(c.MolarMass-want) > 1e-4*want {
			t.Errorf("%s: %g g/mol, from atomic masses %g", c.Formula, c.MolarMass, want)
		}
		found, ok := ChemicalByFormula(c.Formula)
		if !ok || found.Name != c.Name {
			t.Errorf("%s is not found by its formula", c.Formula)
		}
	}
	if _, ok := ChemicalByFormula("H2O"); ok {
		t.Error("water is no chemical of the table")
	}
}

// The mass of a basis is that of its formula times how many the chemical has.
func TestBases(t *testing.T) {
	count := map[string]float64{ // moles of the basis per mole of the chemical, by reaction
		"Ca(OH)2 CaO": 1, "CaO Ca(OH)2": 1, "HNO3 N": 1, "H3PO4 PO4": 1, "H3PO4 P": 1,
		"Al2(SO4)3.14.3H2O Al": 2, "Al2(SO4)3.14.3H2O Al2O3": 1, "FeCl3 Fe": 1, "Fe2(SO4)3 Fe": 2, "Al2O3 Al": 1,
		"NaOCl Cl2": 1, "Ca(OCl)2 Cl2": 2, "NH3 N": 1, "(NH4)2SO4 N": 2, "H2SiF6 F": 6, "Na2SiF6 F": 6, "NaF F": 1,
		"Na2O.3.3SiO2 SiO2": 3.3,
	}
	for _, c := range Chemicals() {
		for _, b := range c.Bases {
			key := c.Formula + " " + b.Name
			want := count[key] * gramsPerMole(t, b.Name)
			if math.Abs(b.Mass-want) > 1e-4*want {
				t.Errorf("%s: %g g, want %g", key, b.Mass, want)
			}
			delete(count, key)
		}
	}
	if len(count) > 0 {
		t.Errorf("bases that are missing: %v", count)
	}
}

// publishedRows reads a file of published check values as maps by column name.
func publishedRows(t *testing.T, file string) []map[string]string {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "testdata", file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var rows []map[string]string
	for _, cells := range lines[1:] {
		row := map[string]string{}
		for i, name := range lines[0] {
			row[name] = cells[i]
		}
		rows = append(rows, row)
	}
	return rows
}

// stated says how a published row names a chemical of ours: the formula, and
// the grams of what the row states per mole of it.
var stated = map[string]struct {
	formula string
	grams   float64
}{
	"Al2(SO4)3.14H2O":       {"Al2(SO4)3.14.3H2O", 342.132 + 14*18.015},
	"Al2(SO4)3.14.3H2O":     {"Al2(SO4)3.14.3H2O", 599.76},
	"dry alum rule":         {"Al2(SO4)3.14.3H2O", 599.76},
	"general hydrate x H2O": {"Al2(SO4)3.14.3H2O", 599.76}, // at x = 14.3
	"Al2(SO4)3 anhydrous":   {"Al2(SO4)3.14.3H2O", 342.132},
	"FeCl3 anhydrous":       {"FeCl3", 162.204},
	"FeCl3.6H2O":            {"FeCl3", 162.204 + 6*18.015},
	"Fe2(SO4)3.9H2O":        {"Fe2(SO4)3", 399.88 + 9*18.015},
	"Cl2, HOCl kept as free chlorine (only HCl counted)":   {"Cl2", 70.906},
	"per mg NaOCl, pure salt: weak base; residual as HOCl": {"NaOCl", 74.442},
	"CaO":                  {"CaO", 56.077},
	"Ca(OH)2":              {"Ca(OH)2", 74.093},
	"NaOH":                 {"NaOH", 39.997},
	"NaHCO3":               {"NaHCO3", 84.007},
	"Na2CO3":               {"Na2CO3", 105.988},
	"CaCO3":                {"CaCO3", 100.087},
	"Mg(OH)2":              {"Mg(OH)2", 58.320},
	"H2SO4 93.2 % (66 Be)": {"H2SO4", 98.079 / 0.932},
	"CO2":                  {"CO2", 44.009},
	"per mg F added":       {"H2SiF6", 6 * 18.998},
	"NH3 as molecule (base, all NH4+ at pH below 8)": {"NH3", 17.031},
	"per mg as N": {"NH3", 14.007},
	"(NH4)2SO4":   {"(NH4)2SO4", 132.14},
}

// noChemical lists published rows that are no chemical of ours, with the reason.
var noChemical = map[string]string{
	"ferrous sulfate":              "not sold as a product here: it must be oxidised first",
	"carbon dioxide, acidity":      "acidity, not alkalinity",
	"breakpoint chlorination":      "chlorine beyond chloramine is refused",
	"breakpoint chlorination rule": "chlorine beyond chloramine is refused",
	"chloride (as HCl formed)":     "an ion",
	"hydrogen ion":                 "an ion",
	"bicarbonate ion":              "an ion",
	"carbonate ion":                "an ion",
}

func TestPublishedStoichiometry(t *testing.T) {
	unused := map[string]bool{}
	for key := range stated {
		unused[key] = true
	}
	for _, row := range publishedRows(t, "stoichiometry.csv") {
		if noChemical[row["chemical"]] != "" {
			continue
		}
		basis := row["formula_basis"]
		s, ok := stated[basis]
		if !ok {
			t.Errorf("%s, %s: neither checked nor listed", row["chemical"], basis)
			continue
		}
		delete(unused, basis)
		c, ok := ChemicalByFormula(s.formula)
		if !ok {
			t.Fatalf("no chemical %s", s.formula)
		}
		got := c.Equivalents * 50.0435 / s.grams
		switch row["direction"] {
		case "consumes":
			got = -got
		case "adds", "none":
		default:
			t.Errorf("%s: direction %q", basis, row["direction"])
		}
		source := row["source"] + " (" + row["how"] + ")"
		// Printed factors have two decimals and agree among themselves within 0.01.
		if text := row["alkalinity_mg_as_CaCO3_per_mg_chemical"]; text != "" {
			if want, _ := strconv.ParseFloat(text, 64); math.Abs(got-want) > 0.0101 {
				t.Errorf("%s, %s: %.4f, published %g, %s", row["chemical"], basis, got, want, source)
			}
		}
		exact := row["exact_from_masses"]
		if exact == "300.3/(342.15 + 18.015 x)" {
			exact = strconv.FormatFloat(300.3/(342.15+18.015*14.3), 'f', 4, 64)
		}
		if exact != "" {
			// Three decimals, and atomic masses (or a strength of 93.2) of other editions.
			if want, _ := strconv.ParseFloat(exact, 64); math.Abs(got-want) > 0.0005+0.0005*want {
				t.Errorf("%s, %s: %.4f, from masses %g, %s", row["chemical"], basis, got, want, source)
			}
		}
	}
	for key := range unused {
		t.Errorf("%s: no published row of that basis", key)
	}
}

// Composition rows among the densities: fluoride in pure acid, and Al2O3 in
// liquid alum of a strength stated as dry alum.
func TestPublishedComposition(t *testing.T) {
	checked := 0
	for _, row := range publishedRows(t, "densities.csv") {
		want, _ := strconv.ParseFloat(row["value"], 64)
		var got, tolerance float64
		switch row["quantity"] {
		case "available fluoride":
			c, _ := ChemicalByFormula("H2SiF6")
			got, tolerance = c.Bases[0].Mass/c.MolarMass, 0.0001
		case "Al2O3":
			c, _ := ChemicalByFormula("Al2(SO4)3.14.3H2O")
			strength, _ := strconv.ParseFloat(row["concentration"], 64)
			got, tolerance = strength*c.Bases[1].Mass/c.MolarMass, 0.006 // two decimals, and 17 % rounded
		default:
			continue
		}
		checked++
		if math.Abs(got-want) > tolerance {
			t.Errorf("%s %s: %.4f, published %g, %s", row["substance"], row["concentration"], got, want, row["source"])
		}
	}
	if checked < 7 {
		t.Errorf("only %d rows of composition", checked)
	}
}
