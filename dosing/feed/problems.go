package feed

import "fmt"

// BadInput is a value with which no feed can be worked out. Field is its name
// on the command line without dashes (dose, strength, product-temperature, flow,
// pump) or "form"; values in the unit of Input.
type BadInput struct {
	Field     string
	Value     float64
	Low, High float64 // what would be accepted
}

func (e *BadInput) Error() string {
	return fmt.Sprintf("feed: %s %g is not within %g to %g", e.Field, e.Value, e.Low, e.High)
}

// OutOfTable is a strength at which the density of a product is not published
// or not known here. All are kg of formula per kg of product.
type OutOfTable struct {
	Density  Density
	Strength float64
	High     float64 // densities are given from 0 to this strength; 0 where there is no such table
}

func (e *OutOfTable) Error() string {
	if e.High == 0 {
		return fmt.Sprintf("feed: no density table %q", string(e.Density))
	}
	return fmt.Sprintf("feed: the density of %s is known up to %.4g %%, not at %.4g %%",
		e.Density, e.High*100, e.Strength*100)
}

// TooSmall is a pump that cannot deliver the feed.
type TooSmall struct {
	Fraction float64 // of the pump's output at 100 %, above 1
	Needed   float64 // m3/s
	Capacity float64 // m3/s
}

func (e *TooSmall) Error() string {
	return fmt.Sprintf("feed: the pump would have to run at %.4g %% of its output", e.Fraction*100)
}
