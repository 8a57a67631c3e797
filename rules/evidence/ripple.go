package evidence

import (
	"fmt"
	"math/cmplx"

	"kilovet/hv/circuit"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/phasor"
)

// harmonics is how many multiples of the drive frequency are followed to the
// cathode; behind a filter they fall at least as the square of their order.
const harmonics = 48

// Line is one frequency between the cathode and what its electrons go to, and across the
// bias, as complex amplitudes.
type Line struct {
	Frequency     quantity.Frequency
	Cathode, Bias complex128
}

// AtCathode is the amplitude at the cathode.
func (l Line) AtCathode() quantity.Voltage { return quantity.Voltage(cmplx.Abs(l.Cathode)) }

// AcrossBias is the amplitude across the bias.
func (l Line) AcrossBias() quantity.Voltage { return quantity.Voltage(cmplx.Abs(l.Bias)) }

// DriveLines are drive frequency and harmonics at the cathode: those of the
// multiplier through filter, cable, bias and floating supply, and what strays pick up.
func (e *Evidence) DriveLines() ([]Line, error) {
	return remember(e, "drive lines", func() ([]Line, error) {
		var lines []Line
		for k := 1; k <= harmonics; k++ {
			l, err := e.driveLine(k, nil)
			if err != nil {
				return nil, err
			}
			lines = append(lines, l)
		}
		return lines, nil
	})
}

// driveLine is harmonic k of the drive at the cathode, as far as the tops that are kept
// bring it there; nil keeps all.
func (e *Evidence) driveLine(k int, kept func(node string) bool) (Line, error) {
	s, err := e.solution()
	if err != nil {
		return Line{}, err
	}
	x, err := e.driven(s, k)
	if err != nil {
		return Line{}, err
	}
	for i := range x.Nodes {
		if kept != nil && !kept(x.Nodes[i].Node) {
			x.Nodes[i].Voltage = 0
		}
	}
	l, err := e.line(e.chain.Drive.Frequency.V*quantity.Frequency(k), x)
	return l.scaled(e.taper(k)), err
}

// taper weighs harmonic k of a square drive, whose steps a cut series would overshoot.
func (e *Evidence) taper(k int) float64 {
	if e.chain.Drive.Waveform.V != "square" {
		return 1
	}
	return phasor.Taper(k, harmonics)
}

func (l Line) scaled(w float64) Line {
	return Line{l.Frequency, l.Cathode * complex(w, 0), l.Bias * complex(w, 0)}
}

// driven holds the multiplier's top and the top of its coupling columns at their
// harmonic of order k.
func (e *Evidence) driven(s periodic, k int) (phasor.Excitation, error) {
	c, err := e.Circuit()
	if err != nil {
		return phasor.Excitation{}, err
	}
	x := phasor.Excitation{Extra: e.gunSlope()}
	for _, node := range e.tops(c) {
		all, err := remember(e, "harmonics of "+node, func() ([]complex128, error) { return s.harmonics(node, "ground", harmonics) })
		if err != nil {
			return x, err
		}
		x.Nodes = append(x.Nodes, phasor.Driven{Node: node, Voltage: phasor.Phasor(all[k-1])})
	}
	return x, nil
}

// tops are the nodes of the multiplier and its drive from which anything outside starts,
// one name each.
func (e *Evidence) tops(c *circuit.Circuit) []string {
	inside, outside := make([]bool, c.Nodes()), make([]bool, c.Nodes())
	for _, el := range c.Elements {
		marks := outside
		if el.Role == circuit.Ladder {
			marks = inside
		} else if el.Role == circuit.Stray && el.Name != "stray.pickup" {
			continue // strays of the columns belong to the multiplier
		}
		marks[el.From], marks[el.To] = true, true
	}
	names := []string{"multiplier"}
	top, _ := c.Node("multiplier")
	for n := 1; n < c.Nodes(); n++ {
		if inside[n] && outside[n] && circuit.Node(n) != top {
			names = append(names, c.Labels(circuit.Node(n))[0])
		}
	}
	return names
}

// gunSlope loads cathode to control electrode with n I/(cutoff − bias) where that is
// known; else the gun is a constant current and loads nothing.
func (e *Evidence) gunSlope() []phasor.Transfer {
	p, err := e.Gun()
	if err != nil || e.chain.Bias == nil {
		return nil
	}
	return []phasor.Transfer{phasor.Conductance("cathode", "control", float64(p.Transconductance()))}
}

func (e *Evidence) line(f quantity.Frequency, x phasor.Excitation) (Line, error) {
	c, err := e.Circuit()
	if err != nil {
		return Line{}, err
	}
	r, err := phasor.Solve(c, f, x)
	if err != nil {
		return Line{}, err
	}
	from, to := e.BeamEnds()
	cathode, err := r.Between(from, to)
	if err != nil {
		return Line{}, err
	}
	bias := phasor.Phasor(0)
	if _, ok := c.Node("control"); ok {
		bias, err = r.Between("cathode", "control")
	}
	return Line{f, complex128(cathode), complex128(bias)}, err
}

// Hum is the mains' common mode at the cathode through the heater feed; the
// multiplier stands for its capacitors and its output resistance meanwhile.
func (e *Evidence) Hum() (Line, error) {
	return remember(e, "hum", func() (Line, error) {
		f, err := e.humFeed()
		if err != nil || f == 0 {
			return Line{}, err
		}
		out, err := e.outputConductance()
		if err != nil {
			return Line{}, err
		}
		extra := append(e.gunSlope(), phasor.Conductance("multiplier", "ground", out))
		return e.line(f, phasor.Excitation{Source: "mains", Ladder: true, Extra: extra})
	})
}

// humFeed is the frequency of the hum; zero where nothing carries any.
func (e *Evidence) humFeed() (quantity.Frequency, error) {
	h := e.chain.Heater
	if h == nil || h.Feed != nil && h.Feed.Kind.V == "battery" {
		return 0, nil
	}
	if h.Feed == nil {
		return 0, lack.Key("heater.feed")
	}
	if err := document.Need(h.Feed.Capacitance, h.Feed.CommonMode); err != nil {
		return 0, err
	}
	if e.chain.Site == nil {
		return 0, lack.Key("site.mains_frequency")
	}
	return e.chain.Site.MainsFrequency.Need()
}

// outputConductance is one over the output resistance of the multiplier.
func (e *Evidence) outputConductance() (float64, error) {
	c, err := e.Cascade()
	if err != nil {
		return 0, err
	}
	supply, err := c.Supply()
	return 1 / float64(supply.OutputResistance), err
}

func pick(lines []Line, of func(Line) complex128) []complex128 {
	all := make([]complex128, len(lines))
	for i, l := range lines {
		all[i] = of(l)
	}
	return all
}

// CathodeRipple is the ripple at the cathode at the drive frequency and its
// harmonics, peak to peak.
func (e *Evidence) CathodeRipple() (quantity.Voltage, error) {
	lines, err := e.DriveLines()
	return phasor.PeakToPeak(pick(lines, func(l Line) complex128 { return l.Cathode })), err
}

// BiasRipple is the ripple across the bias, peak to peak, hum included.
func (e *Evidence) BiasRipple() (quantity.Voltage, error) {
	lines, err := e.DriveLines()
	if err != nil {
		return 0, err
	}
	return phasor.PeakToPeak(pick(lines, func(l Line) complex128 { return l.Bias })), nil
}

// CathodeHum is the hum at the cathode, peak to peak: the common mode of the feed and
// the swing of an AC heater, which are taken to add; the heater's centre resistors as
// stated, or at their worst in a corner of the tolerances.
func (e *Evidence) CathodeHum() (quantity.Voltage, error) {
	l, err := e.Hum()
	if err != nil {
		return 0, err
	}
	tip, err := e.tipInCorner()
	return quantity.Voltage(2*cmplx.Abs(l.Cathode)) + 2*tip, err
}

// CathodeDisturbance is the linear sum of ripple and hum, or what was measured in their
// place.
func (e *Evidence) CathodeDisturbance() (quantity.Voltage, error) {
	if m, err := e.Measured(); err != nil || m != nil {
		return m.PeakToPeak(), err
	}
	ripple, err := e.CathodeRipple()
	if err != nil {
		return 0, err
	}
	hum, err := e.CathodeHum()
	return ripple + hum, err
}

// RippleAssumptions are what the disturbance takes for granted.
func (e *Evidence) RippleAssumptions() []string {
	var all []string
	c := e.chain
	for _, f := range c.Filters {
		if !f.BypassCapacitance.Set() {
			all = append(all, "stray across each filter resistor "+quantity.Text(circuit.AssumedBypass)+" (common practice, no source)")
			break
		}
	}
	if c.Multiplier != nil && len(c.Filters) > 0 && !c.Multiplier.PickupToOutput.Set() {
		all = append(all, "pickup from coupling column to output "+quantity.Text(circuit.AssumedPickup)+" (common practice, no source)")
	}
	if h := c.Heater; h != nil && h.Feed != nil && h.Feed.Screen.V && h.Feed.CommonMode.V > 0 {
		all = append(all, "the screen of the heater feed divides the coupled common mode by "+fmt.Sprint(circuit.ScreenFactor))
	}
	if c.Gun.IsFitted() && e.alternatingHeater() && e.biasMovesCathode() {
		if _, err := e.TemperatureSwing(); err != nil {
			all = append(all, "an AC heater's swing of temperature leaves the emission alone: "+err.Error())
		}
	}
	if e.CutoffByGeometry() {
		all = append(all, e.CutoffAssumption())
	} else if c.Gun.IsFitted() && c.Gun.Emission.Set() && !c.Gun.Cutoff.Set() && !e.DiodeGun() {
		all = append(all, "the gun draws a constant current: its cutoff is not given")
	}
	return all
}
