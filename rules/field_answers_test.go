package rules_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// rodAt is a rod with a half ball of a radius at its end, so far over the floor of a can
// in vacuum, all in millimetres.
func rodAt(radius, gap, can, volts float64) []byte {
	ball := fmt.Sprintf(`{ from = ["0 mm", "%[2]g mm"] }, { to = ["%[1]g mm", "%[3]g mm"], centre = ["0 mm", "%[3]g mm"], turn = "left" }`, radius, gap, gap+radius)
	return rodEnding(ball, radius, can, volts)
}

// rodEnding is a rod with any end in a can.
func rodEnding(end string, radius, can, volts float64) []byte {
	return fmt.Appendf(nil, `format = 1
title = "rod"
[[field]]
name = "gap"
medium = "vacuum"
[[field.electrodes]]
name = "rod"
voltage = "-%[4]g kV"
profile = [%[2]s, { to = ["%[1]g mm", "170 mm"] }]
[[field.electrodes]]
name = "can"
voltage = "0 V"
profile = [{ from = ["0 mm", "0 mm"] }, { to = ["%[3]g mm", "0 mm"] }, { to = ["%[3]g mm", "170 mm"] }]
[[field.boundary]]
kind = "natural"
profile = [{ from = ["%[1]g mm", "170 mm"] }, { to = ["%[3]g mm", "170 mm"] }]
`, radius, end, can, volts)
}

// Answers for a described field: the powers of the distance, the rod's radius and the
// can's add up to −1, as the field of the same voltages goes with the size of all; what
// is said to be enough is, and not by much.
func TestAnswersOfADescribedField(t *testing.T) {
	r := reviewed(t, rodAt(5, 15, 150, 50))
	sum := 0.0
	for _, table := range r.Tables {
		for _, row := range table.Rows {
			if table.ID == "field.answers" && row[2].Value != nil && !strings.HasPrefix(row[0].Text, "size") {
				sum += *row[2].Value
			}
		}
	}
	if math.Abs(sum+1) > 0.03 {
		t.Errorf("the powers add up to %g", sum)
	}
	needed := answersOf(r)
	for name, changed := range map[string]func(float64) []byte{
		"radius of rod, its end kept": func(v float64) []byte { return rodAt(v, 15, 150, 50) },
		"distance of rod from can":    func(v float64) []byte { return rodAt(5, v, 150, 50) },
	} {
		v, found := needed[name]
		if !found {
			t.Errorf("no answer by the %s in %v", name, needed)
			continue
		}
		after := strengthOf(reviewed(t, changed(v)), "gap/rod")
		if after.Provided == nil || after.Verdict == rule.Fails || after.Provided.Value < 0.9*after.Needed.Value {
			t.Errorf("%s of %g mm: %s, %s", name, v, after.Verdict, after.Because)
		}
	}
}
