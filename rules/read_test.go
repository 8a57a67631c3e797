package rules_test

import (
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/evidence"
)

// Two pieces of one node touch, whatever alias names it; another node must not.
func TestElectrodesOfOneNodeMayTouch(t *testing.T) {
	touching := func(node string) string {
		return string(described(t, "column")) + `
[[field]]
name   = "rod"
medium = "air"
[[field.electrodes]]
name    = "rod"
node    = "output"
profile = [{ from = ["3 mm", "0 mm"] }, { to = ["3 mm", "20 mm"] }]
[[field.electrodes]]
name    = "cap"
node    = "` + node + `"
profile = [{ from = ["3 mm", "20 mm"] }, { to = ["3 mm", "30 mm"] }]
[[field.electrodes]]
name    = "wall"
node    = "ground"
profile = [{ from = ["30 mm", "0 mm"] }, { to = ["30 mm", "30 mm"] }]
[[field.boundary]]
kind    = "natural"
profile = [{ from = ["3 mm", "0 mm"] }, { to = ["30 mm", "0 mm"] }]
[[field.boundary]]
kind    = "earth"
profile = [{ from = ["30 mm", "0 mm"] }, { to = ["60 mm", "0 mm"] }]
[[field.boundary]]
kind    = "natural"
profile = [{ from = ["3 mm", "30 mm"] }, { to = ["30 mm", "30 mm"] }]
`
	}
	if _, faults := rules.Read([]byte(touching("control"))); len(faults) > 0 {
		t.Error(faults)
	}
	_, faults := rules.Read([]byte(touching("stage.2")))
	if len(faults) != 1 || faults[0].Code != evidence.Outline || !strings.Contains(faults[0].What, "touches") {
		t.Errorf("another node: %v", faults)
	}
}

// A field that bears another fault is not looked at a second time; the next one is.
func TestOutlinesOfFaultyFieldsAreLeft(t *testing.T) {
	one := string(described(t, "plate"))
	spoilt := strings.Replace(one, `{ to = ["4 mm", "60 mm"] }`, `{ to = ["4 mm", "60"] }, { to = ["4 mm", "50 mm"] }`, 1)
	_, second, _ := strings.Cut(one, "[[field]]")
	second = "[[field]]" + strings.Replace(second, `"gun lead-through"`, `"another"`, 1)
	second = strings.Replace(second, `{ to = ["4 mm", "60 mm"] }`, `{ to = ["4 mm", "60 mm"] }, { to = ["4 mm", "50 mm"] }`, 1)
	_, faults := rules.Read([]byte(spoilt + second))
	if len(faults) != 2 || faults[0].Code == evidence.Outline || faults[1].Code != evidence.Outline {
		t.Errorf("%v", faults)
	}
}
