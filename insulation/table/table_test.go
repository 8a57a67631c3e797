package table_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"

	"pgregory.net/rapid"
)

func ExampleSteadyClearance() {
	a := table.SteadyClearance(table.CaseA)
	for _, u := range []quantity.Voltage{20e3, 22.5e3, 60e3} {
		r, err := a.At(u)
		if err != nil {
			fmt.Println(err)
			continue
		}
		fmt.Println(quantity.Text(r.Value), r.Rows, "-", r.Source.Text)
	}
	// Output:
	// 34 mm row 20 kV - IEC 60664-1:2020 Table F.8, case A
	// 39 mm between the rows 20 kV and 25 kV - IEC 60664-1:2020 Table F.8, case A
	// IEC 60664-1:2020 Table F.8, case A ends at a peak voltage of 50 kV, asked for 60 kV
}

// TI SLUAAR5 (2023): 3 mm at 2000 m are 3.87 mm at 4000 m.
func ExampleAltitudeFactor() {
	f, _ := table.AltitudeFactor(4000)
	fmt.Println(quantity.Text(3e-3 * quantity.Length(f.Value)))
	// Output: 3.87 mm
}

// TI SLUAAR5 (2023): impulse 1500, 4000, 6000 V, pollution degree 2, case A.
func TestImpulseClearancesOfAPublishedExample(t *testing.T) {
	c, err := table.ImpulseClearance(table.CaseA, 2)
	if err != nil {
		t.Fatal(err)
	}
	for u, want := range map[quantity.Voltage]quantity.Length{1500: 0.5e-3, 4000: 3e-3, 6000: 5.5e-3} {
		if got, err := c.At(u); err != nil || !quantity.Equal(got.Value, want) {
			t.Errorf("%v V: %v (%v), published %v", u, got.Value, err, want)
		}
	}
}

// TI SLUAAR5 (2023): reinforced insulation takes the next step, 4000 to 6000 V.
func TestReinforcedImpulseIsTheNextStep(t *testing.T) {
	for basic, want := range map[quantity.Voltage]quantity.Voltage{
		4000: 6000, 330: 500, 8000: 12000, // in the series
		12000: 19200, 3000: 4800, 5000: 8000, // its end and outside: 160 %
	} {
		if got := table.ReinforcedImpulse(basic).Value; !quantity.Equal(got, want) {
			t.Errorf("%v V: %v, want %v", basic, got, want)
		}
	}
}

func TestBelowTheFirstRowStandsTheFirstRow(t *testing.T) {
	a, _ := table.ImpulseClearance(table.CaseA, 1)
	r, err := a.At(10)
	if err != nil || !quantity.Equal(r.Value, 0.01e-3) {
		t.Errorf("F.2 at 10 V: %v (%v)", r.Value, err)
	}
	c, err := table.Creepage(1, table.Surface{Degree: 2, Group: table.GroupII})
	if err != nil || !quantity.Equal(c.Value, 0.4e-3) {
		t.Errorf("F.5 at 1 V: %v (%v)", c.Value, err)
	}
	f, err := table.AltitudeFactor(-50)
	if err != nil || f.Value != 1 {
		t.Errorf("A.2 below the sea: %v (%v)", f.Value, err)
	}
}

// The rows of degree 4 below 3.2 kV were not read: a low voltage has no first row to
// fall back on that would not be absurd.
func TestDegree4BelowItsRowsIsALack(t *testing.T) {
	_, err := table.Creepage(230, table.Surface{Degree: 4, Group: table.GroupI})
	if lack.Of(err) == nil {
		t.Errorf("degree 4 at 230 V: %v", err)
	}
	r, err := table.Creepage(6300, table.Surface{Degree: 4, Group: table.GroupII})
	if err != nil || !quantity.Equal(r.Value, 160e-3) {
		t.Errorf("degree 4 at 6.3 kV, group II: %v (%v), read 160 mm", r.Value, err)
	}
}

func TestMarksOfCreepageCells(t *testing.T) {
	for _, c := range []struct {
		v      quantity.Voltage
		degree int
		group  table.Group
		want   gap.Mark
	}{
		{10e3, 3, table.GroupI, gap.Read},
		{12.5e3, 3, table.GroupI, gap.Derived}, // no print above 10 kV at degree 3
		{11e3, 3, table.GroupII, gap.Derived},  // between 10 and 12.5 kV
		{40e3, 3, table.GroupII, gap.Derived},
		{40e3, 2, table.GroupII, gap.Read},
		{63e3, 2, table.GroupIIIa, gap.Memory}, // 630 by the copy, 600 or 630 in memory
		{63e3, 2, table.GroupII, gap.Read},
	} {
		r, err := table.Creepage(c.v, table.Surface{Degree: c.degree, Group: c.group})
		if err != nil || r.Source.Mark != c.want {
			t.Errorf("%v, degree %d, %s: marked %q (%v), want %q", quantity.Text(c.v), c.degree, c.group, r.Source.Mark, err, c.want)
		}
		if project := strings.HasPrefix(r.Source.Text, "project rule"); project != (c.want == gap.Derived) {
			t.Errorf("%v, degree %d: source %q", quantity.Text(c.v), c.degree, r.Source.Text)
		}
	}
}

func TestPrintedWiringExcludesIIIbAtDegree2(t *testing.T) {
	wired, _ := table.Creepage(400, table.Surface{Degree: 2, Group: table.GroupIIIa, PrintedWiring: true})
	plain, _ := table.Creepage(400, table.Surface{Degree: 2, Group: table.GroupIIIb, PrintedWiring: true})
	if !quantity.Equal(wired.Value, 2e-3) || !quantity.Equal(plain.Value, 4e-3) {
		t.Errorf("400 V: IIIa %v, IIIb %v; want 2 and 4 mm", wired.Value, plain.Value)
	}
}

func TestAdvisedAgainstIsSaid(t *testing.T) {
	r, _ := table.Creepage(800, table.Surface{Degree: 3, Group: table.GroupIIIb})
	if !strings.Contains(r.Note, "not recommended") {
		t.Errorf("group IIIb, degree 3, 800 V: note %q", r.Note)
	}
	if r, _ = table.Creepage(800, table.Surface{Degree: 3, Group: table.GroupIIIa}); r.Note != "" {
		t.Errorf("group IIIa: note %q", r.Note)
	}
}

func TestGroupsByIndex(t *testing.T) {
	for cti, want := range map[quantity.Voltage]table.Group{
		600: table.GroupI, 599: table.GroupII, 400: table.GroupII, 399: table.GroupIIIa,
		175: table.GroupIIIa, 174: table.GroupIIIb, 100: table.GroupIIIb,
	} {
		if g, _, err := table.GroupByCTI(cti); err != nil || g != want {
			t.Errorf("CTI %v: %s (%v), want %s", cti, g, err, want)
		}
	}
	if _, _, err := table.GroupByCTI(99); lack.Of(err) == nil {
		t.Errorf("CTI 99 has a group")
	}
}

func TestGroupsByName(t *testing.T) {
	for name, want := range map[string]table.Group{
		"alumina": table.NonTracking, "Borosilicate glass": table.NonTracking,
		"machinable glass-ceramic": table.NonTracking, "PTFE": table.GroupI, "FR-4": table.GroupIIIa, "PEEK": table.GroupIIIb,
	} {
		if g, source, err := table.GroupByName(name); err != nil || g != want || source.Mark != gap.Memory {
			t.Errorf("%q: %s, %q (%v), want %s from memory", name, g, source.Mark, err, want)
		}
	}
	for _, name := range []string{"", "unobtainium"} {
		if _, _, err := table.GroupByName(name); lack.Of(err) == nil || lack.Of(err).Kind != lack.Missing {
			t.Errorf("%q: %v, want a missing index", name, err)
		}
	}
}

func TestGrooveWidths(t *testing.T) {
	for _, c := range []struct {
		degree    int
		clearance quantity.Length
		want      quantity.Length
	}{
		{1, 10e-3, 0.25e-3}, {2, 10e-3, 1e-3}, {3, 10e-3, 1.5e-3}, {4, 10e-3, 2.5e-3},
		{2, 1.5e-3, 0.5e-3}, {3, 2.4e-3, 0.8e-3}, // a third of a clearance under 3 mm
		{1, 2.4e-3, 0.25e-3}, // the third would be wider
		{2, 3e-3, 1e-3},      // not under 3 mm
	} {
		if r, err := table.GrooveWidth(c.degree, c.clearance); err != nil || !quantity.Equal(r.Value, c.want) {
			t.Errorf("degree %d, clearance %v: %v (%v), want %v", c.degree, c.clearance, r.Value, err, c.want)
		}
	}
}

func TestDegreesAreCheckedEverywhere(t *testing.T) {
	for _, degree := range []int{0, 5, -1} {
		_, err1 := table.ImpulseClearance(table.CaseA, degree)
		_, err2 := table.PollutionFloor(degree, false)
		_, err3 := table.Creepage(100, table.Surface{Degree: degree, Group: table.GroupI})
		_, err4 := table.GrooveWidth(degree, 1)
		for i, err := range []error{err1, err2, err3, err4} {
			if l := lack.Of(err); l == nil || (l.Kind == lack.Missing) != (degree == 0) {
				t.Errorf("degree %d, table %d: %v", degree, i, err)
			}
		}
	}
}

// At 1000 V the printed-wiring column of IEC 60664-1 and the uncoated external column
// of IPC-2221 ask for the same 5 mm.
func TestTwoBoardTablesMeetAt1000V(t *testing.T) {
	ipc, err1 := table.BoardSpacing(1000, gap.ExternalUncoated, 0)
	iec, err2 := table.Creepage(1000, table.Surface{Degree: 2, Group: table.GroupIIIa, PrintedWiring: true})
	if err1 != nil || err2 != nil || !quantity.Equal(ipc.Value, iec.Value) {
		t.Errorf("IPC-2221 %v, IEC 60664-1 %v (%v, %v)", ipc.Value, iec.Value, err1, err2)
	}
}

// IEC 61010-1 K.3: without working voltage the answer is that of the impulse, without
// transients that of the steady voltage.
func TestCombinedClearanceMeetsItsEnds(t *testing.T) {
	a, _ := table.ImpulseClearance(table.CaseA, 1)
	for _, u := range []quantity.Voltage{1500, 4000, 20e3} {
		d1, _ := a.At(u)
		d2, _ := table.SteadyClearance(table.CaseA).At(u)
		r1, err1 := table.CombinedClearance(0, u)
		r2, err2 := table.CombinedClearance(u, 0)
		if err1 != nil || err2 != nil || !quantity.Equal(r1.Value, d1.Value) || !quantity.Equal(r2.Value, d2.Value) {
			t.Errorf("%v: %v and %v, want %v and %v", u, r1.Value, r2.Value, d1.Value, d2.Value)
		}
	}
}

func TestReachUndoesAt(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := table.SteadyClearance(table.Case(rapid.IntRange(0, 1).Draw(t, "case")))
		u := quantity.Voltage(rapid.Float64Range(330, float64(c.Last())).Draw(t, "peak"))
		r, err := c.At(u)
		if err != nil {
			t.Fatal(err)
		}
		back, err := c.Reach(r.Value)
		if err != nil || math.Abs(float64(back/u)-1) > 1e-9 {
			t.Fatalf("%v V takes %v, which stands %v (%v)", u, r.Value, back, err)
		}
	})
}

func TestReachEndsWithTheTable(t *testing.T) {
	a := table.SteadyClearance(table.CaseA)
	if _, err := a.Reach(0.9e-6); lack.Of(err) == nil {
		t.Error("a spacing below the first row stands something")
	}
	if u, err := a.Reach(1); err != nil || u != a.Last() {
		t.Errorf("a metre stands %v (%v); the table says %v and no more", u, err, a.Last())
	}
}

// A dirtier place, a worse material, a higher voltage or a higher place never needs less.
func TestNothingWorseNeedsLess(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		v := quantity.Voltage(rapid.Float64Range(1, 60e3).Draw(t, "V"))
		more := v * quantity.Voltage(rapid.Float64Range(1, 1.05).Draw(t, "more"))
		degree := rapid.IntRange(1, 2).Draw(t, "degree")
		group := table.Group(rapid.IntRange(1, 3).Draw(t, "group"))
		wired := rapid.Bool().Draw(t, "printed wiring")
		creepage := func(v quantity.Voltage, degree int, g table.Group) quantity.Length {
			r, err := table.Creepage(v, table.Surface{Degree: degree, Group: g, PrintedWiring: wired})
			if err != nil {
				t.Fatal(err)
			}
			return r.Value
		}
		least := creepage(v, degree, group)
		for what, worse := range map[string]quantity.Length{
			"voltage": creepage(more, degree, group), "degree": creepage(v, degree+1, group), "group": creepage(v, degree, group+1),
		} {
			if !quantity.AtLeast(worse, least) {
				t.Fatalf("%v V, degree %d, %s: %v; a worse %s needs %v", v, degree, group, least, what, worse)
			}
		}
	})
}

// IEC 60664-1 Table F.1: category IV at 150, 300, 600 V has the impulses of category III at 300,
// 600, 1000 V, 4, 6, 8 kV, and IEC 61010-1 has the same distances there in K.12 and K.11 in every
// row. So category II at 300 and 600 V, 2.5 and 4 kV, has those of III at 150 and 300 V at most.
func TestDistancesOfTheLaboratoryStandardFollowTheImpulse(t *testing.T) {
	for _, peak := range []quantity.Voltage{20, 70, 420, 840, 1400, 2240, 4480, 7000, 11200} {
		for four, three := range map[quantity.Voltage]quantity.Voltage{150: 300, 300: 600, 600: 1000} {
			a, err1 := table.SecondaryClearance(peak, four, 4)
			b, err2 := table.SecondaryClearance(peak, three, 3)
			if err1 != nil || err2 != nil || !quantity.Equal(a.Value, b.Value) {
				t.Errorf("%v V: %v behind IV at %v, %v behind III at %v", peak, a.Value, four, b.Value, three)
			}
		}
		for two, three := range map[quantity.Voltage]quantity.Voltage{150: 150, 300: 150, 600: 300, 1000: 600} {
			a, err1 := table.SecondaryAtMost(peak, two, 2)
			b, err2 := table.SecondaryClearance(peak, three, 3)
			if err1 != nil || err2 != nil || !quantity.Equal(a.Value, b.Value) {
				t.Errorf("%v V behind II at %v: %v, behind III at %v: %v", peak, two, a.Value, three, b.Value)
			}
		}
	}
	if _, err := table.SecondaryAtMost(12e3, 230, 2); lack.Of(err) == nil {
		t.Error("12 kV is past Table K.11")
	}
}
