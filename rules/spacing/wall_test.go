package spacing_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// sleeved is a lead of radius 2 mm in a sleeve of alumina, permittivity 9.2, to 3 mm, with
// air to the hole.
func sleeved(voltage, hole, more string) string {
	return site(240) + fmt.Sprintf(`[[feedthrough]]
name = "lead"
voltage = %q
insulation = "basic"
pin = { radius = "2 mm" }
hole = { radius = %q }
%ssleeve = { material = "alumina", permittivity = 9.2, resistivity = "1e12 ohm m", outer_radius = "3 mm", outer_gap = "air", strength = "17 kV/mm", tested_thickness = "3 mm" }
air_side = { length = "60 mm" }
vacuum_side = { length = "120 mm", junction_angle = "45 deg" }
`, voltage, hole, more)
}

// Behind an annulus that holds, the wall is judged at what it takes: by permittivity ln(3/2)/9.2
// of that and ln(16/3), 2.565 %, nothing once DC has settled (capacitors in series, any
// textbook of electrostatics). An annulus that discharges hands the whole on to it.
func TestTheWallOfASleeveTakesItsShare(t *testing.T) {
	share := math.Log(1.5) / 9.2 / (math.Log(1.5)/9.2 + math.Log(16.0/3))
	all := findings(t, sleeved("12 kV", "16 mm", ""))
	for _, of := range []string{"spacing.clearance | lead: sleeve", "spacing.breakdown | lead: sleeve"} {
		f := all[of]
		if f.Verdict != rule.Marginal || len(f.Assumptions) == 0 || *f.Margin < f.Stated {
			t.Errorf("%s: %s, %s", of, f.Verdict, f.Because)
		}
		for _, said := range []string{"2.565 % just after switching", "0 % once DC has settled"} {
			if !strings.Contains(f.Because, said) {
				t.Errorf("%s: no %q in %q", of, said, f.Because)
			}
		}
	}
	if got := all["spacing.breakdown | lead: sleeve"].Provided.Value; math.Abs(got-12e3*share) > 1 {
		t.Errorf("%g V across the wall, of 12 kV %g", got, 12e3*share)
	}
	f := findings(t, sleeved("12 kV", "5 mm", ""))["spacing.breakdown | lead: sleeve"]
	if f.Verdict != rule.Fails || f.Provided.Value != 12e3 || !strings.Contains(f.Because, "discharges, then it takes all") {
		t.Errorf("2 mm of air under 12 kV: %s at %v: %s", f.Verdict, f.Provided, f.Because)
	}
}

// With the thickness of the plate the field is worked out, and its greatest in the sleeve
// judges in place of the layers: in the middle of a thick plate that is what the layers give,
// beside a thin one less. Both are shown.
func TestTheComputedFieldJudgesTheWall(t *testing.T) {
	voltage := func(plate string) float64 {
		f := findings(t, sleeved("12 kV", "16 mm", `plate_thickness = "`+plate+`"`+"\n"))["spacing.breakdown | lead: sleeve"]
		if !strings.Contains(f.Because, "2.565 % just after switching") || !strings.Contains(f.Because, "by the greatest computed field in it") {
			t.Errorf("not both in %q", f.Because)
		}
		return f.Provided.Value
	}
	layers := 12e3 * math.Log(1.5) / 9.2 / (math.Log(1.5)/9.2 + math.Log(16.0/3))
	if thick := voltage("120 mm"); math.Abs(thick/layers-1) > 0.01 {
		t.Errorf("in a thick plate %g V across the wall, by layers %g", thick, layers)
	}
	if thin := voltage("12 mm"); thin > 0.99*layers {
		t.Errorf("in a thin plate %g V across the wall, by layers %g", thin, layers)
	}
}

// One size that the remedies of the wall name serves both of its rules and its annulus.
func TestOneSizeServesTheSleeve(t *testing.T) {
	text := sleeved("12 kV", "5 mm", "")
	before := findings(t, text)
	clearance, breakdown := before["spacing.clearance | lead: sleeve"], before["spacing.breakdown | lead: sleeve"]
	if a, b := resize.FindString(clearance.Remedy), resize.FindString(breakdown.Remedy); a == "" || a != b {
		t.Fatalf("two remedies: %q and %q", clearance.Remedy, breakdown.Remedy)
	}
	after := findings(t, applied(t, text, clearance.Remedy))
	for _, of := range []string{"spacing.clearance | lead: sleeve", "spacing.breakdown | lead: sleeve", "feedthrough.annulus | lead: sleeve to hole"} {
		if f := after[of]; f.Margin == nil || *f.Margin < f.Stated-1e-6 {
			t.Errorf("%s after %q: %s, %s", of, clearance.Remedy, f.Verdict, f.Because)
		}
	}
}
