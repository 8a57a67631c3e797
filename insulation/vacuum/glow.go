package vacuum

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Glow is a discharge that sustains itself at a voltage and a current.
type Glow struct {
	Voltage quantity.Voltage
	Current quantity.Current
	source  gap.Source
}

// hiddenGlow was seen at a deflector; its scan shows pA where the 0.45 W it states make µA.
var hiddenGlow = Glow{90e3, 5e-6, gap.Source{Text: "Observation of sustained glow discharges at high vacuum in a deflector test stand, NSCL", Mark: gap.Read}}

// HiddenGlow is the discharge of the caution about what a current trip does not see.
func HiddenGlow() Glow { return hiddenGlow }

// Power is what the discharge takes: P = V I.
func (g Glow) Power() quantity.Power { return quantity.Power(float64(g.Voltage) * float64(g.Current)) }

func (g Glow) text() string {
	return fmt.Sprintf("A steady glow at %s in high vacuum drew about %s, %s, hidden in the noise of its supply: a current trip alone does not show that all is well.",
		quantity.Text(g.Voltage), quantity.Text(g.Current), quantity.Text(g.Power()))
}
