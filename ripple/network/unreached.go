package network

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// unreached is that a search was given up, and what keeps the state from coming back.
func (s *search) unreached() error {
	what := "the periodic state"
	if s.level != nil {
		what = "the drive that holds the voltage"
	}
	return lack.Failed("%s was not reached because after %d periods %s", what, s.pace.work.Periods, s.unrest())
}

// unrest is what still goes on in the period walked last.
func (s *search) unrest() string {
	if i := s.sleeper(); i >= 0 && len(s.linear.steps) > 0 {
		return s.c.Elements[s.diodes[i].element].Name + " does not conduct, though the balance of charges needs it to"
	}
	after := append([]float64(nil), s.from...)
	axpy(1, s.start, after)
	if name, v := s.widest(s.from, after); v > 0 {
		return fmt.Sprintf("the voltage of %s still changes by %s in each", name, quantity.Text(quantity.Voltage(v)))
	}
	return "corrections of it lead no nearer"
}
