package evidence

import (
	"math"

	"kilovet/hv/document"
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// alternating reports whether the heater is fed with AC; a heater of which nothing is
// said may be.
func (e *Evidence) alternatingHeater() bool {
	h := e.chain.Heater
	return h != nil && !(h.Supply.Set() && h.Supply.V == "dc")
}

// TipSwing is the amplitude by which an AC heater swings the tip of the filament against
// the cathode node; none for a DC heater.
func (e *Evidence) TipSwing() (quantity.Voltage, error) {
	h := e.chain.Heater
	if !e.alternatingHeater() {
		return 0, nil
	}
	if err := document.Need(h.Supply, h.Voltage); err != nil {
		return 0, err
	}
	v, r := h.Voltage.V*math.Sqrt2, h.CentreResistors
	if r == nil {
		return gun.TipSwingReturn(v), nil
	}
	return gun.TipSwing(v, r.Value.V[0], r.Value.V[1])
}

// TipSwingAtWorst is TipSwing with the centre resistors at the ends of their tolerance.
func (e *Evidence) TipSwingAtWorst() (quantity.Voltage, error) {
	swing, err := e.TipSwing()
	if err != nil || !e.alternatingHeater() {
		return swing, err
	}
	return e.worstTip(e.chain.Heater.Voltage.V * math.Sqrt2)
}

// worstTip is how far a voltage across the filament moves its tip at the ends of the centre
// resistors' tolerance.
func (e *Evidence) worstTip(v quantity.Voltage) (quantity.Voltage, error) {
	r := e.chain.Heater.CentreResistors
	if r == nil {
		return gun.TipSwingReturn(v), nil
	}
	tolerance, err := r.Tolerance.Need()
	if err != nil {
		return 0, err
	}
	return gun.TipSwingTolerance(v, r.Value.V[0], r.Value.V[1], tolerance)
}

// TipRipple is the amplitude by which the ripple of a DC heater swings the tip at worst, and
// its frequency; none where no ripple is stated.
func (e *Evidence) TipRipple() (quantity.Voltage, quantity.Frequency, error) {
	h := e.chain.Heater
	if h == nil || h.Supply.V != "dc" || h.Ripple.V == 0 {
		return 0, 0, nil
	}
	swing, err := e.worstTip(h.Ripple.V / 2)
	if err != nil {
		return 0, 0, err
	}
	if h.RippleFrequency.Set() {
		return swing, h.RippleFrequency.V, nil
	}
	if e.chain.Site == nil {
		return 0, 0, lack.Key("heater.ripple_frequency")
	}
	f, err := e.chain.Site.MainsFrequency.Need()
	return swing, 2 * f, err
}

// HeaterPower is what the feed must carry: filament voltage times current.
func (e *Evidence) HeaterPower() (quantity.Power, error) {
	h := e.chain.Heater
	if h == nil {
		return 0, lack.Key("heater")
	}
	err := document.Need(h.Voltage, h.Current)
	return quantity.Power(float64(h.Voltage.V) * float64(h.Current.V)), err
}

// heaterFrequency is that of an AC heater: its own, else the mains'.
func (e *Evidence) heaterFrequency() (quantity.Frequency, error) {
	if f := e.chain.Heater.Frequency; f.Set() {
		return f.V, nil
	}
	if e.chain.Site == nil {
		return 0, lack.Key("heater.frequency")
	}
	return e.chain.Site.MainsFrequency.Need()
}

// Warmth is how an AC heater's swing of temperature moves the emission.
type Warmth struct {
	Frequency   quantity.Frequency       // twice the heater's
	Temperature quantity.TemperatureRise // amplitude
	Emission    quantity.Fraction        // peak to peak
	Bias        quantity.Voltage         // across the bias resistor, peak to peak
}

// TemperatureSwing is the swing of an AC heater's temperature and what it does to the
// emission; a lack where the heater is on DC.
func (e *Evidence) TemperatureSwing() (Warmth, error) {
	if !e.alternatingHeater() {
		return Warmth{}, lack.Failed("the heater is fed with DC")
	}
	f, err := e.heaterFrequency()
	if err != nil {
		return Warmth{}, err
	}
	limit, swing, err := e.limitSwing(f)
	if err != nil {
		return Warmth{}, err
	}
	p, err := e.Gun()
	if err != nil {
		return Warmth{}, err
	}
	w := Warmth{Frequency: 2 * f, Temperature: swing, Emission: p.SwingOfLimit(limit, 2*f, e.bypass())}
	w.Bias = p.SwingOfBias(w.Emission, 2*f, e.bypass())
	return w, nil
}

// limitSwing is the relative swing of the cathode's limit, peak to peak, and the amplitude
// of its temperature's.
func (e *Evidence) limitSwing(f quantity.Frequency) (quantity.Fraction, quantity.TemperatureRise, error) {
	g, h := e.chain.Gun, e.chain.Heater
	if g == nil {
		return 0, 0, lack.Key("gun")
	}
	if _, err := e.RichardsonLimit(); err != nil {
		return 0, 0, err
	}
	if err := document.Need(h.WireDiameter); err != nil {
		return 0, 0, err
	}
	emitter, err := e.Emitter()
	if err != nil {
		return 0, 0, err
	}
	wire, err := gun.TungstenWire(h.WireDiameter.V, g.CathodeTemperature.V)
	if err != nil {
		return 0, 0, err
	}
	swing, err := wire.SwingAt(f, h.Current.V)
	if err != nil {
		return 0, 0, err
	}
	limit, err := emitter.LimitSwing(g.CathodeTemperature.V, swing)
	return limit, swing, err
}

// Unheated reports whether a cathode is hot by what is said of it, and nothing is said of
// what heats it.
func (e *Evidence) Unheated() bool {
	g := e.chain.Gun
	return e.chain.Heater == nil && g.IsFitted() && g.CathodeTemperature.Set()
}
