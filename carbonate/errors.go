package carbonate

import (
	"errors"
	"fmt"
)

// Errors that a caller can tell apart with errors.Is.
var (
	// ErrAlkalinityBelowPH: the hydroxide (and other bases) that the pH implies
	// already exceed the alkalinity, so inorganic carbon would be negative.
	ErrAlkalinityBelowPH = errors.New("carbonate: alkalinity is below what the pH implies")
	// ErrChlorineWithAmmonia: free chlorine and ammonia react at once, so a water
	// with both is not an equilibrium that this package describes.
	ErrChlorineWithAmmonia = errors.New("carbonate: free chlorine and ammonia in one water")
	// ErrOutOfReach: no amount of the reagent brings the water to the pH.
	ErrOutOfReach = errors.New("carbonate: pH out of reach of the reagent")
	// ErrNoConvergence: an iteration ended at its step limit. It has not been
	// seen on valid input; it exists so that no unfinished number is returned.
	ErrNoConvergence = errors.New("carbonate: iteration did not converge")
)

// RangeError reports a quantity outside the range in which the equations hold.
type RangeError struct {
	Quantity  string // "temperature", "ionic strength", "pH", or a component's name
	Value     float64
	Low, High float64 // accepted range, in the unit of Value (K, mol/L, pH)
}

func (e *RangeError) Error() string {
	return fmt.Sprintf("carbonate: %s %g is outside %g to %g", e.Quantity, e.Value, e.Low, e.High)
}
