package tui

import (
	"io"
	"os"
	"path/filepath"
	"testing"

	"beckline/dosing"
)

// The test binary plays the program in tests on a real terminal: with this
// variable set it opens the screen instead of running tests. Its value may ask
// for a fault: "solver", "painter", "command".
const childVariable = "BECKLINE_TUI_TEST_CHILD"

func TestMain(m *testing.M) {
	if fault := os.Getenv(childVariable); fault != "" {
		os.Exit(child(fault))
	}
	os.Exit(m.Run())
}

// child runs the screen. A fault strikes once a reading has been typed, so that
// the screen is up by then.
func child(fault string) int {
	o := Options{Commands: fakeCommands()}
	if state := os.Getenv("XDG_STATE_HOME"); state != "" {
		_ = os.Chdir(state) // files that are asked for go there
	}
	struck := func(c dosing.Case) bool { return c.Readings.PH.Given && c.Readings.PH.Value == 6.66 }
	switch fault {
	case "solver":
		o.Solve = func(c dosing.Case) (*dosing.Result, error) {
			if struck(c) {
				panic("forced fault in the solver")
			}
			return dosing.Solve(c)
		}
	case "painter":
		output = func(f *os.File) io.Writer {
			return writerFunc(func(b []byte) (int, error) {
				if string(b) == "6" {
					panic("forced fault in the painter")
				}
				return f.Write(b)
			})
		}
	case "stuck":
		o.Solve = func(c dosing.Case) (*dosing.Result, error) {
			if struck(c) {
				_ = os.WriteFile(filepath.Join(os.Getenv("XDG_STATE_HOME"), "stuck"), nil, 0o600)
				select {}
			}
			return dosing.Solve(c)
		}
	}
	return Run(o)
}

type writerFunc func([]byte) (int, error)

func (f writerFunc) Write(b []byte) (int, error) { return f(b) }
