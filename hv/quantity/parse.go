package quantity

import (
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"
)

// Refusal says why a text is not a quantity and what would be accepted.
type Refusal struct {
	What   string // "no unit", "a decimal comma"
	Remedy string // what to write instead
}

// Error says what is wrong and what to write.
func (r *Refusal) Error() string { return r.What + "; " + r.Remedy }

var number = regexp.MustCompile(`^([+-]?(?:\d+(?:\.\d*)?|\.\d+))(?:[eE]([+-]?\d+))?`)

// Parse reads "2.2 nF" into SI units. Case matters (mV, MV); µ may be U+00B5,
// U+03BC or u, ohm may be Ω or ohm; the space may be missing. A decimal comma, a
// number without unit, NaN and infinities are refused with the remedy.
func (d *Dimension) Parse(text string) (float64, error) {
	s := plainSigns(strings.TrimSpace(text))
	m := number.FindStringSubmatch(s)
	if m == nil {
		return 0, d.notANumber(s)
	}
	symbol := strings.TrimSpace(s[len(m[0]):])
	u, ok := d.find(symbol)
	if !ok {
		return 0, d.noUnit(m[1], symbol)
	}
	return u.value(m[1], m[2], d)
}

// noUnit refuses what follows a number where a unit should.
func (d *Dimension) noUnit(mantissa, symbol string) error {
	switch {
	case symbol == "" && strings.Trim(mantissa, "+-0.") == "":
		return &Refusal{"a bare zero", fmt.Sprintf("write it with its unit, as in \"0 %s\"", d.units[0].symbol)}
	case symbol == "":
		return &Refusal{"a number without a unit", d.accepted()}
	case symbol[0] == ',':
		return &Refusal{"a decimal comma", "write a decimal point, as in " + strconv.Quote(d.Example)}
	case strings.ContainsAny(symbol[:1], "0123456789_'."):
		return &Refusal{"a number in groups or with two points", "write the digits without gaps and one decimal point, as in " + strconv.Quote(d.Example)}
	}
	return d.unknownUnit(symbol)
}

// value joins mantissa and exponent before the one conversion, so that "10 uF"
// is the float64 nearest to 1e-5.
func (u unit) value(mantissa, exponent string, d *Dimension) (float64, error) {
	e := u.exponent
	if exponent != "" {
		n, _ := strconv.Atoi(exponent) // out of range: the largest int, refused below
		e += min(max(n, -9999), 9999)
	}
	v, err := strconv.ParseFloat(mantissa+"e"+strconv.Itoa(e), 64)
	if v == 0 && strings.Trim(mantissa, "+-0.") != "" {
		return 0, &Refusal{"a number too small to compute with", d.accepted()}
	}
	v = v*u.scale + u.offset
	if err != nil || math.IsInf(v, 0) {
		return 0, &Refusal{"a number too large to compute with", d.accepted()}
	}
	if d == temperature && v < 0 {
		return 0, &Refusal{"a temperature below absolute zero", d.accepted()}
	}
	return v, nil
}

func (d *Dimension) notANumber(s string) error {
	lower := strings.ToLower(strings.TrimLeft(s, "+-"))
	if strings.HasPrefix(lower, "nan") || strings.HasPrefix(lower, "inf") {
		return &Refusal{"not a finite number", d.accepted()}
	}
	return &Refusal{"not a number with a unit", d.accepted()}
}

func (d *Dimension) unknownUnit(symbol string) error {
	if right := d.otherCase(symbol); len(right) > 0 {
		return &Refusal{fmt.Sprintf("unknown unit %q", symbol), "upper and lower case matter: write " + strings.Join(right, " or ")}
	}
	for _, other := range dimensions {
		if _, ok := other.find(symbol); ok {
			return &Refusal{fmt.Sprintf("unit %q is %s, not %s", symbol, other.Noun(), d.Noun()), d.accepted()}
		}
	}
	return &Refusal{fmt.Sprintf("unknown unit %q", cut(symbol)), d.accepted()}
}

func (d *Dimension) accepted() string {
	return fmt.Sprintf("write %s such as %q (units: %s)", d.Noun(), d.Example, strings.Join(d.Units(), ", "))
}

var signs = strings.NewReplacer("\u00b5", "u", "\u03bc", "u", "\u2126", "ohm", "\u03a9", "ohm", "\u2212", "-", "²", "2", "³", "3", "\u00a0", " ", "\u202f", " ", "\u2009", " ")

// plainSigns writes the signs of units and numbers as a keyboard has them.
func plainSigns(s string) string {
	for i := range len(s) {
		if s[i] >= utf8.RuneSelf {
			return signs.Replace(s)
		}
	}
	return s
}

// cut shortens what a message repeats of the input.
func cut(s string) string {
	const most = 24
	if utf8.RuneCountInString(s) <= most {
		return s
	}
	return string([]rune(s)[:most]) + "…"
}

var dimensions = []*Dimension{
	voltage, current, resistance, capacitance, inductance, frequency, duration, length, area, energy, electronEnergy,
	power, charge, temperature, temperatureRise, thermalResistance, pressure, field, angle, fraction, linearCapacitance,
	perKelvin, perVolt, humidity, resistivity, currentDensity, richardson, kermaRate, pressureLength,
}
