package evidence

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// fieldCase is a field under one condition, for one set of potentials.
type fieldCase struct {
	Field      *field.Field
	Under      Condition
	Settled    bool // the distribution of a direct voltage that has settled
	potentials map[string]quantity.Voltage
}

// Stress is a greatest field over all states and corners, and the field it stands in.
type Stress struct {
	field.Peak
	Field   *field.Field
	Under   Condition
	Settled bool

	potentials map[string]quantity.Voltage
}

// Text says under what it stands, in words.
func (s Stress) Text() string {
	if s.Settled {
		return s.Under.Text() + ", settled direct voltage"
	}
	return s.Under.Text()
}

// fieldCases are the fields of an arrangement over all states and corners at the
// extremes of its nodes, like ones once; the settled ones after the others.
func (e *Evidence) fieldCases(f *build.Arrangement) ([]fieldCase, error) {
	return remember(e.Under(Condition{}), "field cases "+f.Name.V, func() ([]fieldCase, error) {
		s, err := e.FieldOf(f)
		if err != nil {
			return nil, err
		}
		all, err := e.casesOf(f, s)
		if err != nil {
			return nil, err
		}
		settled, err := e.SettledOf(f)
		if err != nil {
			return all, nil
		}
		for _, c := range slices.Clone(all) {
			c.Settled = true
			if c.Field, err = settled.Under(c.potentials); err != nil {
				return nil, err
			}
			all = append(all, c)
		}
		return all, nil
	})
}

func (e *Evidence) casesOf(f *build.Arrangement, s *field.Solution) (all []fieldCase, err error) {
	for _, c := range e.conditionsOf(f) {
		extremes, err := e.Under(c).extremes(f)
		if err != nil {
			return nil, err
		}
		for _, potentials := range extremes {
			if slices.ContainsFunc(all, func(x fieldCase) bool { return alikeVolts(x.potentials, potentials) }) {
				continue
			}
			at, err := s.Under(potentials)
			if err != nil {
				return nil, err
			}
			all = append(all, fieldCase{Field: at, Under: c, potentials: potentials})
		}
	}
	return all, nil
}

// alikeVolts reports whether two sets of potentials are the same.
func alikeVolts(a, b map[string]quantity.Voltage) bool {
	for name, v := range a {
		if !quantity.Equal(v, b[name]) {
			return false
		}
	}
	return true
}

// conditionsOf are the conditions under which a field differs: one where no electrode
// is at a node; that of the highest voltage for the shape of a spacing.
func (e *Evidence) conditionsOf(f *build.Arrangement) []Condition {
	if f.Gap != nil {
		if _, under, _, err := e.across(f.Gap); err == nil {
			return []Condition{under}
		}
	}
	if slices.ContainsFunc(f.Electrodes, func(el chain.Electrode) bool { return el.Node.Set() && el.Node.V != "ground" }) {
		return Ratings()
	}
	return []Condition{{State: Working}}
}

// Where says on which surface of an arrangement a field is looked for.
type Where struct {
	Electrode string          // on this electrode
	Body      string          // in this body: a dielectric or the medium; empty: in any
	Beside    string          // in the medium on the free surface of this dielectric
	Distance  quantity.Length // from every sharp edge
}

func (w Where) find(f *field.Field) (field.Peak, error) {
	switch {
	case w.Beside != "":
		return f.PeakBeside(w.Beside, w.Distance)
	case w.Electrode == "":
		return f.PeakInBeyond(w.Body, w.Distance)
	case w.Body == "":
		return f.PeakBeyond(w.Electrode, w.Distance)
	}
	return f.PeakFacing(w.Electrode, w.Body, w.Distance)
}

// ClearOfEdges looks clear of sharp edges where there is no peak for them.
func (e *Evidence) ClearOfEdges(f *build.Arrangement, w Where) Where {
	if _, err := e.Stress(f, w); err != nil {
		w.Distance = EdgeDistance
	}
	return w
}

// Stress is the greatest field somewhere over all states and corners and, where the
// resistivities are given, both at once after switching on and settled.
func (e *Evidence) Stress(f *build.Arrangement, w Where) (Stress, error) {
	return e.stress(f, w, func(fieldCase) bool { return true })
}

// FieldPeak is the greatest electrostatic field somewhere over all states and corners.
func (e *Evidence) FieldPeak(f *build.Arrangement, w Where) (Stress, error) {
	return e.stress(f, w, func(c fieldCase) bool { return !c.Settled })
}

// SettledPeak is the greatest field somewhere once a direct voltage has settled.
func (e *Evidence) SettledPeak(f *build.Arrangement, w Where) (Stress, error) {
	if _, err := e.SettledOf(f); err != nil {
		return Stress{}, err
	}
	return e.stress(f, w, func(c fieldCase) bool { return c.Settled })
}

func (e *Evidence) stress(f *build.Arrangement, w Where, counts func(fieldCase) bool) (Stress, error) {
	cases, err := e.fieldCases(f)
	if err != nil {
		return Stress{}, err
	}
	var most Stress
	for _, c := range cases {
		if !counts(c) {
			continue
		}
		p, err := e.peakOf(f, c, w)
		if err != nil {
			return Stress{}, err
		}
		if most.Field == nil || p.Strength > most.Strength {
			most = Stress{p, c.Field, c.Under, c.Settled, c.potentials}
		}
	}
	return most, nil
}

// peakOf remembers the peaks of every case.
func (e *Evidence) peakOf(f *build.Arrangement, c fieldCase, w Where) (field.Peak, error) {
	key := fmt.Sprintf("field peak %s %p %v", f.Name.V, c.Field, w)
	return remember(e.Under(Condition{}), key, func() (field.Peak, error) { return w.find(c.Field) })
}

// SettlingTime is the time constant with which the greatest field somewhere passes to
// that of a settled direct voltage.
func (e *Evidence) SettlingTime(f *build.Arrangement, w Where) (quantity.Time, error) {
	settled, err := e.SettledOf(f)
	if err != nil {
		return 0, err
	}
	key := fmt.Sprintf("settling time %s %v", f.Name.V, w)
	return remember(e.Under(Condition{}), key, func() (quantity.Time, error) {
		p, err := e.Stress(f, w)
		if err != nil {
			return 0, err
		}
		if p.Settled { // the passage starts at the other distribution under the same voltages
			if p.Field, err = e.unsettled(f, p); err != nil {
				return 0, err
			}
		}
		return p.Field.RelaxationTime(settled, p.Peak)
	})
}

// unsettled is the electrostatic field under the voltages of a settled one.
func (e *Evidence) unsettled(f *build.Arrangement, p Stress) (*field.Field, error) {
	cases, err := e.fieldCases(f)
	if err != nil {
		return nil, err
	}
	i := slices.IndexFunc(cases, func(c fieldCase) bool { return c.Field == p.Field })
	s, err := e.FieldOf(f)
	if err != nil {
		return nil, err
	}
	return s.Under(cases[i].potentials)
}

// FieldEnergy is the largest energy of the electrostatic field over states and corners.
func (e *Evidence) FieldEnergy(f *build.Arrangement) (most quantity.Energy, err error) {
	cases, err := e.fieldCases(f)
	if err != nil {
		return 0, err
	}
	for _, c := range cases {
		if c.Settled {
			continue
		}
		w, err := c.Field.Energy()
		if err != nil {
			return 0, err
		}
		most = max(most, w)
	}
	return most, nil
}
