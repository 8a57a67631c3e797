// Package rules lists every rule and runs the review of a chain. Its result is
// plain data that the reports render.
package rules

import (
	"kilovet/rules/diagram"
	"kilovet/rules/exhibit"
	"kilovet/rules/figure"
	"kilovet/rules/local"
	"kilovet/rules/rule"
)

// Review is a finished review: plain data, nothing left to compute or judge.
type Review struct {
	Program Program
	Inputs  []Input
	Heading Heading

	// Summary says in a few lines what the chain is and does.
	Summary []Line

	Verdict     rule.Verdict
	Counts      map[rule.Verdict]int
	Figures     []figure.Figure
	Findings    []rule.Finding // in the order of the rules; Worst sorts them
	Cautions    []rule.Caution
	PassedOver  []rule.PassedOver
	Assumptions []string
	Local       []local.Outcome // what became of local limits
	Curves      []exhibit.Curve
	Tables      []exhibit.Table
	// Diagram is the circuit ready to be drawn, its findings marked.
	Diagram *diagram.Diagram
	// Deference says what the review does not replace.
	Deference string
}

// Program is what made the review.
type Program struct{ Name, Version string }

// Input is a file that was read.
type Input struct{ Role, Name, SHA256 string }

// Heading holds the data fields of the title block (ISO 7200); empty fields are
// blanks to write in.
type Heading struct {
	Title, Document, Revision, Owner, Creator, Approver, Date, DocumentType string
}

// Line is a label and what stands beside it.
type Line struct{ Label, Text string }
