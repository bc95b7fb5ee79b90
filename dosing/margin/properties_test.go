package margin_test

import (
	"math"
	"math/rand/v2"
	"reflect"
	"runtime"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/margin"
)

func of(t *testing.T, c dosing.Case, tol margin.Tolerances, o margin.Options) margin.Margin {
	t.Helper()
	m, err := margin.Of(solve(t, c), tol, o)
	if err != nil {
		t.Fatal(err)
	}
	return m
}

func only(t *testing.T, name string, tol margin.Tolerance) margin.Tolerances {
	t.Helper()
	var out margin.Tolerances
	if err := out.Set(name, tol); err != nil {
		t.Fatal(err)
	}
	return out
}

func close(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if !(math.Abs(got-want) <= relative*math.Abs(want)) {
		t.Errorf("%s is %g, want %g within %g %%", what, got, want, 100*relative)
	}
}

// TestOneReadingMapsThrough: with one reading wrong the dose is a monotone
// function of it, so the percentiles of the dose are the doses at the
// percentiles of the reading. dosing.Solve gives those by its own way.
func TestOneReadingMapsThrough(t *testing.T) {
	for _, c := range []struct {
		name  string
		half  float64
		shift func(*dosing.Readings, float64)
	}{
		{"ph", 0.1, func(r *dosing.Readings, by float64) { r.PH.Value += by }},
		{"alkalinity", alkalinity(2), func(r *dosing.Readings, by float64) { r.Alkalinity.Value += by }},
		{"temperature", 3, func(r *dosing.Readings, by float64) { r.Kelvin.Value += by }},
		{"calcium", 5e-5, func(r *dosing.Readings, by float64) { r.Calcium.Value += by }},
		{"conductivity", 3e-3, func(r *dosing.Readings, by float64) { r.Conductivity.Value += by }},
	} {
		base := upland(t)
		m := of(t, base, only(t, c.name, margin.Tolerance{Absolute: c.half}), margin.Options{Method: margin.Draws})
		at := func(by float64) float64 {
			k := base
			c.shift(&k.Readings, by)
			return solve(t, k).Dose().Dose
		}
		a, b := at(-c.half), at(c.half)
		want := margin.Range{Low: min(a, b), High: max(a, b)}
		width := want.High - want.Low
		if math.Abs(m.Dose.Low-want.Low) > 0.01*width || math.Abs(m.Dose.High-want.High) > 0.01*width {
			t.Errorf("%s: draws give %+v, the dose at the reading's own percentiles %+v", c.name, m.Dose, want)
		}
		if len(m.Shares) != 1 || m.Shares[0] != (margin.Share{Reading: c.name, Fraction: 1}) || m.Repeat != c.name {
			t.Errorf("%s alone has shares %+v, repeat %q", c.name, m.Shares, m.Repeat)
		}
	}
}

// TestFirstOrderAgainstDraws: up to pH 0.1 the two deviations agree within 3 %,
// on soft and hard waters.
func TestFirstOrderAgainstDraws(t *testing.T) {
	r := rand.New(rand.NewPCG(31, 32))
	worst := 0.0
	for range 40 {
		s := simulate(t, r)
		result, err := dosing.Solve(s.truth)
		if err != nil {
			continue
		}
		m, err := margin.Of(result, s.tol, margin.Options{Method: margin.Draws})
		if err != nil {
			t.Fatal(err)
		}
		apart := math.Abs(m.FirstOrder.DoseDeviation/m.DoseDeviation - 1)
		worst = max(worst, apart)
		if apart > 0.03 {
			t.Errorf("first order has %g, draws %g (%.1f %%): %+v", m.FirstOrder.DoseDeviation, m.DoseDeviation, 100*apart, s.truth.Readings)
		}
		for i, share := range m.DoseShares {
			if d := math.Abs(share.Fraction - m.FirstOrder.DoseShares[i].Fraction); d > 0.03 {
				t.Errorf("share of %s is %.3f by draws, %.3f at first order", share.Reading, share.Fraction, m.FirstOrder.DoseShares[i].Fraction)
			}
		}
	}
	t.Logf("worst difference of the deviations %.2f %%", 100*worst)
}

// TestAlkalinityTargetIsExact: to a target alkalinity the dose is a straight
// line of the alkalinity read, one equivalent for one, by hand.
func TestAlkalinityTargetIsExact(t *testing.T) {
	c := upland(t)
	c.Target = dosing.Target{Kind: dosing.TargetAlkalinity, Value: alkalinity(40)}
	half := alkalinity(2)
	m := of(t, c, only(t, "alkalinity", margin.Tolerance{Absolute: half}), margin.Options{Method: margin.FirstOrder})
	dose := solve(t, c).Dose().Dose
	close(t, "low", m.Dose.Low, dose-half, 1e-9)
	close(t, "high", m.Dose.High, dose+half, 1e-9)
	close(t, "deviation", m.DoseDeviation, half/1.959964, 1e-6)
	drawn := of(t, c, only(t, "alkalinity", margin.Tolerance{Absolute: half}), margin.Options{Method: margin.Draws})
	close(t, "drawn low", drawn.Dose.Low, dose-half, 0.002)
	close(t, "drawn high", drawn.Dose.High, dose+half, 0.002)
}

// TestOtherTargets: to an index or a CCPP the range is that of the dose at the
// ends of the reading, as to a pH.
func TestOtherTargets(t *testing.T) {
	for _, target := range []dosing.Target{
		{Kind: dosing.TargetSaturationIndex, Value: -1},
		{Kind: dosing.TargetCCPP, Value: -5e-3 / carbonate.MolarMassCaCO3},
	} {
		c := upland(t)
		c.Target = target
		m := of(t, c, only(t, "ph", margin.Tolerance{Absolute: 0.1}), margin.Options{Method: margin.Draws})
		at := func(by float64) float64 {
			k := c
			k.Readings.PH.Value += by
			return solve(t, k).Dose().Dose
		}
		width := at(-0.1) - at(0.1)
		if math.Abs(m.Dose.Low-at(0.1)) > 0.01*width || math.Abs(m.Dose.High-at(-0.1)) > 0.01*width {
			t.Errorf("%s: %+v, want %g to %g", target.Kind.Field(), m.Dose, at(0.1), at(-0.1))
		}
	}
}

// TestFlowAndStrength: they move the feed and not the dose, by their own size;
// a product stronger than stated needs less of it, and less still by volume
// since it is denser; both move the finished pH.
func TestFlowAndStrength(t *testing.T) {
	c := upland(t)
	feed := solve(t, c).Dose().Feed
	for _, method := range []margin.Method{margin.FirstOrder, margin.Draws} {
		m := of(t, c, only(t, "flow", margin.Tolerance{Relative: 0.03}), margin.Options{Method: method})
		if d := solve(t, c).Dose().Dose; math.Abs(m.Dose.Low/d-1) > 1e-9 || math.Abs(m.Dose.High/d-1) > 1e-9 {
			t.Errorf("%s: the flow moves the dose: %+v", method, m.Dose)
		}
		close(t, "mass low", m.Mass.Low, feed.MassPerSecond*0.97, 1e-3)
		close(t, "volume high", m.Volume.High, feed.VolumePerSecond*1.03, 1e-3)
		if m.Shares[0].Reading != "flow" || m.Repeat != "flow" {
			t.Errorf("shares %+v repeat %q, want flow alone", m.Shares, m.Repeat)
		}
		if !(m.FinishedPH.Low < 8.35 && m.FinishedPH.High > 8.45) {
			t.Errorf("%s: finished pH %+v does not feel the flow", method, m.FinishedPH)
		}

		m = of(t, c, only(t, "strength", margin.Tolerance{Relative: 0.02}), margin.Options{Method: method})
		close(t, "product high", m.Product.High, feed.ProductMass*1.02, 1e-3)
		mass := (m.Mass.High - m.Mass.Low) / feed.MassPerSecond
		volume := (m.Volume.High - m.Volume.Low) / feed.VolumePerSecond
		if r := volume / mass; !(r > 1.15 && r < 1.35) {
			t.Errorf("%s: volume goes with strength %.3f times as steeply as mass; a caustic of 25 %% is 1.1 %% denser for each 1 %% by weight", method, r)
		}
		if m.Repeat != "" {
			t.Errorf("a strength cannot be read again, but %q is to be repeated", m.Repeat)
		}
	}
}

// TestUnsureStrength: a strength 40 % off needs 1/1.4 to 1/0.6 of the feed, by
// mass rate as by water, and a product weaker than stated leaves the pH low.
func TestUnsureStrength(t *testing.T) {
	c := well(t)
	r := solve(t, c)
	m := of(t, c, only(t, "strength", margin.Tolerance{Relative: 0.4}), margin.Options{Method: margin.Draws})
	feed := r.Dose().Feed
	close(t, "mass low", m.Mass.Low, feed.MassPerSecond/1.4, 0.01)
	close(t, "mass high", m.Mass.High, feed.MassPerSecond/0.6, 0.01)
	close(t, "product high", m.Product.High, feed.ProductMass/0.6, 0.01)
	set := c
	set.Target = dosing.Target{}
	set.Additions = []dosing.Addition{{Product: c.Additions[0].Product, Dose: dosing.Some(0.6 * r.Dose().Dose)}}
	close(t, "pH of a weak product", m.FinishedPH.Low, solve(t, set).Finished().Figures.PH, 0.002)
}

// TestFinishedPH: with one reading wrong the finished pH range is that of the
// dose as set in the waters at the ends of the reading.
func TestFinishedPH(t *testing.T) {
	c := upland(t)
	dose := solve(t, c).Dose().Dose
	at := func(by float64) float64 {
		k := c
		k.Readings.PH.Value += by
		k.Target = dosing.Target{}
		k.Additions = []dosing.Addition{c.Additions[0], {Product: c.Additions[1].Product, Dose: dosing.Some(dose)}}
		return solve(t, k).Finished().Figures.PH
	}
	m := of(t, c, only(t, "ph", margin.Tolerance{Absolute: 0.05}), margin.Options{Method: margin.Draws})
	close(t, "finished pH low", m.FinishedPH.Low, at(-0.05), 1e-3)
	close(t, "finished pH high", m.FinishedPH.High, at(0.05), 1e-3)
}

func TestSharesSumToOne(t *testing.T) {
	for _, c := range []dosing.Case{upland(t), well(t)} {
		for _, method := range []margin.Method{margin.FirstOrder, margin.Draws} {
			m := of(t, c, margin.Defaults(), margin.Options{Method: method})
			for name, shares := range map[string][]margin.Share{"dose": m.DoseShares, "feed": m.FeedShares, "pH": m.PHShares, "": m.Shares} {
				sum := 0.0
				for _, s := range shares {
					if !(s.Fraction >= 0) {
						t.Errorf("%s share of %s is %g", name, s.Reading, s.Fraction)
					}
					sum += s.Fraction
				}
				if math.Abs(sum-1) > 1e-12 {
					t.Errorf("%s: the %s shares sum to %g", method, name, sum)
				}
			}
			if m.Repeat != "ph" {
				t.Errorf("the pH meter is the weakest by far, but %q is to be repeated", m.Repeat)
			}
		}
	}
}

// TestSameEachTime: however often it is asked and however many processors
// share the work.
func TestSameEachTime(t *testing.T) {
	r := solve(t, upland(t))
	ask := func() margin.Margin {
		m, err := margin.Of(r, margin.Defaults(), margin.Options{Method: margin.Draws})
		if err != nil {
			t.Fatal(err)
		}
		return m
	}
	first := ask()
	before := runtime.GOMAXPROCS(3)
	second := ask()
	runtime.GOMAXPROCS(before)
	if !reflect.DeepEqual(first, second) {
		t.Errorf("twice asked:\n%+v\n%+v", first, second)
	}
}

// TestChoosesTheWay: draws where the water is unbuffered, the pH poor, or the
// target near; slopes on a buffered water with a good meter.
func TestChoosesTheWay(t *testing.T) {
	with := func(pH float64) margin.Tolerances {
		tol := only(t, "ph", margin.Tolerance{Absolute: pH})
		if err := tol.Set("alkalinity", margin.Tolerance{Relative: 0.02}); err != nil {
			t.Fatal(err)
		}
		return tol
	}
	near := well(t)
	near.Target.Value = 7.2
	soft := upland(t)
	hard := well(t)
	hard.Target.Value = 9.6
	for _, c := range []struct {
		what   string
		kase   dosing.Case
		tol    margin.Tolerances
		method margin.Method
		reason margin.Reason
	}{
		{"buffered, good meter", hard, with(0.02), margin.FirstOrder, margin.NoReason},
		{"buffered, poor meter", hard, with(0.10), margin.Draws, margin.PHTolerance},
		{"unbuffered", soft, with(0.02), margin.Draws, margin.LowBuffer},
		{"target within the tolerance", near, with(0.08), margin.Draws, margin.NearLimit},
	} {
		m := of(t, c.kase, c.tol, margin.Options{})
		if m.Method != c.method || m.Reason != c.reason {
			t.Errorf("%s: %s, %q; want %s, %q", c.what, m.Method, m.Reason, c.method, c.reason)
		}
		forced := of(t, c.kase, c.tol, margin.Options{Method: margin.FirstOrder})
		if forced.Method != margin.FirstOrder || forced.Reason != c.reason || forced.Drawn != 0 {
			t.Errorf("%s: slopes asked for give %s, %q, %d draws", c.what, forced.Method, forced.Reason, forced.Drawn)
		}
	}
}

// TestBand: at the dose that was answered the band is close to the drawn range
// of the finished pH; without a dose it is the raw pH within its tolerance.
func TestBand(t *testing.T) {
	c := well(t)
	r := solve(t, c)
	m := of(t, c, margin.Defaults(), margin.Options{Method: margin.Draws})
	dose := r.Dose().Dose
	band, err := margin.Band(r, margin.Defaults(), []float64{0, dose, 3 * dose})
	if err != nil {
		t.Fatal(err)
	}
	if math.Abs(band[0].Low-7.05) > 0.01 || math.Abs(band[0].High-7.25) > 0.01 {
		t.Errorf("without a dose the band is %+v, want 7.15 within 0.10", band[0])
	}
	width := m.FinishedPH.High - m.FinishedPH.Low
	if math.Abs(band[1].Low-m.FinishedPH.Low) > 0.1*width || math.Abs(band[1].High-m.FinishedPH.High) > 0.1*width {
		t.Errorf("at the dose the band is %+v, drawn %+v", band[1], m.FinishedPH)
	}
	if !(band[2].Low > band[1].Low && band[2].High > band[1].High) {
		t.Errorf("the band does not rise with the dose: %+v", band)
	}
	c.Additions, c.Target = nil, dosing.Target{}
	if _, err := margin.Band(solve(t, c), margin.Defaults(), []float64{0}); err == nil {
		t.Error("a band without a dose")
	}
}
