package document

import "kilovet/hv/quantity"

// Plain is what a text holds as plain values, and whether all of it could be read.
func Plain(text string) (values any, read bool) {
	root, faults := grow(text)
	return root.plain(), len(faults) == 0
}

// UnitPattern is the pattern of a dimension's quantities of any sign in a schema.
func UnitPattern(d *quantity.Dimension) string { return unitPattern(d, anySign) }
