package rules

import (
	"fmt"
	"math"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// fieldPictures shows every computed field, whole and about its weakest point.
func fieldPictures(e *evidence.Evidence) (all []exhibit.Curve) {
	for _, f := range e.Arrangements() {
		weak, err := e.Weakest(f)
		if err != nil || weak.Field == nil {
			continue
		}
		whole := frame(f)
		part := about(e, f, weak, whole)
		small := (part.To.R-part.From.R)*(part.To.Z-part.From.Z) < (whole.To.R-whole.From.R)*(whole.To.Z-whole.From.Z)/4
		c := fieldPicture(e, f, weak, whole)
		c.ID, c.Title, c.Detail = "field.picture", "Equipotential lines and strength of the field", small
		if small {
			d := fieldPicture(e, f, weak, part)
			d.ID, d.Title = "field.weakest", "The field about its weakest point"
			all = append(all, d)
		}
		all = append(all, c)
	}
	return all
}

// frame is the box that holds all outlines.
func frame(f *build.Arrangement) field.Window {
	w := field.Window{From: profile.Point{R: quantity.Length(math.Inf(1)), Z: quantity.Length(math.Inf(1))}, To: profile.Point{Z: quantity.Length(math.Inf(-1))}}
	for _, o := range evidence.Outlines(f) {
		for _, p := range o.Points {
			w.From.R, w.From.Z = min(w.From.R, p.R), min(w.From.Z, p.Z)
			w.To.R, w.To.Z = max(w.To.R, p.R), max(w.To.Z, p.Z)
		}
	}
	if w.From.R < w.To.R/4 {
		w.From.R = 0
	}
	const least = 0.05 // of the other side, where all outlines are flat
	w.To.Z = max(w.To.Z, w.From.Z+least*(w.To.R-w.From.R))
	w.To.R = max(w.To.R, w.From.R+least*(w.To.Z-w.From.Z))
	return w
}

// about is the surroundings of the weakest point, as far as its critical line goes.
func about(e *evidence.Evidence, f *build.Arrangement, weak evidence.Weak, whole field.Window) field.Window {
	reach := (whole.To.Z - whole.From.Z + whole.To.R - whole.From.R) / 16
	if c, err := e.Critical(f, weak.Where); err == nil {
		reach = min(max(1.5*c.Line.Gap(), reach/8), 4*reach)
	}
	return field.Window{
		From: profile.Point{R: max(weak.At.R-reach, whole.From.R), Z: max(weak.At.Z-reach, whole.From.Z)},
		To:   profile.Point{R: min(weak.At.R+reach, whole.To.R), Z: min(weak.At.Z+reach, whole.To.Z)},
	}
}

// shadeSteps are the shares of the strongest field between which a picture is shaded.
var shadeSteps = []quantity.Field{0.1, 0.25, 0.5, 0.75, 1.05}

func fieldPicture(e *evidence.Evidence, f *build.Arrangement, weak evidence.Weak, w field.Window) exhibit.Curve {
	c := exhibit.Curve{
		Subject: f.Name.V, Chapter: exhibit.Spacings, Basis: fieldBasis,
		X: exhibit.Axis{What: "distance from the axis", Unit: "m"}, Y: exhibit.Axis{What: "height", Unit: "m"},
		Note: "Under " + weak.Text() + ". Shaded by the field as a share of the weakest point's.",
	}
	for _, o := range evidence.Outlines(f) {
		c.Lines = append(c.Lines, clipped(o.Body, exhibit.Outline, o.Points, w)...)
	}
	levels, names := evenLevels(weak.Field)
	sizes := make([]quantity.Field, len(shadeSteps))
	for k, s := range shadeSteps {
		sizes[k] = s * weak.Strength
	}
	p := weak.Field.Picture(w, levels, sizes)
	for _, l := range p.Equipotentials {
		c.Lines = append(c.Lines, exhibit.Line{Name: names[l.Level], Kind: exhibit.Equipotential, Points: path(l.Points)})
	}
	if line, err := e.Critical(f, weak.Where); err == nil {
		c.Lines = append(c.Lines, clipped("critical line", exhibit.CriticalLine, places(line.Traced), w)...)
	}
	c.Areas = shades(p)
	c.Marks = marks(e, f, weak, w)
	return c
}

// evenLevels are the nine potentials between the lowest and the highest electrode.
func evenLevels(f *field.Field) ([]quantity.Voltage, map[quantity.Voltage]string) {
	low, high := f.Range()
	names := map[quantity.Voltage]string{}
	var levels []quantity.Voltage
	for k := 1; k < 10; k++ {
		v := low + (high-low)*quantity.Voltage(k)/10
		levels, names[v] = append(levels, v), quantity.Text(v)
	}
	return levels, names
}

func shades(p field.Picture) (all []exhibit.Area) {
	for k, s := range p.Shades {
		if len(s.Boxes) == 0 {
			continue
		}
		a := exhibit.Area{Name: fmt.Sprintf("%s to %s", quantity.Text(s.Least), quantity.Text(s.Most)), Share: 0.2 * float64(k+1)}
		for _, b := range s.Boxes {
			a.Boxes = append(a.Boxes, [2]exhibit.Point{pointOf(b.From), pointOf(b.To)})
		}
		all = append(all, a)
	}
	return all
}

// marks are the weakest point and the peak of every electrode that is seen.
func marks(e *evidence.Evidence, f *build.Arrangement, weak evidence.Weak, w field.Window) []exhibit.Mark {
	all := []exhibit.Mark{{Name: "weakest point, " + quantity.Text(weak.Strength), Point: pointOf(weak.At)}}
	s, err := e.FieldOf(f)
	if err != nil {
		return all
	}
	for _, name := range s.Electrodes() {
		p, err := e.FieldPeak(f, e.ClearOfEdges(f, evidence.Where{Electrode: name}))
		if err == nil && within(p.At, w) {
			all = append(all, exhibit.Mark{Name: "peak on " + name + ", " + quantity.Text(p.Strength), Point: pointOf(p.At)})
		}
	}
	return all
}

func pointOf(p profile.Point) exhibit.Point { return exhibit.Point{X: float64(p.R), Y: float64(p.Z)} }

func path(points []profile.Point) []exhibit.Point {
	all := make([]exhibit.Point, len(points))
	for i, p := range points {
		all[i] = pointOf(p)
	}
	return all
}

func places(l field.Line) (all []profile.Point) {
	for _, p := range l.Points {
		all = append(all, p.At)
	}
	return all
}

func within(p profile.Point, w field.Window) bool {
	return p.R >= w.From.R && p.R <= w.To.R && p.Z >= w.From.Z && p.Z <= w.To.Z
}

// clipped is what a window leaves of a path, in pieces.
func clipped(name string, kind exhibit.Kind, points []profile.Point, w field.Window) (lines []exhibit.Line) {
	var piece []exhibit.Point
	flush := func() {
		if len(piece) > 1 {
			lines = append(lines, exhibit.Line{Name: name, Kind: kind, Points: piece})
		}
		piece = nil
	}
	for i := 1; i < len(points); i++ {
		a, b, seen := cutTo(points[i-1], points[i], w)
		if !seen {
			flush()
			continue
		}
		if piece == nil || piece[len(piece)-1] != pointOf(a) {
			flush()
			piece = []exhibit.Point{pointOf(a)}
		}
		piece = append(piece, pointOf(b))
	}
	flush()
	return lines
}

// cutTo is the part of a straight way that lies in a window.
func cutTo(a, b profile.Point, w field.Window) (from, to profile.Point, seen bool) {
	low, high := 0.0, 1.0
	cut := func(start, way, least, most quantity.Length) bool {
		if way == 0 {
			return start >= least && start <= most
		}
		s, t := float64((least-start)/way), float64((most-start)/way)
		low, high = math.Max(low, math.Min(s, t)), math.Min(high, math.Max(s, t))
		return low < high
	}
	if !cut(a.R, b.R-a.R, w.From.R, w.To.R) || !cut(a.Z, b.Z-a.Z, w.From.Z, w.To.Z) || low >= high {
		return a, b, false
	}
	at := func(t float64) profile.Point {
		switch t {
		case 0:
			return a
		case 1:
			return b
		}
		return profile.Point{R: a.R + (b.R-a.R)*quantity.Length(t), Z: a.Z + (b.Z-a.Z)*quantity.Length(t)}
	}
	return at(low), at(high), true
}
