// Package evidence gathers what is computed for one chain. Everything goes through
// Under(condition): states, tolerance corners, drive levels and faults are
// conditions, not code paths. It holds no formula and gives no verdict; what it has
// computed it remembers for one review.
package evidence

import (
	"strings"

	"kilovet/hv/quantity"
)

// State of a chain.
type State string

// The states.
const (
	Working State = "working" // as described
	Cold    State = "cold"    // no emission: lowest load, no self-bias
	Lost    State = "lost"    // regulation lost: drive at its limit, no emission
)

// States lists them in the order of print.
var States = []State{Working, Cold, Lost}

// Condition is what a chain is computed under.
type Condition struct {
	State  State
	Corner Corner
	// Drive is the share of the state's drive, 1 where zero.
	Drive float64
	// Peak is the peak of the drive where it is set by hand; zero leaves it to the state.
	Peak  quantity.Voltage
	Fault Fault
}

// Text says the condition in words.
func (c Condition) Text() string {
	words := []string{string(c.State)}
	if c.Corner != Nominal {
		words = append(words, c.Corner.Text())
	}
	if c.Fault.Name != "" {
		words = append(words, c.Fault.Name)
	}
	return strings.Join(words, ", ")
}

// key tells conditions apart; a fault is known by its name.
func (c Condition) key() conditionKey {
	if c.Drive == 0 {
		c.Drive = 1
	}
	return conditionKey{c.State, c.Corner, c.Drive, c.Peak, c.Fault.Name}
}

type conditionKey struct {
	state  State
	corner Corner
	drive  float64
	peak   quantity.Voltage
	fault  string
}
