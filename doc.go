// Package kilovet is the root of a project that reviews a high-voltage supply
// chain and its insulation before first power-up: a drive, a diode-capacitor
// cascade, filters, a cable, a divider and, at the end, an electron gun.
//
// One description in TOML is read, what will happen is computed, and that is judged
// against named rules whose sources are shown. The result is a review to read, a
// sheet to sign and JSON for other programs. Local electrical codes and licensed
// practice come first; the review replaces neither.
//
// Data goes one way: cmd → reports → rules → ripple and insulation → hv, and a room
// imports only rooms below it. DEVELOPERS.md shows the house. This package holds
// what belongs to no room: the version and the built-in example.
package kilovet

import _ "embed"

// Version of the project.
const Version = "0.1.0"

//go:embed testdata/chains/column.toml
var column []byte

// Example is the built-in description: its name and what it holds.
func Example() (name string, data []byte) {
	return "built-in column.toml", append([]byte(nil), column...)
}
