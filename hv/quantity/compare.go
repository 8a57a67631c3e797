package quantity

import "math"

// slack is the relative difference below which two quantities count as equal:
// arithmetic differs between processors, a verdict must not.
const slack = 1e-9

// AtLeast reports whether a ≥ b within a relative slack of 1e-9.
func AtLeast[Q ~float64](a, b Q) bool { return float64(a) >= float64(b)-slack*larger(a, b) }

// AtMost reports whether a ≤ b within a relative slack of 1e-9.
func AtMost[Q ~float64](a, b Q) bool { return AtLeast(b, a) }

// Equal reports whether a and b agree within a relative slack of 1e-9.
func Equal[Q ~float64](a, b Q) bool { return AtLeast(a, b) && AtMost(a, b) }

func larger[Q ~float64](a, b Q) float64 { return math.Max(math.Abs(float64(a)), math.Abs(float64(b))) }
