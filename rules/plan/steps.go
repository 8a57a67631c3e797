package plan

import (
	"fmt"

	"kilovet/hv/parallel"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// level is one level of the drive with how long it is held: common practice, no source.
type level struct {
	share float64
	dwell quantity.Time
	word  string
}

// first proves the polarity; climb are the levels that follow.
var (
	first = level{0.05, 60, "polarity"}
	climb = [...]level{{0.25, 120, ""}, {0.5, 300, ""}, {0.75, 300, ""}, {1, 900, ""}}
	again = [...]level{{0.5, 300, ""}, {1, 900, ""}}
	full  = level{1, 1800, ""}
)

// staged is a step to plan.
type staged struct {
	gun   Gun
	state evidence.State
	level
}

// staircase lists the steps: the levels of the drive, the gun apart first.
func (m *maker) staircase() []staged {
	alone := None
	if m.e.Chain().Gun.IsFitted() {
		alone = Apart
	}
	all := []staged{{alone, evidence.Cold, first}}
	for _, l := range climb {
		all = append(all, staged{alone, evidence.Cold, l})
	}
	if alone == None {
		return all
	}
	for _, l := range again {
		all = append(all, staged{Still, evidence.Cold, l})
	}
	return append(all, staged{Lit, evidence.Working, full})
}

// steps plans every level; what cannot be computed is left open, with the reason.
func (m *maker) steps() {
	list := m.staircase()
	steps, errs := make([]Step, len(list)), make([]error, len(list))
	parallel.Each(len(list), func(i int) { steps[i], errs[i] = m.step(list[i]) })
	for i, s := range steps {
		s.First = m.readying(s.Gun, list[i].level)
		if errs[i] != nil {
			m.open(s.Name, errs[i])
			continue
		}
		m.plan.Steps = append(m.plan.Steps, s)
	}
}

// step plans one level, but for what is done before it.
func (m *maker) step(g staged) (Step, error) {
	s := Step{Name: nameOf(g.gun, g.level), Gun: g.gun, Share: g.share, Dwell: g.dwell}
	if g.word != "" {
		s.Polarity = m.plan.Polarity
	}
	top, err := m.e.In(g.state).Peak()
	if err != nil {
		return s, err
	}
	s.Peak = top * quantity.Voltage(g.share)
	s.Condition = evidence.Condition{State: g.state, Peak: s.Peak, Fault: m.bench}
	return s, m.fill(&s)
}

// fill computes what a step brings about.
func (m *maker) fill(s *Step) (err error) {
	at := m.e.Under(s.Condition)
	if s.Output, err = at.Potential("output"); err != nil {
		return err
	}
	if ripple, err := at.Swing("output", "ground"); err == nil {
		s.Ripple = &ripple
	}
	if i, err := at.ReturnCurrent(); err == nil {
		s.Return = &i
		if !readsReturn(m.e.Chain()) {
			s.Within, err = returnDial.band(m.e, s.Condition)
			if err != nil {
				return err
			}
		}
	}
	if s.Power, err = at.InputPower(); err != nil {
		return err
	}
	if s.Discharge, err = at.SlowestDischarge(); err != nil {
		return err
	}
	s.Readings, err = Readings(m.e, s.Condition)
	return err
}

func nameOf(g Gun, l level) string {
	name := fmt.Sprintf("%s, %.0f %%", g, 100*l.share)
	if l.word != "" {
		name += ", " + l.word
	}
	return name
}

// readying is what is done before a step.
func (m *maker) readying(g Gun, l level) []string {
	switch {
	case l.word != "":
		return []string{"Prove that the output is " + m.plan.Polarity + " before going on; a reversed multiplier destroys what hangs on it."}
	case g == Still && quantity.Equal(l.share, again[0].share):
		return m.gunReadying()
	case g == Lit:
		return []string{"Turn the filament up slowly at full voltage, and watch the emission and the pressure.",
			"An emitting gun makes X-rays: survey every shield before anybody stays near."}
	}
	return nil
}

// polarity is that of the output, as described.
func (m *maker) polarity() string {
	if m.e.Chain().Multiplier.Negative() {
		return "negative"
	}
	return "positive"
}

// gunReadying is what comes before the gun is connected.
func (m *maker) gunReadying() []string {
	todo := []string{"Switch off, wait, discharge and earth as at the end of this plan; then connect the gun."}
	v := m.e.Chain().Vacuum
	if v == nil || !v.PressurePermit.Set() {
		m.plan.Open = append(m.plan.Open, "pressure: no vacuum.pressure_permit is described, so nothing permits high voltage in the vessel")
		return append(todo, "No pressure permit is described: do not go on without one.")
	}
	text := "High voltage only below " + quantity.Text(v.PressurePermit.V) + ", read on a gauge whose factor for the gas is known."
	if limits, err := m.e.Vessel().Permit(); err == nil {
		text += " Over the longest path " + quantity.Text(limits.Free.Value) + " or less is free of discharge."
	}
	return append(todo, text)
}
