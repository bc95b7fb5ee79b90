package working

import "beckline/dosing"

// Of writes the worked sheet of a result. The error is a *dosing.Problem of code
// "working_failed": a line of the sheet did not give the number of the answer,
// which is then not to be trusted.
func Of(r *dosing.Result) (Sheet, error) {
	b := builder{names: map[string]float64{}}
	b.raw(r)
	b.train(r)
	b.figures(r)
	b.feeds(r)
	if b.err != nil {
		return Sheet{}, b.err
	}
	return b.sheet, nil
}
