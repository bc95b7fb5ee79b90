package dosing

// Case is everything that a result depends on: readings, additions in the
// order in which the water meets them, and a target. All values are SI with
// amounts in mol/L.
type Case struct {
	Readings  Readings
	Sources   []Source // two or more waters blended into the raw water; Readings then gives the flow only
	Additions []Addition
	Target    Target
	Second    Target    // with two solved additions, the other figure that they must reach together
	TargetAt  int       // the station (1 for the first addition) whose water must meet the target; 0 for the finished water
	Notes     []Warning // what reading the input already found (unusual values, assumed bases)
}

// Readings is one sample as measured. Absent means not measured, never zero.
type Readings struct {
	PH              Optional // activity scale, 0 to 14
	PHKelvin        Optional // K, temperature at which the pH was read; default Kelvin
	Alkalinity      Optional // eq/L, total alkalinity
	Kelvin          Optional // K, process temperature, 273.15 to 323.15
	Flow            Optional // m3/s
	Calcium         Optional // mol/L
	Magnesium       Optional // mol/L
	CalciumHardness Optional // mol/L of Ca
	Hardness        Optional // mol/L of Ca + Mg
	Sulfate         Optional // mol/L, as are the following
	Chloride        Optional
	Sodium          Optional
	Potassium       Optional
	Nitrate         Optional
	Ammonia         Optional
	Phosphate       Optional
	Silica          Optional
	Boron           Optional
	Fluoride        Optional
	FreeChlorine    Optional // mol/L of Cl2
	Acetate         Optional
	Formate         Optional
	Citrate         Optional
	DIC             Optional // mol/L of C
	Conductivity    Optional // S/m at 25 C
	TDS             Optional // kg/m3
}

// Source is one water of a blend and its part of the flow.
type Source struct {
	Name     string
	Readings Readings
	Flow     Optional // m3/s, or parts of the whole in any one unit; all sources alike
}

// Addition is one step of the water's path: a chemical feed, or a process that
// exchanges carbon dioxide or calcite. For a feed exactly one of Dose, Residual
// and Solve applies.
type Addition struct {
	Process Process
	Product Product
	Dose    Optional // mol of the chemical's formula per litre of water
	Solve   bool     // the dose is what is asked for
	Feed    FeedSetup

	// Chlorine only. Demand is what the water reduces to chloride at once, mol/L
	// as Cl2; Residual is the free chlorine that must be left, mol/L as Cl2.
	Demand   Optional
	Residual Optional

	// Aeration only: the share of the excess CO2 that leaves, 0 to 1, or the pH
	// that was measured after it; and the air's CO2, atm, default carbonate.AirCO2.
	Share  Optional
	PH     Optional
	AirCO2 Optional
}

// Process says what an Addition does.
type Process int

// The processes.
const (
	ChemicalFeed       Process = iota
	Aeration                   // carbon dioxide exchanged with air at constant alkalinity
	LimestoneContactor         // calcite dissolved until the water is at SI 0
)

// FeedSetup is the equipment side of an addition.
type FeedSetup struct {
	ProductKelvin Optional // K, temperature of the product in its tank; default 293.15
	Density       Optional // kg/m3 of the product as measured in its tank; default the published table's
	PumpCapacity  Optional // m3/s at 100 %
	MaximumUse    Optional // kg of product per m3 of water, the certified maximum use level
}

// TargetKind says which figure of the finished water is asked for.
type TargetKind int

// The kinds of target.
const (
	NoTarget TargetKind = iota
	TargetPH
	TargetAlkalinity      // eq/L
	TargetSaturationIndex // calcite, dimensionless
	TargetCCPP            // mol/L of CaCO3
	TargetDIC             // mol/L of C, dissolved inorganic carbon
)

// Target is the figure that the solved addition must reach.
type Target struct {
	Kind  TargetKind
	Value float64
}
