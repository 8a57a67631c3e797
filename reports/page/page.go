// Package page lays a review out as sections, paragraphs, tables and signature
// blocks, without saying how they are drawn: one model for every renderer of
// sheets.
package page

import "kilovet/rules/rule"

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
}

// Block is one piece of a section: Banner, Notice, Paragraph, Facts, Table or
// Signatures.
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
	Columns []Column
	Rows    []Row
	Fill    bool // ends with the sheet it stands on; Rest counts the rows left out
}

// Column is a title and a share of the width.
type Column struct {
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
}

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
func (Signatures) block() {}
