package report

import (
	"encoding/json"
	"errors"
	"go/ast"
	"go/parser"
	"go/token"
	"math"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/bench"
	"beckline/dosing/feed"
	"beckline/dosing/hand"
	"beckline/dosing/margin"
	"beckline/dosing/slips"
)

func trusted(t *testing.T) (Document, *dosing.Result, margin.Margin) {
	t.Helper()
	r := solve(t, soft(t), "caustic-25", si(t, "pump", 20))
	m, err := margin.Of(r, margin.Defaults(), margin.Options{Method: margin.FirstOrder})
	if err != nil {
		t.Fatal(err)
	}
	titration, err := hand.Titrate(r)
	if err != nil {
		t.Fatal(err)
	}
	return New(r).WithMargin(m, true).WithWays(hand.Of(r), titration, true), r, m
}

// The margin of the JSON is that of the room, in the units of its keys.
func TestMarginInJSON(t *testing.T) {
	d, _, m := trusted(t)
	text, err := d.JSON()
	if err != nil {
		t.Fatal(err)
	}
	var got struct {
		Margin struct {
			Low     float64            `json:"dose_mg_l_low"`
			High    float64            `json:"dose_mg_l_high"`
			PHLow   float64            `json:"finished_ph_low"`
			PHHigh  float64            `json:"finished_ph_high"`
			FeedLow float64            `json:"feed_l_h_low"`
			Shares  map[string]float64 `json:"shares"`
			Repeat  string             `json:"repeat"`
			Method  string             `json:"method"`
		}
		Checks []struct {
			Name   string
			Value  float64
			Agrees bool
		}
	}
	if err := json.Unmarshal(text, &got); err != nil {
		t.Fatal(err)
	}
	const naoh = 39.997e3 // mg/mol
	for name, pair := range map[string][2]float64{
		"low": {got.Margin.Low, m.Dose.Low * naoh}, "high": {got.Margin.High, m.Dose.High * naoh},
		"pH low": {got.Margin.PHLow, m.FinishedPH.Low}, "pH high": {got.Margin.PHHigh, m.FinishedPH.High},
		"feed": {got.Margin.FeedLow, m.Volume.Low * 3.6e6},
	} {
		if math.Abs(pair[0]-pair[1]) > 1e-4*math.Abs(pair[1]) {
			t.Errorf("%s is %g, want %g", name, pair[0], pair[1])
		}
	}
	sum := 0.0
	for _, v := range got.Margin.Shares {
		sum += v
	}
	if math.Abs(sum-1) > 1e-9 || got.Margin.Repeat != "ph" || got.Margin.Method != "first-order" {
		t.Errorf("shares sum to %g, repeat %s, method %s", sum, got.Margin.Repeat, got.Margin.Method)
	}
	names := map[string]bool{}
	for _, c := range got.Checks {
		names[c.Name] = c.Agrees
	}
	if !names["hand_method"] || !names["forward_titration"] || !names["closure_ph"] {
		t.Errorf("checks are %v", names)
	}
	if New(d.result).margin != nil || len(New(d.result).Checks) == len(d.Checks) {
		t.Error("a document without a margin has one")
	}
}

func TestTrustLines(t *testing.T) {
	d, r, m := trusted(t)
	if got := d.TrustLine(); !strings.Contains(got, "most of it from pH: read it again first") || !strings.Contains(got, "usual tolerances") {
		t.Errorf("%q", got)
	}
	if !strings.Contains(d.Slip(), "trust") || strings.Contains(New(r).Slip(), "trust") {
		t.Error("the slip has no line of trust, or one without a margin")
	}
	m.Dose.High, m.Unreached, m.Repeat = math.Inf(1), 400, "alkalinity"
	got := New(r).WithMargin(m, false).TrustLine()
	for _, want := range []string{" or more mg/L", "cannot be brought there", "read alkalinity again first", "tolerances given"} {
		if !strings.Contains(got, want) {
			t.Errorf("%q lacks %q", got, want)
		}
	}
	for _, line := range strings.Split(d.Text(), "\n") {
		if len(line) > textWidth {
			t.Errorf("a line of %d columns: %s", len(line), line)
		}
	}
}

// A broken assumption is told as such; a difference without one is no answer.
func TestWaysThatPart(t *testing.T) {
	_, r, _ := trusted(t)
	titration, err := hand.Titrate(r)
	if err != nil {
		t.Fatal(err)
	}
	a := hand.Of(r)
	a.Verdict, a.Broken = hand.Explained, hand.NoPairs
	d := New(r).WithWays(a, titration, false)
	if !d.Agrees() || !strings.Contains(d.WaysLine(), "Two ways part: the hand method leaves out ion pairs") {
		t.Errorf("%v: %s", d.Agrees(), d.WaysLine())
	}
	a.Verdict = hand.Differs
	if New(r).WithWays(a, titration, false).Agrees() {
		t.Error("an unexplained difference passes")
	}
	a.Verdict = hand.Agrees
	titration.Verdict = hand.Differs
	if New(r).WithWays(a, titration, false).Agrees() {
		t.Error("a titration that differs passes")
	}
	for _, assumption := range []hand.Assumption{hand.NoOtherAcids, hand.NoPairs, hand.NoBisulfate, hand.SimpleActivity, hand.OneSet, hand.NotNearReach} {
		if strings.Contains(assumptionText(assumption), "_") {
			t.Errorf("%s has no words", assumption)
		}
	}
}

func TestSlipsAreWarnings(t *testing.T) {
	_, r, _ := trusted(t)
	d := New(r).WithSlips([]slips.Finding{{Code: slips.AlkalinityBasis, Field: "alkalinity", Cause: "as CaCO3 or as HCO3?",
		Evidence: "the ions make 29 mg/L", Do: "look on the report"}})
	found := false
	for i, w := range d.Warnings {
		if i > 0 && w.Code < d.Warnings[i-1].Code {
			t.Error("the warnings are not sorted")
		}
		if w.Code == "slip_alkalinity_basis" {
			found = true
			if w.Message != "alkalinity: as CaCO3 or as HCO3? the ions make 29 mg/L; look on the report" {
				t.Errorf("%q", w.Message)
			}
		}
	}
	if !found || !d.Agrees() {
		t.Errorf("the slip is not there: %v", d.Warnings)
	}
}

// Every code of the feed room has a sentence.
func TestEveryEquipmentCodeHasASentence(t *testing.T) {
	files, err := filepath.Glob("../feed/*.go")
	if err != nil {
		t.Fatal(err)
	}
	seen := 0
	for _, name := range files {
		file, err := parser.ParseFile(token.NewFileSet(), name, nil, 0)
		if err != nil {
			t.Fatal(err)
		}
		ast.Inspect(file, func(n ast.Node) bool {
			spec, ok := n.(*ast.ValueSpec)
			if !ok || len(spec.Values) != 1 || !strings.HasPrefix(spec.Names[0].Name, "Code") {
				return true
			}
			code, err := strconv.Unquote(spec.Values[0].(*ast.BasicLit).Value)
			if err != nil {
				t.Fatal(err)
			}
			seen++
			if s := equipmentSentence(code); len(s) < 20 || ASCII(s) != s || strings.Contains(s, "_") || s == strings.ReplaceAll(code, "_", " ") {
				t.Errorf("%s: %q", code, s)
			}
			return true
		})
	}
	if seen < 25 {
		t.Errorf("only %d codes found", seen)
	}
}

func TestFeedProblems(t *testing.T) {
	_, err := feed.Calibrate(nil)
	if p := FeedProblem(err); p.Kind != dosing.BadInput || p.Field != "drawdowns" || p.Accepted == "" {
		t.Errorf("%+v", p)
	}
	c, err := feed.Calibrate([]feed.Drawdown{{Volume: 1e-4, Seconds: 60, Stroke: 1, Speed: 1}})
	if err != nil {
		t.Fatal(err)
	}
	_, err = c.SettingFor(1, 1, 0)
	if p := FeedProblem(err); p.Kind != dosing.NoAnswer || p.Code != "pump_too_small" || !strings.Contains(p.Accepted, "6.00 L/h") {
		t.Errorf("%+v", p)
	}
	if p := FeedProblem(errors.New("odd")); p.Kind != dosing.Failed {
		t.Errorf("%+v", p)
	}
	for code := range trustReasons {
		if line := ProblemLine(&dosing.Problem{Code: code, Field: "x"}); ASCII(line) != line || strings.Contains(line, "_") {
			t.Errorf("%s: %q", code, line)
		}
	}
}

func TestUnknownsHaveNamesAndUnits(t *testing.T) {
	for u := bench.Alkalinity; u <= bench.Precipitated; u++ {
		spec, ok := unknownUnits[u]
		if !ok || spec.factor == 0 || spec.unit == "" {
			t.Errorf("%s has no unit", u.Name())
		}
		if back, ok := UnknownNamed(spec.key); !ok || back != u {
			t.Errorf("%s is not found again", spec.key)
		}
	}
	if _, ok := UnknownNamed("colour"); ok {
		t.Error("colour is an unknown")
	}
}

// The bar stands where the residual is, within its ends.
func TestBar(t *testing.T) {
	for _, c := range []struct {
		v, allowed, scale float64
		want              string
	}{
		{0, 0.5, 1, "     [    *    ]     "},
		{1, 0.5, 1, "     [    |    ]    *"},
		{-9, 1, 1, "*         |         ]"},
		{0, 0, 0, "          *          "},
	} {
		if got := bar(c.v, c.allowed, c.scale); got != c.want {
			t.Errorf("bar(%g, %g, %g) is %q, want %q", c.v, c.allowed, c.scale, got, c.want)
		}
	}
}

func TestSheetTextAndJSON(t *testing.T) {
	s := Sheet{Name: "thing", Head: []string{"Set it"}, Figures: []Figure{
		number("a_l", "a", "L", Some(2), asVolume), number("b_l", "b", "L", Number{}, asVolume), truth("ok", "fine", true)},
		Tables: []SheetTable{{Key: "rows", Title: "Rows", Rows: [][]Figure{{number("x", "x", "", Some(1), asPH), worded("", "bar", "*")}}, Notes: []string{"why"}}}}
	s.Warn("pump", feed.CodeNotLinear)
	s.Handle("caustic-soda")
	text := s.Text()
	for _, want := range []string{"Set it\n", "2.000 L", "fine", "yes", "1.00  *", "why", "off the line", "licensed operator"} {
		if !strings.Contains(text, want) {
			t.Errorf("%q lacks %q", text, want)
		}
	}
	if strings.Contains(text, "b  ") {
		t.Errorf("%q shows what is not there", text)
	}
	data, err := s.JSON()
	if err != nil {
		t.Fatal(err)
	}
	var got map[string]any
	if err := json.Unmarshal(data, &got); err != nil {
		t.Fatal(err)
	}
	thing := got["thing"].(map[string]any)
	row := thing["rows"].([]any)[0].(map[string]any)
	if thing["b_l"] != nil || thing["ok"] != true || thing["a_l"] != 2.0 || len(row) != 1 {
		t.Errorf("%v", thing)
	}
}
