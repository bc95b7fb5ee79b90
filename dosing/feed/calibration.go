package feed

import (
	"math"
	"slices"

	"gonum.org/v1/gonum/stat"
	"gonum.org/v1/gonum/stat/distuv"
)

// Codes of a calibration. Their bounds are common practice, no source.
const (
	CodeDrawdownShort   = "drawdown_too_short"      // a draw of under 20 s: the stopwatch is its largest error
	CodeRepeatsApart    = "repeats_apart"           // draws at one setting scatter by over 3 %
	CodeNotLinear       = "not_linear"              // a setting lies over 5 % of full output off the line
	CodeNotThroughZero  = "line_misses_zero"        // the line gives over 5 % of full output at a setting of nothing, and that is no scatter
	CodeStrokeUneven    = "stroke_not_proportional" // strokes differ by over 5 % in output per stroke and speed
	CodeOneSetting      = "one_setting"             // all draws at one setting: a straight line through zero is assumed
	CodeBeyondDrawn     = "beyond_drawdown"         // the setting lies outside of what was drawn
	CodeOutputDropped   = "output_dropped"          // over 10 % below the last calibration: air lock, worn valve, scale or crystals
	CodeStrokeOrSpeedAt = "knob_at_its_end"         // a knob stands below 10 % of its travel
)

const (
	shortestDraw   = 20.0 // s
	repeatsWithin  = 0.03
	linearWithin   = 0.05
	zeroWithin     = 0.05
	strokesWithin  = 0.05
	droppedBy      = 0.10
	sameSetting    = 1e-6
	leastOfAKnob   = 0.10
	confidence95   = 0.975 // upper point of a two-sided 95 % interval
	greatestVolume = 1e3   // m3; no calibration column is larger
)

// Drawdown is one timed draw out of a calibration column. A pump with one knob
// has the other at 1.
type Drawdown struct {
	Volume  float64 // m3, above 0
	Seconds float64 // s, above 0
	Stroke  float64 // share of the full stroke, above 0 to 1
	Speed   float64 // share of the full speed, above 0 to 1
}

// Rate is the output of the draw, m3/s.
func (d Drawdown) Rate() float64 { return d.Volume / d.Seconds }

// Setting is stroke times speed: a metering pump's output is the product of the
// two.
func (d Drawdown) Setting() float64 { return d.Stroke * d.Speed }

// Calibration is a pump as drawn down: output = Zero + Slope x stroke x speed.
type Calibration struct {
	Zero       float64 // m3/s that the line gives at a setting of nothing
	Slope      float64 // m3/s for stroke x speed = 1, above Zero
	ZeroError  float64 // standard errors; 0 where the draws cannot tell them
	SlopeError float64
	Scatter    float64 // m3/s, standard deviation of a draw about the line

	HasRepeats    bool
	Repeatability float64 // standard deviation of draws at one setting over their mean, all settings together
	Linearity     float64 // largest distance of a setting's mean from the line, over the full output
	Least, Most   float64 // smallest and largest stroke x speed drawn

	Draws []Drawn  // in the order given
	Codes []string // sorted

	mean, spread float64 // of the settings, for the error of the line
	freedom      int
}

// Drawn is one draw beside the line.
type Drawn struct {
	Drawdown
	Measured, Line float64 // m3/s
}

// Calibrate fits the line to draws by least squares. One setting alone gives a
// line through zero. The error is *BadInput: field "drawdown" for a volume or a
// time that cannot be, "stroke" and "speed", "drawdowns" where there are none
// or where the output falls with the setting.
func Calibrate(draws []Drawdown) (*Calibration, error) {
	if len(draws) == 0 {
		return nil, &BadInput{Field: "drawdowns", Value: 0, Low: 1, High: math.MaxInt32}
	}
	c := &Calibration{}
	var x, y []float64
	for _, d := range draws {
		if err := d.check(); err != nil {
			return nil, err
		}
		x, y = append(x, d.Setting()), append(y, d.Rate())
		if d.Seconds < shortestDraw {
			c.note(CodeDrawdownShort)
		}
	}
	c.Least, c.Most = slices.Min(x), slices.Max(x)
	c.line(x, y)
	if !(c.Slope > 0) {
		return nil, &BadInput{Field: "drawdowns", Value: c.Slope, Low: 0, High: math.MaxFloat64}
	}
	for i, d := range draws {
		c.Draws = append(c.Draws, Drawn{d, y[i], c.Zero + c.Slope*x[i]})
	}
	c.repeats(draws)
	c.straight(draws)
	c.strokes(draws)
	slices.Sort(c.Codes)
	return c, nil
}

func (d Drawdown) check() error {
	switch {
	case !(d.Volume > 0 && d.Volume <= greatestVolume):
		return &BadInput{Field: "drawdown", Value: d.Volume, Low: 0, High: greatestVolume}
	case !(d.Seconds > 0) || math.IsInf(d.Seconds, 0):
		return &BadInput{Field: "drawdown", Value: d.Seconds, Low: 0, High: math.MaxFloat64}
	}
	return knobs(d.Stroke, d.Speed)
}

func knobs(stroke, speed float64) error {
	if !(stroke > 0 && stroke <= 1) {
		return &BadInput{Field: "stroke", Value: stroke, Low: 0, High: 1}
	}
	if !(speed > 0 && speed <= 1) {
		return &BadInput{Field: "speed", Value: speed, Low: 0, High: 1}
	}
	return nil
}

func (c *Calibration) note(code string) {
	if !slices.Contains(c.Codes, code) {
		c.Codes = append(c.Codes, code)
	}
}

// line is ordinary least squares; standard errors from the scatter about it.
func (c *Calibration) line(x, y []float64) {
	n := float64(len(x))
	c.mean = stat.Mean(x, nil)
	for _, v := range x {
		c.spread += (v - c.mean) * (v - c.mean)
	}
	if c.Most-c.Least < sameSetting {
		c.note(CodeOneSetting)
		c.Slope = stat.Mean(y, nil) / c.mean
		c.spread = 0
		return
	}
	c.Zero, c.Slope = stat.LinearRegression(x, y, nil, false)
	c.freedom = len(x) - 2
	if c.freedom < 1 {
		return
	}
	sum := 0.0
	for i := range x {
		r := y[i] - c.Zero - c.Slope*x[i]
		sum += r * r
	}
	c.Scatter = math.Sqrt(sum / float64(c.freedom))
	c.SlopeError = c.Scatter / math.Sqrt(c.spread)
	c.ZeroError = c.Scatter * math.Sqrt(1/n+c.mean*c.mean/c.spread)
	// By more than its own 95 % interval, and enough to matter.
	student := distuv.StudentsT{Sigma: 1, Nu: float64(c.freedom)}.Quantile(confidence95)
	if math.Abs(c.Zero) > zeroWithin*(c.Zero+c.Slope) && math.Abs(c.Zero) > student*c.ZeroError {
		c.note(CodeNotThroughZero)
	}
}

// groups gathers draws by a key that they share.
func groups(draws []Drawdown, key func(Drawdown) float64) [][]Drawdown {
	var out [][]Drawdown
next:
	for _, d := range draws {
		for i := range out {
			if math.Abs(key(out[i][0])-key(d)) < sameSetting {
				out[i] = append(out[i], d)
				continue next
			}
		}
		out = append(out, []Drawdown{d})
	}
	return out
}

func meanRate(draws []Drawdown) float64 {
	sum := 0.0
	for _, d := range draws {
		sum += d.Rate()
	}
	return sum / float64(len(draws))
}

// repeats pools the relative scatter within settings (same stroke, same speed).
func (c *Calibration) repeats(draws []Drawdown) {
	sum, freedom := 0.0, 0
	for _, byStroke := range groups(draws, func(d Drawdown) float64 { return d.Stroke }) {
		for _, g := range groups(byStroke, func(d Drawdown) float64 { return d.Speed }) {
			mean := meanRate(g)
			for _, d := range g {
				r := d.Rate()/mean - 1
				sum += r * r
			}
			freedom += len(g) - 1
		}
	}
	if freedom == 0 {
		return
	}
	c.HasRepeats, c.Repeatability = true, math.Sqrt(sum/float64(freedom))
	if c.Repeatability > repeatsWithin {
		c.note(CodeRepeatsApart)
	}
}

// straight is the largest distance of a setting's mean from the line.
func (c *Calibration) straight(draws []Drawdown) {
	full := c.Zero + c.Slope
	for _, g := range groups(draws, Drawdown.Setting) {
		c.Linearity = max(c.Linearity, math.Abs(meanRate(g)-c.Zero-c.Slope*g[0].Setting())/full)
	}
	if c.Linearity > linearWithin {
		c.note(CodeNotLinear)
	}
}

// strokes compares output per stroke and speed between strokes: where they
// differ, the product of the two does not describe this pump.
func (c *Calibration) strokes(draws []Drawdown) {
	least, most := math.Inf(1), 0.0
	for _, g := range groups(draws, func(d Drawdown) float64 { return d.Stroke }) {
		sum := 0.0
		for _, d := range g {
			sum += (d.Rate() - c.Zero) / d.Setting()
		}
		v := sum / float64(len(g))
		least, most = min(least, v), max(most, v)
	}
	if most > least*(1+strokesWithin) {
		c.note(CodeStrokeUneven)
	}
}
