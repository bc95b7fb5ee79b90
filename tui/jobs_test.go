package tui

import (
	"strings"
	"testing"

	"beckline/dosing/report"
)

// count presses keys and adds up how many there were.
func (d *driver) count(n *int, words ...string) *driver {
	for _, w := range words {
		if _, special := keyTypes[w]; special {
			*n++
		} else {
			*n += len(w)
		}
	}
	return d.keys(words...)
}

// TestKeysOfThreeJobs does three jobs as a new user would, who has read the
// bottom line and no more, and holds the number of keys that they take.
func TestKeysOfThreeJobs(t *testing.T) {
	n := 0
	d := demo(t).count(&n, "7.0", "Enter", "30", "Enter", "10", "Enter", "240", "Enter").shows("SET THE PUMP TO", "for pH 8.40")
	if n != 14 {
		t.Errorf("four readings to a caustic setting took %d keys", n)
	}
	d.count(&n, "Right", "Right", "8.6", "Enter").shows("for pH 8.60")
	if n != 20 {
		t.Errorf("with another target %d keys", n)
	}

	n = 0
	d = demo(t).keys("7.0", "Enter", "300", "Enter", "10", "Enter", "240", "Enter") // 300 for 30
	d.count(&n, "Home", "Down", "30", "Enter").shows("30 ")
	if n != 5 {
		t.Errorf("putting a wrong entry right took %d keys", n)
	}
	d.count(&n, "p", "sulf", "Enter").shows("WRONG WAY")
	d.count(&n, "Right", "6.6", "Enter").shows("SET THE PUMP TO", "for pH 6.60", "Sulfuric acid burns")
	if n != 16 {
		t.Errorf("to the acid's setting %d keys", n)
	}

	n = 0
	demo(t).own().count(&n, "a", "alum", "Enter", "22", "Enter").shows("[alum-dry]", "SET THE PUMP TO", "Alum dust")
	if n != 9 {
		t.Errorf("a coagulant ahead took %d keys", n)
	}
}

// TestKeysThatMeanNothingAreAnswered: silence would leave a person guessing.
func TestKeysThatMeanNothingAreAnswered(t *testing.T) {
	demo(t).own().keys("q").shows("q does nothing here; ? lists the keys, Ctrl-C leaves")
	demo(t).own().keys("Right", "5").shows("no number goes here")
	demo(t).own().keys("Right", "Right", "Home", "8").shows("typing", "target pH      8 ")
	demo(t).own().keys("a", "alum-dry", "Enter", "Home", "9").shows("typing", "dose           9 ")
}

// TestTheSettingIsTheLargestFigure reads the large digits off the demo plant's
// screen, as a person does over the phone: they are the pump's setting, there is
// nothing else of that size, and nothing but the title above.
func TestTheSettingIsTheLargestFigure(t *testing.T) {
	d := demo(t)
	lines := strings.Split(d.screen(), "\n")
	if !strings.Contains(lines[1], "SET THE PUMP TO") {
		t.Fatalf("under the title: %q", lines[1])
	}
	column := strings.Index(lines[1], "SET THE PUMP TO")
	column = len([]rune(lines[1][:column]))
	cell := func(y, x int) rune {
		if r := []rune(lines[y]); x < len(r) {
			return r[x]
		}
		return ' '
	}
	read := ""
	for x := column; x < column+answerWidth; {
		found := false
		for digit, glyph := range largeDigits {
			width, same := len([]rune(glyph[0])), true
			for row := range glyph {
				for i, r := range []rune(glyph[row]) {
					same = same && cell(2+row, x+i) == r
				}
			}
			if same && (digit != '.' || cell(4, x) == '▀' && cell(4, x+1) == ' ') {
				read, x, found = read+string(digit), x+width+1, true
				break
			}
		}
		if !found {
			break
		}
	}
	want := figure(report.Dose(d.m.good.result.Dose()), "feed_l_h")
	if read != want.Show() || !strings.Contains(lines[4], want.Unit) {
		t.Errorf("the large figure reads %q, the setting is %s:\n%s", read, want.ShowUnit(), d.screen())
	}
	for y, line := range lines {
		if strings.ContainsAny(line, "█▀") && (y < 2 || y > 4) {
			t.Errorf("another large figure in line %d", y+1)
		}
	}
	first := d.m.speak().Statements[0]
	if !strings.HasPrefix(first, "Demo plant: Set the pump to "+want.ShowUnit()) {
		t.Errorf("read aloud first: %q", first)
	}
}
