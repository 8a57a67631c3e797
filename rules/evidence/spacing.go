package evidence

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
)

// Spacing is a spacing with the voltages across it and what is known of it.
type Spacing struct {
	Voltages   gap.Voltages
	Under      Condition // where the peak occurs
	Lasting    Condition // where the lasting voltage is highest
	Gap        gap.Gap
	Assessment insulation.Assessment
	Computed   bool  // a computed field judges in place of the closed shape
	Wall       *Wall // of the sleeve of a feedthrough: what it takes of the voltage; else nil
}

// Spacings are the described spacings and those of the feedthroughs.
func (e *Evidence) Spacings() []*chain.Spacing {
	all, _ := remember(e.Under(Condition{}), "spacings", func() ([]*chain.Spacing, error) {
		var all []*chain.Spacing
		for i := range e.chain.Spacings {
			all = append(all, &e.chain.Spacings[i])
		}
		for i := range e.chain.Feedthroughs {
			parts := e.chain.Feedthroughs[i].Spacings()
			for j := range parts {
				all = append(all, &parts[j])
			}
		}
		return all, nil
	})
	return all
}

// Surface is the part of a spacing's creepage that counts, and why something was taken
// off.
func (x Spacing) Surface() (quantity.Length, string, error) {
	return insulation.SurfaceCounted(x.Gap, x.Voltages)
}

// Spacing assesses a spacing at its highest voltage: the peak over all states and
// corners, the lasting voltage over those that can stand for long.
// With a fault it is that of all other conditions unless the fault raises the peak.
func (e *Evidence) Spacing(s *chain.Spacing) (Spacing, error) {
	if e.failed() {
		return e.spacingInFault(s)
	}
	return remember(e.Under(Condition{}), "spacing "+s.Name.V, func() (Spacing, error) {
		if s.Medium.V == "gas" {
			if err := document.Need(s.Gas, s.Pressure); err != nil {
				return Spacing{}, err
			}
		}
		v, under, lasting, err := e.across(s)
		if err != nil {
			return Spacing{}, err
		}
		v, wall, err := e.onWall(s, v)
		if err != nil {
			return Spacing{}, err
		}
		g := e.gap(s)
		x := Spacing{v, under, lasting, g, insulation.Assess(g, v), false, wall}
		e.byField(s, &x)
		return x, nil
	})
}

func (e *Evidence) spacingInFault(s *chain.Spacing) (Spacing, error) {
	usual, err := e.Healthy().Spacing(s)
	if err != nil || s.Voltage.Set() {
		return usual, err
	}
	peak, err := Largest(e, e.Ratings(), nodesOf(s), func(e *Evidence, n string) (quantity.Voltage, error) { return e.peakOver(n, s.To.V) })
	if err != nil || quantity.AtMost(peak.Value, usual.Whole()) {
		return usual, err
	}
	return remember(e, "spacing "+s.Name.V, func() (Spacing, error) {
		v, wall := usual.Voltages, (*Wall)(nil)
		if v.Peak = peak.Value; usual.Wall != nil {
			w := e.Healthy().wall(s.Of, v.Peak, min(v.Peak, usual.Whole()))
			v.Peak, wall = w.Of(v.Peak), &w
		}
		x := Spacing{v, peak.Under, usual.Lasting, usual.Gap, insulation.Assess(usual.Gap, v), false, wall}
		e.Healthy().byField(s, &x) // its field is that of the same line, for each volt
		return x, nil
	})
}

// Whole is the peak between the ends of a spacing, of which it may take a part only.
func (x Spacing) Whole() quantity.Voltage {
	if x.Wall != nil {
		return x.Wall.Whole
	}
	return x.Voltages.Peak
}

// nodesOf are the nodes on the live side of a spacing.
func nodesOf(s *chain.Spacing) []string { return append([]string{s.From.V}, s.Also.V...) }

func (e *Evidence) across(s *chain.Spacing) (v gap.Voltages, under, long Condition, err error) {
	if s.Voltage.Set() {
		return gap.Voltages{Peak: s.Voltage.V, LongTerm: s.Voltage.V, Sharp: gap.Polarity(s.SharperElectrode.V)}, under, long, nil
	}
	if !e.HasSupply() {
		v, err = e.acrossMains(s)
		return v, under, long, err
	}
	live := nodesOf(s)
	peak, err := Worst(e, live, func(e *Evidence, n string) (quantity.Voltage, error) { return e.peakOver(n, s.To.V) })
	if err != nil {
		return v, under, long, err
	}
	lasting, err := Largest(e, LongTerm(), live, func(e *Evidence, n string) (quantity.Voltage, error) { return e.lastingOver(n, s.To.V) })
	if err != nil {
		return v, under, long, err
	}
	sharp, err := e.sharp(s)
	if err != nil {
		return v, under, long, err
	}
	v = gap.Voltages{Peak: peak.Value, LongTerm: lasting.Value, Sharp: sharp}
	err = e.alternating(s, live, &v)
	return v, peak.Under, lasting.Under, err
}

// alternating adds the swing of a drive at or above 30 kHz.
func (e *Evidence) alternating(s *chain.Spacing, live []string, v *gap.Voltages) error {
	const high = 30e3
	if e.chain.Drive.Frequency.V < high {
		return nil
	}
	swing, err := Worst(e, live, func(e *Evidence, n string) (quantity.Voltage, error) { return e.Swing(n, s.To.V) })
	v.Alternating, v.Frequency = swing.Value/2, e.chain.Drive.Frequency.V
	return err
}

// gap turns a described spacing into what insulation reads; what was not given stays
// so.
func (e *Evidence) gap(s *chain.Spacing) gap.Gap {
	g := gap.Gap{
		Medium: gap.Medium(s.Medium.V), Insulation: gap.Insulation(s.Insulation.V),
		Clearance: s.Clearance.V, Creepage: s.Creepage.V, Shape: shapeOf(s.Shape),
		Material: s.Material.V, Temperature: s.Temperature.V, Pressure: s.Pressure.V,
		GaugeFactor: s.GaugeFactor.V, Gas: gap.Gas(s.Gas.V), ImpulseTested: s.ImpulseTested.V, Mains: e.mains(s),
	}
	g.Board, g.Surface = gap.Board(s.Board.V), gap.Surface(s.ElectrodeSurface.V)
	g.StressedArea, g.OilTest, g.Strength, g.Specimen = s.StressedArea.V, s.OilTest.V, s.Strength.V, s.TestedThickness.V
	g.Tested = gap.Tested{Voltage: s.TestedVoltage.V, Length: s.TestedLength.V}
	g.Polished, g.Conditioned = known(s.Finish, "polished"), known(s.Conditioned, true)
	if r := s.Ribs; r != nil {
		g.Ribs = gap.Ribs{Count: r.Count.V, Depth: r.Depth.V, Width: r.Width.V, Thickness: r.Thickness.V}
	}
	if s.CTI.Set() {
		g.CTI = &s.CTI.V
	}
	if s.Humidity.Set() {
		g.Humidity = &s.Humidity.V
	}
	if site := e.chain.Site; site != nil {
		g.PollutionDegree = site.PollutionDegree.V
		if site.Altitude.Set() {
			g.Altitude = &site.Altitude.V
		}
		if !s.Temperature.Set() {
			g.Temperature = site.AirTemperature.V
		}
	}
	return g
}

// known is whether a key has a value, nil where it was not given.
func known[T comparable](key document.Given[T], value T) *bool {
	if !key.Set() {
		return nil
	}
	return new(key.V == value)
}

func shapeOf(s *chain.Shape) *gap.Shape {
	if s == nil {
		return nil
	}
	return &gap.Shape{Kind: gap.Kind(s.Kind.V), InnerRadius: s.InnerRadius.V, OuterRadius: s.OuterRadius.V,
		Radius: s.Radius.V, TipRadius: s.TipRadius.V, EdgeRadius: s.EdgeRadius.V, Symmetric: !s.Earthed.Or(true)}
}
