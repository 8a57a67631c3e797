// Package json writes a review as JSON for other programs: contract 1, which
// changes only by addition. Values are in SI base units and in the shortest
// decimal that reads back as the same float64.
package json

import (
	"bytes"
	"encoding/json"
	"fmt"
	"math"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// Contract is the number of the contract this package writes.
const Contract = 1

// Render writes the review as one line of JSON. JSON has no infinities and no
// NaN: an infinite margin is left out, and a figure or amount that is not finite
// is an error, since nobody may mistake it for an answer.
func Render(r *rules.Review) ([]byte, error) {
	if err := Check(r); err != nil {
		return nil, err
	}
	var out bytes.Buffer
	encoder := json.NewEncoder(&out)
	encoder.SetEscapeHTML(false)
	if err := encoder.Encode(shape(r)); err != nil {
		return nil, fmt.Errorf("json: %w", err)
	}
	return out.Bytes(), nil
}

// Check says what of a review no JSON can hold, which no other output may show either:
// a figure, an amount or a number of a curve or table that is not finite.
func Check(r *rules.Review) error {
	for _, c := range r.Curves {
		if err := c.Check(); err != nil {
			return err
		}
	}
	for _, t := range r.Tables {
		if err := t.Check(); err != nil {
			return err
		}
	}
	for _, f := range r.Figures {
		if !isFinite(f.Value) {
			return fmt.Errorf("json: figure %s of %q in state %q is not a finite number", f.ID, f.Subject, f.State)
		}
	}
	for _, f := range r.Findings {
		for _, a := range []*rule.Amount{f.Needed, f.Provided} {
			if a != nil && !isFinite(a.Value) {
				return fmt.Errorf("json: finding %s of %q holds an amount that is not a finite number", f.Rule, f.Subject)
			}
		}
	}
	return nil
}

func isFinite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }
