// Package readings compares what was read at a first power-up with what the plan
// expects, and finds what a deviation points to: every fault and every error of
// assembly is computed at the very steps that were read, and those are named that fit.
package readings

import (
	"errors"
	"fmt"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/rules/plan"
)

// File is a form of readings as it was filled in.
type File struct {
	document.Table
	Format      document.Given[int]    `key:"format" range:">= 1, <= 1" needed:"yes" means:"version of this format" example:"1"`
	Document    document.Given[string] `key:"document" means:"number of the description" example:"HV-0042"`
	Revision    document.Given[string] `key:"revision" means:"revision of the description" example:"B"`
	Description document.Given[string] `key:"description" needed:"yes" means:"SHA-256 of the description that the form was made for" example:"e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855"`
	Steps       []Step                 `key:"step" means:"one step of the plan"`
}

// Step is one step as it was carried out.
type Step struct {
	document.Table
	Name     document.Given[string]           `key:"name" needed:"yes" means:"name of the step in the plan" example:"gun disconnected, 25 %"`
	Drive    document.Given[quantity.Voltage] `key:"drive" range:"> 0 V, <= 1 MV" needed:"yes" means:"peak of the drive that was really set, zero to peak" example:"446 V"`
	Polarity document.Given[string]           `key:"polarity" words:"positive | negative" means:"sign of the output to ground that was seen; absent where none was" example:"negative"`
	Readings []Reading                        `key:"reading" means:"what one instrument showed"`
}

// Reading is what one instrument showed.
type Reading struct {
	document.Table
	Instrument document.Given[string] `key:"instrument" needed:"yes" means:"name of the instrument in the plan" example:"divider meter"`
	Value      document.Given[string] `key:"value" means:"magnitude that was read, with its unit; absent where nothing was" example:"249 mV"`
}

// Read reads a form against the plan it was made for: every step and instrument must
// be one of the plan's, every value one of its instrument's quantity.
func Read(data []byte, p *plan.Plan) (*File, document.Faults) {
	f := &File{}
	faults := document.Read(data, f)
	if faults.Unread() {
		return f, faults
	}
	c := checker{p, faults, map[string]bool{}}
	for i := range f.Steps {
		c.step(&f.Steps[i])
	}
	return f, c.faults.Sorted()
}

type checker struct {
	plan   *plan.Plan
	faults document.Faults
	seen   map[string]bool
}

func (c *checker) fault(at document.Place, what, remedy string) {
	c.faults = append(c.faults, document.Fault{Code: "reading", Key: at.Key, Line: at.Line, Column: at.Column, What: what, Remedy: remedy})
}

func (c *checker) step(s *Step) {
	if !s.Name.Set() {
		return
	}
	planned := find(c.plan, s.Name.V)
	switch {
	case planned == nil:
		c.fault(s.Name.Place, fmt.Sprintf("%q is no step of the plan", s.Name.V), "make the form anew with kilovet plan --readings")
		return
	case c.seen[s.Name.V]:
		c.fault(s.Name.Place, fmt.Sprintf("a second step %q", s.Name.V), "keep one")
	}
	c.seen[s.Name.V] = true
	if s.Drive.Set() && (s.Drive.V > 2*planned.Peak || 2*s.Drive.V < planned.Peak) {
		c.fault(s.Drive.Place, fmt.Sprintf("the plan sets %s in this step", quantity.Text(planned.Peak)), "write the peak that was set, zero to peak")
	}
	read := map[string]bool{}
	for i := range s.Readings {
		c.reading(planned, &s.Readings[i], read)
	}
}

func (c *checker) reading(s *plan.Step, r *Reading, read map[string]bool) {
	if !r.Instrument.Set() {
		return
	}
	expected := instrument(s, r.Instrument.V)
	switch {
	case expected == nil:
		c.fault(r.Instrument.Place, fmt.Sprintf("%q is no instrument of this step", r.Instrument.V), "make the form anew with kilovet plan --readings")
		return
	case read[r.Instrument.V]:
		c.fault(r.Instrument.Place, fmt.Sprintf("%q a second time in one step", r.Instrument.V), "keep one")
	}
	read[r.Instrument.V] = true
	if !r.Value.Set() || r.Value.V == "" {
		return // nothing was read, or it is a fault already that it is no text
	}
	d := quantity.DimensionOf(expected.Unit)
	v, err := d.Parse(r.Value.V)
	var refusal *quantity.Refusal
	switch {
	case errors.As(err, &refusal):
		c.fault(r.Value.Place, fmt.Sprintf("%q: %s", r.Value.V, refusal.What), refusal.Remedy)
	case v < 0:
		c.fault(r.Value.Place, fmt.Sprintf("%q is below zero", r.Value.V), "readings are magnitudes: write it without its sign, and the sign of the output as the polarity of its step")
	case v > impossible*expected.Value && v > impossible*expected.High:
		c.fault(r.Value.Place, fmt.Sprintf("%q where %s is expected", r.Value.V, d.Text(expected.Value)), "look at the unit and at the range of the instrument")
	}
}

// impossible is how many times what is expected is taken for a slip of the pen.
const impossible = 1e4

func find(p *plan.Plan, name string) *plan.Step {
	for i := range p.Steps {
		if p.Steps[i].Name == name {
			return &p.Steps[i]
		}
	}
	return nil
}

func instrument(s *plan.Step, name string) *plan.Reading {
	for i := range s.Readings {
		if s.Readings[i].Instrument == name {
			return &s.Readings[i]
		}
	}
	return nil
}
