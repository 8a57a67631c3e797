package readings

import (
	"cmp"
	"math"
	"slices"

	"kilovet/rules/evidence"
	"kilovet/rules/plan"
)

// Apart is a further reading that would tell apart what the readings leave standing.
type Apart struct {
	What, Step string
	Planned    bool // an instrument of the plan, not read in that step; else a further one
	Unit       string
	Expected   []Expectation // the least first
}

// Expectation is what a further reading would be, and of what: a magnitude in SI units.
type Expectation struct {
	Low, High float64
	Names     []string
}

const (
	// certain is the relative difference that a further reading can be relied on to show:
	// common practice, no source.
	certain = 0.1
	// further is how many further readings are asked for at most.
	further = 3
)

// unread is something that can be read in a step and was not.
type unread struct {
	what, unit string
	planned    bool
	least      float64 // that a further instrument reads well: common practice, no source
	of         func(*evidence.Evidence) (float64, error)
}

// apart looks for readings that were not taken and separate most of what the readings leave
// standing, in the step with the highest drive that was read: nobody goes higher for it.
func (b *bench) apart(suspects []Suspect) (all []Apart, standing int) {
	rivals := left(suspects)
	highest := b.highest()
	open := b.open(highest)
	together := [][]*trial{rivals}
	for len(all) < further {
		best, split := Apart{}, together
		for _, u := range open {
			if a, parts := b.split(u, highest, rivals, together); len(parts) > len(split) {
				best, split = a, parts
			}
		}
		if len(split) == len(together) {
			break
		}
		all, together = append(all, best), split
	}
	return all, len(rivals)
}

// left are the hypotheses that the readings leave standing: those that fit, and about as
// well as the best.
func left(suspects []Suspect) (all []*trial) {
	for _, s := range suspects {
		if s.Fits() && s.Fit <= suspects[0].Fit+1 {
			all = append(all, s.trials...)
		}
	}
	return all
}

// open is what was not read in a step, the instruments of the plan first.
func (b *bench) open(in taken) (all []unread) {
	current := false
	for place, r := range in.step.Readings {
		current = current || r.Unit == "A"
		if !b.wasRead(in.step, place) {
			all = append(all, unread{r.Instrument, r.Unit, true, 0, func(e *evidence.Evidence) (float64, error) { return plan.Value(e, place) }})
		}
	}
	if !current {
		all = append(all, unread{"the current in the return of the multiplier", "A", false, 1e-6, func(e *evidence.Evidence) (float64, error) {
			i, err := e.ReturnCurrent()
			return float64(i), err
		}})
	}
	metered := plan.Metered(b.e.Chain())
	for _, node := range b.e.Nodes() {
		if slices.ContainsFunc(metered, func(m string) bool { return b.e.Same(m, node) }) {
			continue
		}
		all = append(all, unread{"the voltage of " + node + " to ground", "V", false, 1, func(e *evidence.Evidence) (float64, error) {
			v, err := e.Reads(node, "ground")
			return float64(v), err
		}})
	}
	return all
}

// wasRead reports whether an instrument was read in a step.
func (b *bench) wasRead(s *plan.Step, place int) bool {
	return slices.ContainsFunc(b.all, func(t taken) bool { return t.step == s && t.place == place })
}

// split divides sets of hypotheses by what one reading would show.
func (b *bench) split(u unread, in taken, rivals []*trial, together [][]*trial) (Apart, [][]*trial) {
	values := map[*trial]float64{}
	healthy, err := u.of(b.e.Under(in.at))
	if err != nil {
		return Apart{}, nil
	}
	for _, r := range rivals {
		if values[r], err = b.value(u, in.at, r); err != nil {
			return Apart{}, nil
		}
	}
	a := Apart{What: u.what, Step: in.step.Name, Planned: u.planned, Unit: u.unit}
	least := max(certain*healthy, u.least/certain)
	for _, part := range clusters(rivals, values, least) {
		a.Expected = append(a.Expected, expectation(part, rivals, values))
	}
	var parts [][]*trial
	for _, set := range together {
		parts = append(parts, clusters(set, values, least)...)
	}
	return a, parts
}

// expectation is what a reading would be of a part of the hypotheses, named in their order.
func expectation(part, rivals []*trial, values map[*trial]float64) Expectation {
	e := Expectation{Low: values[part[0]], High: values[part[len(part)-1]]}
	for _, t := range rivals {
		if slices.Contains(part, t) {
			e.Names = append(e.Names, t.name)
		}
	}
	return e
}

// clusters divides hypotheses at the gaps between their values that a reading can be relied
// on to show; below the least value that is read well there is none.
func clusters(set []*trial, values map[*trial]float64, least float64) (all [][]*trial) {
	sorted := slices.Clone(set)
	slices.SortStableFunc(sorted, func(x, y *trial) int { return cmp.Compare(values[x], values[y]) })
	last := math.Inf(-1)
	for _, t := range sorted {
		v := values[t]
		if v-last > certain*max(v, least) {
			all = append(all, nil)
		}
		all[len(all)-1] = append(all[len(all)-1], t)
		last = v
	}
	return all
}

// value is what a reading would be under a hypothesis.
func (b *bench) value(u unread, at evidence.Condition, t *trial) (float64, error) {
	under := at
	under.Fault = both(t.change, at.Fault)
	v, err := u.of(b.e.Under(under))
	if err != nil || t.share == 0 {
		return v, err
	}
	under.Fault = both(t.towards, at.Fault)
	other, err := u.of(b.e.Under(under))
	return v + t.share*(other-v), err
}
