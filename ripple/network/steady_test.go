package network

import (
	"encoding/json"
	"fmt"
	"math"
	"testing"

	"kilovet/hv/circuit"
)

// near fails where a value is further from what is wanted than a part of it.
func near(t *testing.T, what string, got, want, part float64) {
	t.Helper()
	if !(math.Abs(got-want) <= part*math.Abs(want)) {
		t.Errorf("%s: %.9g, want %.9g within %g (off by %.2g)", what, got, want, part, got/want-1)
	}
}

func node(t testing.TB, c *circuit.Circuit, name string) circuit.Node {
	t.Helper()
	n, ok := c.Node(name)
	if !ok {
		t.Fatalf("no node %s", name)
	}
	return n
}

func steady(t testing.TB, c *circuit.Circuit) *Periodic {
	t.Helper()
	p, err := Steady(c, Options{})
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// The periodic state against the independent simulation in testdata/cases.json:
// backward differences with up to 1024 base steps a period and steps down to
// T/2^25 at every event, its own uncertainty far below the tolerances here.
func TestSteadyAgainstSimulation(t *testing.T) {
	for _, r := range references(t) {
		t.Run(r.ID, func(t *testing.T) {
			c := build(t, r.describe())
			p := steady(t, c)
			r.compareTop(t, p, "multiplier", &r.Results.Top)
			if r.Results.Load != nil {
				r.compareTop(t, p, "output", r.Results.Load)
			}
			r.compareParts(t, p)
			near(t, "input power", float64(p.InputPower()), r.Results.PowerIn.Value, 1e-4)
			if u := float64(p.Uncertainty); u > 1e-3*math.Abs(r.Results.Top.Mean.Value) {
				t.Errorf("uncertainty %g V", u)
			}
		})
	}
}

func (r *reference) compareTop(t *testing.T, p *Periodic, at string, want *topFigures) {
	n := node(t, p.Circuit, at)
	s, err := p.At(n)
	if err != nil {
		t.Fatal(err)
	}
	near(t, at+" mean", float64(s.Mean), want.Mean.Value, 1e-5)
	near(t, at+" least", float64(s.Least), want.Min.Value, 1e-5)
	near(t, at+" greatest", float64(s.Greatest), want.Max.Value, 1e-5)
	near(t, at+" ripple", float64(s.PeakToPeak()), want.Ripple.Value, 1e-3)
	for k, h := range []figure{want.RippleH1, want.RippleH2} {
		a, _ := p.Harmonic(n, circuit.Ground, k+1)
		if got := math.Hypot(real(a), imag(a)); math.Abs(got-h.Value) > 1e-3*want.RippleH1.Value+1e-3*want.RippleH2.Value {
			t.Errorf("%s harmonic %d: %g, want %g", at, k+1, got, h.Value)
		}
	}
}

// parts are the names of the parts of one column in the order of the reference.
func (r *reference) parts(column string) (coupling, smoothing, diodes []string) {
	for k := 1; k <= r.Inputs.N; k++ {
		coupling = append(coupling, fmt.Sprintf("multiplier.coupling_capacitor%s.%d", column, k))
		smoothing = append(smoothing, fmt.Sprintf("multiplier.smoothing_capacitor.%d", k))
	}
	for k := 1; k <= 2*r.Inputs.N; k++ {
		diodes = append(diodes, fmt.Sprintf("multiplier.diode%s.%d", column, k))
	}
	return coupling, smoothing, diodes
}

func (r *reference) compareParts(t *testing.T, p *Periodic) {
	column := ""
	if r.Inputs.Topology == "symmetric" {
		column = ".a"
	}
	coupling, smoothing, diodes := r.parts(column)
	for key, names := range map[string][]string{"C_ac": coupling, "C_dc": smoothing} {
		var f figures
		if err := json.Unmarshal(r.Results.Cap[key], &f); err != nil {
			t.Fatal(err)
		}
		for i, name := range names {
			near(t, name, float64(p.Across(name).Mean), f.Value[i], 1e-4)
		}
	}
	for i, name := range diodes {
		d := p.Diode(name)
		near(t, name+" reverse peak", float64(d.ReversePeak), r.Results.Piv.Value[i], 1e-4)
		near(t, name+" peak", float64(d.Peak), r.Results.Peak.Value[i], 0.01)
		near(t, name+" mean", float64(d.Mean), r.Results.Mean.Value[i], 1e-6)
	}
	source := "drive.source" + column
	f, err := p.Through(source)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "source rms", float64(f.RMS), r.Results.SourceRMS.Value, 0.002)
	near(t, "source peak", float64(f.Peak), r.Results.SourcePeak.Value, 0.01)
	r.compareLosses(t, p)
}

func (r *reference) compareLosses(t *testing.T, p *Periodic) {
	var diodes, series, filter float64
	for _, l := range p.Losses() {
		switch {
		case l.Element.Kind == circuit.Diode:
			diodes += float64(l.Power)
		case l.Element.Name == "drive.resistance" || l.Element.Name == "drive.resistance.a" || l.Element.Name == "drive.resistance.b":
			series += float64(l.Power)
		case l.Element.Name == "filter.1.resistor":
			filter += float64(l.Power)
		}
	}
	near(t, "diode loss", diodes, r.Results.PowerDiodes.Value, 0.002)
	near(t, "series loss", series, r.Results.PowerRs.Value, 0.002)
	near(t, "filter loss", filter, r.Results.PowerRf.Value, 0.002)
}
