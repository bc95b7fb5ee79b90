package site

// ParsePrice reads a price per kg of product as delivered, as a plant file has
// it: a bare number is per kg, "310 /t", "0.18 per lb". ok is false where it
// cannot be read or is below 0; accepted says what could.
func ParsePrice(text string) (perKg float64, accepted string, ok bool) {
	v, ok := price.parse(text)
	return v, price.accepted, ok
}

// ParseUseLevel reads a maximum use level, kg of product per m3 of water; a bare
// number is mg/L. ok and accepted are as those of ParsePrice.
func ParseUseLevel(text string) (kgPerM3 float64, accepted string, ok bool) {
	v, ok := useLevel.parse(text)
	return v, useLevel.accepted, ok
}

// ParseRatio reads a ratio, 0 to 10000. ok and accepted are as those of
// ParsePrice.
func ParseRatio(text string) (v float64, accepted string, ok bool) {
	v, ok = ratio.parse(text)
	return v, ratio.accepted, ok
}
