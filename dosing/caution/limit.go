package caution

import "strconv"

// Limit is one exposure limit of the air at work, or a level of danger.
type Limit struct {
	Name   string // NIOSH REL, OSHA PEL, NIOSH IDLH, NIOSH STEL
	How    string // 8 h average, ceiling, 15 min, immediately dangerous
	Value  float64
	Unit   string // mg/m3, ppm, mg F/m3, ...
	Source string
}

// Line is the limit as a line of a sheet.
func (l Limit) Line() Line {
	return Line{l.Name + " " + strconv.FormatFloat(l.Value, 'f', -1, 64) + " " + l.Unit + ", " + l.How, l.Source}
}
