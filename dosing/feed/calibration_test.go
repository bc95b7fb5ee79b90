package feed

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

const (
	millilitre  = 1e-6                   // m3
	mlPerMinute = millilitre / minute    // m3/s
	litrePerH   = 1e-3 / 3600            // m3/s
	half, full  = 0.5, 1.0               // of a knob
	tenLitres   = 10.0 * litrePerH * 1.0 // m3/s
)

// drawn makes a drawdown of a rate.
func drawn(stroke, speed, rate, seconds float64) Drawdown {
	return Drawdown{Volume: rate * seconds, Seconds: seconds, Stroke: stroke, Speed: speed}
}

// A line without scatter comes back as it is, and so does the setting for a feed.
func TestCalibrationLine(t *testing.T) {
	var draws []Drawdown
	for _, s := range []float64{0.2, 0.4, 0.6, 0.8, 1} {
		draws = append(draws, drawn(1, s, litrePerH*(0.2+14.8*s), 60))
	}
	c, err := Calibrate(draws)
	if err != nil {
		t.Fatal(err)
	}
	if apart(c.Zero/litrePerH, 0.2, 1e-9) || apart(c.Slope/litrePerH, 14.8, 1e-9) || c.Linearity > 1e-9 || len(c.Codes) != 0 || c.HasRepeats {
		t.Errorf("%+v", c)
	}
	s, err := c.SettingFor(8*litrePerH, 1, 0.01)
	if err != nil || apart(s.Speed, (8-0.2)/14.8, 1e-9) || s.Rounded != 0.53 || apart(s.Off, (0.2+14.8*0.53)/8-1, 1e-6) || len(s.Codes) != 0 {
		t.Errorf("8 L/h: %+v, %v", s, err)
	}
	// Half the stroke needs twice the speed, less what the zero gives.
	if s, err = c.SettingFor(6*litrePerH, 0.5, 0); err != nil || apart(s.Speed, (6-0.2)/7.4, 1e-9) {
		t.Errorf("6 L/h at half stroke: %+v, %v", s, err)
	}
	var small *TooSmall
	if _, err := c.SettingFor(16*litrePerH, 1, 0.01); !errors.As(err, &small) || apart(small.Fraction, 16.0/15, 1e-9) {
		t.Errorf("16 L/h of a 15 L/h pump: %v", err)
	}
	if s, _ := c.SettingFor(1.0*litrePerH, 1, 0.01); !slices.Contains(s.Codes, CodePumpBelowTurndown) || !slices.Contains(s.Codes, CodeBeyondDrawn) {
		t.Errorf("1 L/h of a 15 L/h pump: %+v", s)
	}
	least, most, ratio, err := c.Range(1)
	if err != nil || apart(most/litrePerH, 15, 1e-9) || apart(least/litrePerH, 1.68, 1e-9) || apart(ratio, 15/1.68, 1e-9) {
		t.Errorf("range %g to %g L/h, %g", least/litrePerH, most/litrePerH, ratio)
	}
}

// 1 US gal/day is 2.629 mL/min: a drawdown in one unit is a feed in the other.
func TestDrawdownFactor(t *testing.T) {
	for _, row := range published(t, "feed.csv") {
		if row["case"] != "factor" || row["inputs"] != "1 US gal/day" {
			continue
		}
		d := Drawdown{Volume: gallon, Seconds: day, Stroke: 1, Speed: 1}
		want, tolerance := number(t, row["published_answer"]), number(t, row["tolerance_rel"])
		if got := d.Rate() / mlPerMinute; apart(got, want, tolerance) {
			t.Errorf("%g mL/min, published %g (%s)", got, want, row["source"])
		}
		return
	}
	t.Error("no such row")
}

func TestCalibrationFindings(t *testing.T) {
	straight := []Drawdown{drawn(1, 0.3, 4*litrePerH, 60), drawn(1, 0.6, 8*litrePerH, 60), drawn(1, 0.9, 12*litrePerH, 60)}
	for name, c := range map[string]struct {
		draws []Drawdown
		code  string
	}{
		"a draw of ten seconds": {append(slices.Clone(straight), drawn(1, 0.5, 20.0/3*litrePerH, 10)), CodeDrawdownShort},
		"repeats 10 % apart":    {append(slices.Clone(straight), drawn(1, 0.6, 8.8*litrePerH, 60)), CodeRepeatsApart},
		"bent at the top":       {append(slices.Clone(straight), drawn(1, 1, 11*litrePerH, 60)), CodeNotLinear},
		"leaks at standstill": {[]Drawdown{drawn(1, 0.2, 4.0*litrePerH, 60), drawn(1, 0.4, 6.01*litrePerH, 60), drawn(1, 0.6, 7.99*litrePerH, 60),
			drawn(1, 0.8, 10.0*litrePerH, 60)}, CodeNotThroughZero},
		"stroke not in step": {[]Drawdown{drawn(1, 0.5, 8*litrePerH, 60), drawn(1, 1, 16*litrePerH, 60), drawn(0.5, 1, 6*litrePerH, 60),
			drawn(0.5, 0.5, 3*litrePerH, 60)}, CodeStrokeUneven},
		"one setting": {[]Drawdown{drawn(1, 0.5, 8*litrePerH, 60), drawn(1, 0.5, 8.1*litrePerH, 60)}, CodeOneSetting},
	} {
		got, err := Calibrate(c.draws)
		if err != nil || !slices.Contains(got.Codes, c.code) {
			t.Errorf("%s: %+v, %v", name, got, err)
		}
	}
	sound, err := Calibrate(straight)
	if err != nil || len(sound.Codes) != 0 {
		t.Errorf("a sound pump: %v, %v", sound.Codes, err)
	}
	worn, _ := Calibrate([]Drawdown{drawn(1, 0.3, 3.4*litrePerH, 60), drawn(1, 0.6, 6.8*litrePerH, 60)})
	if change, code := worn.Against(sound); apart(change, -0.15, 1e-6) || code != CodeOutputDropped {
		t.Errorf("15 %% less: %g %q", change, code)
	}
	if change, code := sound.Against(worn); change < 0 || code != "" {
		t.Errorf("more than last time: %g %q", change, code)
	}
}

// TestCalibrationCoverage: the 95 % interval of the line holds the true output
// in 95 of 100 calibrations of a pump that repeats to 2 %, and the scatter found
// is the one put in.
func TestCalibrationCoverage(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 8))
	const pumps = 2000
	inside, scatter := 0, 0.0
	for range pumps {
		var draws []Drawdown
		for _, s := range []float64{0.25, 0.5, 0.75, 1} {
			for range 2 {
				draws = append(draws, drawn(1, s, 15*litrePerH*s+0.2*litrePerH*r.NormFloat64(), 60))
			}
		}
		c, err := Calibrate(draws)
		if err != nil {
			t.Fatal(err)
		}
		rate, wide, err := c.Output(1, 0.6)
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(rate-9*litrePerH) <= wide {
			inside++
		}
		scatter += c.Scatter * c.Scatter / pumps
	}
	if share := float64(inside) / pumps; math.Abs(share-0.95) > 0.017 {
		t.Errorf("%.1f %% inside", share*100)
	}
	if got := math.Sqrt(scatter) / litrePerH; apart(got, 0.2, 0.03) {
		t.Errorf("scatter %.3f L/h, put in 0.2", got)
	}
}

// One step of 1 % at 53 % moves the feed by 1/53 of itself, and the pH by the
// slope of the water.
func TestResolution(t *testing.T) {
	c, err := Calibrate([]Drawdown{drawn(1, 0.5, 7.5*litrePerH, 60), drawn(1, 1, 15*litrePerH, 60)})
	if err != nil {
		t.Fatal(err)
	}
	r, err := c.Resolution(1, 0.53, 0.01, 9.87, 0.8)
	if err != nil || apart(r.Share, 1.0/53, 1e-9) || apart(r.Dose, 9.87/53, 1e-9) || apart(r.PH, 9.87/53*0.8, 1e-9) || apart(r.Rate/litrePerH, 0.15, 1e-9) {
		t.Errorf("%+v, %v", r, err)
	}
}

func TestCalibrationRefuses(t *testing.T) {
	sound, _ := Calibrate([]Drawdown{drawn(1, 0.5, tenLitres, 60)})
	for name, c := range map[string]struct {
		call  func() error
		field string
	}{
		"no draws":       {func() error { _, err := Calibrate(nil); return err }, "drawdowns"},
		"no volume":      {func() error { _, err := Calibrate([]Drawdown{{0, 60, 1, 1}}); return err }, "drawdown"},
		"no time":        {func() error { _, err := Calibrate([]Drawdown{{1e-4, 0, 1, 1}}); return err }, "drawdown"},
		"a stroke of 40": {func() error { _, err := Calibrate([]Drawdown{{1e-4, 60, 40, 1}}); return err }, "stroke"},
		"no speed":       {func() error { _, err := Calibrate([]Drawdown{{1e-4, 60, 1, math.NaN()}}); return err }, "speed"},
		"falls": {func() error {
			_, err := Calibrate([]Drawdown{drawn(1, half, tenLitres, 60), drawn(1, full, tenLitres/2, 60)})
			return err
		}, "drawdowns"},
		"no feed":         {func() error { _, err := sound.SettingFor(0, 1, 0.01); return err }, "feed"},
		"a step of 2":     {func() error { _, err := sound.SettingFor(tenLitres, 1, 2); return err }, "step"},
		"output at 200 %": {func() error { _, _, err := sound.Output(1, 2); return err }, "speed"},
		"range":           {func() error { _, _, _, err := sound.Range(0); return err }, "stroke"},
		"no step":         {func() error { _, err := sound.Resolution(1, 1, 0, 1, 1); return err }, "step"},
		"negative dose":   {func() error { _, err := sound.Resolution(1, 1, 0.01, -1, 1); return err }, "dose"},
	} {
		var bad *BadInput
		if err := c.call(); !errors.As(err, &bad) || bad.Field != c.field {
			t.Errorf("%s: %v", name, err)
		}
	}
}
