package page_test

import (
	"slices"
	"strconv"
	"strings"
	"testing"

	"kilovet"
	"kilovet/reports/digest"
	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
	"kilovet/rules"
	"kilovet/rules/exhibit"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// printed reports whether the value of a figure stands in a cell that belongs to its
// subject and its state: of a list, of a matrix, or of a table that is named for it.
func printed(d *page.Document, f figure.Figure) bool {
	value := digest.FigureText(f)
	subject := f.Subject
	if subject == "" {
		subject = "whole chain"
	}
	return slices.ContainsFunc(tablesOf(d), func(t page.Table) bool {
		return slices.ContainsFunc(t.Rows, func(r page.Row) bool {
			switch {
			case strings.HasPrefix(t.Title, "Figures: "):
				return speaks(r.Cells[0], subject) && slices.ContainsFunc(r.Cells[1:], func(c page.Cell) bool { return said(c) == value }) && headed(t, r, f, value)
			case t.Title == "Figures shown in tables":
				return said(r.Cells[0]) == f.ID && shownIn(d, subject, value)
			case strings.HasPrefix(t.Title, "Figures"):
				return listed(t, r, f, value)
			}
			return false
		})
	})
}

// headed reports whether the value stands under the figure and its state.
func headed(t page.Table, r page.Row, f figure.Figure, value string) bool {
	_, name, _ := strings.Cut(f.ID, ".")
	name = strings.ReplaceAll(name, "_", " ")
	if name == "" {
		name = f.ID
	}
	for i, c := range t.Columns {
		under := c.Over == name && c.Title == f.State || c.Over == "" && (c.Title == name || c.Title == name+", "+f.State)
		if under && said(r.Cells[i]) == value && strings.Contains(t.Note, f.ID+": "+f.What) {
			return true
		}
	}
	return false
}

func listed(t page.Table, r page.Row, f figure.Figure, value string) bool {
	if r.Cells[0].Lines[0].Text != f.ID {
		return false
	}
	if f.Subject != "" && (len(r.Cells[0].Lines) < 2 || !speaks(page.Cell{Lines: r.Cells[0].Lines[1:]}, f.Subject)) {
		return false
	}
	for i, c := range t.Columns {
		if (c.Title == f.State || f.State == "" && c.Title == "value") && said(r.Cells[i]) == value {
			return true
		}
	}
	return false
}

func shownIn(d *page.Document, subject, value string) bool {
	return slices.ContainsFunc(tablesOf(d), func(t page.Table) bool {
		return strings.HasPrefix(t.Title, "Table ") && slices.ContainsFunc(t.Rows, func(r page.Row) bool {
			return said(r.Cells[0]) == subject && slices.ContainsFunc(r.Cells[1:], func(c page.Cell) bool { return said(c) == value })
		})
	})
}

// speaks reports whether a cell names a subject: by itself, in a list, or within a count
// from one to another.
func speaks(c page.Cell, subject string) bool {
	text := said(c)
	if text == subject || slices.Contains(strings.Split(text, ", "), subject) {
		return true
	}
	at := strings.LastIndex(subject, ".") + 1
	n, err := strconv.Atoi(subject[at:])
	for _, part := range strings.Split(text, ", ") {
		from, to, isRange := strings.Cut(strings.TrimPrefix(part, subject[:at]), " to ")
		first, err1 := strconv.Atoi(from)
		last, err2 := strconv.Atoi(to)
		if isRange && err == nil && err1 == nil && err2 == nil && first <= n && n <= last {
			return true
		}
	}
	return false
}

func said(c page.Cell) string {
	var all []string
	for _, l := range c.Lines {
		all = append(all, l.Text)
	}
	return strings.Join(all, " ")
}

func tablesOf(d *page.Document) []page.Table {
	var all []page.Table
	var add func(b page.Block)
	add = func(b page.Block) {
		switch b := b.(type) {
		case page.Table:
			all = append(all, b)
		case page.Halves:
			for _, inner := range b.Blocks {
				add(inner)
			}
		}
	}
	for _, s := range d.Sections {
		for _, b := range s.Blocks {
			add(b)
		}
	}
	return all
}

// of is figures of an id, one for each subject.
func of(id, state, unit string, subjects []string, values ...float64) []figure.Figure {
	var all []figure.Figure
	for i, s := range subjects {
		all = append(all, figure.Figure{ID: id, Subject: s, State: state, Value: values[i], Unit: unit, What: "what " + id + " is", Basis: "rules"})
	}
	return all
}

func laidOut(figures ...[]figure.Figure) (*rules.Review, string) {
	r := sample.Sound()
	r.Figures = slices.Concat(figures...)
	return r, outline(page.New(r))
}

// Figures of several subjects of a family stand beside each other, a row a subject.
func TestFamiliesStandBesideEachOther(t *testing.T) {
	r, text := laidOut(
		of("spacing.voltage", "", "V", []string{"one", "two"}, 2e4, 3e4),
		of("spacing.clearance_needed", "", "m", []string{"one", "three"}, 0.03, 0.04))
	for _, want := range []string{"Title:clearance needed", "[0 one]\n      |  [0 20 kV]\n      |  [0 30 mm]", "[0 two]\n      |  [0 30 kV]\n      | \n", "[0 three]\n      | \n      |  [0 40 mm]", "spacing.voltage: what spacing.voltage is; spacing.clearance_needed: what spacing.clearance_needed is (basis: rules)"} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is missing in\n%s", want, text)
		}
	}
	allPrinted(t, r)
}

func allPrinted(t *testing.T, r *rules.Review) {
	t.Helper()
	for _, f := range r.Figures {
		if !printed(page.New(r), f) {
			t.Errorf("%s of %s in state %q is in no cell", f.ID, f.Subject, f.State)
		}
	}
}

// Each state has its column under the name of the figure; rows with the same numbers are
// one, and so is a figure that is the same for all.
func TestRowsWithTheSameNumbersAreOne(t *testing.T) {
	stages := []string{"stage.1", "stage.2", "stage.3", "stage.4", "supply"}
	r, text := laidOut(
		of("potential", "working", "V", stages, 1, 2, 2, 2, 2),
		of("potential", "lost", "V", stages, 5, 6, 6, 6, 6),
		of("diode.current_mean", "working", "A", []string{"multiplier.diode.1", "multiplier.diode.2", "multiplier.diode.3"}, 9e-5, 9e-5, 9e-5))
	for _, want := range []string{"{Over:potential Title:working", "{Over:potential Title:lost", "[0 stage.2 to 4, supply]\n      |  [0 2 V]\n      |  [0 6 V]", "[1 diode.current_mean] [0 multiplier.diode.1 to 3]"} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is missing in\n%s", want, text)
		}
	}
	allPrinted(t, r)
}

// What a table of the same subject shows is not set again; the table is named.
func TestFiguresThatATableShowsAreNotSetAgain(t *testing.T) {
	r := sample.Sound()
	n := exhibit.Number[float64]
	r.Figures = of("arc.part_voltage", "lost", "V", []string{"one", "two"}, 100, 200)
	table := exhibit.Table{ID: "chain.arc", Chapter: exhibit.Parts, Title: "An arc", Columns: []exhibit.Column{{Head: "part"}, {Head: "peak", Unit: "V"}},
		Rows: [][]exhibit.Cell{{exhibit.Words("one"), n(100.0)}, {exhibit.Words("two"), n(200.0)}}}
	r.Tables = []exhibit.Table{table}
	if text := outline(page.New(r)); strings.Contains(text, "Figures: arc") || !strings.Contains(text, "[1 arc.part_voltage]") || !strings.Contains(text, "[0 Table 1 links [{Table 1 table chain.arc }]]") {
		t.Error(text)
	}
	allPrinted(t, r)
	r.Tables[0].Rows[1][1] = n(201.0)
	if text := outline(page.New(r)); !strings.Contains(text, "Figures: arc") {
		t.Error("a table that shows another number is named for a figure")
	}
	allPrinted(t, r)
}

// A long text that comes again stands once, under the table.
func TestLongTextsThatComeAgainStandUnderTheTable(t *testing.T) {
	r := sample.Sound()
	long, other := strings.Repeat("prove the polarity before ", 3), strings.Repeat("several diodes in series ", 3)
	table := exhibit.Table{ID: "faults", Chapter: exhibit.Faults, Title: "Faults", Columns: []exhibit.Column{{Head: "fault"}, {Head: "what to add"}}}
	for _, row := range [][2]string{{"one", long}, {"two", other}, {"three", long}} {
		table.Rows = append(table.Rows, []exhibit.Cell{exhibit.Words(row[0]), exhibit.Words(row[1])})
	}
	r.Tables = []exhibit.Table{table}
	text := outline(page.New(r))
	for _, want := range []string{"[0 one]\n      |  [0 note a]", "[0 two]\n      |  [0 note b]", "[0 three]\n      |  [0 note a]", "legend note a: " + long, "legend note b: " + other} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is missing in\n%s", want, text)
		}
	}
	if strings.Count(text, long) != 1 {
		t.Error("a long text stands twice")
	}
	r.Tables[0].Chapter = exhibit.Plan
	if text := outline(page.New(r)); strings.Contains(text, "note a") {
		t.Error("who works from the plan must look up notes")
	}
}

// Every figure of the built-in example stands in a cell of its own subject and state.
func TestSheetsHoldEveryFigureOfTheExample(t *testing.T) {
	if testing.Short() {
		t.Skip("a whole review")
	}
	_, data := kilovet.Example()
	c, faults := rules.Read(data)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	r := rules.Run(c, nil, rules.Program{Name: "kilovet"})
	d := page.New(r)
	for _, f := range r.Figures {
		if f.Value != 0 && !printed(d, f) {
			t.Errorf("%s of %q in state %q is in no cell", f.ID, f.Subject, f.State)
		}
	}
}

// A finding about the whole chain leads to the figures, tables and curves that its rule
// rests on, where there are any.
func TestAFindingAboutTheChainLeadsToWhatItRestsOn(t *testing.T) {
	r := sample.Sound()
	r.Findings = append(r.Findings, rule.Finding{Rule: "discharge.waiting_time", Subject: "chain", Verdict: rule.Meets, Concern: rule.Life, Because: "it waits"},
		rule.Finding{Rule: "beam.blur", Subject: "beam", Verdict: rule.Fails, Concern: rule.Performance, Because: "too wide"},
		rule.Finding{Rule: "access.interlock", Subject: "chain", Verdict: rule.Meets, Concern: rule.Life, Because: "two switches"})
	r.Figures = append(of("stored.discharge_time", "lost", "s", []string{"", "stage.1"}, 7, 6), of("beam.blur_total", "", "m", []string{""}, 5e-9)...)
	r.Tables = []exhibit.Table{{ID: "energy.nodes", Chapter: exhibit.Energy, Title: "Nodes", Columns: []exhibit.Column{{Head: "node"}}, Rows: [][]exhibit.Cell{{exhibit.Words("stage.1")}}}}
	text := outline(page.New(r))
	for _, want := range []string{
		"see Table 1, stored.discharge_time links [{1 table energy.nodes } {stored.discharge_time figures stored.discharge_time whole chain}]",
		"see beam.blur_total links [{beam.blur_total figure beam.blur_total }]",
		"[0 two switches] [2 concerns life]\n",
	} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is missing in\n%s", want, text)
		}
	}
}
