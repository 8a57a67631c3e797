package signoff

import (
	"fmt"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"sync"
	"time"

	"kilovet/hv/quantity"
)

// answering are the units in which a measurement answers the rules that begin with a word:
// what an instrument shows of the thing that the rule is about. Where no word fits any unit
// does. Common practice, no source.
var answering = []struct {
	rules string
	units []string
}{
	{"xray.", []string{"Gy/s", "Sv/h", "mSv/h", "uSv/h", "nSv/h", "Sv/s"}},
	{"spacing.", []string{"V", "m"}},
	{"feedthrough.", []string{"V", "m"}},
	{"cable.", []string{"V"}},
	{"feed.", []string{"V"}},
	{"fault.spacing", []string{"V", "m"}},
	{"fault.touch", []string{"V", "A", "C", "J"}},
	{"touch.", []string{"V", "A", "C", "J"}},
	{"discharge.", []string{"V", "s", "C", "J"}},
	{"bleeder.", []string{"V", "s", "ohm"}},
	{"rod.voltage", []string{"V"}},
	{"rod.energy", []string{"J", "V", "C"}},
	{"access.earth_bond", []string{"ohm"}},
}

// unrecorded says what a measurement that is to answer a rule does not record: a value with
// the unit of what the rule is about, the day, and with what it was measured. Who answers for
// it and the number of the record the description demands. Empty where nothing is missing.
func unrecorded(d Disposition) string {
	var missing []string
	if units := wanted(d.Rule); !valued(d.Measurement, units) {
		missing = append(missing, "a value with its unit"+inUnits(units))
	}
	if d.Date == "" && !dated(d.Measurement) && !dated(d.Record) {
		missing = append(missing, "the day, as in 2025-03-04")
	}
	if d.Instrument == "" && !instrumented(d.Measurement) {
		missing = append(missing, "with what it was measured")
	}
	if len(missing) == 0 {
		return ""
	}
	return fmt.Sprintf("a measurement answers it only with %s", strings.Join(missing, ", "))
}

func wanted(rule string) []string {
	for _, a := range answering {
		if strings.HasPrefix(rule, a.rules) {
			return a.units
		}
	}
	return nil
}

func inUnits(units []string) string {
	if units == nil {
		return " and above zero"
	}
	var names []string
	for _, u := range units {
		if d := quantity.DimensionOf(u); d != nil {
			u = d.Noun()
		} else if u != "uSv/h" {
			continue // the one stands for all of them
		} else {
			u = "a dose rate in uSv/h"
		}
		names = append(names, u)
	}
	return " above zero (" + strings.Join(names, " or ") + ")"
}

// valued reports whether a text holds a value above zero in one of some units, any where
// they are none. Nothing at all is what no instrument shows: it has a least that it sees.
func valued(text string, units []string) bool {
	return slices.ContainsFunc(quantity.Mentions(text), func(m quantity.Mention) bool {
		number, _, _ := strings.Cut(m.Text, " ")
		if v, err := strconv.ParseFloat(number, 64); err != nil || v <= 0 {
			return false
		}
		if units == nil {
			return true
		}
		return slices.Contains(units, m.Unit) || m.Dimension != nil && slices.Contains(units, m.Dimension.SI)
	})
}

var day = regexp.MustCompile(`\d{4}-\d{2}-\d{2}`)

func dated(text string) bool {
	return slices.ContainsFunc(day.FindAllString(text, -1), func(d string) bool {
		_, err := time.Parse(time.DateOnly, d)
		return err == nil
	})
}

// instrumented reports whether a text names what was measured with: after "with", or as a
// part between commas or semicolons that is neither a value nor a day.
func instrumented(text string) bool {
	for _, part := range strings.FieldsFunc(text, func(r rune) bool { return r == ',' || r == ';' }) {
		if _, tool, found := strings.Cut(" "+part, " with "); found && strings.TrimSpace(tool) != "" {
			return true
		}
		if len(quantity.Mentions(part)) == 0 && len(letters().FindAllString(day.ReplaceAllString(part, ""), -1)) > 0 {
			return true
		}
	}
	return false
}

// letters are those of a word, not of a lone unit or initial.
var letters = sync.OnceValue(func() *regexp.Regexp { return regexp.MustCompile(`\pL{2,}|\pL-?\d`) })
