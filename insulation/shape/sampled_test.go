package shape_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// samplesOf takes a closed line at growing steps, as a traced field line has them.
func samplesOf(l shape.Line, volts float64, places int) (list []shape.Sample) {
	for k := range places + 1 {
		part := float64(k) / float64(places)
		x := l.Gap() * quantity.Length(part*part)
		list = append(list, shape.Sample{Along: x, Field: quantity.Field(volts * float64(l.PerVolt(x)))})
	}
	return list
}

// The line taken at places is the one that it was taken from.
func TestSampledIsTheLineItWasTakenFrom(t *testing.T) {
	for _, s := range []gap.Shape{
		{Kind: gap.SpherePlane, Radius: 5e-3},
		{Kind: gap.Coaxial, InnerRadius: 2e-3, OuterRadius: 22e-3},
		{Kind: gap.SphereSphere, Radius: 5e-3},
		{Kind: gap.Plates},
	} {
		exact, err := shape.Of(s, 20e-3)
		if err != nil {
			t.Fatal(err)
		}
		l, err := shape.Sampled(samplesOf(exact, 5000, 400), 5000)
		if err != nil {
			t.Fatal(err)
		}
		if !l.Computed() || exact.Computed() {
			t.Errorf("%s: which one is computed?", s.Kind)
		}
		for _, part := range []quantity.Length{0, 0.1, 0.35, 0.5, 0.9, 1} {
			x := part * exact.Gap()
			if r := float64(l.PerVolt(x) / exact.PerVolt(x)); math.Abs(r-1) > 1e-3 {
				t.Errorf("%s at %g of the gap: %g of the exact field", s.Kind, float64(part), r)
			}
		}
		if d := math.Abs(float64(l.Trough()/exact.Trough()) - 1); d > 0.02 && s.Kind != gap.Plates {
			t.Errorf("%s: least field at %v, is at %v", s.Kind, l.Trough(), exact.Trough())
		}
	}
}

// A bump farther on raises what lies before it, and no line falls below its samples.
func TestSampledIsAnUpperBound(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		var list []shape.Sample
		x := 0.0
		for range rapid.IntRange(3, 30).Draw(rt, "places") {
			list = append(list, shape.Sample{Along: quantity.Length(x), Field: quantity.Field(rapid.Float64Range(1, 1e6).Draw(rt, "field"))})
			x += rapid.Float64Range(1e-6, 1e-2).Draw(rt, "step")
		}
		scale := 0.0 // the voltage, by the logarithmic mean
		for i := 1; i < len(list); i++ {
			a, b := float64(list[i-1].Field), float64(list[i].Field)
			mean := (a + b) / 2
			if math.Abs(a/b-1) > 1e-6 {
				mean = (a - b) / math.Log(a/b)
			}
			scale += mean * float64(list[i].Along-list[i-1].Along)
		}
		l, err := shape.Sampled(list, quantity.Voltage(scale))
		if err != nil {
			rt.Fatal(err)
		}
		for i, s := range list {
			if got := float64(l.PerVolt(s.Along)) * scale; got < float64(s.Field)*(1-1e-9) {
				rt.Fatalf("place %d: %g under %g", i, got, float64(s.Field))
			}
		}
		last := math.Inf(1)
		for k := range 50 {
			at := l.Trough() * quantity.Length(float64(k)/49)
			if e := float64(l.PerVolt(at)); e > last*(1+1e-12) {
				rt.Fatalf("the field rises at %v before the trough", at)
			} else {
				last = e
			}
		}
	})
}

func TestSampledNeedsThreePlaces(t *testing.T) {
	for _, list := range [][]shape.Sample{nil, {{0, 1}, {1, 1}}, {{0, 1}, {0, 1}, {0, 1}}, {{0, 0}, {1, 0}, {2, 0}}} {
		if _, err := shape.Sampled(list, 1); lack.Of(err) == nil {
			t.Errorf("%v: %v", list, err)
		}
	}
}

func TestSampledAddsUpToItsVoltage(t *testing.T) {
	list := []shape.Sample{{Along: 0, Field: 1}, {Along: 1, Field: 1}, {Along: 2, Field: 1}}
	if _, err := shape.Sampled(list, 2.2); lack.Of(err) == nil {
		t.Errorf("2 V along a line of 2.2 V: %v", err)
	}
	if l, err := shape.Sampled(list, 2.02); err != nil || l.Peak(2.02) != 1 {
		t.Errorf("the field at the start is not that of the sample: %v, %v", l.Peak(2.02), err)
	}
}
