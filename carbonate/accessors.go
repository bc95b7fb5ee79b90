package carbonate

import "math"

// DaviesSlope is the slope A of log10 gamma = -A z^2 (sqrt I/(1+sqrt I) - 0.3 I)
// at the constants' temperature, (L/mol)^1/2.
func (k *Constants) DaviesSlope() float64 { return k.daviesA / math.Ln10 }
