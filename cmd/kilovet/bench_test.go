package main

import (
	"path/filepath"
	"testing"

	"kilovet"
	"kilovet/hv/chain"
	"kilovet/reports/html"
	"kilovet/reports/json"
	"kilovet/reports/page"
	"kilovet/reports/pdf"
	"kilovet/rules"
)

// BenchmarkWholeReview reads and reviews the built-in example and renders its sheets
// and results.
func BenchmarkWholeReview(b *testing.B) {
	name, data := kilovet.Example()
	for b.Loop() {
		c, faults := chain.Read(data)
		if len(faults) > 0 {
			b.Fatal(faults)
		}
		r := rules.Run(c, []rules.Input{{Role: "description", Name: filepath.Base(name)}}, rules.Program{Name: "kilovet"})
		if _, err := pdf.Render(page.New(r)); err != nil {
			b.Fatal(err)
		}
		if _, err := json.Render(r); err != nil {
			b.Fatal(err)
		}
	}
}

// BenchmarkRendering renders sheets and page of a review that is there: what remains of
// a review when all is computed.
func BenchmarkRendering(b *testing.B) {
	name, data := kilovet.Example()
	c, faults := rules.Read(data)
	if len(faults) > 0 {
		b.Fatal(faults)
	}
	r := rules.Run(c, []rules.Input{{Role: "description", Name: filepath.Base(name)}}, rules.Program{Name: "kilovet"})
	b.Run("sheets", func(b *testing.B) {
		for b.Loop() {
			if _, err := pdf.Render(page.New(r)); err != nil {
				b.Fatal(err)
			}
		}
	})
	b.Run("page", func(b *testing.B) {
		for b.Loop() {
			if _, err := html.Render(r); err != nil {
				b.Fatal(err)
			}
		}
	})
}
