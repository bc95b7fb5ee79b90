// Package site reads the plant file: a TOML file, written by the plant's people,
// that says what their works has and wants. It is checked whole, and every
// mistake is reported with its line, its key and what would be accepted.
//
//	path.go      where the file is looked for
//	load.go      reading it
//	decode.go    TOML to a tree of keys that know their lines
//	keys.go      the keys, table by table
//	lines.go     the keys of a treatment line
//	value.go     numbers with units, bands, tolerances
//	quantity.go  volumes, densities, prices and use levels
//	resolve.go   names that refer to each other
//	nearest.go   what may have been meant
//	site.go      the plant that comes out of it
//	units.go     the units shown
//	use.go       a line and a form make a case
//	limits.go    readings and finished water against the plant's own limits
//	show.go      what holds, and where each value comes from
//	template.go  a commented file to start from
//
// Keys are the words of the command line without their dashes; a bare number is
// in the unit of that word, whatever units are shown.
package site
