package plan

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// maker gathers a plan.
type maker struct {
	e     *evidence.Evidence
	bench evidence.Fault
	plan  *Plan
	alike map[Check]*likes
}

// Of plans the first power-up of a chain. It is a lack where there is no supply.
func Of(e *evidence.Evidence) (*Plan, error) {
	if !e.HasSupply() {
		return nil, lack.Key("drive", "multiplier")
	}
	m := &maker{e: e, bench: Bench(e.Chain()), plan: &Plan{Takes: takes(e.Chain()), Stops: stops(e.Chain())}}
	m.plan.Polarity = m.polarity()
	m.cold()
	m.before()
	m.steps()
	m.ratings()
	m.survey()
	m.trips()
	m.after()
	return m.plan, nil
}

// open notes what could not be planned.
func (m *maker) open(what string, err error) {
	m.plan.Open = append(m.plan.Open, fmt.Sprintf("%s: %v", what, err))
}

// takes is what a plan takes for granted.
func takes(c *chain.Chain) []string {
	all := []string{
		fmt.Sprintf("the peak of the drive is set or read to %.0f %% (common practice, no source)", 100*driveShare),
		"levels and times of the steps are common practice, no source",
	}
	if c.Gun.IsFitted() {
		all = append(all, "without emission a disconnected gun and a cold one read alike")
	}
	if b := c.Beam; b != nil && b.MeasuredRipple.Set() {
		all = append(all, "ripple and readings of every step are computed; the measured record "+b.MeasuredRipple.V+" takes the place of the computed ripple in the disturbance and blur of the beam alone, at full voltage with the gun working")
	}
	for i := range c.Instruments {
		in := &c.Instruments[i]
		if !in.Accuracy.Set() {
			all = append(all, "the "+in.Name.V+" is without error: its accuracy is not described")
		}
		if !in.ReadsCurrent() && !in.RatedVoltage.Set() {
			all = append(all, "the "+in.Name.V+" stands what it is put to: its rated voltage is not described")
		}
		if Floats(in) {
			all = append(all, fmt.Sprintf("the %s may show up to %g %% of the voltage it hangs at by itself (common practice, no source)", in.Name.V, 100*floating))
		}
	}
	return all
}

// stops is what ends every step at once.
func stops(c *chain.Chain) []string {
	all := []string{
		"a reading outside its bounds, or one that goes on moving when the drive does not",
		"more current in the return than expected: leakage or corona, to be found before going on",
		"a hiss, a glow, a smell of ozone, a flash, a trip",
	}
	if c.Gun.IsFitted() || c.Vacuum != nil {
		all = append(all, "pressure above the permit")
	}
	return append(all, "anything that nobody present can explain")
}

// before is what is done before the first voltage.
func (m *maker) before() {
	todo := []string{
		"Two people who know the chain, one of them outside with a hand on the switch; nobody with a pacemaker near.",
		"Every cold check done and written down; nothing loose, nothing wet, no tool left inside.",
		"Earthing rod hung ready with its earth lead proved; the way out free.",
	}
	c := m.e.Chain()
	if c.Access != nil && c.Access.Interlock != nil {
		todo = append(todo, "Open the door with the drive at its lowest: the interlock must switch off "+orWord(c.Access.Interlock.ActsOn.V, "the drive")+".")
	} else {
		todo = append(todo, "No interlock is described: keep everybody out by other means that do not rest on memory.")
	}
	if m.e.Chain().Regulation != nil {
		todo = append(todo, "Open the loop, or set it by hand: the drive is set by its peak in every step; close the loop only after the last.")
	}
	for i := range c.Instruments {
		if in := &c.Instruments[i]; Floats(in) {
			todo = append(todo, "The "+in.Name.V+" stands at high voltage itself: insulated for it, fed by a battery, read from outside, never touched before all is off and earthed.")
		}
	}
	if len(dials(c)) == 0 {
		m.plan.Open = append(m.plan.Open, "readings: neither a meter at the divider nor an [[instrument]] is described, so no step can be followed")
	}
	m.plan.Before = todo
}

func orWord(word, otherwise string) string {
	if word == "" {
		return otherwise
	}
	return word
}

// survey lists where radiation is to be measured.
func (m *maker) survey() {
	c := m.e.Chain()
	for _, s := range m.plan.Steps {
		if s.Gun == None || s.Gun == Apart || s.Share < 1 {
			continue
		}
		for i := range c.Shields {
			sh := &c.Shields[i]
			point := Survey{Shield: sh.Name.V, Step: s.Name}
			if r, err := m.e.Radiation(sh, max(s.Output, -s.Output)); err != nil {
				point.Open = err.Error()
			} else {
				point.Highest = r.Upper
			}
			m.plan.Survey = append(m.plan.Survey, point)
		}
	}
	if c.Gun.IsFitted() && len(c.Shields) == 0 {
		m.plan.Open = append(m.plan.Open, "X-rays: no [[shield]] is described; survey every wall, port and window")
	}
}

// trips lists the protections to set.
func (m *maker) trips() {
	p := m.e.Chain().Protection
	if p == nil {
		m.plan.Open = append(m.plan.Open, "trips: no [protection] is described")
		return
	}
	if t := p.OverVoltage; t != nil {
		most, err := evidence.Largest(m.e, evidence.LongTerm(), []string{"output"}, func(e *evidence.Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") })
		m.plan.Trips = append(m.plan.Trips, Trip{"over-voltage", quantity.Text(t.Trip.V), textOr(most.Value, err)})
	}
	if t := p.OverCurrent; t != nil {
		i, err := m.e.In(evidence.Working).TripCurrent()
		m.plan.Trips = append(m.plan.Trips, Trip{"over-current", quantity.Text(t.Trip.V), textOr(i, err)})
	}
}

func textOr[Q quantity.Number](q Q, err error) string {
	if err != nil {
		return "what is not known: " + err.Error()
	}
	return quantity.Text(q)
}

// after is how every step and the day end.
func (m *maker) after() {
	todo := []string{"Drive down, drive off, plug pulled and kept in sight."}
	worst := evidence.Discharge{}
	for _, s := range m.plan.Steps {
		if s.Discharge.Slower(worst) {
			worst = s.Discharge
		}
	}
	switch {
	case worst.Node == "":
		todo = append(todo, "How long the chain stays charged is not known: treat it as charged until the rod has been on every node.")
	case worst.Never:
		todo = append(todo, fmt.Sprintf("%s never falls below 60 V by itself: %s stays. Only the rod discharges it.", worst.Node, quantity.Text(worst.Left)))
	default:
		todo = append(todo, m.wait(worst))
	}
	watch := "Watch the meter fall, and never trust a meter alone."
	if len(Metered(m.e.Chain())) == 0 {
		watch = "No meter is described that would show the fall: every node counts as charged until the rod has been on it."
	}
	todo = append(todo, watch,
		"Rod on the output, the multiplier's top and every column node, one after the other, then leave the earth lead on.")
	if rest, err := m.e.Residue(); err == nil && rest > 60 {
		todo = append(todo, "An intact ladder keeps up to "+quantity.Text(rest)+": the rod at every column node is not optional.")
	}
	m.plan.After = append(todo, "Before hands go in: prove dead with a tester that was proved on a live source before and after.")
}

// wait is how long nobody opens anything: as described where that is longer than what is
// computed.
func (m *maker) wait(slowest evidence.Discharge) string {
	computed := fmt.Sprintf("computed to 60 V at %s, nominal parts", slowest.Node)
	if a := m.e.Chain().Access; a != nil && a.WaitingTime.V > slowest.Time {
		return fmt.Sprintf("Wait the %s described (%s %s), and longer after a fault.", quantity.Text(a.WaitingTime.V), quantity.Text(slowest.Time), computed)
	}
	return fmt.Sprintf("Wait at least %s from full voltage (%s), and longer after a fault.", quantity.Text(slowest.Time), computed)
}
