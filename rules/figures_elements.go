package rules

import (
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// elements lists what every capacitor, diode and drive source bears over a period.
func elements(c *collector, e *evidence.Evidence) {
	capacitorsBear(c, e)
	diodesBear(c, e)
	sourcesGive(c, e)
	powers(c, e)
	harmonics(c, e)
}

func capacitorsBear(c *collector, e *evidence.Evidence) {
	for _, name := range e.Capacitors() {
		s, err := e.Across(name)
		add(c, "capacitor.mean", name, evidence.Basis, max(s.Mean, -s.Mean), err)
		add(c, "capacitor.peak", name, evidence.Basis, s.Peak(), err)
	}
}

func diodesBear(c *collector, e *evidence.Evidence) {
	const basis = evidence.Basis
	for _, name := range e.Diodes() {
		d, err := e.Diode(name)
		add(c, "diode.reverse_peak", name, basis, d.ReversePeak, err)
		add(c, "diode.current_mean", name, basis, d.Mean, err)
		add(c, "diode.current_rms", name, basis, d.RMS, err)
		add(c, "diode.current_peak", name, basis, d.Peak, err)
		add(c, "diode.conduction", name, basis, d.Conducting, err)
	}
}

func sourcesGive(c *collector, e *evidence.Evidence) {
	for _, name := range e.DriveSources() {
		f, err := e.Flow(name)
		add(c, "source.current_rms", name, evidence.Basis, f.RMS, err)
		add(c, "source.current_peak", name, evidence.Basis, f.Peak, err)
	}
}

// powers lists where the power goes, part by part and in all.
func powers(c *collector, e *evidence.Evidence) {
	lost, err := e.Losses()
	var sum quantity.Power
	for _, l := range lost {
		add(c, "loss.power", l.Element.Name, evidence.Basis, l.Power, err)
		sum += l.Power
	}
	add(c, "loss.power", "", evidence.Basis, sum, err)
	of(c, "loss.fed_besides", "", evidence.Basis, e.Feed)
}

// harmonics lists the amplitudes at the drive frequency and twice it where the ripple
// matters; that at the multiplier is listed with it.
func harmonics(c *collector, e *evidence.Evidence) {
	v, err := e.Harmonic("output", 1)
	add(c, "output.ripple_fundamental", "", evidence.Basis, v, err)
	v, err = e.Harmonic("output", 2)
	add(c, "output.ripple_second", "", evidence.Basis, v, err)
	if !e.Chain().HasCathode() {
		return
	}
	const basis = "ripple.phasor"
	lines, err := e.DriveLines()
	if err != nil {
		return
	}
	add(c, "cathode.ripple_fundamental", "", basis, lines[0].AtCathode(), nil)
	add(c, "cathode.ripple_second", "", basis, lines[1].AtCathode(), nil)
	if e.Chain().Bias != nil {
		add(c, "bias.ripple_fundamental", "", basis, lines[0].AcrossBias(), nil)
		add(c, "bias.ripple_second", "", basis, lines[1].AcrossBias(), nil)
	}
}
