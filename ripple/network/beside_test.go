package network

import (
	"math"
	"testing"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// What stands beside a known state is found swiftly from it: every value a tenth higher,
// the drive a tenth higher, another load. The same voltages, ripple and diode currents as
// from nothing and to 1e-9, for fewer periods; of a loaded ladder for at most four.
func TestBesideAKnownState(t *testing.T) {
	const loaded = "6 stages with filter and bias"
	for _, name := range []string{loaded, "12 stages with strays"} {
		whole := steady(t, build(t, examples()[name]))
		for what, beside := range neighbours(whole.Circuit) {
			exact := steady(t, beside)
			swift, err := Steady(beside, Options{From: whole, Swift: true})
			if err != nil {
				t.Fatal(name, what, err)
			}
			if swift.Work.Periods >= exact.Work.Periods {
				t.Errorf("%s, %s: %d periods, %d from nothing", name, what, swift.Work.Periods, exact.Work.Periods)
			}
			if name == loaded && (swift.Work.Periods > 4 || swift.Uncertainty != whole.Uncertainty) {
				t.Errorf("%s, %s: %d periods, uncertainty %v", name, what, swift.Work.Periods, swift.Uncertainty)
			}
			top := node(t, beside, "multiplier")
			a, _ := exact.At(top)
			b, _ := swift.At(top)
			alike(t, name+", "+what+", mean", float64(b.Mean), float64(a.Mean), 1e-6)
			alike(t, name+", "+what+", ripple", float64(b.PeakToPeak()), float64(a.PeakToPeak()), 1e-4)
			const diode = "multiplier.diode.1"
			alike(t, name+", "+what+", diode", float64(swift.Diode(diode).Mean), float64(exact.Diode(diode).Mean), 1e-4)
		}
	}
}

func alike(t *testing.T, what string, got, want, within float64) {
	t.Helper()
	if !(math.Abs(got/want-1) <= within) {
		t.Errorf("%s: %g, exact %g", what, got, want)
	}
}

// neighbours are circuits near one.
func neighbours(c *circuit.Circuit) map[string]*circuit.Circuit {
	return map[string]*circuit.Circuit{
		"capacitors": c.Each(func(e *circuit.Element) bool {
			e.Capacitance *= 1.1
			return true
		}),
		"drive": c.Each(func(e *circuit.Element) bool {
			if e.Kind == circuit.Source {
				e.Wave.Amplitude *= 1.1
			}
			return true
		}),
		"load": c.Each(func(e *circuit.Element) bool {
			e.Current *= 0.9
			return true
		}),
	}
}

// A drive sought swiftly from a known state holds the voltage to a part in a million.
func TestHoldBesideAKnownState(t *testing.T) {
	c := build(t, examples()["6 stages with filter and bias"])
	whole := steady(t, c)
	at, err := whole.At(node(t, c, "multiplier"))
	if err != nil {
		t.Fatal(err)
	}
	set := 0.98 * max(at.Mean, -at.Mean)
	o := HoldOptions{Node: "multiplier", Set: set, First: 1, Build: func(share quantity.Voltage) (*circuit.Circuit, error) {
		return c.Each(func(e *circuit.Element) bool {
			if e.Kind == circuit.Source {
				e.Wave.Amplitude *= share
			}
			return true
		}), nil
	}}
	exact, _, err := Hold(o)
	if err != nil {
		t.Fatal(err)
	}
	o.Options = Options{From: whole, Swift: true}
	swift, p, err := Hold(o)
	if err != nil {
		t.Fatal(err)
	}
	alike(t, "drive", float64(swift), float64(exact), 2e-6)
	held, err := p.At(node(t, p.Circuit, "multiplier"))
	if err != nil {
		t.Fatal(err)
	}
	alike(t, "mean", float64(max(held.Mean, -held.Mean)), float64(set), heldNearly)
	if p.Work.Periods > 4 {
		t.Errorf("%d periods", p.Work.Periods)
	}
}

// What one circuit's change made of the charges is foreseen of the same change of another: at
// half the drive a corner is found in fewer periods from the states at the whole, and is the
// same.
func TestAChangeIsForeseen(t *testing.T) {
	whole := steady(t, build(t, examples()["6 stages with filter and bias"]))
	at := func(p *Periodic, drive quantity.Voltage) *circuit.Circuit {
		return p.Circuit.Each(func(e *circuit.Element) bool {
			if e.Kind == circuit.Source {
				e.Wave.Amplitude *= drive
			}
			return true
		})
	}
	corner := steady(t, neighbours(whole.Circuit)["capacitors"])
	half := steady(t, at(whole, 0.5))
	sought := at(corner, 0.5)
	exact := steady(t, sought)
	plain, err := Steady(sought, Options{From: half, Swift: true})
	if err != nil {
		t.Fatal(err)
	}
	foreseen, err := Steady(sought, Options{From: half, Before: whole, After: corner, Swift: true})
	if err != nil {
		t.Fatal(err)
	}
	if foreseen.Work.Periods >= plain.Work.Periods {
		t.Errorf("%d periods, %d where nothing is foreseen", foreseen.Work.Periods, plain.Work.Periods)
	}
	top := node(t, sought, "multiplier")
	a, _ := exact.At(top)
	b, _ := foreseen.At(top)
	alike(t, "mean", float64(b.Mean), float64(a.Mean), 1e-6)
	alike(t, "ripple", float64(b.PeakToPeak()), float64(a.PeakToPeak()), 1e-4)
}
