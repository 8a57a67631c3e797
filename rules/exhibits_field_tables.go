package rules

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// fieldTables lists what every computed field gives: peaks, critical lines, edges,
// solids, capacitances.
func fieldTables(e *evidence.Evidence) (all []exhibit.Table) {
	for _, f := range e.Arrangements() {
		s, err := e.FieldOf(f)
		if err != nil {
			continue
		}
		for _, t := range []exhibit.Table{peakTable(e, f, s), lineTable(e, f, s), edgeTable(e, f, s), solidTable(e, f), capacitanceTable(f, s)} {
			if len(t.Rows) > 0 {
				t.Subject, t.Chapter, t.Basis = f.Name.V, exhibit.Spacings, fieldBasis
				all = append(all, t)
			}
		}
	}
	return all
}

// peakTable lists the peak of every electrode by what it borders.
func peakTable(e *evidence.Evidence, f *build.Arrangement, s *field.Solution) exhibit.Table {
	t := exhibit.Table{
		ID: "field.peaks", Title: "Greatest fields on the electrodes",
		Columns: []exhibit.Column{{Head: "electrode"}, {Head: "in"}, {Head: "peak", Unit: "V/m"}, {Head: "may be off by", Unit: "1"}, {Head: "r", Unit: "m"}, {Head: "z", Unit: "m"},
			{Head: "settled peak", Unit: "V/m"}, {Head: "time constant", Unit: "s"}},
		Note: "At once after switching on, and once a direct voltage has settled; both are judged.",
	}
	for _, name := range s.Electrodes() {
		for _, body := range s.Facing(name) {
			w := e.ClearOfEdges(f, evidence.Where{Electrode: name, Body: body})
			p, err := e.FieldPeak(f, w)
			if err != nil {
				continue
			}
			what := body
			if w.Distance > 0 {
				what += ", " + quantity.Text(w.Distance) + " clear of sharp edges"
			}
			row := []exhibit.Cell{exhibit.Words(name), exhibit.Words(what), exhibit.Number(p.Strength), exhibit.Number(p.Error), exhibit.Number(p.At.R), exhibit.Number(p.At.Z)}
			t.Rows = append(t.Rows, append(row, settledCells(e, f, w)...))
		}
	}
	return t
}

// settledCells are the settled peak and its time constant, or a dash.
func settledCells(e *evidence.Evidence, f *build.Arrangement, w evidence.Where) []exhibit.Cell {
	settled, err := e.SettledPeak(f, w)
	if err != nil {
		return []exhibit.Cell{exhibit.Words("–"), exhibit.Words("–")}
	}
	time, err := e.SettlingTime(f, w)
	if err != nil {
		return []exhibit.Cell{exhibit.Number(settled.Strength), exhibit.Words("–")}
	}
	return []exhibit.Cell{exhibit.Number(settled.Strength), exhibit.Number(time)}
}

// lineTable lists the critical lines with what stands along them.
func lineTable(e *evidence.Evidence, f *build.Arrangement, s *field.Solution) exhibit.Table {
	t := exhibit.Table{
		ID: "field.lines", Title: "Critical lines",
		Columns: []exhibit.Column{{Head: "from"}, {Head: "ends on"}, {Head: "length", Unit: "m"}, {Head: "voltage along it", Unit: "V"}, {Head: "mean over peak field", Unit: "1"},
			{Head: "streamer integral", Unit: "1"}, {Head: "onset", Unit: "V"}, {Head: "breakdown, positive", Unit: "V"}, {Head: "breakdown, negative", Unit: "V"}},
		Note: "The field line from each greatest field through the medium. A streamer integral of 1 starts a discharge; where the line ends on an insulator none crosses.",
	}
	for _, name := range s.Electrodes() {
		for _, body := range s.Facing(name) {
			if !evidence.Open(f, body) {
				continue
			}
			if c, err := e.Critical(f, e.ClearOfEdges(f, evidence.Where{Electrode: name, Body: body})); err == nil {
				t.Rows = append(t.Rows, lineRow(name, c))
			}
		}
	}
	return t
}

func lineRow(from string, c evidence.Critical) []exhibit.Cell {
	streamer := exhibit.Words("–")
	if c.HasIntegral {
		streamer = exhibit.Number(c.Streamer)
	}
	onset, err := c.Strength.Onset.Get()
	row := []exhibit.Cell{exhibit.Words(from), exhibit.Words(c.Traced.Ends), exhibit.Number(c.Line.Gap()), exhibit.Number(c.Volts),
		exhibit.Number(c.Line.Utilisation()), streamer, exhibit.OrWords(onset, err)}
	if c.Traced.Closed {
		return append(row, exhibit.Words("closed"), exhibit.Words("closed"))
	}
	positive, err := c.Positive.Get()
	row = append(row, exhibit.OrWords(positive, err))
	negative, err := c.Negative.Get()
	return append(row, exhibit.OrWords(negative, err))
}

// edgeTable lists the fields before sharp edges and junctions.
func edgeTable(e *evidence.Evidence, f *build.Arrangement, s *field.Solution) exhibit.Table {
	t := exhibit.Table{
		ID: "field.edges", Title: "Sharp edges and junctions",
		Columns: []exhibit.Column{{Head: "place"}, {Head: "between"}, {Head: "exponent", Unit: "1"}},
		Note:    "The field goes with the distance to the power of the exponent: below nought it has no bound, and no peak. Fields in the medium, the greater of switched and settled.",
	}
	t.Columns = append(t.Columns, exhibit.Column{Head: "judged at", Unit: "m"})
	for _, d := range evidence.EdgeDistances() {
		t.Columns = append(t.Columns, exhibit.Column{Head: "at " + quantity.Text(d), Unit: "V/m"})
	}
	for _, x := range s.Edges() {
		row := []exhibit.Cell{exhibit.Words(evidence.EdgeName(x)), exhibit.Words(joined(x)), exhibit.Exponent(x.Exponent)}
		judged, err := e.JudgedAt(f, x)
		row = append(row, exhibit.OrWords(judged, err))
		for _, d := range evidence.EdgeDistances() {
			at, err := e.AtEdge(f, x, d)
			if err != nil {
				row = append(row, exhibit.Words("–"))
				continue
			}
			row = append(row, exhibit.Number(at.Strength))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

func joined(x field.Edge) string {
	text := ""
	for i, b := range append(append([]string(nil), x.Electrodes...), x.Bodies...) {
		if i > 0 {
			text += ", "
		}
		text += b
	}
	return text
}

// solidTable lists what of its strength every insulator uses.
func solidTable(e *evidence.Evidence, f *build.Arrangement) exhibit.Table {
	t := exhibit.Table{
		ID: "field.solids", Title: "Strength used of insulators",
		Columns: []exhibit.Column{{Head: "insulator"}, {Head: "peak", Unit: "V/m"}, {Head: "along", Unit: "m"}, {Head: "stands", Unit: "V/m"}, {Head: "used", Unit: "1"}},
		Note:    "Against the short-time strength at the length of field line through the insulator from its greatest field.",
	}
	for i := range f.Dielectrics {
		d := &f.Dielectrics[i]
		if d.Fill.Set() {
			continue
		}
		u, err := e.SolidUse(f, d)
		switch {
		case u.Field == nil:
		case err != nil:
			t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(d.Name.V), exhibit.Number(u.Strength), exhibit.Number(u.Through), exhibit.Words(err.Error()), exhibit.Words("–")})
		default:
			t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(d.Name.V), exhibit.Number(u.Strength), exhibit.Number(u.Through), exhibit.Number(u.Stands.Value), exhibit.Number(quantity.Fraction(u.Strength / u.Stands.Value))})
		}
	}
	return t
}

// capacitanceTable is the matrix of Maxwell coefficients.
func capacitanceTable(f *build.Arrangement, s *field.Solution) exhibit.Table {
	t := exhibit.Table{ID: "field.capacitances", Title: "Capacitance coefficients", Columns: []exhibit.Column{{Head: "charge on, per volt of"}},
		Note: "Maxwell coefficients of the model as drawn: half a model has half of them."}
	for _, a := range s.Electrodes() {
		t.Columns = append(t.Columns, exhibit.Column{Head: a, Unit: "F"})
		row := []exhibit.Cell{exhibit.Words(a)}
		for _, b := range s.Electrodes() {
			v, err := s.Capacitance(a, b)
			row = append(row, exhibit.OrWords(v, err))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}
