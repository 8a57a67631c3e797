package sample

import (
	"fmt"
	"math"

	"kilovet/rules/exhibit"
)

// Curves are curves of all kinds: a period in time, logarithmic axes with many marks,
// a section to scale with many lines, long and foreign names, a single point, nothing.
func Curves() []exhibit.Curve {
	return []exhibit.Curve{wave(), paschen(40), section(), strained(), alone(), {ID: "nothing", Chapter: exhibit.Plan, Title: "Nothing", X: seconds, Y: volts, Basis: "none"}}
}

var (
	seconds = exhibit.Axis{What: "time", Unit: "s"}
	volts   = exhibit.Axis{What: "voltage less its mean", Unit: "V"}
)

func wave() exhibit.Curve {
	c := exhibit.Curve{ID: "multiplier.waveform", Chapter: exhibit.Multiplier, Title: "Ripple over one period of the drive", X: seconds, Y: volts,
		Basis: "ripple.network", Note: "Steady state, working."}
	for i, name := range []string{"multiplier", "output", "cathode"} {
		l := exhibit.Line{Name: name}
		for k := range 201 {
			x := float64(k) / 200
			l.Points = append(l.Points, exhibit.Point{X: 40e-6 * x, Y: 0.6 * math.Sin(2*math.Pi*(x-0.1*float64(i))) / float64(i+1)})
		}
		c.Lines = append(c.Lines, l)
	}
	c.Levels = []exhibit.Level{{Name: "allowed", Value: 0.7}, {Name: "diode stops conducting", Value: 11e-6, Along: true}}
	return c
}

// paschen has as many marks as there may be spacings.
func paschen(marks int) exhibit.Curve {
	c := exhibit.Curve{ID: "spacing.paschen", Subject: "column", Chapter: exhibit.Spacings, Title: "Breakdown over pressure times distance",
		X: exhibit.Axis{What: "pressure times distance", Unit: "Pa m", Log: true}, Y: exhibit.Axis{What: "breakdown voltage, peak", Unit: "V", Log: true}, Basis: "insulation.gas"}
	l := exhibit.Line{Name: "air"}
	for k := range 101 {
		x := 0.3 * math.Pow(10, 3.5*float64(k)/100)
		l.Points = append(l.Points, exhibit.Point{X: x, Y: 327 * (x / 0.76) / (1 + math.Log(1+x/0.76)) * (1 + 0.5/x)})
	}
	c.Lines = []exhibit.Line{l}
	for i := range marks {
		c.Marks = append(c.Marks, exhibit.Mark{Name: fmt.Sprintf("spacing %d", i+1), Point: exhibit.Point{X: 10 + 20*float64(i%7), Y: 300 * math.Pow(1.12, float64(i))}})
	}
	return c
}

// section is a drawing to scale with many lines.
func section() exhibit.Curve {
	c := exhibit.Curve{ID: "field.section", Subject: "gun", Chapter: exhibit.Spacings, Title: "Equipotentials", Basis: "insulation.field",
		X: exhibit.Axis{What: "distance from the axis", Unit: "m"}, Y: exhibit.Axis{What: "height", Unit: "m"}}
	for i := range 12 {
		l := exhibit.Line{Name: fmt.Sprintf("%d kV", i)}
		for k := range 61 {
			a := math.Pi / 2 * float64(k) / 60
			r := 0.004 + 0.003*float64(i)
			l.Points = append(l.Points, exhibit.Point{X: r * math.Sin(a), Y: 0.02 + r*math.Cos(a)})
		}
		c.Lines = append(c.Lines, l)
	}
	c.Marks = []exhibit.Mark{{Name: "largest field", Point: exhibit.Point{X: 0, Y: 0.024}}}
	return c
}

// strained has names that no room was made for.
func strained() exhibit.Curve {
	c := paschen(3)
	c.ID, c.Subject, c.Title = LongName, Foreign, LongName+" "+Foreign
	c.X.What, c.Y.What = LongName+" "+LongName+" "+LongName, LongName+" "+LongName+" "+LongName
	c.X.Log = false
	c.Lines[0].Name, c.Marks[0].Name, c.Note, c.Basis = LongName+LongName+LongName, Foreign, LongName+" "+LongName, LongName
	for i := range 6 {
		c.Levels = append(c.Levels, exhibit.Level{Name: LongName, Value: 5e3 + float64(i)})
	}
	return c
}

func alone() exhibit.Curve {
	return exhibit.Curve{ID: "alone", Chapter: exhibit.Energy, Title: "One point", X: seconds, Y: volts, Basis: "none", Lines: []exhibit.Line{{Name: "one", Points: []exhibit.Point{{X: 7200, Y: 5}}}}}
}

// Tables are tables of numbers with units, words, and names that no room was made for.
func Tables() []exhibit.Table {
	n := exhibit.Number[float64]
	t := exhibit.Table{ID: "multiplier.losses", Chapter: exhibit.Multiplier, Title: "Where the power goes", Basis: "ripple.network", Note: "Means over a period.",
		Columns: []exhibit.Column{{Head: "part"}, {Head: "mean power", Unit: "W"}, {Head: "share", Unit: "1"}, {Head: "where it is lost"}}}
	for i := range 24 {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(fmt.Sprintf("multiplier.diode.%d", i)), n(1.2345e-3 * float64(i)), n(float64(i) / 276), exhibit.Words("in the part")})
	}
	hard := exhibit.Table{ID: LongName, Subject: LongName, Chapter: exhibit.Beam, Title: LongName + " " + Foreign, Basis: LongName, Note: LongName + " " + LongName,
		Columns: []exhibit.Column{{Head: LongName}, {Head: LongName, Unit: "V"}, {Head: "c", Unit: "m"}, {Head: "d"}, {Head: "e"}, {Head: "f", Unit: "s"}, {Head: "g", Unit: "ohm"}, {Head: "h", Unit: "eV"}}}
	for range 3 {
		hard.Rows = append(hard.Rows, []exhibit.Cell{exhibit.Words(LongName), n(-12345.678), n(1e-9), exhibit.Words(Foreign), {}, n(3600), n(4.7e6), n(20e3)})
	}
	return []exhibit.Table{t, hard}
}
