package feed

import (
	"errors"
	"math"
	"slices"
	"strings"
	"testing"
)

// 240 L fed at 7.97 L/h last 30.1 h.
func TestTankLasts(t *testing.T) {
	tank := Tank{Volume: 0.240, Full: 0.240}
	s, err := tank.Lasts(7.97*litrePerH, 2*hour)
	if err != nil || apart(s.Seconds/hour, 240/7.97, 1e-9) || !slices.Contains(s.Codes, CodeDayTankLarge) {
		t.Fatalf("%+v, %v", s, err)
	}
	if apart(s.Seconds-s.Refill, 2*hour, 1e-9) {
		t.Errorf("refill after %g s for empty after %g s", s.Refill, s.Seconds)
	}
	// What lies below the suction does not count, and a margin longer than the
	// supply means now.
	s, err = Tank{Volume: 0.05, Heel: 0.04}.Lasts(10*litrePerH, 2*hour)
	if err != nil || apart(s.Seconds, hour, 1e-9) || s.Refill != 0 || len(s.Codes) != 0 {
		t.Errorf("%+v, %v", s, err)
	}
	if s, _ = (Tank{Volume: 0.03, Heel: 0.04}).Lasts(1, 0); s.Seconds != 0 || !slices.Contains(s.Codes, CodeTankBelowHeel) {
		t.Errorf("%+v", s)
	}
	if s, _ = (Tank{Volume: 1, Full: 0.5}).Lasts(1e-3, 0); !slices.Contains(s.Codes, CodeStoreOverFull) {
		t.Errorf("%+v", s)
	}
	// A drip does not run past what a clock holds.
	if s, err = (Tank{Volume: 50}).Lasts(1e-12, 0); err != nil || s.Seconds > longestSupply || !(s.Seconds > 0) {
		t.Errorf("%+v, %v", s, err)
	}
}

// Volumes of standing cylinders as published: wells of 100 ft by the inch of
// their casing, and a tank of 40 ft by 30 ft.
func TestCylinders(t *testing.T) {
	const inch, foot = 0.0254, 0.3048
	seen := 0
	for _, row := range published(t, "feed.csv") {
		if row["case"] != "well volume" {
			continue
		}
		words := strings.Fields(row["inputs"])
		want, tolerance := number(t, row["published_answer"]), number(t, row["tolerance_rel"])
		if got := UprightCylinder(number(t, words[1])*inch, 100*foot) / gallon; apart(got, want, tolerance) {
			t.Errorf("%s: %.2f US gal, published %g (%s)", row["inputs"], got, want, row["source"])
		}
		seen++
	}
	if seen < 8 {
		t.Errorf("%d wells", seen)
	}
	// A lying tank: full, half, empty, and a quarter of the depth (0.1955 of the
	// volume, by the segment's formula).
	whole := math.Pi / 4 * 4 * 3
	for depth, share := range map[float64]float64{2: 1, 1: 0.5, 0: 0, 0.5: 0.19550110947788532, 3: 1, -1: 0} {
		if got := LyingCylinder(2, 3, depth); math.Abs(got-share*whole) > 1e-9 {
			t.Errorf("dipped to %g m: %.4f m3", depth, got)
		}
	}
	if LyingCylinder(0, 3, 1) != 0 {
		t.Error("a tank of no diameter holds something")
	}
}

func TestDelivery(t *testing.T) {
	store := Tank{Volume: 8, Heel: 0.5, Full: 20}
	// 16 t of 25 % caustic are 12.56 m3: half a cubic metre too much.
	r, err := store.Takes(Load{Mass: 16000, KgPerM3: 1273.9})
	if err != nil || apart(r.Volume, 16000/1273.9, 1e-12) || apart(r.Over, 16000/1273.9-12, 1e-9) || !slices.Contains(r.Codes, CodeLoadDoesNotFit) {
		t.Errorf("%+v, %v", r, err)
	}
	if r, err = store.Takes(Load{Volume: 12, KgPerM3: 1273.9}); err != nil || r.Over != 0 || len(r.Codes) != 0 || r.After != 20 {
		t.Errorf("%+v, %v", r, err)
	}
	// 191 L a day out of 19.5 m3: 102 days; a small store under 30 days and of
	// less than one and a half loads.
	s, err := store.Keeps(0.191/day, 14*day, 12)
	if err != nil || apart(s.Seconds/day, 7.5/0.191, 1e-9) || apart(s.FullSeconds/day, 19.5/0.191, 1e-9) || apart(s.OrderIn/day, 7.5/0.191-14, 1e-9) || len(s.Codes) != 0 {
		t.Errorf("%+v, %v", s, err)
	}
	s, err = Tank{Volume: 2, Full: 4}.Keeps(0.191/day, 14*day, 12)
	if err != nil || !slices.Contains(s.Codes, CodeStorageUnder30) || !slices.Contains(s.Codes, CodeStorageUnder1p5) || s.OrderIn > 0 {
		t.Errorf("%+v, %v", s, err)
	}
}

// The truck with 50 % on board for a note of 25 %.
func TestGate(t *testing.T) {
	g, err := SodiumHydroxide.CheckDelivery(0.25, 1525, 293.15)
	if err != nil || g.Accept || !slices.Contains(g.Codes, CodeDensityOff) || !g.HasFound || apart(g.Found.Strength, 0.50, 0.01) {
		t.Errorf("%+v, %v", g, err)
	}
	// The same product cold is heavier and still the same.
	g, err = SodiumHydroxide.CheckDelivery(0.25, 1273.9+0.58*15, 278.15)
	if err != nil || !g.Accept || math.Abs(g.Difference) > 0.001 || len(g.Codes) != 0 {
		t.Errorf("%+v, %v", g, err)
	}
	g, err = FerricChloride.CheckDelivery(0.40, 1420, 278.15)
	if err != nil || !g.Accept || !slices.Contains(g.Codes, CodeDensityAt20C) {
		t.Errorf("%+v, %v", g, err)
	}
	var beyond *OutOfTable
	if _, err := SodiumHydroxide.CheckDelivery(0.9, 1500, 293.15); !errors.As(err, &beyond) {
		t.Errorf("90 %% caustic: %v", err)
	}
}

func TestTanksRefuse(t *testing.T) {
	for name, c := range map[string]struct {
		call  func() error
		field string
	}{
		"no feed":         {func() error { _, err := Tank{Volume: 1}.Lasts(0, 0); return err }, "feed"},
		"negative tank":   {func() error { _, err := Tank{Volume: -1}.Lasts(1, 0); return err }, "tank"},
		"margin":          {func() error { _, err := Tank{Volume: 1}.Lasts(1, -1); return err }, "margin"},
		"no fill mark":    {func() error { _, err := Tank{Volume: 1}.Takes(Load{Mass: 1, KgPerM3: 1000}); return err }, "tank"},
		"two amounts":     {func() error { _, err := Tank{Full: 1}.Takes(Load{Mass: 1, Volume: 1, KgPerM3: 1000}); return err }, "load"},
		"no amount":       {func() error { _, err := Tank{Full: 1}.Takes(Load{KgPerM3: 1000}); return err }, "load"},
		"density of 1.28": {func() error { _, err := Tank{Full: 1}.Takes(Load{Mass: 1, KgPerM3: 1.28}); return err }, "density"},
		"lead":            {func() error { _, err := Tank{Volume: 1}.Keeps(1, -1, 0); return err }, "lead"},
		"load":            {func() error { _, err := Tank{Volume: 1}.Keeps(1, 1, math.NaN()); return err }, "load"},
		"use":             {func() error { _, err := Tank{Volume: 1}.Keeps(0, 1, 1); return err }, "feed"},
		"gate":            {func() error { _, err := SodiumHydroxide.CheckDelivery(0.25, 1.28, 293.15); return err }, "density"},
	} {
		var bad *BadInput
		if err := c.call(); !errors.As(err, &bad) || bad.Field != c.field {
			t.Errorf("%s: %v", name, err)
		}
	}
}
