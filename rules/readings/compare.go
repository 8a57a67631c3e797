package readings

import (
	"slices"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
)

// Comparison is what the readings of a form say.
type Comparison struct {
	Rows    []Row
	Planned int // readings of the whole plan, taken or not
	// Polarities are the signs of the output that were seen; Sign says what they come to.
	Polarities []Polarity
	Sign       Sign
	// Sound reports that there are readings, that every one lies within its bounds, that they
	// agree with each other, and that no polarity is the wrong one.
	Sound bool
	// Bent reports that every reading lies within its bounds, and that together they lie
	// further from a healthy chain than one explains: they do not agree with each other.
	Bent bool
	// Suspects are what deviating readings point to, what fits best first.
	Suspects []Suspect
	// Standing is how many hypotheses the readings leave standing; Apart are further readings
	// that would tell them apart.
	Standing int
	Apart    []Apart
	// Healthy is how far the readings lie from a healthy chain, in standard errors (rms).
	Healthy float64
	// Tried counts the hypotheses; Unseen those that these readings cannot tell from a
	// healthy chain; Open names those that could not be computed.
	Tried, Unseen int
	Open          []string
	// Hidden names those that cannot be told from a healthy chain, what fits best first, where
	// nothing explains deviating readings better than one does: they are one class with it.
	Hidden []string
}

// Row is one reading beside what is expected at the drive that was really set.
type Row struct {
	Step, Instrument string
	Read             float64
	Expected         plan.Band
	Within           bool
	// Surplus is by how much a current passes the computed one, where that is more than the
	// reading of it is worth; zero else.
	Surplus float64
}

// taken is one reading with where and how it was taken.
type taken struct {
	step     *plan.Step
	at       evidence.Condition // the plan's step at the drive that was set
	read     float64
	expected plan.Band
	place    int // of its instrument in the step
}

// Of compares a form that was read without faults with its plan, and finds what
// deviations point to.
func Of(e *evidence.Evidence, p *plan.Plan, f *File) (*Comparison, error) {
	all, err := gathered(e, p, f)
	if err != nil {
		return nil, err
	}
	c := compared(e, p, f, all)
	switch {
	case c.Sign == Reversed:
		c.Suspects = reversals(e)
	case len(all) > 0 && !c.Sound:
		diagnose(e, all, c)
	}
	return c, nil
}

// Held compares only: where a reading lies outside its bounds it looks for no reason.
func Held(e *evidence.Evidence, p *plan.Plan, f *File) (*Comparison, error) {
	all, err := gathered(e, p, f)
	if err != nil {
		return nil, err
	}
	return compared(e, p, f, all), nil
}

// agree is the rms deviation in standard errors up to which readings that lie within their
// bounds agree with each other.
const agree = 2

func compared(e *evidence.Evidence, p *plan.Plan, f *File, all []taken) *Comparison {
	c := &Comparison{Planned: planned(p)}
	c.Polarities, c.Sign = polarities(p, f)
	for _, t := range all {
		r := Row{Step: t.step.Name, Instrument: t.step.Readings[t.place].Instrument, Read: t.read, Expected: t.expected, Within: t.expected.Holds(t.read)}
		if more := t.read - t.expected.Value; t.expected.Unit == "A" && more > 2*readShare*t.expected.Value {
			r.Surplus = more
		}
		c.Rows = append(c.Rows, r)
	}
	if len(all) > 0 {
		b := newBench(e, all)
		c.Healthy = b.rms(b.misfit(b.read, b.healthy))
	}
	within := !slices.ContainsFunc(c.Rows, func(r Row) bool { return !r.Within })
	c.Bent = len(all) > 0 && within && c.Healthy > agree
	c.Sound = len(all) > 0 && within && !c.Bent && c.Sign != Reversed
	return c
}

func planned(p *plan.Plan) (n int) {
	for _, s := range p.Steps {
		n += len(s.Readings)
	}
	return n
}

// gathered lists the readings that were taken, step by step.
func gathered(e *evidence.Evidence, p *plan.Plan, f *File) ([]taken, error) {
	var all []taken
	for i := range f.Steps {
		s := &f.Steps[i]
		planned := find(p, s.Name.V)
		at := planned.Condition
		at.Peak = s.Drive.V
		var expected []plan.Reading
		for j := range s.Readings {
			r := &s.Readings[j]
			if !r.Value.Set() {
				continue
			}
			if expected == nil {
				var err error
				if expected, err = plan.Readings(e, at); err != nil {
					return nil, err
				}
			}
			all = append(all, reading(planned, at, r, expected))
		}
	}
	return all, nil
}

func reading(s *plan.Step, at evidence.Condition, r *Reading, expected []plan.Reading) taken {
	for i, x := range expected {
		if x.Instrument == r.Instrument.V {
			v, _ := quantity.DimensionOf(x.Unit).Parse(r.Value.V) // the reader has parsed it already
			return taken{s, at, v, x.Band, i}
		}
	}
	panic("readings: " + r.Instrument.V + " was read, and the plan has no such instrument")
}
