package rules_test

import (
	"os"
	"testing"

	"kilovet/hv/chain"
	"kilovet/rules"
)

// BenchmarkReview reviews the built-in example.
func BenchmarkReview(b *testing.B) {
	data, err := os.ReadFile("../testdata/chains/column.toml")
	if err != nil {
		b.Fatal(err)
	}
	c, _ := chain.Read(data)
	for b.Loop() {
		rules.Run(c, nil, rules.Program{})
	}
}
