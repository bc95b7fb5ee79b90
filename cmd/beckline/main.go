// Command beckline turns readings of a water into a caustic or acid dose and a
// pump setting.
//
// Where things are:
//
//	run.go        one run: buffering, exit codes, the one line of a refusal
//	root.go       the bare command: the screen, or the demo plant's slip
//	dose.go water.go rows.go products.go cautions.go check.go version.go man.go
//	              one command each
//	blend.go mix.go curve.go titrate.go site.go
//	              the train's commands; titrate_*.go holds the methods
//	plant.go      --site and --line: what was typed laid over a plant file
//	quantities.go quantities that one command alone asks for
//	csvfile.go    small CSV files, read whole
//	trust.go      what speaks for and against a dose: margin, other ways, slips, worked sheet
//	bench.go trim.go feed.go feed_product.go drawdown.go   jars, a running plant, the feed equipment
//	table.go      small CSV files of readings
//	flags.go      flags from the table of readings
//	help.go       the help texts
//	refusal.go    wrong command lines as problems
package main

import "os"

func main() {
	os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr))
}
