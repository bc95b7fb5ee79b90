package tui

import "testing"

// own types four readings into a new water: soft, at 10 °C, 240 m³/h.
func (d *driver) own() *driver {
	return d.keys("7.0", "Enter", "30", "Enter", "10", "Enter", "240", "Enter")
}

// TestScreens compares whole screens with files that a person can review. The
// figures on them are the program's own; what they must be is checked where
// they are computed.
func TestScreens(t *testing.T) {
	for name, see := range map[string]func(d *driver){
		"demo":            func(d *driver) {},
		"first-key":       func(d *driver) { d.keys("7") },
		"four-readings":   func(d *driver) { d.own() },
		"with-calcium":    func(d *driver) { d.own().keys("Down", "12", "Enter", "3", "Enter") },
		"bad-entry":       func(d *driver) { d.own().keys("Home", "1,200", "wait") },
		"bad-entry-left":  func(d *driver) { d.own().keys("Home", "Down", "1,200", "Down") },
		"unusual-asked":   func(d *driver) { d.own().keys("Home", "Down", "Down", "41", "Enter") },
		"out-of-reach":    func(d *driver) { d.own().keys("p", "bicarb", "Enter", "Right", "Down", "9.5", "Enter") },
		"wrong-side":      func(d *driver) { d.own().keys("Right", "Right", "Down", "6.5", "Enter") },
		"product-list":    func(d *driver) { d.own().keys("p", "caustic") },
		"target-list":     func(d *driver) { d.own().keys("t") },
		"product-station": func(d *driver) { d.own().keys("Right", "Down", "Down", "Down", "25", "Enter") },
		"paste-row":       func(d *driver) { d.paste("7.05\t31\t9.5\t250\t\t12") },
		"acid":            func(d *driver) { d.own().keys("p", "sulfuric-93", "Enter", "Right", "Down", "6.6", "Enter") },
		"solid":           func(d *driver) { d.own().keys("p", "soda-ash", "Enter", "Enter") },
		"help":            func(d *driver) { d.keys("?") },
		"cautions":        func(d *driver) { d.keys("c") },
		"slip":            func(d *driver) { d.own().keys("v") },
		"warnings":        func(d *driver) { d.own().keys("w") },
		"figures":         func(d *driver) { d.own().keys("f", "Down", "Down", "Down", "Down") },
		"alarm":           func(d *driver) { d.own().keys("Right", "End", "20", "Enter", "Right", "End", "Up", "8.2", "Enter") },
		"worked-sheet":    func(d *driver) { d.own().keys("s") },
		"three-steps": func(d *driver) {
			d.hard().keys("a", "aeration", "Enter", "60", "Enter", "Right", "a", "chlorine-gas", "Enter", "Down", "0.5", "Enter", "1.2", "Enter")
		},
		"never-together": func(d *driver) {
			d.own().keys("a", "alum-dry", "Enter", "20", "Enter", "a", "hypochlorite", "Enter", "1 mg/L Cl2", "Enter")
		},
		"along-the-line": func(d *driver) { d.own().keys("Down", "12", "Enter", "g") },
	} {
		for _, form := range []struct {
			suffix        string
			look          look
			width, height int
		}{
			{"-80x24", fullLook, 80, 24}, {"-80x24-ascii", plainLook, 80, 24}, {"-132x43", fullLook, 132, 43},
		} {
			t.Run(name+form.suffix, func(t *testing.T) {
				d := demo(t).size(form.width, form.height)
				d.m.look = form.look
				see(d)
				d.golden(name + form.suffix)
			})
		}
	}
}

// TestSmallScreens checks what must be seen on a terminal that is too small.
func TestSmallScreens(t *testing.T) {
	for name, size := range map[string][2]int{"small-60x15": {60, 15}, "small-40x12": {40, 12}, "small-79x24": {79, 24}} {
		d := demo(t).size(size[0], size[1])
		d.shows("SET THE PUMP TO", "L/h", "Caustic soda burns")
		d.golden(name)
	}
}
