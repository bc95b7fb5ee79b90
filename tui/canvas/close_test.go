package canvas

import "testing"

func TestCloseLeavesOneBlank(t *testing.T) {
	for text, want := range map[string]string{"(20 °C) x": "(20 C)  x", "a°C": "a°C", "  °C": "  C"} {
		c := New(9, 1)
		c.Text(0, 0, text, Plain)
		c.Close('°')
		if got := c.Lines()[0]; got != want {
			t.Errorf("%q became %q, want %q", text, got, want)
		}
	}
}
