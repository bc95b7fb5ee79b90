package check

import (
	"fmt"
	"math"

	"beckline/carbonate"
)

// constantOf finds a constant by the name that the tables use; minus says that
// the table gives its negative logarithm.
var constantOf = map[string]struct {
	value func(*carbonate.Constants) float64
	minus bool
}{
	"pKsp calcite":               {func(k *carbonate.Constants) float64 { return k.Calcite }, true},
	"pKsp aragonite":             {func(k *carbonate.Constants) float64 { return k.Aragonite }, true},
	"log K CaHCO3+ association":  {func(k *carbonate.Constants) float64 { return k.CaHCO3 }, false},
	"log K CaCO3 aq association": {func(k *carbonate.Constants) float64 { return k.CaCO3 }, false},
	"pKH CO2 (mol/kg/atm)":       {func(k *carbonate.Constants) float64 { return k.Henry }, true},
	"pK1 carbonic":               {func(k *carbonate.Constants) float64 { return k.Carbonic1 }, true},
	"pK2 carbonic":               {func(k *carbonate.Constants) float64 { return k.Carbonic2 }, true},
	"pKw":                        {func(k *carbonate.Constants) float64 { return k.Water }, true},
	"pK HOCl":                    {func(k *carbonate.Constants) float64 { return k.HOCl }, true},
	"pKa NH4+":                   {func(k *carbonate.Constants) float64 { return k.Ammonium }, true},
	"pK1 phosphoric":             {func(k *carbonate.Constants) float64 { return k.Phosphoric[0] }, true},
	"pK2 phosphoric":             {func(k *carbonate.Constants) float64 { return k.Phosphoric[1] }, true},
	"pK3 phosphoric":             {func(k *carbonate.Constants) float64 { return k.Phosphoric[2] }, true},
	"pKa boric":                  {func(k *carbonate.Constants) float64 { return k.Boric }, true},
	"pKa1 silicic":               {func(k *carbonate.Constants) float64 { return k.Silicic }, true},
	"pK HF":                      {func(k *carbonate.Constants) float64 { return k.Fluoric }, true},
	"pKa acetic":                 {func(k *carbonate.Constants) float64 { return k.Acetic }, true},
	// The table's pK is that of HSO4- = H + SO4, the constant here that of the
	// reverse reaction.
	"pK2 sulfuric (HSO4-)": {func(k *carbonate.Constants) float64 { return k.HSO4 }, false},
}

func constant(r record) Outcome {
	o := Outcome{
		Name:      fmt.Sprintf("%s at %s C", r["quantity"], r["temperature_c"]),
		Unit:      "log10",
		Published: r.number("value"), Tolerance: r.number("tolerance"),
	}
	of, ok := constantOf[r["quantity"]]
	if !ok {
		o.Err = fmt.Errorf("check: unknown constant %s", r["quantity"])
		return o
	}
	k, err := carbonate.ConstantsAt(r.kelvin())
	if err != nil {
		o.Err = err
		return o
	}
	o.Value = math.Log10(of.value(k))
	if of.minus {
		o.Value = -o.Value
	}
	return o
}
