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

func (r *Refusal) Error() string { return r.What + "; " + r.Remedy }

var number = regexp.MustCompile(`^([+-]?(?:\d+(?:\.\d*)?|\.\d+))(?:[eE]([+-]?\d{1,3}))?`)

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
	if symbol == "" {
		return 0, &Refusal{"a number without a unit", d.accepted()}
	}
	if symbol[0] == ',' {
		return 0, &Refusal{"a decimal comma", "write a decimal point, as in " + strconv.Quote(d.Example)}
	}
	u, ok := d.find(symbol)
	if !ok {
		return 0, d.unknownUnit(symbol)
	}
	return u.value(m[1], m[2], d)
}

// value joins mantissa and exponent before the one conversion, so that "10 uF"
// is the float64 nearest to 1e-5.
func (u unit) value(mantissa, exponent string, d *Dimension) (float64, error) {
	e := u.exponent
	if exponent != "" {
		n, _ := strconv.Atoi(exponent)
		e += n
	}
	v, err := strconv.ParseFloat(mantissa+"e"+strconv.Itoa(e), 64)
	v = v*u.scale + u.offset
	if err != nil || math.IsInf(v, 0) {
		return 0, &Refusal{"a number too large to compute with", d.accepted()}
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
	if right, ok := d.otherCase(symbol); ok {
		return &Refusal{fmt.Sprintf("unit %q", symbol), fmt.Sprintf("upper and lower case matter: write %q", right)}
	}
	for _, other := range dimensions {
		if _, ok := other.find(symbol); ok {
			return &Refusal{fmt.Sprintf("unit %q is a %s, not a %s", symbol, other.Name, d.Name), d.accepted()}
		}
	}
	return &Refusal{fmt.Sprintf("unknown unit %q", cut(symbol)), d.accepted()}
}

func (d *Dimension) accepted() string {
	return fmt.Sprintf("write a %s such as %q (units: %s)", d.Name, d.Example, strings.Join(d.Units(), ", "))
}

var signs = strings.NewReplacer("\u00b5", "u", "\u03bc", "u", "\u2126", "ohm", "\u03a9", "ohm", "\u2212", "-", "²", "2", "³", "3", "\u00a0", " ", "\u202f", " ")

func plainSigns(s string) string { return signs.Replace(s) }

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
