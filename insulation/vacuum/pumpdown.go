package vacuum

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/solve"
)

// Products of pressure and longest path that decide whether a vessel may carry high
// voltage: 0.001 and 0.01 Torr cm.
const (
	Free    quantity.PressureLength = 0.001 * 1.01325 / 0.76 // electrons cross without multiplying
	Crowded quantity.PressureLength = 10 * Free              // a fiftieth of the product of air's Paschen minimum
)

// FeedthroughPressure is the pressure under which two suppliers hold the ratings of
// their feedthroughs.
const FeedthroughPressure quantity.Pressure = 1e-2 // 1e-4 mbar

var (
	freeSource    = gap.Source{Text: "under 0.001 Torr cm electrons cross without multiplying, Chung, High-voltage Pulsed Power Engineering, Seoul National University 2018", Mark: gap.Read}
	crowdedSource = gap.Source{Text: "no high voltage above 0.01 Torr cm over the longest path", Mark: gap.Practice}

	// FeedthroughSource is where FeedthroughPressure comes from.
	FeedthroughSource = gap.Source{Text: "ratings of feedthroughs hold below 1e-4 mbar (handbook of a pump maker; a second supplier: 1e-4 Torr)", Mark: gap.Read}
)

// Vessel is what is pumped down. Its pressures are those that the gauge reads, at 20 °C.
type Vessel struct {
	Gas         gap.Gas         // none: air
	LongestPath quantity.Length // straight, between parts at different potential
	GaugeFactor float64         // true pressure over reading; none: 1
}

// product is pressure times length.
func product(p quantity.Pressure, l quantity.Length) quantity.PressureLength {
	return quantity.PressureLength(float64(p) * float64(l))
}

func (s Vessel) complete() error {
	switch {
	case s.LongestPath <= 0:
		return lack.Key("vacuum.longest_path")
	case s.GaugeFactor < 0:
		return lack.Because("the gauge factor is not above zero", "spacing.gauge_factor")
	}
	return nil
}

func (s Vessel) filling() gap.Gas { return gap.Gap{Gas: s.Gas}.Filling() }

// reading is what the gauge shows at a true pressure.
func (s Vessel) reading(p quantity.Pressure) quantity.Pressure {
	if s.GaugeFactor == 0 {
		return p
	}
	return p / quantity.Pressure(s.GaugeFactor)
}

// at is the reading at which pressure times longest path is a product.
func (s Vessel) at(pd quantity.PressureLength) quantity.Pressure {
	return s.reading(quantity.Pressure(float64(pd) / float64(s.LongestPath)))
}

// Permit are the highest readings at which high voltage may be on.
type Permit struct {
	Free    gap.Answer[quantity.Pressure] // up to it electrons cross the longest path freely
	Crowded gap.Answer[quantity.Pressure] // above it no high voltage
}

// Permit is where high voltage may be on in the vessel: freely up to 0.001 Torr cm over
// the longest path, not above 0.01 Torr cm. It protects the insulation; emitters ask
// for far less pressure, 1e-9 to 1e-6 mbar by their kind.
func (s Vessel) Permit() (Permit, error) {
	if err := s.complete(); err != nil {
		return Permit{}, err
	}
	over := " over a path of " + quantity.Text(s.LongestPath)
	return Permit{
		Free: gap.Answer[quantity.Pressure]{
			Value: s.at(Free), Because: "0.001 Torr cm" + over, Sources: []gap.Source{freeSource.Governing()},
		},
		Crowded: gap.Answer[quantity.Pressure]{
			Value: s.at(Crowded), Because: "0.01 Torr cm" + over, Sources: []gap.Source{crowdedSource.Governing(), freeSource},
		},
	}, nil
}

// PathFor is the longest path that a permitted pressure allows at a product: the longer
// the path, the lower the pressure must be.
func (s Vessel) PathFor(reading quantity.Pressure, pd quantity.PressureLength) (quantity.Length, error) {
	if reading <= 0 {
		return 0, lack.Key("vacuum.pressure_permit")
	}
	s.LongestPath = 1
	return quantity.Length(float64(s.at(pd)) / float64(reading)), nil
}

// WorstPressure is the reading at which the longest path stands least: where the measured
// Paschen minimum of the gas lies.
func (s Vessel) WorstPressure() (gap.Answer[quantity.Pressure], error) {
	m, err := s.minimum()
	if err != nil {
		return gap.Answer[quantity.Pressure]{}, err
	}
	return gap.Answer[quantity.Pressure]{
		Value: s.at(m.At), Because: "lowest breakdown voltage of " + string(s.filling()) + ", " + quantity.Text(m.Voltage),
		Sources: []gap.Source{m.Governing()},
	}, nil
}

func (s Vessel) minimum() (gas.Minimum, error) {
	if err := s.complete(); err != nil {
		return gas.Minimum{}, err
	}
	return gas.MeasuredMinimum(s.filling())
}

// Band are the readings between which a voltage breaks the longest path down; the zero
// Band where it breaks down at none.
type Band struct {
	From, To    quantity.Pressure
	Because     string
	Sources     []gap.Source
	Assumptions []string
}

// Holds reports whether a reading lies in the band, its ends not counted.
func (b Band) Holds(reading quantity.Pressure) bool {
	return !quantity.AtMost(reading, b.From) && !quantity.AtLeast(reading, b.To)
}

// normalPressure is where the band ends at the latest.
const normalPressure quantity.Pressure = 101325

// Band is the range of pressures in which a voltage may break the longest path down
// while the vessel is pumped or vented. It begins where electrons begin to multiply, the
// left branch of Paschen's curve being too uncertain to stay out of less; it ends where
// the path between plates stands the voltage again, at normal pressure at the latest and
// where no law of the gas reaches. At or below the Paschen minimum it is empty. Sharp
// electrodes and shorter gaps break down at higher pressures too.
func (s Vessel) Band(v quantity.Voltage) (Band, error) {
	m, err := s.minimum()
	if err != nil {
		return Band{}, err
	}
	if quantity.AtMost(v, m.Voltage) {
		return Band{
			Because: quantity.Text(v) + " is not above the lowest breakdown voltage of " + string(s.filling()) + ", " + quantity.Text(m.Voltage),
			Sources: []gap.Source{m.Governing()},
		}, nil
	}
	b := Band{
		From: s.at(Free), Because: "collisions over a path of " + quantity.Text(s.LongestPath) + " break " + quantity.Text(v) + " down",
		Sources:     []gap.Source{freeSource.Governing(), m.Source},
		Assumptions: []string{"the path ends on plates; sharp electrodes and shorter gaps break down at higher pressures too"},
	}
	top, known := s.top(v, m)
	b.To = s.reading(top)
	if a, err := s.uniform(top); err == nil {
		b.Assumptions = append(b.Assumptions, a.Assumptions...)
	}
	if !known {
		b.Assumptions = append(b.Assumptions, "no law of the gas shows where between "+quantity.Text(s.at(m.At))+" and "+quantity.Text(b.To)+" the band ends: taken at its highest")
	}
	return b, nil
}

// top is the true pressure from which the path between plates stands a voltage, found
// from normal pressure down; where the laws of the gas leave it open, the lowest that is
// known to stand it, or normal pressure.
func (s Vessel) top(v quantity.Voltage, m gas.Minimum) (top quantity.Pressure, known bool) {
	bottom := quantity.Pressure(float64(m.At) / float64(s.LongestPath))
	top = normalPressure
	for p := normalPressure; ; p = max(p/2, bottom) {
		a, err := s.uniform(p)
		switch {
		case err != nil && known, err == nil && a.Value < v && !known:
			return top, false
		case err == nil && a.Value < v:
			return s.crossing(v, p, top)
		case err == nil:
			top, known = p, true
		}
		if p <= bottom {
			return top, false
		}
	}
}

// crossing is the pressure between two at which the path stands a voltage.
func (s Vessel) crossing(v quantity.Voltage, less, more quantity.Pressure) (quantity.Pressure, bool) {
	p, err := solve.Rise(float64(less), float64(more), func(p float64) (float64, error) {
		a, err := s.uniform(quantity.Pressure(p))
		return float64(a.Value - v), err
	})
	if err != nil {
		return more, false
	}
	return quantity.Pressure(p), true
}

// uniform is what the longest path stands between plates, right of the minimum.
func (s Vessel) uniform(p quantity.Pressure) (gap.Answer[quantity.Voltage], error) {
	return gas.UniformBreakdown(gas.State{Gas: s.filling(), Pressure: p, Temperature: 293.15}, s.LongestPath)
}

// Strength is what the longest path stands at a reading: the law of the gas right of the
// Paschen minimum, the minimum itself left of it down to 0.001 Torr cm. At or under that
// the gas does not decide, a lack: the vacuum laws do.
func (s Vessel) Strength(reading quantity.Pressure) (gap.Answer[quantity.Voltage], error) {
	m, err := s.minimum()
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	p := reading
	if s.GaugeFactor > 0 {
		p *= quantity.Pressure(s.GaugeFactor)
	}
	pd := product(p, s.LongestPath)
	if quantity.AtMost(pd, Free) {
		return gap.Answer[quantity.Voltage]{}, lack.Range("at %s electrons cross %s freely: the laws of vacuum gaps decide", quantity.Text(reading), quantity.Text(s.LongestPath))
	}
	a, err := s.uniform(p)
	if err == nil && pd < m.At && s.filling() == gap.AirGas {
		if v, outside := gas.AirConstants.Voltage(pd); outside == nil {
			a.Shown = append(a.Shown, gap.Beside[quantity.Voltage]{Value: v, Source: gas.AirConstants.Source})
		}
	}
	return a, err
}
