package dosing

import (
	"errors"
	"math"
	"slices"
	"testing"

	"beckline/dosing/feed"
)

// catalogue is the promised list of names, in order.
var catalogue = []string{
	"caustic-25", "caustic-50", "potassium-hydroxide-45", "lime", "quicklime", "magnesium-hydroxide-60", "soda-ash",
	"soda-ash-10", "bicarbonate", "carbon-dioxide", "sulfuric-93", "sulfuric-98", "hydrochloric-32", "hydrochloric-37",
	"nitric-60", "phosphoric-75", "acetic-80", "formic-85", "citric-50", "alum-dry", "alum-liquid",
	"ferric-chloride-40", "ferric-sulfate-43", "pacl-10", "chlorine-gas", "hypochlorite-12", "calcium-hypochlorite-65",
	"ammonia-19", "ammonium-sulfate-40", "hydrofluorosilicic-23", "sodium-fluoride", "sodium-silicate",
}

func TestCatalogue(t *testing.T) {
	var names []string
	for _, p := range Products() {
		names = append(names, p.Name)
		if p.Title == "" || p.StrengthText == "" || p.Caution == "" || p.Purpose == 0 || p.Chemical.MolarMass == 0 {
			t.Errorf("%s has an empty field: %+v", p.Name, p)
		}
		if !(p.Strength > 0 && p.Strength <= 1) || !(p.StatedStrength > 0 && p.StatedStrength <= 1) {
			t.Errorf("%s: strength %g, stated %g", p.Name, p.Strength, p.StatedStrength)
		}
		switch p.Form {
		case feed.Liquid:
			found, err := p.Density.At(p.Strength, 293.15)
			if err != nil || found.Source == "" || found.BeyondTable {
				t.Errorf("%s: density %+v, %v", p.Name, found, err)
			}
		case feed.Solid, feed.Gas:
			if p.Density != "" {
				t.Errorf("%s has a density table", p.Name)
			}
		default:
			t.Errorf("%s: form %d", p.Name, p.Form)
		}
		assumed := slices.Contains(p.Warns, "purity_assumed")
		if want := p.Form == feed.Solid && p.Strength == 1; assumed != want {
			t.Errorf("%s: purity assumed %v, want %v", p.Name, assumed, want)
		}
		if found, ok := ProductByName(p.Name); !ok || found.Title != p.Title {
			t.Errorf("%s is not found by its name", p.Name)
		}
	}
	if !slices.Equal(names, catalogue) {
		t.Errorf("names\n%v\nwant\n%v", names, catalogue)
	}
	if _, ok := ProductByName("caustic"); ok {
		t.Error("half a name was taken for a product")
	}
}

// What a caller does to a product it was given stays with that caller.
func TestCatalogueIsNotShared(t *testing.T) {
	spoil := func(p Product) {
		for i := range p.Chemical.Bases {
			p.Chemical.Bases[i].Mass = -1
		}
		for i := range p.Warns {
			p.Warns[i] = "spoilt"
		}
	}
	for _, p := range Products() {
		spoil(p)
		again, _ := ProductByName(p.Name)
		spoil(again)
		if other, err := again.AtStrength(again.StatedStrength); err == nil {
			spoil(other)
		}
	}
	for _, c := range Chemicals() {
		spoil(Product{Chemical: c})
		again, _ := ChemicalByFormula(c.Formula)
		spoil(Product{Chemical: again})
	}
	for _, p := range Products() {
		for _, b := range p.Chemical.Bases {
			if b.Mass < 0 {
				t.Errorf("%s: basis %s was changed from outside", p.Name, b.Name)
			}
		}
		if slices.Contains(p.Warns, "spoilt") {
			t.Errorf("%s: its warnings were changed from outside", p.Name)
		}
	}
}

// A strength stated anew leaves the product that it came from as it was.
func TestAtStrengthCopies(t *testing.T) {
	p, _ := ProductByName("alum-liquid")
	other, err := p.AtStrength(0.4)
	if err != nil {
		t.Fatal(err)
	}
	other.Chemical.Bases[0].Mass = -1
	if p.Chemical.Bases[0].Mass < 0 {
		t.Error("the first product changed with the second")
	}
}

// Numbers of the list: 125 g/L as chlorine and 5 g/L of excess caustic; 65 % as
// chlorine; alum at 48.5 % as the hydrate, which is 8.2 % Al2O3.
func TestStrengthsStatedOtherwise(t *testing.T) {
	p, _ := ProductByName("hypochlorite-12")
	found, err := p.Density.At(p.Strength, 293.15)
	if err != nil {
		t.Fatal(err)
	}
	pure := p.Strength * found.KgPerM3 / p.Chemical.MolarMass // kmol/m3 of NaOCl
	if got := pure * 70.906; math.Abs(got-125) > 1e-9 {
		t.Errorf("hypochlorite holds %g g/L as chlorine", got)
	}
	if got := (p.Chemical.Equivalents - 1) * pure * 39.997; math.Abs(got-5) > 1e-9 {
		t.Errorf("hypochlorite holds %g g/L of excess caustic", got)
	}
	p, _ = ProductByName("calcium-hypochlorite-65")
	if got := p.Strength / p.Chemical.MolarMass * p.Chemical.Bases[0].Mass; math.Abs(got-0.65) > 1e-12 {
		t.Errorf("calcium hypochlorite holds %g of chlorine", got)
	}
	p, _ = ProductByName("alum-liquid")
	if got := p.Strength / p.Chemical.MolarMass * 101.961; math.Abs(got-0.0825) > 0.0001 {
		t.Errorf("liquid alum holds %g Al2O3", got)
	}
}

func TestAtStrength(t *testing.T) {
	lime, _ := ProductByName("lime")
	weaker, err := lime.AtStrength(0.92)
	if err != nil || weaker.Strength != 0.92 || weaker.StrengthText != "92 % by weight" || len(weaker.Warns) != 0 {
		t.Errorf("lime of 92 %%: %+v, %v", weaker, err)
	}
	if again, _ := ProductByName("lime"); len(again.Warns) != 1 || len(lime.Warns) != 1 {
		t.Error("another strength changed the catalogue")
	}
	bleach, _ := ProductByName("hypochlorite-12")
	weak, err := bleach.AtStrength(0.10)
	if err != nil {
		t.Fatal(err)
	}
	found, _ := weak.Density.At(weak.Strength, 293.15)
	pure := weak.Strength * found.KgPerM3 / weak.Chemical.MolarMass
	if math.Abs(pure*70.906-100) > 1e-9 || math.Abs((weak.Chemical.Equivalents-1)*pure*39.997-5) > 1e-9 {
		t.Errorf("10 %% trade: %g g/L chlorine, %g eq a mole", pure*70.906, weak.Chemical.Equivalents)
	}
	if same, err := bleach.AtStrength(bleach.StatedStrength); err != nil || same.Strength != bleach.Strength || same.StrengthText != bleach.StrengthText {
		t.Errorf("its own strength changes hypochlorite: %+v, %v", same, err)
	}
}

func TestAtStrengthRefuses(t *testing.T) {
	for _, c := range []struct {
		product string
		stated  float64
	}{
		{"caustic-25", 0}, {"caustic-25", -0.1}, {"caustic-25", 1.2}, {"caustic-25", math.NaN()}, {"caustic-25", 0.55},
		{"lime", 1.01}, {"calcium-hypochlorite-65", 0.995}, {"hypochlorite-12", 0.25}, {"hypochlorite-12", math.NaN()},
	} {
		p, ok := ProductByName(c.product)
		if !ok {
			t.Fatal(c.product)
		}
		var problem *Problem
		if got, err := p.AtStrength(c.stated); !errors.As(err, &problem) || problem.Kind != BadInput || problem.Field != "strength" || problem.Accepted == "" {
			t.Errorf("%s at %g: %+v, %v", c.product, c.stated, got.Strength, err)
		}
	}
}

// Only what a works would feed to move the pH is offered as a way to a target.
func TestPurposes(t *testing.T) {
	for name, want := range map[string]Purpose{
		"caustic-50": PHControl, "carbon-dioxide": PHControl, "sulfuric-93": PHControl, "alum-liquid": Coagulation,
		"hypochlorite-12": Disinfection, "ammonia-19": Disinfection, "hydrofluorosilicic-23": Fluoridation,
		"phosphoric-75": Inhibitor, "nitric-60": Neutralisation, "citric-50": Neutralisation,
	} {
		if p, _ := ProductByName(name); p.Purpose != want {
			t.Errorf("%s: purpose %d, want %d", name, p.Purpose, want)
		}
	}
}
