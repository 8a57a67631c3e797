package network

import (
	"fmt"
	"testing"
)

// Six stages with two filter sections, cable, divider and self-bias; twelve with
// strays; sixty. Run with: go test -bench Steady ./ripple/network
func BenchmarkSteady(b *testing.B) {
	for name, text := range examples() {
		c := build(b, text)
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Steady(c, Options{}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

const column = `
[[filter]]
resistor = { value = "1 Mohm" }
capacitor = { value = "470 pF" }
[[filter]]
resistor = { value = "1 Mohm" }
capacitor = { value = "470 pF" }
[cable]
length = "1.2 m"
capacitance = "110 pF/m"
gun_end_resistor = { value = "47 kohm" }
[divider]
upper = { value = "200 Mohm", count = 10 }
lower = { value = "200 kohm" }
meter = { resistance = "10 Mohm" }
[bias]
kind = "self"
fed = "control"
resistor = { value = "4.7 Mohm" }
bypass = { value = "1 nF" }
[gun]
fitted = true
emission = "60 uA"
`

// examples are the ladders of the benchmarks and the work bounds.
func examples() map[string]string {
	six := ladder{stages: 6, polarity: "negative", frequency: 38e3, peak: 1750, resistance: 900, capacitance: 2.2e-9, drop: 12, on: 40, junction: 1e-12, leakage: "10 nA", more: column}
	e := map[string]string{"6 stages with filter and bias": six.describe()}
	for _, n := range []int{12, 30, 60} {
		l := ladder{stages: n, frequency: 50e3, peak: 1000, resistance: 100, capacitance: 1e-9, current: 1e-6, drop: 8, on: 50, junction: 1e-12, leakage: "1 nA"}
		e[fmt.Sprintf("%d stages with strays", n)] = l.describe()
	}
	return e
}
