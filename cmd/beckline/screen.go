package main

import "beckline/tui"

// openScreen runs the screen until it is left. Its exit code is 0, or 128 and
// the number of the signal that ended it.
func openScreen(c *console, options tui.Options) error {
	c.code = tui.Run(options)
	return nil
}
