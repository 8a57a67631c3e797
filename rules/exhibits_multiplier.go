package rules

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// losses shows where the power of the drive goes.
func losses(e *evidence.Evidence) []exhibit.Table {
	lost, err := e.Losses()
	in, err2 := e.InputPower()
	besides, err3 := e.Feed()
	if first(err, err2, err3) != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "multiplier.losses", Chapter: exhibit.Multiplier, Title: "Where the power goes", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "part"}, {Head: "mean power", Unit: "W"}, {Head: "share of what is fed in", Unit: "1"}},
		Note:    "working state; loads count as what they take",
	}
	fed := in + besides
	row := func(name string, p quantity.Power) {
		share := exhibit.Words("")
		if fed > 0 {
			share = exhibit.Number(p / fed)
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(name), exhibit.Number(p), share})
	}
	var sum quantity.Power
	for _, l := range lost {
		row(l.Element.Name, l.Power)
		sum += l.Power
	}
	row("all parts", sum)
	row("fed in by the drive", in)
	row("fed in by heater supply and fixed bias", besides)
	return []exhibit.Table{t}
}

// stageVoltages shows what every capacitor holds.
func stageVoltages(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "multiplier.capacitors", Chapter: exhibit.Multiplier, Title: "Voltages on the capacitors", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "capacitor"}, {Head: "mean", Unit: "V"}, {Head: "peak", Unit: "V"}, {Head: "ripple, peak to peak", Unit: "V"}},
		Note:    "working state",
	}
	for _, name := range e.Capacitors() {
		s, err := e.Across(name)
		if err != nil {
			return nil
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(name), exhibit.Number(max(s.Mean, -s.Mean)), exhibit.Number(s.Peak()), exhibit.Number(s.PeakToPeak())})
	}
	return tabled(t)
}

// tabled is a table that has rows, or nothing.
func tabled(t exhibit.Table) []exhibit.Table {
	if len(t.Rows) == 0 {
		return nil
	}
	return []exhibit.Table{t}
}

// diodeTable shows what every diode bears.
func diodeTable(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "multiplier.diodes", Chapter: exhibit.Multiplier, Title: "Stress of the diodes", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "diode"}, {Head: "reverse peak", Unit: "V"}, {Head: "peak current", Unit: "A"},
			{Head: "mean current", Unit: "A"}, {Head: "r.m.s. current", Unit: "A"}, {Head: "conducts for", Unit: "1"}},
		Note: "working state; currents without that of the junction capacitance",
	}
	for _, name := range e.Diodes() {
		d, err := e.Diode(name)
		if err != nil {
			return nil
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(name), exhibit.Number(d.ReversePeak), exhibit.Number(d.Peak),
			exhibit.Number(d.Mean), exhibit.Number(d.RMS), exhibit.Number(d.Conducting)})
	}
	return tabled(t)
}

// shownHarmonics is how many multiples of the drive frequency the table of ripples has.
const shownHarmonics = 8

// ripples shows the harmonics on their way from the multiplier to the bias.
func ripples(e *evidence.Evidence) []exhibit.Table {
	lines, err := e.DriveLines()
	if err != nil || !e.Chain().HasCathode() {
		lines = nil
	}
	t := exhibit.Table{
		ID: "chain.harmonics", Chapter: exhibit.Multiplier, Title: "Harmonics of the ripple", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "times the drive frequency"}, {Head: "multiplier", Unit: "V"}, {Head: "output", Unit: "V"}},
		Note:    "working state; amplitudes, zero to peak",
	}
	if lines != nil {
		t.Columns = append(t.Columns, exhibit.Column{Head: "cathode", Unit: "V"}, exhibit.Column{Head: "across the bias", Unit: "V"})
		t.Note += "; cathode and bias by phasors"
	}
	for k := 1; k <= shownHarmonics; k++ {
		m, err := e.Harmonic("multiplier", k)
		o, err2 := e.Harmonic("output", k)
		if first(err, err2) != nil {
			return nil
		}
		row := []exhibit.Cell{exhibit.Words(fmt.Sprint(k)), exhibit.Number(m), exhibit.Number(o)}
		if lines != nil {
			row = append(row, exhibit.Number(lines[k-1].AtCathode()), exhibit.Number(lines[k-1].AcrossBias()))
		}
		t.Rows = append(t.Rows, row)
	}
	return tabled(t)
}
