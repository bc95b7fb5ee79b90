package dosing

// Optional is a number that may not have been measured or may not exist.
// Absent is never zero.
type Optional struct {
	Value float64
	Given bool
}

// Some wraps a number that is known.
func Some(v float64) Optional { return Optional{Value: v, Given: true} }

// None is the number that is not known.
var None = Optional{}

// Or returns the value, or the fallback where there is none.
func (o Optional) Or(fallback float64) float64 {
	if o.Given {
		return o.Value
	}
	return fallback
}
