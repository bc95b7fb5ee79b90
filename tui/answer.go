package tui

import (
	"strings"

	"beckline/dosing"
	"beckline/dosing/report"
	"beckline/tui/canvas"
)

// setting is the answer: what to set the pump or the feeder to.
type setting struct {
	heading string
	number  string
	unit    string
	others  []string // the same feed in other units
}

// answer says the dose station's setting. A pump that is known is set in
// percent; a liquid without one in L/h, or mL/min where that reads better; a
// solid or a gas by weight; without a flow there is only the dose.
func answer(s *dosing.Station, u units) setting {
	f := report.Dose(s)
	shown := func(keys ...string) []string {
		var out []string
		for _, key := range keys {
			if x := figure(f, key); x.Value.Given {
				out = append(out, x.ShowUnit())
			}
		}
		return out
	}
	of := func(heading, key string, others ...string) setting {
		x := figure(f, key)
		return setting{heading: heading, number: x.Show(), unit: x.Unit, others: shown(others...)}
	}
	us := u != unitsSI
	hourly := func(heading string, others ...string) setting {
		number, unit, _ := strings.Cut(report.PerHour(f), " ")
		return setting{heading: heading, number: number, unit: unit, others: shown(others...)}
	}
	given := func(key string) bool { return figure(f, key).Value.Given }
	switch {
	case given("pump_percent") && us:
		return of("SET THE PUMP TO", "pump_percent", "feed_gal_h", "feed_ml_min", "feed_l_h", "feed_lb_d")
	case given("feed_gal_h") && us:
		return of("SET THE PUMP TO", "feed_gal_h", "feed_ml_min", "feed_l_h", "feed_lb_d")
	case given("feed_lb_d") && us:
		a := of("FEED", "feed_lb_d", "feed_kg_d")
		a.others = append(a.others, report.PerHour(f))
		return a
	case given("pump_percent"):
		return of("SET THE PUMP TO", "pump_percent", "feed_l_h", "feed_ml_min", "feed_gal_h", "feed_kg_d")
	case given("feed_l_h") && figure(f, "feed_l_h").Value.Value < 1:
		return of("SET THE PUMP TO", "feed_ml_min", "feed_l_h", "feed_gal_h", "feed_kg_d", "feed_lb_d")
	case given("feed_l_h"):
		return of("SET THE PUMP TO", "feed_l_h", "feed_ml_min", "feed_gal_h", "feed_kg_d", "feed_lb_d")
	case given("feed_kg_d"):
		return hourly("FEED", "feed_kg_d", "feed_lb_d")
	}
	a := of("DOSE, AS PRODUCT", "product_mg_l")
	a.others = []string{pureDose(s), "no flow given"}
	return a
}

// pureDose is the dose as the chemical's own formula, which it names: beside
// the dose as product it is another figure of the same feed.
func pureDose(s *dosing.Station) string {
	x := figure(report.Dose(s), "dose_mg_l")
	text := x.ShowUnit() + " as " + s.Addition.Product.Chemical.Formula
	if len([]rune(text)) > answerWidth {
		text = x.ShowUnit() + " pure"
	}
	return text
}

// drawAnswer shows the answer, or why there is none, at the right of the line.
func (m *Model) drawAnswer(c *canvas.Canvas, top int) {
	x := c.Width - answerWidth
	switch {
	case m.good.result == nil:
		m.drawNeeded(c, x, top)
		return
	case m.good.refusal != nil:
		m.drawRefusal(c, x, top)
		return
	case !m.good.solved:
		m.drawNeeded(c, x, top)
		return
	}
	s := m.good.result.Dose()
	if s == nil {
		return
	}
	a := answer(s, m.sheet.Units)
	heading, style := a.heading, canvas.Plain
	if m.old {
		heading, style = "OLD FIGURES: DO NOT SET", canvas.Notice
	}
	c.Text(x, top, heading, style)
	end := m.drawNumber(c, x, top+1, a.number, answerWidth-1-len([]rune(a.unit)))
	c.Text(end+1, top+3, a.unit, canvas.Answer)
	c.Text(x, top+4, canvas.Cut("for "+targetText(m.good.result.Case.Target), answerWidth), canvas.Plain)
	y := top + 5
	text := ""
	for _, other := range a.others {
		if text != "" && len(text)+3+len(other) > answerWidth {
			c.Text(x, y, text, canvas.Plain)
			text = ""
			if y++; y > top+6 {
				return
			}
		}
		if text != "" {
			text += "   "
		}
		text += other
	}
	c.Text(x, y, text, canvas.Plain)
}

// drawNumber writes the number as large as the terminal and the room allow and
// returns the column after it.
func (m *Model) drawNumber(c *canvas.Canvas, x, y int, number string, room int) int {
	if m.look.glyphs == asciiGlyphs || largeWidth(number) > room {
		return c.Text(c.Text(c.Text(x, y+2, ">> ", canvas.Answer), y+2, number, canvas.Answer), y+2, " <<", canvas.Answer)
	}
	for _, r := range number {
		glyph, ok := largeDigits[r]
		if !ok {
			continue
		}
		width := 0
		for i, row := range glyph {
			width = max(width, c.Text(x, y+i, row, canvas.Answer)-x)
		}
		x += width + 1
	}
	return x
}

// largeWidth is how many columns a number takes in large digits.
func largeWidth(number string) int {
	width := 0
	for _, r := range number {
		width += len([]rune(largeDigits[r][0])) + 1
	}
	return width
}

// largeDigits are digits three rows high, made of half blocks.
var largeDigits = map[rune][3]string{
	'0': {"█▀█", "█ █", "▀▀▀"},
	'1': {"▀█ ", " █ ", "▀▀▀"},
	'2': {"▀▀█", "█▀▀", "▀▀▀"},
	'3': {"▀▀█", " ▀█", "▀▀▀"},
	'4': {"█ █", "▀▀█", "  ▀"},
	'5': {"█▀▀", "▀▀█", "▀▀▀"},
	'6': {"█▀▀", "█▀█", "▀▀▀"},
	'7': {"▀▀█", "  █", "  ▀"},
	'8': {"█▀█", "█▀█", "▀▀▀"},
	'9': {"█▀█", "▀▀█", "▀▀▀"},
	'.': {" ", " ", "▀"},
}

// drawNeeded says what an answer still needs.
func (m *Model) drawNeeded(c *canvas.Canvas, x, top int) {
	if len(m.now.missing) == 0 {
		return
	}
	c.Text(x, top, "STILL NEEDED", canvas.Strong)
	for i, name := range m.now.missing {
		if i < lineRows-1 {
			c.Text(x, top+1+i, canvas.Cut(m.label(name), answerWidth), canvas.Notice)
		}
	}
}

// label is how the screen names a field.
func (m *Model) label(name string) string {
	if name == "dic" || name == "ph" {
		return "pH"
	}
	for _, st := range m.line {
		for _, p := range st.places {
			if p.name == name && st.kind == fixedStation {
				return p.label + " of " + st.title
			}
			if p.name == name {
				return p.label
			}
		}
	}
	if strings.HasPrefix(name, "target") {
		return "target"
	}
	return name
}

// targetText is a target in a few letters.
func targetText(t dosing.Target) string { return shortTarget.Replace(report.TargetText(t)) }

var shortTarget = strings.NewReplacer("saturation index", "SI", " mg/L as CaCO3", "", "alkalinity", "alk.")

// refusalHeading says in a few words why there is no answer.
func refusalHeading(p *dosing.Problem) string {
	switch p.Code {
	case "out_of_reach":
		return "OUT OF REACH"
	case "wrong_side":
		return "WRONG WAY"
	case "target_met":
		return "TARGET ALREADY MET"
	case "pump_too_small":
		return "PUMP TOO SMALL"
	}
	return "NO ANSWER"
}

// drawRefusal says that no dose does it. The message rows say it in full.
func (m *Model) drawRefusal(c *canvas.Canvas, x, top int) {
	p := m.good.refusal
	rows := lineRows - 1
	if m.old {
		c.Text(x, top, "OF THE ENTRIES BEFORE", canvas.Notice)
		top, rows = top+1, rows-1
	}
	c.Text(x, top, refusalHeading(p), canvas.Alarm)
	text := ""
	if p.Nearest.Given {
		text = "nearest is " + targetText(dosing.Target{Kind: p.Target.Kind, Value: p.Nearest.Value})
	}
	if len(p.CouldReach) > 0 {
		text = strings.TrimPrefix(text+"; could: "+strings.Join(p.CouldReach, ", "), "; ")
	}
	if text == "" {
		text = "see below"
	}
	for i, line := range canvas.Wrap(text, answerWidth) {
		if i < rows {
			c.Text(x, top+1+i, line, canvas.Plain)
		}
	}
}
