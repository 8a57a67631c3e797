package chain

import (
	"fmt"
	"time"

	"kilovet/hv/document"
)

// Accepted says what is to become of one open point of the review when people sign.
type Accepted struct {
	document.Table
	Rule        document.Given[string] `key:"rule" needed:"yes" means:"rule that fails, is unassessed or is marginal" example:"spacing.corona"`
	Subject     document.Given[string] `key:"subject" means:"what it is about, as the review names it (default: the only thing that the rule judges)" example:"gun feedthrough, air side"`
	Disposition document.Given[string] `key:"disposition" needed:"yes" words:"accepted | restricted | measured" means:"left as it is, left under the restriction that the reason states, or answered by a measurement" example:"accepted"`
	Name        document.Given[string] `key:"name" needed:"yes" means:"who answers for it" example:"A. N. Other"`
	Reason      document.Given[string] `key:"reason" needed:"yes" means:"why that is enough" example:"the hiss is heard and nobody works there"`
	Record      document.Given[string] `key:"record" means:"number of the record of the measurement" example:"MR-0031"`
	Measurement document.Given[string] `key:"measurement" means:"what was measured: value, where, when and with what" example:"0.2 uSv/h at 0.1 m from the port at 23 kV, survey meter SM-2, 2025-03-04"`
	Instrument  document.Given[string] `key:"instrument" means:"with what it was measured, where the measurement does not say it" example:"survey meter SM-2"`
	Date        document.Given[string] `key:"date" means:"day on which it was measured, where the measurement does not say it" example:"2025-03-04"`
}

// checkAccepted asks for the record of a measurement that is said to answer a point,
// and for one disposition a point.
func checkAccepted(s *survey) {
	first := map[string]document.Place{}
	for i := range s.Accepted {
		a := &s.Accepted[i]
		if a.Disposition.V == "measured" {
			s.recorded(a, a.Record, "record")
			s.recorded(a, a.Measurement, "measurement")
		}
		if _, err := time.Parse(time.DateOnly, a.Date.V); s.sound(a.Date.Place) && err != nil {
			s.fault(a.Date.Place, quoted(a.Date.V)+" is no date", "write year, month and day, as in 2025-03-04")
		}
		if !s.sound(a.Rule.Place) || a.Subject.Set() && !s.sound(a.Subject.Place) {
			continue
		}
		point := a.Rule.V + "\x00" + a.Subject.V
		if there, twice := first[point]; twice {
			s.fault(a.Here(), "a second disposition of the same point", "keep one; the first is on line "+lineOf(there))
			continue
		}
		first[point] = a.Here()
	}
}

func (s *survey) recorded(a *Accepted, given document.Given[string], key string) {
	if s.lacks(given.Place) {
		s.fault(a.Disposition.Place, "measured, without "+key, fmt.Sprintf("give %s, or another disposition", key))
	}
}
