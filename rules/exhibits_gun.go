package rules

import (
	"fmt"

	"kilovet/hv/gun"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// curveSteps is how many steps a computed curve is drawn in.
const curveSteps = 120

// emissionCurve shows the law, the load line and where they meet.
func emissionCurve(e *evidence.Evidence) []exhibit.Curve {
	p, err := e.Gun()
	if err != nil || e.DiodeGun() {
		return nil
	}
	law := p.Law()
	c := exhibit.Curve{
		ID: "gun.emission", Chapter: exhibit.Beam, Title: "Emission against bias", Basis: "hv.gun",
		X:     exhibit.Axis{What: "bias, cathode above control electrode", Unit: "V"},
		Y:     exhibit.Axis{What: "emission", Unit: "A"},
		Marks: []exhibit.Mark{{Name: "works here", Point: exhibit.Point{X: float64(p.Bias), Y: float64(p.Emission)}}},
	}
	line := exhibit.Line{Name: "emission law"}
	load := exhibit.Line{Name: "bias resistor"}
	for i := range curveSteps + 1 {
		bias := law.Cutoff() * quantity.Voltage(i) / curveSteps
		line.Points = append(line.Points, exhibit.Point{X: float64(bias), Y: float64(law.At(bias))})
		if current, err := p.LoadLine(bias); err == nil && current <= law.ZeroBias() {
			load.Points = append(load.Points, exhibit.Point{X: float64(bias), Y: float64(current)})
		}
	}
	c.Lines = []exhibit.Line{line}
	if len(load.Points) > 1 {
		c.Lines = append(c.Lines, load)
	}
	if limit, err := e.RichardsonLimit(); err == nil && limit < 2*law.ZeroBias() {
		c.Levels = append(c.Levels, exhibit.Level{Name: "limit of the cathode at its temperature", Value: float64(limit)})
	}
	return []exhibit.Curve{c}
}

// operatingPoint says what of the gun was given and what was solved.
func operatingPoint(e *evidence.Evidence) []exhibit.Table {
	p, err := e.Gun()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "gun.operating_point", Chapter: exhibit.Beam, Title: "Where the gun works", Basis: "hv.gun",
		Columns: []exhibit.Column{{Head: "quantity"}, {Head: "value"}, {Head: "how"}},
		Note:    pointNote(e),
	}
	row := func(what, value, how string) {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(what), exhibit.Words(value), exhibit.Words(how)})
	}
	g := e.Chain().Gun
	row("emission", quantity.Text(p.Emission), givenOr(g.Emission.Set(), "solved: law and bias"))
	if !e.DiodeGun() {
		biasRows(e, p, row)
	}
	scale := "given"
	if g.Emission.Set() {
		scale = "solved: the law through the given emission"
	}
	row("emission without bias", quantity.Text(p.Law().ZeroBias()), scale)
	row("exponent of the law", quantity.Significant(p.Law().Exponent()), givenOr(g.Exponent.Set(), "assumed"))
	if limit, err := e.RichardsonLimit(); err == nil {
		row("limit of the cathode", quantity.Text(limit), "Richardson's law for area and temperature")
	} else {
		row("limit of the cathode", "not known", err.Error())
	}
	regulationRows(e, row)
	return []exhibit.Table{t}
}

func givenOr(given bool, otherwise string) string {
	if given {
		return "given"
	}
	return otherwise
}

func biasRows(e *evidence.Evidence, p gun.Point, row func(what, value, how string)) {
	how := "given"
	if e.Chain().Bias.Kind.V == "self" {
		how = "solved: emission through the resistor"
	}
	row("bias", quantity.Text(p.Bias), how)
	how = "given"
	if c, err := e.CutoffFromGeometry(); err == nil && e.CutoffByGeometry() {
		how = "from the gun's geometry, " + c.By
	}
	row("cutoff", quantity.Text(p.Law().Cutoff()), how)
	cutoffRows(e, row)
	if ratio, err := e.CutoffRatio(); err == nil {
		row("cutoff over working voltage", quantity.Significant(ratio), "the cutoff goes with the voltage")
	}
	if r, err := e.ResistorNeeded(); err == nil && e.Chain().Bias.Kind.V == "self" {
		row("bias resistor for the given emission", quantity.Text(r), "by the stated law; fitted is "+quantity.Text(e.Chain().Bias.Resistor.Total()))
	}
	if b, err := e.BiasNeeded(); err == nil && e.Chain().Bias.Kind.V == "fixed" {
		row("bias for the given emission", quantity.Text(b), "by the stated law; set is "+quantity.Text(e.Chain().Bias.Voltage.V))
	}
}

// cutoffRows sets the cutoff by the computed field before the tabulated estimate.
func cutoffRows(e *evidence.Evidence, row func(what, value, how string)) {
	if e.Chain().Gun.Geometry == nil {
		return
	}
	one := func(by string, c evidence.EstimatedCutoff, err error, governs string) {
		if err != nil {
			row("cutoff by "+by, "not known", err.Error())
			return
		}
		row("cutoff by "+by, fmt.Sprintf("%s, between %s and %s", quantity.Text(c.Voltage), quantity.Text(c.Low), quantity.Text(c.High)), governs+" at "+quantity.Text(c.Anode))
	}
	field, err := e.CutoffByField()
	one(evidence.ByField, field.EstimatedCutoff, err, "governs,")
	estimate, outside := e.CutoffEstimate()
	governs := "estimate,"
	if err != nil {
		governs = "governs,"
	}
	one(evidence.ByTable, estimate, outside, governs)
}

func regulationRows(e *evidence.Evidence, row func(what, value, how string)) {
	r, err := e.GunRegulation()
	if err != nil {
		return
	}
	row("a slow disturbance of the emission is divided by", quantity.Significant(r.Suppression), "solved: one more than the loop gain")
	row("regulates", fmt.Sprintf("up to %s, from %s on", quantity.Text(r.Emission), quantity.Text(r.Resistor)), "there a disturbance is only halved")
	if r.Whole > 0 {
		row("the bypass takes that away", fmt.Sprintf("from %s on, and leaves nothing above %s", quantity.Text(r.Whole), quantity.Text(r.None)), "solved")
	}
}

func pointNote(e *evidence.Evidence) string {
	if e.DiodeGun() {
		return "No bias is described: the gun is a diode, its emission follows the voltage by its exponent."
	}
	return ""
}

// answering says how strongly the emission follows its causes, self-biased and fixed.
func answering(e *evidence.Evidence) []exhibit.Table {
	s, err := e.GunSensitivities()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "gun.sensitivities", Chapter: exhibit.Beam, Title: "By how many per cent the emission changes for one per cent of its causes", Basis: "hv.gun",
		Columns: []exhibit.Column{{Head: "cause"}, {Head: "as biased", Unit: "1"}, {Head: "at a fixed bias of the same size", Unit: "1"}},
	}
	row := func(what string, here, fixed exhibit.Cell) {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(what), here, fixed})
	}
	n := exhibit.Exponent
	row("high voltage", n(s.Here.Voltage), n(s.Fixed.Voltage))
	if here, fixed, err := e.EmissionToTemperature(); err == nil {
		row("temperature of the cathode", n(here), n(fixed))
	} else {
		row("temperature of the cathode", exhibit.Words(err.Error()), exhibit.Words(err.Error()))
	}
	none := exhibit.Words("")
	if s.Here.Resistor != 0 {
		row("bias resistor", n(s.Here.Resistor), none)
	}
	if !e.DiodeGun() {
		bias := none
		if s.Here.Bias != 0 {
			bias = n(s.Here.Bias)
		}
		row("bias voltage", bias, n(s.Fixed.Bias))
	}
	return []exhibit.Table{t}
}
