package evidence

import (
	"fmt"
	"math/cmplx"

	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Path is one way by which ripple, hum, drift or noise reaches the beam.
type Path struct {
	Name string // the subject of its figures: "drive.1/filter"
	What string // in words
	// Frequency is zero for noise, which has many, and for drift, which is slower than an
	// exposure.
	Frequency quantity.Frequency
	// Voltage is at the cathode, Bias across the bias, Emission the relative swing of the
	// emission: peak to peak, of noise rms.
	Voltage, Bias quantity.Voltage
	Emission      quantity.Fraction
	Noise, Drift  bool
	// Unknown is why there are no numbers; nil where there are.
	Unknown error
}

// Paths lists every way to cathode and bias, in the order of the chain.
func (e *Evidence) Paths() []Path {
	all, _ := remember(e, "paths", func() ([]Path, error) {
		var all []Path
		for _, part := range []func() []Path{e.drivePaths, e.humPaths, e.heaterPaths, e.driftPaths, e.noisePaths, e.measuredPaths} {
			all = append(all, part()...)
		}
		for i := range all {
			all[i].Emission = max(all[i].Emission, e.emissionSwing(all[i]))
		}
		return all, nil
	})
	return all
}

// NoAnswer is why no swing of the emission is known; nil where the law is.
func (e *Evidence) NoAnswer() error {
	_, err := e.Gun()
	return err
}

// emissionSwing is what a path makes of the emission, by the bias and by the high voltage
// that the cutoff goes with, which are taken to add; none where the law is not known.
func (e *Evidence) emissionSwing(of Path) quantity.Fraction {
	p, err := e.Gun()
	if err != nil || of.Noise {
		return e.noiseSwing(p, of, err)
	}
	sum := quantity.Fraction(0)
	if swing, err := p.Swing(of.Bias); err == nil && !e.DiodeGun() {
		sum += swing
	}
	particle, err := e.Particle()
	if err != nil {
		return sum
	}
	if swing, err := p.SwingOfVoltage(particle.Relative(of.Voltage), of.Frequency, e.bypass()); err == nil {
		sum += swing
	}
	return sum
}

// noiseSwing is the part of the bias alone: what noise moves is the cathode's own.
func (e *Evidence) noiseSwing(p gun.Point, of Path, known error) quantity.Fraction {
	if known != nil || e.DiodeGun() {
		return 0
	}
	swing, err := p.Swing(of.Bias)
	if err != nil {
		return 0
	}
	return swing
}

// Harmonics of the drive are listed up to shownOrders as far as they reach shownShare of
// the largest.
const (
	shownOrders = 6
	shownShare  = 0.01
)

// drivePaths are the drive's harmonics, through the filters and as pickup past them.
func (e *Evidence) drivePaths() []Path {
	if !e.HasSupply() {
		return nil
	}
	lines, err := e.DriveLines()
	if err != nil {
		return []Path{{Name: "drive", What: "ripple of the multiplier", Unknown: err}}
	}
	most := 0.0
	for _, l := range lines[:shownOrders] {
		most = max(most, cmplx.Abs(l.Cathode))
	}
	var all []Path
	for k, l := range lines[:shownOrders] {
		through, err := e.driveLine(k+1, func(node string) bool { return node == "multiplier" })
		if err != nil {
			return append(all, Path{Name: "drive", What: "ripple of the multiplier", Unknown: err})
		}
		past := Line{l.Frequency, l.Cathode - through.Cathode, l.Bias - through.Bias}
		if max(cmplx.Abs(through.Cathode), cmplx.Abs(past.Cathode)) < shownShare*most {
			continue
		}
		order := fmt.Sprint(k + 1)
		all = append(all,
			path("drive."+order+"/filter", ordinal(k+1)+" harmonic, filters and cable", through),
			path("drive."+order+"/pickup", ordinal(k+1)+" harmonic, pickup past the filter", past))
	}
	return all
}

func ordinal(n int) string {
	return []string{"", "first", "second", "third", "fourth", "fifth", "sixth"}[n]
}

// path is a line as peak to peak.
func path(name, what string, l Line) Path {
	return Path{Name: name, What: what, Frequency: l.Frequency,
		Voltage: quantity.Voltage(2 * cmplx.Abs(l.Cathode)), Bias: quantity.Voltage(2 * cmplx.Abs(l.Bias))}
}

// humPaths is the mains' common mode through the heater feed.
func (e *Evidence) humPaths() []Path {
	h := e.chain.Heater
	if h == nil || h.Feed != nil && h.Feed.Kind.V == "battery" {
		return nil
	}
	what := "common mode through the heater feed"
	if h.Feed != nil && h.Feed.Screen.V {
		what += ", screened"
	}
	l, err := e.Hum()
	p := path("mains/feed", what, l)
	p.Unknown = err
	return []Path{p}
}

// heaterPaths are what an AC heater, or the ripple of a DC one, does to tip and emission.
func (e *Evidence) heaterPaths() []Path {
	h := e.chain.Heater
	if h == nil {
		return nil
	}
	if !e.alternatingHeater() {
		v, f, err := e.TipRipple()
		if v == 0 && err == nil {
			return nil
		}
		return []Path{{Name: "heater/ripple", What: "DC heater: its ripple at the tip", Frequency: f, Voltage: 2 * v, Bias: 2 * v, Unknown: err}}
	}
	tip := Path{Name: "heater/tip", What: "AC heater: tip, resistors at the ends of their tolerance"}
	if h.CentreResistors == nil {
		tip.What = "AC heater: tip, one leg the return"
	}
	v, err := e.TipSwingAtWorst()
	if err == nil {
		tip.Frequency, err = e.heaterFrequency()
	}
	tip.Voltage, tip.Bias, tip.Unknown = 2*v, 2*v, err
	warm := Path{Name: "heater/temperature", What: "AC heater: its temperature"}
	w, err := e.TemperatureSwing()
	warm.Frequency, warm.Bias, warm.Unknown = w.Frequency, w.Bias, err
	warm.Emission = w.Emission
	if e.biasMovesCathode() {
		warm.Voltage = w.Bias
	}
	return []Path{tip, warm}
}

// driftPaths are what moves slower than an exposure.
func (e *Evidence) driftPaths() []Path {
	if e.chain.Beam == nil && !e.chain.HasCathode() {
		return nil
	}
	drifts, err := e.Drifts()
	if err != nil {
		return []Path{{Name: "drift", What: "divider and regulation over temperature and exposure", Drift: true, Unknown: err}}
	}
	all := make([]Path, len(drifts))
	for i, d := range drifts {
		all[i] = Path{Name: d.Name, What: driftWords[d.Name], Voltage: d.Voltage, Drift: true}
	}
	return all
}

var driftWords = map[string]string{
	"divider/temperature":       "divider, as the air changes",
	"reference/temperature":     "reference, as the air changes",
	"regulation/stability":      "reference, by itself",
	"bias resistor/temperature": "bias resistor, as the air changes",
}

// noisePaths are resistor and emission noise across the bias.
func (e *Evidence) noisePaths() []Path {
	if b := e.chain.Bias; b == nil || b.Kind.V != "self" || !e.chain.Gun.IsFitted() {
		return nil
	}
	resistor, emission, err := e.BiasNoise()
	noise := func(name, what string, rms quantity.Voltage) Path {
		p := Path{Name: name, What: what, Bias: rms, Noise: true, Unknown: err}
		if e.biasMovesCathode() {
			p.Voltage = rms
		}
		return p
	}
	return []Path{noise("bias resistor/noise", "thermal noise of the bias resistor", resistor),
		noise("emission/noise", "shot noise of the emission, at most", emission)}
}

// measuredPaths is the measured record, which stands in place of ripple and hum.
func (e *Evidence) measuredPaths() []Path {
	m, err := e.Measured()
	if m == nil && err == nil {
		return nil
	}
	p := Path{Name: "measured", What: "measured, in place of ripple and hum", Unknown: err}
	if m != nil {
		lines, _, err := m.Record.Lines("measured", m.Record.Duration())
		p.Voltage, p.Unknown = m.PeakToPeak(), err
		if err == nil {
			p.Frequency = lines[0].Frequency
		}
	}
	return []Path{p}
}

// Within says whether a path blurs, bands or drifts over exposure and dwell.
func (e *Evidence) Within(p Path) string {
	b := e.chain.Beam
	switch {
	case p.Noise:
		return "blurs"
	case p.Drift:
		return "drifts"
	case b == nil || !b.Exposure.Set() && !b.Dwell.Set():
		return ""
	case !quantity.AtLeast(float64(p.Frequency)*float64(e.averaging()), 1):
		return "bands"
	case b.Dwell.Set() && !quantity.AtLeast(float64(p.Frequency)*float64(b.Dwell.V), 1):
		return "blurs; bands in a dwell"
	}
	return "blurs"
}

// Locked reports whether a path keeps step with the mains.
func (e *Evidence) Locked(p Path) bool {
	s := e.chain.Site
	if s == nil || !s.MainsFrequency.Set() || p.Frequency == 0 {
		return false
	}
	turns := float64(p.Frequency / s.MainsFrequency.V)
	return quantity.Equal(turns, 1) || quantity.Equal(turns, 2)
}

// NoPaths is why nothing is said of paths to the beam; nil where they are listed.
func (e *Evidence) NoPaths() error {
	if !e.HasSupply() {
		return lack.Key("drive", "multiplier")
	}
	if e.chain.Beam == nil && !e.chain.HasCathode() {
		return lack.Failed("neither a beam nor a cathode is described")
	}
	return nil
}
