// Package local holds limits that a local code or a test record sets in place of those
// of the rules: stricter ones govern, laxer ones are refused, and what practice or
// memory asks for may be relaxed by a test record, a name and a reason. It reads their
// file and judges findings anew; what it computes is the comparison alone.
package local

import (
	"errors"
	"fmt"
	"regexp"
	"slices"
	"strings"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// File is a file of local limits. Its tags are those of a description.
type File struct {
	document.Table
	Format      document.Given[int]    `key:"format" range:">= 1, <= 1" means:"version of this format" example:"1"`
	Title       document.Given[string] `key:"title" means:"what these limits are" example:"House rules for high voltage"`
	Limits      []Limit                `key:"limit" means:"a stricter limit of a local code"`
	Relaxations []Relaxation           `key:"relaxation" means:"a limit of practice or memory that a test has shown to be too strict"`
}

// Limit is a stricter limit of a local code.
type Limit struct {
	document.Table
	Rule    document.Given[string] `key:"rule" needed:"yes" means:"rule whose limit it is, as kilovet basis lists them" example:"spacing.clearance"`
	Subject document.Given[string] `key:"subject" means:"the one thing it holds for (default: all that the rule judges)" example:"gun feedthrough, air side"`
	Value   document.Given[string] `key:"value" needed:"yes" means:"least or largest amount, in the unit of the rule; in per cent of the rating or estimate where the rule uses a share of one" example:"80 mm"`
	Source  document.Given[string] `key:"source" needed:"yes" means:"name of the code" example:"House rules HV-7"`
	Clause  document.Given[string] `key:"clause" means:"where in it" example:"4.2"`
}

// Relaxation is a laxer limit that a test record stands for.
type Relaxation struct {
	document.Table
	Rule       document.Given[string] `key:"rule" needed:"yes" means:"rule whose limit it is, as kilovet basis lists them" example:"diode.reverse_voltage"`
	Subject    document.Given[string] `key:"subject" means:"the one thing it holds for (default: all that the rule judges)" example:"multiplier.diode"`
	Value      document.Given[string] `key:"value" needed:"yes" means:"least or largest amount, or a share, as for a limit" example:"90 %"`
	TestRecord document.Given[string] `key:"test_record" needed:"yes" means:"number of the record of the test" example:"TR-0017"`
	Name       document.Given[string] `key:"name" needed:"yes" means:"who answers for it" example:"A. N. Other"`
	Reason     document.Given[string] `key:"reason" needed:"yes" means:"why it is enough" example:"40 stacks held 95 % of their rating for 1000 h"`
}

// Read reads a file of local limits and lists every fault of it in document order. The
// ids are those of all rules.
func Read(data []byte, ids []string) (*File, document.Faults) {
	f := &File{}
	faults := document.Read(data, f)
	c := checker{ids: ids, refused: map[[2]int]bool{}}
	for _, found := range faults {
		c.refused[[2]int{found.Line, found.Column}] = true
	}
	for _, l := range f.Limits {
		c.entry(l.Rule, l.Value)
	}
	for _, r := range f.Relaxations {
		c.entry(r.Rule, r.Value)
	}
	if len(f.Limits)+len(f.Relaxations) == 0 && len(faults) == 0 {
		c.fault("purpose", document.Place{Line: 1, Column: 1}, "there is neither a limit nor a relaxation", "write a [[limit]] or a [[relaxation]]")
	}
	return f, append(faults, c.faults...).Sorted()
}

// checker finds the faults that single keys do not show.
type checker struct {
	ids     []string
	refused map[[2]int]bool
	faults  document.Faults
}

func (c *checker) fault(code document.Code, at document.Place, what, remedy string) {
	c.faults = append(c.faults, faultAt(code, at, what, remedy))
}

func faultAt(code document.Code, at document.Place, what, remedy string) document.Fault {
	return document.Fault{Code: code, Key: at.Key, Line: at.Line, Column: at.Column, What: what, Remedy: remedy}
}

func (c *checker) sound(at document.Place) bool {
	return at.Line > 0 && !c.refused[[2]int{at.Line, at.Column}]
}

func (c *checker) entry(rule, value document.Given[string]) {
	if c.sound(rule.Place) && !slices.Contains(c.ids, rule.V) {
		c.fault("rule", rule.Place, fmt.Sprintf("there is no rule %q", rule.V), meant(rule.V, c.ids, "kilovet basis lists the rules"))
	}
	if !c.sound(value.Place) || bareCount.MatchString(value.V) {
		return
	}
	v, err := quantity.ReadAny(value.V)
	switch {
	case err != nil:
		c.fault(document.Quantity, value.Place, fmt.Sprintf("%q: %s", value.V, refusal(err)), `write an amount with its unit, as in "80 mm", a share, as in "60 %", or a count, as in "2"`)
	case v <= 0:
		c.fault(document.Range, value.Place, fmt.Sprintf("%q is not above nought", value.V), "nothing is at most nought, and everything at least that")
	}
}

func refusal(err error) string {
	var r *quantity.Refusal
	if errors.As(err, &r) {
		return r.What
	}
	return err.Error()
}

// bareCount is the number of things, which has no unit.
var bareCount = regexp.MustCompile(`^[1-9][0-9]{0,8}$`)

// meant offers the nearest of the known words, else where they are listed.
func meant(word string, known []string, otherwise string) string {
	if near, ok := document.Nearest(word, known); ok {
		return fmt.Sprintf("was %q meant? ", near) + otherwise
	}
	return otherwise
}

// named is a code with its clause.
func (l Limit) named() string { return strings.TrimSpace(l.Source.V + " " + l.Clause.V) }
