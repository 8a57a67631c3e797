package quantity

import (
	"math"
	"strconv"
	"strings"
)

// Text writes a quantity for people: four significant digits, the usual prefix.
func Text[Q Number](q Q) string { return q.Dimension().Text(float64(q)) }

// Text writes an SI value of the dimension for people: four significant digits
// and, where it is usual, an SI prefix; temperatures in degrees Celsius below
// 1000 K, times from 1000 s in minutes and from ten hours in hours, angles from 100 mrad in
// degrees, fractions in per cent or ppm. What is smaller than the smallest prefix can say is "below 1 fm".
func (d *Dimension) Text(v float64) string {
	switch {
	case d == temperature && v < 1000:
		return Significant(v-273.15) + " °C"
	case d == duration && math.Abs(v) >= 36000:
		return Significant(v/3600) + " h"
	case d == duration && math.Abs(v) >= 1000:
		return Significant(v/60) + " min"
	case d == angle && math.Abs(v) >= degreesFrom:
		return Significant(v*180/math.Pi) + " deg"
	case d == fraction:
		return fractionText(v)
	case d == area:
		return Significant(v*1e6) + " mm2"
	case d == pressure:
		return pressureText(v / 100)
	case d == kermaRate:
		return rateText(v * 3600e6)
	case d == humidity:
		return Significant(v*1e3) + " g/m3"
	case d == perKelvin || d == perVolt:
		return Significant(v*1e6) + " ppm" + d.SI[1:]
	case !d.prefixed:
		return Significant(v) + " " + d.SI
	}
	return engineering(v, strings.ReplaceAll(d.SI, "ohm", "Ω"))
}

// degreesFrom is the angle, 100 mrad, from which one is said in degrees.
const degreesFrom = 0.1

// DimensionOf finds the dimension whose results carry the SI unit; nil where none does.
func DimensionOf(si string) *Dimension {
	for _, d := range dimensions {
		if d.SI == si {
			return d
		}
	}
	return nil
}

// fractionText writes a share in per cent or ppm; one that means nothing as a number is
// "below 0.001 ppm".
func fractionText(v float64) string {
	const least = 1e-9 * (1 - 5e-5) // less what rounds up to it
	switch {
	case v > 0 && v < least:
		return "below 0.001 ppm"
	case v < 0 && v > -least:
		return "above -0.001 ppm"
	}
	if a := math.Abs(v); a > 0 && a < 1e-3 {
		return Significant(v*1e6) + " ppm"
	}
	return Significant(v*100) + " %"
}

// pressureText writes a pressure given in mbar, with a power of ten below a thousandth as
// gauges show it: 4.444e-4 beside 4.444e-5.
func pressureText(v float64) string {
	if a := math.Abs(v); a > 0 && a < 1e-3 {
		mantissa, exponent, _ := strings.Cut(strconv.FormatFloat(v, 'e', 3, 64), "e")
		return strings.TrimRight(strings.TrimRight(mantissa, "0"), ".") + powers.Replace("e"+exponent) + " mbar"
	}
	return Significant(v) + " mbar"
}

// rateText writes an air kerma rate given in µGy/h. A thick wall leaves rates that
// mean nothing as numbers: natural background is about 0.1 µGy/h.
func rateText(v float64) string {
	const least = 1e-6
	if v > 0 && v < least {
		return "below " + Significant(least) + " µGy/h"
	}
	return Significant(v) + " µGy/h"
}

// least is the smallest prefix, less what rounds up to it.
const least = 1e-15 * (1 - 5e-5)

func engineering(v float64, base string) string {
	switch {
	case v == 0:
		return "0 " + base
	case v > 0 && v < least:
		return "below 1 f" + base
	case v < 0 && v > -least:
		return "above -1 f" + base
	}
	const names = "fpnum kMGT" // 10^-15 … 10^12
	step := int(math.Floor(math.Log10(math.Abs(v)*(1+5e-5)) / 3))
	step = min(max(step, -5), 4)
	prefix := strings.TrimSpace(names[step+5 : step+6])
	if prefix == "u" {
		prefix = "µ"
	}
	return Significant(v/math.Pow(1000, float64(step))) + " " + prefix + base
}

// Significant writes four significant digits without trailing zeros; very small and
// very large numbers with a power of ten, as in 4e-5.
func Significant(v float64) string {
	a := math.Abs(v)
	if a != 0 && (a < 1e-3 || a >= 1e5) {
		return powers.Replace(strconv.FormatFloat(v, 'g', 4, 64))
	}
	digits := 3
	if a >= 1 {
		digits = max(0, 3-int(math.Floor(math.Log10(a))))
	} else if a > 0 {
		digits = 3 - int(math.Floor(math.Log10(a)))
	}
	s := strconv.FormatFloat(v, 'f', digits, 64)
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return s
}

// powers takes the padding out of an exponent: 4e-05 is written 4e-5.
var powers = strings.NewReplacer("e-0", "e-", "e+0", "e", "e+", "e")
