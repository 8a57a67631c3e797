package rules

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/rules/evidence"
	"kilovet/rules/signoff"
)

// Read reads a description and lists every fault of it in document order: those of
// single keys, those across keys, those of the outlines of fields, and dispositions of
// no rule. A chain with faults serves for nothing.
func Read(data []byte) (*chain.Chain, document.Faults) {
	c, faults := chain.Read(data)
	faults = append(faults, evidence.OutlineFaults(c, faults)...)
	return c, append(faults, signoff.Faults(c, ids())...).Sorted()
}
