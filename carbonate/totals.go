package carbonate

// Component names one conserved total of a water.
type Component int

// The components, in the order of Totals. The first group takes part in acid
// and base equilibria or ion pairs; the second is inert and only carries charge.
const (
	Carbon Component = iota // dissolved inorganic carbon, reference species CO2
	Calcium
	Magnesium
	Sulfate        // reference SO4 2-
	Ammonia        // reference NH4 +
	Phosphate      // reference H2PO4 -
	Silica         // reference H4SiO4
	Boron          // reference B(OH)3
	Fluoride       // reference F -
	Chlorine       // free chlorine, reference HOCl
	Acetate        // reference CH3COOH
	Formate        // reference HCOOH
	Citrate        // reference H3Cit
	Sodium         // inert from here on
	Potassium      //
	Chloride       //
	Nitrate        //
	OtherHardness  // divalent cations of which only the sum is known: inert, no pairs
	Monochloramine // NH2Cl, formed from chlorine and ammonia: inert, uncharged
	Components     // how many there are
)

// Totals holds the concentration of each component, mol/L, each zero or more.
type Totals [Components]float64

// component facts: the formula that mg/L refers to, its molar mass in g/mol
// (IUPAC standard atomic masses, abridged), and the charge of the reference
// species, the one that the proton condition counts as zero.
type component struct {
	name      string
	formula   string
	molarMass float64
	charge    float64
}

var components = [Components]component{
	Carbon:         {"dissolved inorganic carbon", "C", 12.011, 0},
	Calcium:        {"calcium", "Ca", 40.078, 2},
	Magnesium:      {"magnesium", "Mg", 24.305, 2},
	Sulfate:        {"sulfate", "SO4", 96.06, -2},
	Ammonia:        {"ammonia", "N", 14.007, 1},
	Phosphate:      {"phosphate", "P", 30.974, -1},
	Silica:         {"silica", "SiO2", 60.083, 0},
	Boron:          {"boron", "B", 10.81, 0},
	Fluoride:       {"fluoride", "F", 18.998, -1},
	Chlorine:       {"free chlorine", "Cl2", 70.906, 0},
	Acetate:        {"acetate", "CH3COOH", 60.052, 0},
	Formate:        {"formate", "HCOOH", 46.025, 0},
	Citrate:        {"citrate", "C6H8O7", 192.12, 0},
	Sodium:         {"sodium", "Na", 22.990, 1},
	Potassium:      {"potassium", "K", 39.098, 1},
	Chloride:       {"chloride", "Cl", 35.453, -1},
	Nitrate:        {"nitrate", "NO3", 62.004, -1},
	OtherHardness:  {"hardness of unknown kind", "CaCO3", MolarMassCaCO3, 2},
	Monochloramine: {"monochloramine", "Cl2", 70.906, 0},
}

// Name returns the component's plain name.
func (c Component) Name() string { return components[c].name }

// Formula returns the formula whose mass a mg/L of the component means
// (nitrate as NO3, ammonia as N, silica as SiO2, ...).
func (c Component) Formula() string { return components[c].formula }

// MolarMass returns the mass of that formula in g/mol.
func (c Component) MolarMass() float64 { return components[c].molarMass }

// ReferenceCharge returns the charge of the species that the proton condition
// counts as zero alkalinity.
func (c Component) ReferenceCharge() float64 { return components[c].charge }

// Molar masses of the two formulas in which alkalinity and hardness are
// reported, g/mol.
const (
	MolarMassCaCO3 = 100.087
	MolarMassHCO3  = 61.017
)
