package optics

import (
	"kilovet/rules/evidence"
)

// noGun is why nothing of a gun is judged; empty where one is fitted.
func noGun(e *evidence.Evidence) string {
	switch g := e.Chain().Gun; {
	case g == nil:
		return "no gun is described"
	case !g.IsFitted():
		return "the gun is not fitted"
	}
	return ""
}

// noAllowance is why nothing is judged against a blur allowance; empty where there is a
// spot and an allowance for it.
func noAllowance(e *evidence.Evidence) string {
	b := e.Chain().Beam
	switch {
	case b == nil:
		return "no beam is described"
	case e.Spotless() != nil:
		return e.Spotless().Error()
	case !b.BlurAllowance.Set():
		return "no blur allowance is stated"
	}
	return ""
}
