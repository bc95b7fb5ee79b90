package site

import _ "embed"

//go:embed template.toml
var template string

// Template is a commented plant file that loads as it stands: an invented works
// with a soft upland water.
func Template() string { return template }
