// Package page lays a review out as sections, paragraphs, tables and signature
// blocks, without saying how they are drawn: one model for every renderer of
// sheets.
package page

import (
	"kilovet/rules/diagram"
	"kilovet/rules/exhibit"
	"kilovet/rules/rule"
)

// Document is a review ready to be set on sheets.
type Document struct {
	Block    TitleBlock
	Sections []Section
}

// TitleBlock holds the data fields that stand on every sheet (ISO 7200); the
// sheet numbers are the renderer's. Empty fields are blanks to write in.
type TitleBlock struct {
	Title, Document, Revision, Owner, Creator, Approver, Date, DocumentType string
	Program                                                                 string // what made the sheet
}

// Section is a heading and what stands under it.
type Section struct {
	Lead   string // stands above the heading
	Title  string
	Fresh  bool // begins a sheet
	Whole  bool // stands on one sheet where it can
	Blocks []Block
	Anchor string // what links lead to
}

// Block is one piece of a section: Banner, Notice, Paragraph, Facts, Table, Halves,
// Gallery, Contents or Signatures.
type Block interface{ block() }

// Banner is the verdict of the whole review.
type Banner struct {
	Verdict        rule.Verdict
	Word           string
	Sentence, Rest string
}

// Notice is a paragraph set apart in a box.
type Notice struct{ Text string }

// Paragraph is running text.
type Paragraph struct{ Text string }

// Facts are labels with what stands beside them.
type Facts struct{ Facts []Fact }

// Fact is one label and its text.
type Fact struct{ Label, Text string }

// Table is rows of cells under columns whose shares of the width sum to one.
type Table struct {
	Title   string // stands above it
	Note    string // stands under the title
	Anchor  string // what links lead to
	Columns []Column
	Rows    []Row
	Fill    bool   // ends with the sheet it stands on; Rest counts the rows left out
	Legend  []Line // stands under it
}

// Halves is pieces that half the width is enough for, in two columns: down the first,
// then down the second.
type Halves struct{ Blocks []Block }

// Gallery is pictures, side by side where they are narrow.
type Gallery struct{ Figures []Figure }

// Figure is a picture with its caption: a curve or a schematic.
type Figure struct {
	Anchor, Label, Caption string
	Curve                  *exhibit.Curve
	Diagram                *diagram.Diagram
	Wide                   bool              // takes the whole width
	Spots                  map[string]string // anchors of parts and nodes shown
}

// Contents lists the sections with the sheets that they begin on.
type Contents struct{ Entries []Entry }

// Entry is one line of the contents.
type Entry struct{ Title, Anchor string }

// Column is a title and a share of the width.
type Column struct {
	Over  string // stands above the titles of all columns beside each other that have it
	Title string
	Share float64
	Right bool // numbers stand to the right
}

// Row is one row. A group row has one cell over all columns, stays with the row
// after it, and stands again over the rows under it that go on to another sheet.
type Row struct {
	Group bool
	Under bool // belongs to the group row before it
	Cells []Cell

	Stands int // how many entries it stands for where a table is cut and the rest counted

	Anchor string // what links lead to
}

// Cell is a verdict or lines of text, each a paragraph of its own.
type Cell struct {
	Verdict rule.Verdict
	Lines   []Line
}

// Line is a paragraph in a weight.
type Line struct {
	Text   string
	Weight Weight
	Links  []Link
	Sheet  string // an anchor: the sheet that it is on stands after the text
}

// Link leads from a word of a line, or from all of it, to an anchor.
type Link struct{ Word, To string }

// Weight is how much a line stands out.
type Weight int

// The weights.
const (
	Plain Weight = iota
	Strong
	Small
)

// Signatures are blanks to sign in, side by side.
type Signatures struct{ Blanks []Blank }

// Blank is one signature: the role, and the name where it is known.
type Blank struct{ Role, Name string }

func (Banner) block()     {}
func (Notice) block()     {}
func (Paragraph) block()  {}
func (Facts) block()      {}
func (Table) block()      {}
func (Halves) block()     {}
func (Gallery) block()    {}
func (Contents) block()   {}
func (Signatures) block() {}
