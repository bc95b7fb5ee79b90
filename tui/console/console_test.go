package console

import "testing"

func TestUnfinishedKeys(t *testing.T) {
	for _, c := range []struct {
		in   string
		want bool
	}{
		{"a", false}, {"\x1b", true}, {"\x1b[", true}, {"\x1b[A", false}, {"\x1bO", true}, {"\x1bOA", false},
		{"\x1b[1;5", true}, {"\x1b[1;5C", false}, {"12\x1b[20", true}, {"\x1b[200~7.1", false},
		{"\x1ba", false}, {"\x1b[A1", false}, {"\xc2", true}, {"\xc2\xb5", false}, {"\xe2\x82", true},
		{"\xe2\x88\x92", false}, {"\x1b[[", true}, {"\x1b[[A", false}, {"", false},
	} {
		if got := unfinished([]byte(c.in)); got != c.want {
			t.Errorf("unfinished(%q) = %v, want %v", c.in, got, c.want)
		}
	}
}
