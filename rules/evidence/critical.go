package evidence

import (
	"fmt"
	"math"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/rules/build"
)

// Critical is the critical line of a greatest field: the field line from its place to
// where it leaves the body, and what the body stands along it.
type Critical struct {
	Stress
	Traced      field.Line
	Line        shape.Line
	Volts       quantity.Voltage // across the line at this stress, a magnitude
	Polarity    gap.Polarity     // of the electrode it starts from; unknown on a dielectric
	Sharp       gap.Polarity     // of the end with the greater field
	Strength    insulation.Strength
	Positive    gap.Result[quantity.Voltage] // breakdown with the start positive
	Negative    gap.Result[quantity.Voltage] // and negative
	Streamer    quantity.Fraction            // integral at this stress, 1 where a discharge starts; 0 in vacuum
	HasIntegral bool
}

// Critical is the critical line of the greatest field somewhere in the medium of an
// arrangement or in a space that another fills.
func (e *Evidence) Critical(f *build.Arrangement, w Where) (Critical, error) {
	key := fmt.Sprintf("critical line %s %v", f.Name.V, w)
	return remember(e.Under(Condition{}), key, func() (Critical, error) {
		s, err := e.Stress(f, w)
		if err != nil {
			return Critical{}, err
		}
		c := Critical{Stress: s}
		if c.Traced, err = s.Field.Within(s.Peak); err != nil {
			return c, err
		}
		reversed := false
		if c.Line, reversed, err = lineOf(c.Traced); err != nil {
			return c, err
		}
		c.Volts, c.Polarity = across(c.Traced, w, f)
		g := e.Filling(f, s.Body)
		c.Sharp = sharpEnd(c.Polarity, reversed)
		c.Strength = insulation.StrengthAlong(g, c.Line, c.Sharp)
		c.Positive = insulation.StrengthAlong(g, c.Line, sharpEnd(gap.Positive, reversed)).Breakdown
		c.Negative = insulation.StrengthAlong(g, c.Line, sharpEnd(gap.Negative, reversed)).Breakdown
		c.Streamer, err = insulation.StreamerAlong(g, c.Line, c.Volts)
		c.HasIntegral = err == nil
		return c, nil
	})
}

// Limit is the field at the place at which a discharge starts along its line.
func (c Critical) Limit() (gap.Answer[quantity.Field], error) {
	onset, err := c.Strength.Onset.Get()
	if err != nil {
		return gap.Answer[quantity.Field]{}, err
	}
	by := c.Strength.Onset
	return gap.Answer[quantity.Field]{Value: c.Peak.Strength * quantity.Field(onset/c.Volts), Because: by.Because, Sources: by.Sources, Assumptions: by.Assumptions}, nil
}

// sharpEnd is the polarity of the more highly stressed end of a line.
func sharpEnd(start gap.Polarity, reversed bool) gap.Polarity {
	switch {
	case !reversed || start == gap.Unknown:
		return start
	case start == gap.Positive:
		return gap.Negative
	}
	return gap.Positive
}

// lineFrom is the line from a greatest field, as it was traced and as a critical one.
func lineFrom(p Stress) (traced field.Line, line shape.Line, reversed bool, err error) {
	if traced, err = p.Field.Within(p.Peak); err != nil {
		return traced, line, false, err
	}
	line, reversed, err = lineOf(traced)
	return traced, line, reversed, err
}

// lineOf is a traced line as a critical one, from its more highly stressed end on; it
// reports whether that is the far one.
func lineOf(l field.Line) (line shape.Line, reversed bool, err error) {
	if l.Ends == "" {
		return shape.Line{}, false, lack.Failed("the field line from there leaves the model")
	}
	last := l.Points[len(l.Points)-1]
	reversed = last.Strength > l.Points[0].Strength
	samples := make([]shape.Sample, len(l.Points))
	for i, p := range l.Points {
		samples[i] = shape.Sample{Along: p.Along, Field: p.Strength}
		if reversed {
			samples[i].Along = last.Along - p.Along
		}
	}
	if reversed {
		slices.Reverse(samples)
	}
	line, err = shape.Sampled(samples, quantity.Voltage(math.Abs(float64(l.Points[0].Potential-last.Potential))))
	return line, reversed, err
}

// across is the voltage between the ends of a line, and the polarity of its start where
// that is an electrode whose sign is described.
func across(l field.Line, w Where, f *build.Arrangement) (quantity.Voltage, gap.Polarity) {
	v := l.Points[0].Potential - l.Points[len(l.Points)-1].Potential
	polarity := gap.Negative
	if v > 0 {
		polarity = gap.Positive
	}
	if w.Beside != "" || unsigned(f) {
		polarity = gap.Unknown
	}
	return quantity.Voltage(math.Abs(float64(v))), polarity
}

// unsigned reports whether only the size of the voltages of an arrangement is described.
func unsigned(f *build.Arrangement) bool {
	return f.From == build.FromShape || f.From == build.FromFeedthrough && f.Electrodes[0].Voltage.Set()
}

// Filling is what fills a body of an arrangement, as insulation reads it.
func (e *Evidence) Filling(f *build.Arrangement, body string) gap.Gap {
	if f.Gap != nil {
		g := e.gap(f.Gap)
		g.Shape = nil
		return g
	}
	g := gap.Gap{Medium: gap.Medium(f.Medium.Or("vacuum")), Gas: gap.Gas(f.Gas.V), Pressure: f.Pressure.V, Temperature: f.Temperature.V}
	for _, d := range f.Dielectrics {
		if d.Name.V == body && d.Fill.Set() {
			g = gap.Gap{Medium: gap.Medium(d.Fill.V)}
		}
	}
	if site := e.chain.Site; site != nil {
		if site.Altitude.Set() {
			g.Altitude = &site.Altitude.V
		}
		if g.Temperature == 0 {
			g.Temperature = site.AirTemperature.V
		}
	}
	return g
}

// Open reports whether a body of an arrangement is the medium or a space that gas or
// vacuum fills, and no solid.
func Open(f *build.Arrangement, body string) bool {
	for _, d := range f.Dielectrics {
		if d.Name.V == body {
			return d.Fill.Set()
		}
	}
	return true
}
