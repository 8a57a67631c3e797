package document

import (
	"fmt"
	"regexp"
	"strings"

	"kilovet/hv/quantity"
)

// The patterns of a schema are written for both ECMA-262 and RE2: no classes with
// letters beyond \d, every sign spelled out.
const (
	controls = "\x00-\x1f\x7f-\u009f"
	spaces   = " \u00a0\u1680\u2000-\u200a\u2028\u2029\u202f\u205f\u3000"
	// around is the white space that may stand around a quantity and before its unit.
	around = "[\t-\r\u0085" + spaces + "]"
	// power is what a decimal number may end in; minus signs are those of the keyboard
	// and U+2212.
	power = "([eE][+\u2212-]?\\d+)?"
)

// sign is what a range lets a quantity be, told from zero alone.
type sign int

const (
	anySign sign = iota
	notNegative
	positive
)

// numbers match the decimal numbers of a sign, without their power.
var numbers = [...]string{
	anySign:     "[+\u2212-]?(\\d+(\\.\\d*)?|\\.\\d+)",
	notNegative: "(\\+?(\\d+(\\.\\d*)?|\\.\\d+)|[\u2212-](0+(\\.0*)?|\\.0+))",
	positive:    "\\+?(0*[1-9]\\d*(\\.\\d*)?|0*\\.0*[1-9]\\d*)",
}

// sign is what the range of a quantity says of its sign. Where nought is not the same in
// every unit, as with temperatures, it says nothing.
func (d Declared) sign() sign {
	for _, u := range d.Dimension.Units() {
		if v, err := d.Dimension.Parse("0 " + u); err != nil || v != 0 {
			return anySign
		}
	}
	least := anySign
	for _, b := range d.bounds {
		switch {
		case b.sign == ">" && b.limit >= 0 || b.sign == ">=" && b.limit > 0:
			return positive
		case b.sign == ">=" && b.limit >= 0:
			least = notNegative
		}
	}
	return least
}

// textSchema describes a text on one line.
func textSchema() object {
	return object{
		{"description", "text on one line"}, {"type", "string"}, {"maxLength", longestText},
		{"pattern", "^[^" + controls + "]*[^" + controls + spaces + "][^" + controls + "]*$"},
	}
}

// quantitySchema describes a text with a number of a sign and one of the units of a
// dimension.
func quantitySchema(d *quantity.Dimension, s sign) object {
	bound := [...]string{"", ", not less than 0", ", more than 0"}[s]
	return object{
		{"title", d.Name},
		{"description", fmt.Sprintf("%s in quotes%s, as in %q; units: %s", d.Noun(), bound, d.Example, strings.Join(d.Units(), ", "))},
		{"examples", []string{d.Example}}, {"type", "string"}, {"pattern", unitPattern(d, s)},
	}
}

// unitPattern matches what the dimension's parser reads, of a sign. A unit that begins with a
// digit needs a space before it: without one it would be part of the number.
func unitPattern(d *quantity.Dimension, s sign) string {
	var close, apart []string
	for _, u := range d.Units() {
		if u[0] >= '0' && u[0] <= '9' {
			apart = append(apart, unitSigns.Replace(regexp.QuoteMeta(u)))
		} else {
			close = append(close, unitSigns.Replace(regexp.QuoteMeta(u)))
		}
	}
	var ways []string
	if close != nil {
		ways = append(ways, around+"*("+strings.Join(close, "|")+")")
	}
	if apart != nil {
		ways = append(ways, around+"+("+strings.Join(apart, "|")+")")
	}
	return "^" + around + "*" + numbers[s] + power + "(" + strings.Join(ways, "|") + ")" + around + "*$"
}

// unitSigns lets stand for a sign of a unit all that the parser takes for it.
var unitSigns = strings.NewReplacer("u", "[u\u00b5\u03bc]", "ohm", "(ohm|[\u2126\u03a9])", "2", "[2²]", "3", "[3³]", " ", "[ \u00a0\u202f\u2009]")
