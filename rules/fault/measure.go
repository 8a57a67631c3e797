package fault

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// Measure is a measure of protection, and whether it catches a fault.
type Measure struct {
	Name    string // "over-voltage trip"
	Catches bool
	Because string // one clause
	Assumes []string
}

// sensor is what a trip looks at.
type sensor int

const (
	unknown sensor = iota // not given, or in words that say nothing about it
	own                   // a sensor that rests on nothing of the main divider
	main                  // the divider that the meter and the regulation use
)

// sensorOf reads what a voltage trip senses. Only what is said to be separate counts as
// separate; a bare node is read by the divider, where that senses it.
func sensorOf(senses string) sensor {
	words := strings.ToLower(senses)
	for _, w := range []string{"second", "separate", "independent", "own divider", "another"} {
		if strings.Contains(words, w) {
			return own
		}
	}
	for _, w := range []string{"divider", "meter", "tap", "output", "feedback", "reading"} {
		if strings.Contains(words, w) {
			return main
		}
	}
	return unknown
}

// stops reports whether what a trip acts on takes the high voltage away.
func stops(actsOn string) bool {
	return strings.Contains(actsOn, "drive") || strings.Contains(actsOn, "mains")
}

// measures are those of a chain against one fault.
func measures(e *evidence.Evidence, f Fault) []Measure {
	var all []Measure
	c := e.Chain()
	if p := c.Protection; p != nil {
		if p.OverVoltage != nil {
			all = append(all, overVoltage(e, f, p.OverVoltage))
		}
		if p.OverCurrent != nil {
			all = append(all, overCurrent(e, f, p.OverCurrent))
		}
	}
	if f.Class == "pressure rise" && c.Vacuum != nil && c.Vacuum.PressurePermit.Set() {
		all = append(all, Measure{Name: "pressure interlock", Catches: true, Because: "the high voltage is permitted below " + quantity.Text(c.Vacuum.PressurePermit.V) + " only"})
	}
	return all
}

func overVoltage(e *evidence.Evidence, f Fault, t *chain.VoltageTrip) Measure {
	m := Measure{Name: "over-voltage trip", Assumes: e.Opposing()} // what it sees is less with what opposes
	see := (*evidence.Evidence).Sensed
	switch sensorOf(t.Senses.V) {
	case unknown:
		m.Because = "what it senses is not known"
		return m
	case main:
		see = (*evidence.Evidence).Shown
		if strings.HasPrefix(f.Part, "divider.") {
			m.Because = "it rests on the divider that failed"
			return m
		}
	}
	return trips(e, m, t.ActsOn.V, t.Trip.V, see)
}

func overCurrent(e *evidence.Evidence, f Fault, t *chain.CurrentTrip) Measure {
	m := Measure{Name: "over-current trip", Assumes: append(slices.Clone(e.TripAssumptions()), e.Unresisted()...)}
	senses := e.TripSenses()
	switch {
	case f.Part == "multiplier return" && senses == evidence.OfReturn:
		m.Because = "it rests on the return that failed"
		return m
	case f.Part == senses:
		m.Because = "it rests on " + senses + ", which failed"
		return m
	}
	return trips(e, m, t.ActsOn.V, t.Trip.V, (*evidence.Evidence).TripCurrent)
}

// trips decides whether what a trip sees is at or above its set point, and whether it acts.
func trips[Q quantity.Number](e *evidence.Evidence, m Measure, actsOn string, set Q, see func(*evidence.Evidence) (Q, error)) Measure {
	seen, err := see(e)
	switch {
	case err != nil:
		m.Because = "what it sees is not known: " + err.Error()
	case !stops(actsOn):
		m.Because = "it does not take the drive away"
	case quantity.AtLeast(seen, set):
		m.Catches, m.Because = true, fmt.Sprintf("it sees %s and is set to %s", quantity.Text(seen), quantity.Text(set))
	default:
		m.Because = fmt.Sprintf("it sees %s of the %s it is set to", quantity.Text(seen), quantity.Text(set))
	}
	return m
}
