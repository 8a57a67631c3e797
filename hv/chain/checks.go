package chain

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// checks are all checks across keys. Each finds nothing in a sound description.
var checks = []Check{
	{"purpose", "there is something to review: a multiplier, a spacing, a feedthrough or a field", checkPurpose},
	{"multiplier", "what hangs on the multiplier has one, and the multiplier has a drive", checkMultiplier},
	{"stages", "a list of capacitances has one value, or one a stage", checkStages},
	{"drive", "the limit of the drive is not below its peak, and only halves have an unbalance", checkDrive},
	{"regulation", "a regulated chain has a divider", checkRegulation},
	{"load", "a load has a current or a resistance", checkLoads},
	{"bias", "a bias is made by what it is said to be made by", checkBias},
	{"adjustment", "a bias is adjusted within ends of its own kind", checkAdjustment},
	{"beam", "the beam is of a particle whose keys are given, from a node of the chain", checkBeam},
	{"heater", "the frequency of an AC heater is known", checkHeater},
	{"name", "names tell things apart", checkNames},
	{"node", "every named node exists", checkNodes},
	{"part", "a loose part has the values of its kind", checkParts},
	{"instrument", "an instrument reads a node, or the return", checkInstruments},
	{"target", "a shield stands before a target that is described", checkTargets},
	{"spacing", "a spacing lies between two nodes or stands a stated voltage", checkSpacings},
	{"feedthrough", "the parts of a feedthrough go into each other, and its pin is at a node or a stated voltage", checkFeedthroughs},
	{"shape", "a shape has the sizes of its kind, and they agree with the clearance", checkShapes},
	{"electrode", "an electrode has the potential of a node or a fixed one", checkElectrodes},
	{"profile", "a profile starts at a point and goes on by lines and arcs", checkProfiles},
	{"accepted", "an open point has one disposition, and a measurement is recorded where one answers it", checkAccepted},
}

func checkPurpose(s *survey) {
	if s.without(s.Multiplier != nil) && s.without(len(s.Spacings) > 0) && s.without(len(s.Feedthroughs) > 0) && s.without(len(s.Fields) > 0) {
		s.fault(s.Here(), "there is nothing to review", "describe [drive] and [multiplier], a [[spacing]], a [[feedthrough]] or a [[field]]")
	}
}

// checkMultiplier asks for a drive to a multiplier, and for a multiplier to all that hangs on one.
func checkMultiplier(s *survey) {
	if s.Multiplier != nil {
		if s.without(s.Drive != nil) {
			s.fault(s.Multiplier.Here(), "a multiplier without a drive", "describe [drive]: frequency and peak at least")
		}
		return
	}
	if !s.legible {
		return
	}
	for _, place := range s.hangingOn() {
		s.fault(place, "this hangs on a multiplier, and there is none", "describe [multiplier] and [drive]")
	}
}

// hangingOn lists the tables that make no sense without a multiplier.
func (s *survey) hangingOn() []document.Place {
	return slices.Concat(each(s.Filters), each(s.Loads), each(s.Bleeders), each(s.Instruments), one(s.Regulation),
		one(s.Cable), one(s.Divider), one(s.Bias), one(s.Gun), one(s.Heater))
}

// placed is a table of the description.
type placed[T any] interface {
	*T
	Here() document.Place
}

func each[T any, P placed[T]](tables []T) []document.Place {
	places := make([]document.Place, len(tables))
	for i := range tables {
		places[i] = P(&tables[i]).Here()
	}
	return places
}

func one[T any, P placed[T]](table P) []document.Place {
	if table == nil {
		return nil
	}
	return []document.Place{table.Here()}
}

// checkStages counts lists of capacitances; outside the multiplier a capacitor has one value.
func checkStages(s *survey) {
	if m := s.Multiplier; m != nil && s.sound(m.Stages.Place) {
		s.perStage(m.CouplingCapacitor, m.Stages.V)
		s.perStage(m.SmoothingCapacitor, m.Stages.V)
	}
	for i := range s.Filters {
		s.perStage(s.Filters[i].Capacitor, 1)
	}
	if s.Bias != nil {
		s.perStage(s.Bias.Bypass, 1)
	}
}

func (s *survey) perStage(c *Capacitor, stages int) {
	if c == nil {
		return
	}
	for _, list := range []document.Given[[]quantity.Capacitance]{c.Value, c.ValueAtVoltage} {
		n := len(list.V)
		switch {
		case n <= 1 || n == stages:
		case stages == 1:
			s.fault(list.Place, fmt.Sprintf("%d values for one capacitor", n), "give one value")
		default:
			s.fault(list.Place, fmt.Sprintf("%d values for %d stages", n, stages), fmt.Sprintf("give one value, or %d, from the grounded end", stages))
		}
	}
}

func checkDrive(s *survey) {
	d := s.Drive
	if d == nil {
		return
	}
	if s.sound(d.Peak.Place) && s.sound(d.PeakLimit.Place) && !quantity.AtLeast(d.PeakLimit.V, d.Peak.V) {
		s.fault(d.PeakLimit.Place, "the limit is below the peak of "+quantity.Text(d.Peak.V), "give the most that the peak can reach if regulation is lost")
	}
	m := s.Multiplier
	if d.Unbalance.Set() && m != nil && !m.Symmetrical() && (!m.Topology.Set() || s.sound(m.Topology.Place)) {
		s.fault(d.Unbalance.Place, "a half-wave multiplier has one drive, not two halves", `leave it out, or write topology = "symmetrical"`)
	}
}

func checkRegulation(s *survey) {
	if s.Regulation != nil && s.without(s.Divider != nil) {
		s.fault(s.Regulation.Here(), "regulation without a divider that senses the output", "describe [divider]")
	}
}

func checkLoads(s *survey) {
	for i := range s.Loads {
		l := &s.Loads[i]
		switch {
		case l.Current.Set() && l.Resistance.Set():
			s.fault(l.Resistance.Place, "both a current and a resistance", "keep one of the two")
		case s.lacks(l.Current.Place) && s.lacks(l.Resistance.Place):
			s.fault(l.Here(), "neither a current nor a resistance", `give one, as in current = "10 uA"`)
		}
	}
}

func checkBias(s *survey) {
	b := s.Bias
	switch {
	case b == nil || !s.sound(b.Kind.Place):
		return
	case b.Kind.V == "self":
		s.selfBias(b)
	case s.lacks(b.Voltage.Place):
		s.fault(b.Here(), "a fixed bias without a voltage", `give voltage, as in voltage = "300 V"`)
	}
}

// selfBias is made by the emission in a resistor, so it needs both, and the output
// must feed the control electrode.
func (s *survey) selfBias(b *Bias) {
	if s.without(s.Gun != nil) {
		s.fault(b.Kind.Place, "self-bias without a gun whose emission makes it", `describe [gun], or write kind = "fixed" with a voltage`)
	}
	if s.without(b.Resistor != nil) {
		s.fault(b.Here(), "self-bias without a resistor", `give resistor, as in resistor = { value = "4.7 Mohm" }`)
	}
	if b.Fed.V == "cathode" {
		s.fault(b.Fed.Place, "the emission would not pass the bias resistor: no self-bias arises", `write fed = "control", or kind = "fixed" with a voltage`)
	}
	if b.Voltage.Set() {
		s.fault(b.Voltage.Place, "self-bias is made by the emission, not given", `leave it out, or write kind = "fixed"`)
	}
}

func checkHeater(s *survey) {
	h := s.Heater
	if h == nil || h.Supply.V != "ac" || !s.lacks(h.Frequency.Place) {
		return
	}
	if s.Site == nil && s.legible || s.Site != nil && s.lacks(s.Site.MainsFrequency.Place) {
		s.fault(h.Supply.Place, "an AC heater of unknown frequency", "give frequency here or mains_frequency in [site]")
	}
}

func checkTargets(s *survey) {
	var names []string
	known := map[string]bool{}
	for i := range s.Targets {
		name := s.Targets[i].Name
		if !s.sound(name.Place) {
			return // it may be the one that a shield names
		}
		names = append(names, name.V)
		known[name.V] = true
	}
	for i := range s.Shields {
		t := s.Shields[i].Target
		if s.sound(t.Place) && s.without(known[t.V]) {
			s.fault(t.Place, quoted(t.V)+" is no described target", oneOf("target", "describe it as a [[target]]", t.V, names))
		}
	}
}

// oneOf offers the nearest of the known names, and lists them.
func oneOf(what, otherwise, name string, known []string) string {
	if len(known) == 0 {
		return otherwise
	}
	remedy := what + "s: " + list(known)
	if near, ok := document.Nearest(name, known); ok {
		remedy = fmt.Sprintf("was %q meant? ", near) + remedy
	}
	return remedy
}

// list writes names one after the other, the middle of a long list left out.
func list(names []string) string {
	const most, last = 40, 4
	if n := len(names); n > most {
		return strings.Join(names[:most-last], ", ") + ", … " + strings.Join(names[n-last:], ", ")
	}
	return strings.Join(names, ", ")
}
