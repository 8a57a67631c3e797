// Package exhibit holds the words for what a review shows beside its figures and
// findings: curves and tables. They are plain data with every number computed;
// whoever renders them only lays them out.
package exhibit

import (
	"math"

	"kilovet/hv/quantity"
)

// Chapter is the part of a review an exhibit belongs to.
type Chapter string

// The chapters.
const (
	Chain      Chapter = "chain"
	Multiplier Chapter = "multiplier"
	Beam       Chapter = "beam"
	Spacings   Chapter = "spacings"
	Parts      Chapter = "parts"
	Energy     Chapter = "energy"
	Faults     Chapter = "faults"
	Plan       Chapter = "plan"
)

// Chapters lists them in the order of print.
var Chapters = []Chapter{Chain, Multiplier, Beam, Spacings, Parts, Energy, Faults, Plan}

// Curve is a picture of one or several lines over the same axes.
type Curve struct {
	ID      string // "multiplier.stage_voltages"; with the subject unique in a review
	Subject string // node, part, spacing or field; may be empty
	Chapter Chapter
	Title   string // a few words
	X, Y    Axis
	Lines   []Line
	Marks   []Mark
	Levels  []Level
	Areas   []Area // drawn under the lines
	Basis   string // how it was obtained
	Note    string // what a reader must know; may be empty
	// Detail marks what is for whoever looks closely: a renderer short of room may leave
	// it out, JSON never does.
	Detail bool
}

// Axis is what is laid off along one side of a curve.
type Axis struct {
	What string // in a few words
	Unit string // SI without prefix; "1" for fractions and counts
	Log  bool
}

// Line is one line of a curve, its points in the order in which they are joined.
type Line struct {
	Name   string
	Points []Point
	Kind   Kind
}

// Kind says what a line of a picture is, for whoever draws it with a stroke of its own;
// lines of one kind and name belong together. A line of a plain curve has none.
type Kind string

// The kinds of lines.
const (
	Outline       Kind = "outline"       // of a body
	Equipotential Kind = "equipotential" // named by its potential
	CriticalLine  Kind = "critical line" // along which a gap would break down
)

// Area is a part of a picture shaded to a share, 0 white to 1 darkest, by hatching or
// tone: boxes from their lower left to their upper right corner.
type Area struct {
	Name  string
	Share float64
	Boxes [][2]Point
}

// Point is a place in the units of the axes.
type Point struct{ X, Y float64 }

// Mark is a place worth pointing at.
type Mark struct {
	Name string
	Point
}

// Level is a limit drawn through the whole curve, across Y or, where Along is set,
// across X.
type Level struct {
	Name  string
	Value float64
	Along bool
}

// Table is a list of like things with the same columns.
type Table struct {
	ID      string // "beam.remedies"; with the subject unique in a review
	Subject string
	Chapter Chapter
	Title   string
	Columns []Column
	Rows    [][]Cell // as many cells a row as columns
	Basis   string
	Note    string
	// Detail marks what is for whoever looks closely: sheets leave it out, JSON never does.
	Detail bool
}

// Column heads one column.
type Column struct {
	Head string
	Unit string // SI without prefix of the numbers below; empty where they are words
}

// Cell is a number in the unit of its column, or words; a number that has a text is shown
// by it.
type Cell struct {
	Text  string
	Value *float64 // nil where the cell holds words or nothing
}

// Words is a cell of text.
func Words(text string) Cell { return Cell{Text: text} }

// Number is a cell of a quantity in SI units.
func Number[Q ~float64](v Q) Cell {
	f := float64(v)
	return Cell{Value: &f}
}

// Exponent is a pure number that is no share of anything: it is shown as it is. One under
// a millionth is what numbers leave of nought, and is shown as such.
func Exponent(v float64) Cell {
	if math.Abs(v) < 1e-6 {
		return Cell{Text: "0", Value: &v}
	}
	return Cell{Text: quantity.Significant(v), Value: &v}
}

// OrWords is the number, or the reason in words where there is none.
func OrWords[Q ~float64](v Q, err error) Cell {
	if err != nil {
		return Words(err.Error())
	}
	return Number(v)
}
