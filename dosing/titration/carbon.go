package titration

import (
	"errors"
	"fmt"
	"math"

	"beckline/carbonate"
)

// Carbon is inorganic carbon found from a phenolphthalein titration.
type Carbon struct {
	DIC   float64 // mol/L
	PH    float64 // that the water then has at its temperature
	Notes []Note
}

// phSame is how far a measured pH may be from the one that follows (common
// practice, no source: the reproducibility of a pH).
const phSame = 0.1

// CarbonFromP finds the inorganic carbon of a water above pH 8.3 from its
// phenolphthalein alkalinity, eq/L: the acid that brings it down to pH 8.3. In a
// water above pH 10.5 most of the alkalinity is hydroxide and the carbon found
// from pH and total alkalinity hangs on the pH's last digits; that found from two
// titrations does not. At the end point the water has w.Alkalinity - p, and
// alkalinity at a pH rises strictly with carbon, so there is one answer.
//
// w holds the other totals, the total alkalinity as titrated, the background
// and the temperature of the titration; its carbon is not used. The titrant's
// anion counts in the ionic strength, its dilution does not. measuredPH is
// compared with what follows, 0 where there is none. Errors: *Error.
func CarbonFromP(w carbonate.Water, p, measuredPH float64) (Carbon, error) {
	if e := within("p-alkalinity", AsCaCO3(p), 0, greatestAlk, true, "mg/L as CaCO3"); e != nil {
		return Carbon{}, e
	}
	if p > w.Alkalinity*(1+samePartRel) {
		return Carbon{}, &Error{CodePAboveTotal, "p-alkalinity", milligrams(p),
			"at most the total, " + milligrams(w.Alkalinity) + "; are the two swapped?"}
	}
	k, err := carbonate.ConstantsAt(w.Kelvin)
	if err != nil {
		return Carbon{}, modelError(err, w)
	}
	dic, err := carbonAtEndPoint(k, w, p)
	if err != nil {
		return Carbon{}, err
	}
	w.Totals[carbonate.Carbon] = dic
	s, err := k.Solve(w)
	if err != nil {
		return Carbon{}, modelError(err, w)
	}
	c := Carbon{DIC: dic, PH: s.PH}
	if measuredPH != 0 && math.Abs(measuredPH-s.PH) > phSame {
		c.Notes = append(c.Notes, Note{CodePHDisagrees, "ph",
			fmt.Sprintf("the two titrations give pH %.2f, the meter %.2f: check the meter on a high buffer", s.PH, measuredPH)})
	}
	return c, nil
}

// carbonAtEndPoint finds the carbon at which the titrated water has what is left
// of its alkalinity at pH 8.3, by halving: a bench figure is no inner loop.
func carbonAtEndPoint(k *carbonate.Constants, w carbonate.Water, p float64) (float64, error) {
	left := w.Alkalinity - p
	w.Totals[carbonate.Chloride] += p
	excess := func(dic float64) (float64, error) {
		w.Totals[carbonate.Carbon] = dic
		a, err := k.AlkalinityAt(phenolPH, w)
		return a - left, err
	}
	low, high := 0.0, max(w.Alkalinity, 1e-6)
	at, err := excess(low)
	if err != nil {
		return 0, modelError(err, w)
	}
	if at > 1e-12 {
		return 0, &Error{CodePContradicts, "p-alkalinity", milligrams(p) + " of " + milligrams(w.Alkalinity),
			"at most " + milligrams(max(w.Alkalinity-at-left, 0)) + ": what the water has at pH 8.3 without any carbon is more than the rest"}
	}
	over, err := excess(high)
	for ; err == nil && over < 0; over, err = excess(high) {
		low, high = high, 2*high
	}
	if err != nil {
		return 0, modelError(err, w)
	}
	for range 200 {
		mid := 0.5 * (low + high)
		if high-low <= 1e-15*high || mid <= low || mid >= high {
			break
		}
		v, err := excess(mid)
		if err != nil {
			return 0, modelError(err, w)
		}
		if v < 0 {
			low = mid
		} else {
			high = mid
		}
	}
	return 0.5 * (low + high), nil
}

// modelError says in bench words what the model refused.
func modelError(err error, w carbonate.Water) *Error {
	var out *carbonate.RangeError
	switch {
	case errors.Is(err, carbonate.ErrChlorineWithAmmonia):
		return &Error{"chlorine_with_ammonia", "free-chlorine", "free chlorine and ammonia", "one of the two"}
	case errors.As(err, &out) && out.Quantity == "temperature":
		return withinCelsius("temperature", w.Kelvin)
	case errors.As(err, &out) && out.Quantity == "ionic strength":
		return &Error{CodeOutsideRange, "ionic strength", short(out.Value) + " mol/L", "0 to 0.5 mol/L"}
	case errors.As(err, &out):
		return &Error{CodeOutsideRange, out.Quantity, short(out.Value), short(out.Low) + " to " + short(out.High)}
	}
	return &Error{"solver_failed", "alkalinity", err.Error(), ""}
}
