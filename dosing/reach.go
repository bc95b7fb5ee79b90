package dosing

import "beckline/carbonate"

// Hard stops on a dose, kg/m3 of the chemical (common practice, no source): a
// number beyond them is a slip of the pen, not a dose.
const (
	greatestAny       = 10.0
	greatestCoagulant = 0.5
	greatestChlorine  = 0.05 // as Cl2

	// slurryHighPH: magnesium hydroxide stalls near pH 10 (common practice, no
	// source), so it is not offered for a target close to that.
	slurryHighPH = 9.5
)

// GreatestDose is the largest dose of a product that is accepted or looked at,
// mol/L of its chemical's formula.
func GreatestDose(p Product) float64 {
	c := &p.Chemical
	switch {
	case c.Coagulant != NotCoagulant:
		return greatestCoagulant / c.MolarMass
	case c.Adds[carbonate.Chlorine] > 0:
		return greatestChlorine / (c.Adds[carbonate.Chlorine] * carbonate.Chlorine.MolarMass())
	}
	return greatestAny / c.MolarMass
}

// couldReach names the pH-control products that would reach the target in the
// place of the one that does not, one a chemical, in the order of the catalogue.
func (r *run) couldReach() []string {
	var names []string
	seen := map[string]bool{r.c.Additions[r.solved].Product.Chemical.Formula: true}
	for _, p := range Products() {
		if p.Purpose != PHControl || seen[p.Chemical.Formula] {
			continue
		}
		seen[p.Chemical.Formula] = true
		if p.Chemical.Formula == "Mg(OH)2" && r.c.Target.Kind == TargetPH && r.c.Target.Value > slurryHighPH {
			continue
		}
		s, problem := r.search(p)
		if problem != nil {
			continue
		}
		s.most = min(s.most, s.plausible(&p))
		s.onlyDirect = true
		if _, problem := s.find(); problem == nil {
			names = append(names, p.Name)
		}
	}
	return names
}

// plausible bounds the doses that are offered: five times what would neutralise
// or double the water's own carbon and alkalinity, and at least the use level.
func (s *search) plausible(p *Product) float64 {
	w := &s.base.Water
	return max(useLevel/p.Chemical.MolarMass, 5*(w.Totals[carbonate.Carbon]+max(w.Alkalinity, -w.Alkalinity)))
}
