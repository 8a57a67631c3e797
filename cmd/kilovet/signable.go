package main

import (
	"kilovet/hv/chain"
	"kilovet/rules"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
	"kilovet/rules/readings"
)

// signable is what a sheet is made from.
type signable struct {
	chain  *chain.Chain
	review *rules.Review
	read   *readings.Comparison // nil where no readings are named
}

// given reads and reviews a description and, where a second path is named, the readings
// that belong to it.
func (r *reviewing) given(paths []string) (*signable, error) {
	if len(paths) == 2 && paths[0] == "-" && paths[1] == "-" {
		return nil, exitf(unusable, "standard input can be one of the two only")
	}
	description, err := r.input(paths[:1])
	if err != nil {
		return nil, err
	}
	var form source
	if len(paths) == 2 {
		if form, err = r.input(paths[1:]); err != nil {
			return nil, err
		}
	}
	s := &signable{}
	if s.review, err = r.review(description); err != nil {
		return nil, err
	}
	if s.chain, err = r.understood(description); err != nil || len(paths) == 1 {
		return s, err
	}
	s.read, err = r.compared(s.chain, description, form)
	s.review.Inputs = append(s.review.Inputs, inputOf("readings", form))
	return s, err
}

// compared holds a form of readings against the plan of its chain.
func (r *reviewing) compared(c *chain.Chain, description, form source) (*readings.Comparison, error) {
	e := evidence.New(c)
	made, err := plan.Of(e)
	if err != nil {
		return nil, exitf(unsound, "there is nothing to compare the readings with: %v", err)
	}
	f, faults := readings.Read(form.data, made)
	if len(faults) > 0 {
		return nil, r.faulty(form.name, faults)
	}
	if err := belongs(f, description, form.name); err != nil {
		return nil, err
	}
	said, err := readings.Held(e, made, f)
	if err != nil {
		return nil, exitf(unsound, "the readings cannot be compared: %v", err)
	}
	return said, nil
}
