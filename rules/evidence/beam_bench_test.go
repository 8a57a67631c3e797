package evidence

import (
	"maps"
	"os"
	"testing"

	"kilovet/hv/chain"
)

// BenchmarkBeam is the whole beam part of a review, from the steady state of the network on:
// operating point, paths, spot, allowed ripple, best angles, banding.
func BenchmarkBeam(b *testing.B) {
	data, err := os.ReadFile("../../testdata/chains/column.toml")
	if err != nil {
		b.Fatal(err)
	}
	c, _ := chain.Read(data)
	e := New(c)
	if _, err := e.solution(); err != nil {
		b.Fatal(err)
	}
	if _, err := e.Swing("output", "ground"); err != nil {
		b.Fatal(err)
	}
	solved := e.memory.known
	for b.Loop() {
		fresh := *e
		fresh.memory = &memory{known: maps.Clone(solved)}
		fresh.beamPart(b)
	}
}

func (e *Evidence) beamPart(b *testing.B) {
	b.Helper()
	if _, err := e.GunRegulation(); err != nil {
		b.Fatal(err)
	}
	if len(e.Paths()) == 0 || len(e.Tones()) == 0 {
		b.Fatal("no paths")
	}
	if _, err := e.Allowed(); err != nil {
		b.Fatal(err)
	}
	if _, err := e.BestAngles(); err != nil {
		b.Fatal(err)
	}
	if _, err := e.BandingWithin(); err != nil {
		b.Fatal(err)
	}
}
