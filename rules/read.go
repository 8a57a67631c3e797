package rules

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/rules/evidence"
)

// Read reads a description and lists every fault of it in document order: those of
// single keys, those across keys, and those of the outlines of fields. A chain with
// faults serves for nothing.
func Read(data []byte) (*chain.Chain, document.Faults) {
	c, faults := chain.Read(data)
	return c, append(faults, evidence.OutlineFaults(c, faults)...).Sorted()
}
