package rules_test

import (
	"math"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/exhibit"
)

// tableOf finds a table of a review.
func tableOf(t *testing.T, r *rules.Review, id string) exhibit.Table {
	t.Helper()
	for _, x := range r.Tables {
		if x.ID == id {
			return x
		}
	}
	t.Fatalf("there is no table %s", id)
	return exhibit.Table{}
}

// lineOf finds the row that begins with a name.
func lineOf(t *testing.T, x exhibit.Table, name string) []exhibit.Cell {
	t.Helper()
	for _, row := range x.Rows {
		if row[0].Text == name {
			return row
		}
	}
	t.Fatalf("%s has no row %q", x.ID, name)
	return nil
}

// TestEnergyOfOneStage: smoothing and coupling capacitor of one stage at 5 kV and 2.5 kV;
// a short takes C U, the rod R C ln(U/60 V) with its peak U/R; C0G gives 0.6 % back.
func TestEnergyOfOneStage(t *testing.T) {
	r := reviewed(t, []byte(strings.ReplaceAll(stiff, `{ value = "1 uF" }`, `{ value = "10 nF", dielectric = "C0G" }`)+`
[[bleeder]]
at = "output"
resistor = { value = "1 Gohm" }
permanent = true
[access]
touchable = ["output"]
earthing_rod = { resistance = "100 kohm" }
`))
	node := lineOf(t, tableOf(t, r, "energy.nodes"), "stage.1")
	within(t, "voltage", *node[1].Value, 5000, 2e-3)
	// Below 2.5 kV the diode lets the coupling capacitor follow.
	within(t, "charge", *node[2].Value, 10e-9*5000+10e-9*2500, 1e-2)
	within(t, "energy", *node[3].Value, 10e-9*(5000*5000+2500*2500)/2, 1e-2)
	within(t, "time", *node[5].Value, 1e9*10e-9*math.Log(2)+1e9*20e-9*math.Log(2500/60.), 1e-2)
	rod := lineOf(t, tableOf(t, r, "energy.rod"), "stage.1")
	within(t, "peak", *rod[2].Value, 5000/100e3, 2e-3)
	within(t, "rod time", *rod[3].Value, 100e3*10e-9*math.Log(2)+100e3*20e-9*math.Log(2500/60.), 1e-2)
	back := lineOf(t, tableOf(t, r, "energy.recharge"), "multiplier.smoothing_capacitor.1")
	within(t, "back", *back[3].Value, 0.006*5000, 2e-3)
}

// TestMeterShowsNothingOfWhatStays: with a diode of the column open something stays, and
// the divider has run down: the meter shows nothing.
func TestMeterShowsNothingOfWhatStays(t *testing.T) {
	found := 0
	for _, row := range tableOf(t, reviewedWhole(t, described(t, "column")), "energy.one_open").Rows {
		if !strings.HasPrefix(row[0].Text, "multiplier.diode") || !strings.HasPrefix(row[2].Text, "stays at") {
			continue
		}
		found++
		if row[3].Text != "nothing" {
			t.Errorf("%s open: the meter shows %+v", row[0].Text, row[3])
		}
	}
	if found == 0 {
		t.Error("no open diode of the column leaves anything")
	}
}

// TestMeterWhereAllComesDown: where the last node comes down the meter shows the sensed one,
// at most what the last node is at, but for the tolerances of the decay and the ratio. An arm of
// the divider that is open itself reads high.
func TestMeterWhereAllComesDown(t *testing.T) {
	shows := 0
	for _, row := range tableOf(t, reviewedWhole(t, described(t, "column")), "energy.one_open").Rows {
		if row[3].Value == nil || strings.HasPrefix(row[0].Text, "divider.") {
			continue
		}
		shows++
		if v := *row[3].Value; v < 1 || v > 61 {
			t.Errorf("%s open: %g V where 60 V are the last", row[0].Text, v)
		}
	}
	if shows < 5 {
		t.Errorf("the meter shows something in %d rows", shows)
	}
}

// TestFaultsStandWorstFirst: what passes a limit and nothing catches stands before the rest.
func TestFaultsStandWorstFirst(t *testing.T) {
	x := tableOf(t, reviewedWhole(t, described(t, "column")), "faults.outcomes")
	harmless := false
	for _, row := range x.Rows {
		uncaught := row[5].Text != "" && row[6].Text == ""
		if uncaught && harmless {
			t.Errorf("%s stands behind what is harmless", row[0].Text)
		}
		harmless = harmless || !uncaught
		if uncaught && row[7].Text == "" {
			t.Errorf("%s: nothing is said to add", row[0].Text)
		}
	}
	if len(x.Rows) < 100 {
		t.Errorf("%d faults", len(x.Rows))
	}
}

// TestRatesAtBothDistances: four rows a wall, the nearer point and the higher voltage each
// giving more.
func TestRatesAtBothDistances(t *testing.T) {
	x := tableOf(t, reviewed(t, described(t, "column")), "radiation.rates")
	if len(x.Rows) != 4 {
		t.Fatalf("%d rows", len(x.Rows))
	}
	rate := func(i int) float64 { return *x.Rows[i][5].Value }
	if !(rate(1) > rate(0) && rate(3) > rate(2) && rate(2) > rate(0)) {
		t.Errorf("rates %g %g %g %g", rate(0), rate(1), rate(2), rate(3))
	}
}
