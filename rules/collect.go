package rules

import (
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/figure"
)

// collector gathers the figures of a review; one without a value is not listed.
type collector struct {
	list  []figure.Figure
	state evidence.State // of the figures being gathered; empty where it does not matter
}

// add lists a quantity unless it could not be had.
func add[Q quantity.Number](c *collector, id, subject, basis string, value Q, err error) {
	if err != nil {
		return
	}
	c.number(id, subject, basis, float64(value))
}

// number lists a pure number.
func (c *collector) number(id, subject, basis string, value float64) {
	d := figure.Find(id)
	f := figure.Figure{ID: id, Subject: subject, What: d.What, Value: value, Unit: d.Unit, Basis: basis}
	if d.ByState {
		f.State = string(c.state)
	}
	c.list = append(c.list, f)
}

// of lists what a method of the evidence gives.
func of[Q quantity.Number](c *collector, id, subject, basis string, from func() (Q, error)) {
	v, err := from()
	add(c, id, subject, basis, v, err)
}
