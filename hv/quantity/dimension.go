// Package quantity holds the physical quantities of a high-voltage chain as
// defined float64 types in SI base units, one table of the units people write
// them in, and the comparisons that judge them.
package quantity

import (
	"slices"
	"strconv"
	"strings"
)

// Dimension is a kind of quantity: its name, its SI unit and every unit a
// person may write it in.
type Dimension struct {
	Name string // as it stands in messages: "voltage"
	SI   string // the unit of results: "V"
	// Example is one accepted way to write a value.
	Example string

	units    []unit
	prefixed bool // people read it with an SI prefix
}

// unit is one spelling of a unit: value_SI = mantissa × 10^exponent × scale + offset.
type unit struct {
	symbol   string
	exponent int
	scale    float64
	offset   float64
}

// Noun is the name with its article: "an energy".
func (d *Dimension) Noun() string {
	if strings.ContainsAny(d.Name[:1], "aeio") {
		return "an " + d.Name
	}
	return "a " + d.Name
}

// Units lists the accepted spellings, the most usual first.
func (d *Dimension) Units() []string {
	symbols := make([]string, len(d.units))
	for i, u := range d.units {
		symbols[i] = u.symbol
	}
	return symbols
}

func (d *Dimension) find(symbol string) (unit, bool) {
	i := slices.IndexFunc(d.units, func(u unit) bool { return u.symbol == symbol })
	if i < 0 {
		return unit{}, false
	}
	return d.units[i], true
}

// otherCase lists the units that differ from the symbol by upper and lower case
// only, in quotes, so that "mv" can be answered with "mV" or "MV".
func (d *Dimension) otherCase(symbol string) []string {
	var right []string
	for _, u := range d.units {
		if strings.EqualFold(u.symbol, symbol) {
			right = append(right, strconv.Quote(u.symbol))
		}
	}
	return right
}

func decades(base string, prefixes string) []unit {
	var units []unit
	for _, p := range strings.Fields(prefixes) {
		if p == "-" {
			p = ""
		}
		units = append(units, unit{symbol: p + base, exponent: prefixExponent[p], scale: 1})
	}
	return units
}

var prefixExponent = map[string]int{
	"f": -15, "p": -12, "n": -9, "u": -6, "m": -3, "c": -2, "": 0, "h": 2, "k": 3, "M": 6, "G": 9, "T": 12,
}

func exactly(symbol string, exponent int) unit {
	return unit{symbol: symbol, exponent: exponent, scale: 1}
}

func scaled(symbol string, scale float64) unit { return unit{symbol: symbol, scale: scale} }
