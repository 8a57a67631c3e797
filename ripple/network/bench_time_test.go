package network

import (
	"strings"
	"testing"

	"kilovet/hv/circuit"
)

// What follows a circuit in time, from the periodic state of six stages with filters,
// cable, divider and bias. Run with: go test -run - -bench Time ./ripple/network
func BenchmarkTime(b *testing.B) {
	text := examples()["6 stages with filter and bias"]
	p, free := steady(b, build(b, text)), steady(b, build(b, strings.Replace(text, `emission = "60 uA"`, `emission = "0 A"`, 1)))
	top, out := node(b, p.Circuit, "multiplier"), node(b, p.Circuit, "output")
	at, err := p.Highest(out, circuit.Ground)
	if err != nil {
		b.Fatal(err)
	}
	for _, r := range []struct {
		name string
		run  func() error
	}{
		{"arc with the drive on", func() error {
			_, err := Arc(p.Circuit, p.State(at), ArcOptions{From: out, Resistance: 0.05, Until: 20 * p.Period()})
			return err
		}},
		{"arc with the drive off", func() error {
			_, err := Arc(off(p.Circuit), p.State(at), ArcOptions{From: out, Resistance: 0.05})
			return err
		}},
		{"start", func() error { _, err := Start(p, StartOptions{Node: top}); return err }},
		{"load removed", func() error { _, err := Change(p, free, ChangeOptions{Node: out}); return err }},
		{"load applied", func() error { _, err := Change(free, p, ChangeOptions{Node: out}); return err }},
	} {
		b.Run(r.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if err := r.run(); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
