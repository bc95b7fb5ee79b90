package report

import (
	"encoding/json"
	"errors"
	"math"
	"strings"
	"testing"
	"time"

	"beckline/dosing"
	"beckline/dosing/batch"
	"beckline/dosing/mix"
)

func named(t *testing.T, name string) dosing.Product {
	t.Helper()
	p, ok := dosing.ProductByName(name)
	if !ok {
		t.Fatalf("no product %s", name)
	}
	return p
}

// pairOf is soda ash and carbon dioxide to pH 8.3 and alkalinity 80.
func pairOf(t *testing.T) *dosing.Result {
	t.Helper()
	r, err := dosing.Solve(dosing.Case{
		Readings:  soft(t),
		Additions: []dosing.Addition{{Product: named(t, "soda-ash"), Solve: true}, {Product: named(t, "carbon-dioxide"), Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 8.3},
		Second:    dosing.Target{Kind: dosing.TargetAlkalinity, Value: si(t, "alkalinity", 80).Value},
	})
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// No output shows one of two doses as if it were the answer.
func TestBothDosesAreShownEverywhere(t *testing.T) {
	d := New(pairOf(t))
	for form, text := range map[string]string{"text": d.Text(), "slip": d.Slip(), "log": d.LogLine(time.Unix(0, 0))} {
		for _, name := range []string{"soda-ash", "carbon-dioxide"} {
			if !strings.Contains(text, name) {
				t.Errorf("%s lacks %s:\n%s", form, name, text)
			}
		}
	}
	if text := d.Slip(); !strings.Contains(text, "pH 8.30 and alkalinity 80.0") {
		t.Errorf("the slip lacks a target:\n%s", text)
	}
	raw, err := d.JSON()
	if err != nil {
		t.Fatal(err)
	}
	var o struct {
		Dose  map[string]any
		Doses []map[string]any
	}
	if err := json.Unmarshal(raw, &o); err != nil {
		t.Fatal(err)
	}
	if len(o.Doses) != 2 || o.Doses[0]["dose_mg_l"] != o.Dose["dose_mg_l"] || o.Doses[1]["product"] != "carbon-dioxide" {
		t.Errorf("%s", raw)
	}
	cells, columns := d.SecondCells(), SecondColumns()
	if len(cells) != len(columns) || columns[0].Name != "second_product" || cells[0] != "carbon-dioxide" {
		t.Errorf("second cells %v under %v", cells, columns)
	}
	if cells := solved(t, soft(t), "caustic-25", dosing.None).SecondCells(); strings.Join(cells, "") != "" {
		t.Errorf("one dose has second cells %v", cells)
	}
}

func TestPairLines(t *testing.T) {
	p := &dosing.Problem{Kind: dosing.NoAnswer, Code: "pair_out_of_reach", Field: "target-alkalinity", Given: "lime",
		Target:    dosing.Target{Kind: dosing.TargetAlkalinity, Value: si(t, "alkalinity", 45).Value},
		NearestAt: dosing.Some(-1e-4), Nearest: si(t, "alkalinity", 60)}
	want := `target-alkalinity "45.0 mg/L as CaCO3" cannot be met together with the first target by these two products: ` +
		`lime binds, its dose would have to be -7.41 mg/L as Ca(OH)2; the other product alone, at the first target: ` +
		`alkalinity 60.0 mg/L as CaCO3; accepted: other targets, or another pair of products`
	if got := ProblemLine(p); got != want {
		t.Errorf("%s\nwant\n%s", got, want)
	}
	p.Given = "our own" // not in the catalogue
	if got := Given(p); got != "our own at -0.100 mmol/L" {
		t.Errorf("given %q", got)
	}
	p.Given, p.NearestAt, p.Nearest = "lime and soda-ash", dosing.None, dosing.None
	if got := Given(p); got != "lime and soda-ash" {
		t.Errorf("given %q", got)
	}
}

// Stages add up to the whole in every form.
func TestBatchAddsUp(t *testing.T) {
	r := solve(t, soft(t), "caustic-25", dosing.None)
	plan, err := batch.Of(r, 60)
	if err != nil {
		t.Fatal(err)
	}
	raw, err := New(r).WithBatch(plan).JSON()
	if err != nil {
		t.Fatal(err)
	}
	var o struct {
		Batch struct {
			Product float64 `json:"product_kg"`
			Litres  float64 `json:"product_l"`
			Stages  []struct {
				Product float64 `json:"product_kg"`
				Litres  float64 `json:"product_l"`
			}
		}
	}
	if err := json.Unmarshal(raw, &o); err != nil {
		t.Fatal(err)
	}
	kg, litres := 0.0, 0.0
	for _, s := range o.Batch.Stages {
		kg += s.Product
		litres += s.Litres
	}
	whole := find(Dose(r.Dose()), "product_mg_l").Value.Value * 60 / 1000
	if math.Abs(kg-whole) > 1e-9*whole || math.Abs(o.Batch.Product-whole) > 1e-9*whole || math.Abs(litres-o.Batch.Litres) > 1e-9*litres {
		t.Errorf("stages of %v kg, %v L; whole %v kg, %v L; the dose makes %v kg", kg, litres, o.Batch.Product, o.Batch.Litres, whole)
	}
}

func TestMixSaysWhatBinds(t *testing.T) {
	task := mix.Task{Base: dosing.Case{Readings: soft(t)}, Explain: true,
		Candidates: []mix.Candidate{{Product: named(t, "lime"), Price: 0.3}},
		Limits:     []mix.Limit{{Quantity: mix.Alkalinity, Low: si(t, "alkalinity", 29)}}}
	a, err := mix.Solve(task)
	if err != nil {
		t.Fatal(err)
	}
	// 16 mg/L as CaCO3 of lime is 11.845 mg/L (molar masses 74.092 and 100.087).
	text := NewMix(a, "EUR").Text()
	for _, want := range []string{"Least cost: 3.55 EUR a ML", "lime: 11.8 mg/L", "alkalinity at least 29.0 mg/L as CaCO3: without it 3.55 EUR a ML less"} {
		if !strings.Contains(text, want) {
			t.Errorf("no %q in\n%s", want, text)
		}
	}
	for _, line := range strings.Split(text, "\n") {
		if len(line) > textWidth || ASCII(line) != line {
			t.Errorf("line of %d columns: %s", len(line), line)
		}
	}
	task.Limits = append(task.Limits, mix.Limit{Quantity: mix.PH, High: dosing.Some(7)})
	_, err = mix.Solve(task)
	var conflict *mix.Infeasible
	if !errors.As(err, &conflict) {
		t.Fatalf("%v", err)
	}
	p := MixProblem(conflict)
	if p.Kind != dosing.NoAnswer || p.Code != "no_mix" || !strings.Contains(p.Accepted, "(by ") ||
		!strings.Contains(p.Accepted, "alkalinity at least") || !strings.Contains(p.Accepted, "ph at most") {
		t.Errorf("%+v", p)
	}
}

func TestBlendShowsWhatThePHIsNot(t *testing.T) {
	other := soft(t)
	other.PH = dosing.Some(9.5)
	mixed, err := dosing.Solve(dosing.Case{Sources: []dosing.Source{
		{Name: "one", Readings: soft(t), Flow: dosing.Some(1)}, {Name: "two", Readings: other, Flow: dosing.Some(3)}}})
	if err != nil {
		t.Fatal(err)
	}
	b := NewBlend(mixed, nil, dosing.Target{}, 0)
	mean := (6.28 + 3*9.5) / 4
	if got := meanPH(mixed); math.Abs(got-mean) > 1e-9 || math.Abs(got-mixed.Raw().Figures.PH) < 0.5 {
		t.Errorf("mean %v, want %v, which the blend of pH %v is not", got, mean, mixed.Raw().Figures.PH)
	}
	if text := b.Text(); !strings.Contains(text, "would be 8.70, which the blend is not") || !strings.Contains(text, "blend") {
		t.Errorf("%s", text)
	}
	raw, err := b.JSON()
	if err != nil || !strings.Contains(string(raw), `"share_to_meet": null`) || !strings.Contains(string(raw), `"share_percent": 25`) {
		t.Errorf("%s, %v", raw, err)
	}
}

// What is fed ahead stands on the slip and in the log line: repeated without it,
// the solved dose would be wrong.
func TestSlipHoldsWhatIsFedAhead(t *testing.T) {
	alum := named(t, "alum-dry")
	r, err := dosing.Solve(dosing.Case{
		Readings: soft(t),
		Additions: []dosing.Addition{
			{Product: alum, Dose: dosing.Some(12e-3 / alum.Chemical.MolarMass)},
			{Product: named(t, "caustic-25"), Solve: true}},
		Target: dosing.Target{Kind: dosing.TargetPH, Value: 8.3},
	})
	if err != nil {
		t.Fatal(err)
	}
	d := New(r)
	slip := strings.Join(strings.Fields(d.Slip()), " ")
	for _, want := range []string{"step 1 alum-dry: 12.0 mg/L", "step 2 caustic-25 (solved)"} {
		if !strings.Contains(slip, want) {
			t.Errorf("the slip lacks %q:\n%s", want, d.Slip())
		}
	}
	if line := d.LogLine(time.Unix(0, 0)); !strings.Contains(line, "with 1 more fed, caustic-25") || len(line) > logWidth {
		t.Errorf("the log line is %q", line)
	}
}
