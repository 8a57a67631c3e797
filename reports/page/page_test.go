package page_test

import (
	"flag"
	"fmt"
	"math"
	"os"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

var update = flag.Bool("update", false, "rewrite the golden files")

// outline writes a document as text, one piece a line.
func outline(d *page.Document) string {
	var b strings.Builder
	fmt.Fprintf(&b, "title block %+v\n", d.Block)
	for _, s := range d.Sections {
		fmt.Fprintf(&b, "\nsection %q fresh %t whole %t anchor %q\n", s.Title, s.Fresh, s.Whole, s.Anchor)
		for _, block := range s.Blocks {
			piece(&b, block)
		}
	}
	return b.String()
}

func piece(b *strings.Builder, block page.Block) {
	switch block := block.(type) {
	case page.Table:
		table(b, block)
	case page.Halves:
		b.WriteString("  Halves\n")
		for _, inner := range block.Blocks {
			piece(b, inner)
		}
	case page.Gallery:
		for _, f := range block.Figures {
			kind := "schematic"
			if f.Curve != nil {
				kind = "curve " + f.Curve.ID
			}
			fmt.Fprintf(b, "  Figure %q %q wide %t %s: %s %v\n", f.Anchor, f.Label, f.Wide, kind, f.Caption, f.Spots)
		}
	default:
		fmt.Fprintf(b, "  %s %+v\n", strings.TrimPrefix(fmt.Sprintf("%T", block), "page."), block)
	}
}

func table(b *strings.Builder, t page.Table) {
	fmt.Fprintf(b, "  Table %q %q %q %+v\n", t.Title, t.Note, t.Anchor, t.Columns)
	for _, r := range t.Rows {
		fmt.Fprintf(b, "    row group %t under %t anchor %q\n", r.Group, r.Under, r.Anchor)
		for _, c := range r.Cells {
			fmt.Fprintf(b, "      | %s", c.Verdict)
			for _, l := range c.Lines {
				fmt.Fprintf(b, " [%d %s%s%s]", l.Weight, l.Text, links(l.Links), l.Sheet)
			}
			b.WriteByte('\n')
		}
	}
	for _, l := range t.Legend {
		fmt.Fprintf(b, "    legend %s\n", l.Text)
	}
}

func links(all []page.Link) string {
	if len(all) == 0 {
		return ""
	}
	return fmt.Sprint(" links ", all)
}

func TestGolden(t *testing.T) {
	const golden = "testdata/failing.txt"
	got := outline(page.New(sample.Failing()))
	if *update {
		if err := os.WriteFile(golden, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(golden)
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(string(want), got); diff != "" {
		t.Error(diff)
	}
}

func TestFrontSheetAnswers(t *testing.T) {
	front := outline(&page.Document{Sections: page.New(sample.Failing()).Sections[:1]})
	for _, want := range []string{"FAILS", "Do not switch on", "spacing.creepage", "less than the 125 mm", "rating.cable", "drive.peak_limit", sample.Deference, "held at 20 kV"} {
		if !strings.Contains(front, want) {
			t.Errorf("%q is not on the front sheet", want)
		}
	}
}

func TestNothingJudgedIsNotCalledClear(t *testing.T) {
	text := outline(page.New(sample.Empty()))
	if strings.Contains(text, "No finding stands against") || !strings.Contains(text, "Nothing was judged") {
		t.Error(text)
	}
	if text := outline(page.New(sample.Sound())); !strings.Contains(text, "No finding stands against") {
		t.Error(text)
	}
}

func TestFrontSheetListsEveryRuleOnceAndCountsThoseThatDoNotFit(t *testing.T) {
	for _, b := range page.New(sample.Hard()).Sections[0].Blocks {
		if table, ok := b.(page.Table); ok {
			// 42 rules stand against switching on, then a group row and one marginal rule.
			if !table.Fill || len(table.Rows) != 44 || !table.Rows[42].Group {
				t.Errorf("%d rows, fill %t", len(table.Rows), table.Fill)
			}
			if got := table.Rest(41).Cells[0].Lines[0].Text; got != "And 2 rules more, on the sheets that follow." {
				t.Errorf("the rest reads %q", got)
			}
			return
		}
	}
	t.Error("no table on the front sheet")
}

func TestLittleInHandIsOnTheFrontSheet(t *testing.T) {
	r := sample.Sound()
	r.Verdict = rule.Marginal
	r.Findings = append(r.Findings, rule.Finding{Rule: "rating.cable", Subject: "cable", Verdict: rule.Marginal, Concern: rule.Equipment, Because: "The cable has 3 % in hand."})
	front := outline(&page.Document{Sections: page.New(r).Sections[:1]})
	for _, want := range []string{"No finding stands against", "Met with little in hand or on an assumption", "rating.cable", "3 % in hand"} {
		if !strings.Contains(front, want) {
			t.Errorf("%q is not on the front sheet:\n%s", want, front)
		}
	}
}

func TestTheNoteStandsAboveTheFirstSheet(t *testing.T) {
	if got := page.New(sample.Failing()).Noted("Built-in").Sections[0].Lead; got != "Built-in" {
		t.Errorf("got %q", got)
	}
}

func TestFiguresThatSayNothingAreLeftOutAndThatIsSaid(t *testing.T) {
	r := sample.Failing()
	r.Figures = append(r.Figures, figure.Figure{ID: "potential", Subject: "ground", State: "working", What: "mean over a drive period, to ground", Unit: "V", Basis: "ripple.network"},
		figure.Figure{ID: "cathode.hum", State: "working", What: "hum", Unit: "V", Basis: "ripple.phasor"})
	text := outline(page.New(r))
	if strings.Contains(text, "[0 ground]") || !strings.Contains(text, "cathode.hum") || !strings.Contains(text, "are left out here") {
		t.Error(text)
	}
	if text := outline(page.New(sample.Failing())); strings.Contains(text, "are left out here") {
		t.Error("nothing was left out, yet it is said")
	}
}

func TestSheetsHoldEveryFindingFigureAndInput(t *testing.T) {
	for name, r := range map[string]*rules.Review{"failing": sample.Failing(), "sound": sample.Sound(), "hard": sample.Hard(), "empty": sample.Empty()} {
		d := page.New(r)
		text := outline(d)
		for _, want := range names(r) {
			if !strings.Contains(text, want) {
				t.Errorf("%s: %q is missing", name, want)
			}
		}
		for _, f := range r.Figures {
			if f.Value != 0 && !printed(d, f) { // a part at which a figure is nought has no row
				t.Errorf("%s: %s of %q in state %q is in no cell", name, f.ID, f.Subject, f.State)
			}
		}
	}
}

func names(r *rules.Review) []string {
	all := append([]string{r.Deference, r.Program.Version, "kilovet signoff"}, r.Assumptions...)
	for _, f := range r.Findings {
		all = append(all, f.Rule, f.Subject, f.Because, f.Remedy, f.Under)
		for _, s := range f.Sources {
			all = append(all, s.Text, string(s.Mark))
		}
	}
	for _, c := range r.Curves {
		all = append(all, "curve "+c.ID, c.Title, strings.TrimPrefix(c.Note, "i"), c.Basis)
	}
	for _, t := range r.Tables {
		all = append(all, t.Title, t.Basis)
	}
	for _, f := range r.Figures {
		if f.Value != 0 {
			all = append(all, f.ID, f.State, f.What, f.Basis)
		}
	}
	for _, in := range r.Inputs {
		all = append(all, in.Name, in.SHA256)
	}
	for _, c := range r.Cautions {
		all = append(all, c.Text)
	}
	for _, p := range r.PassedOver {
		all = append(all, p.Rule, p.Because)
	}
	return all
}

func TestEveryRowFitsItsTable(t *testing.T) {
	for _, s := range page.New(sample.Hard()).Sections {
		for _, b := range s.Blocks {
			if table, ok := b.(page.Table); ok {
				checkTable(t, s.Title, table)
			}
		}
	}
}

func checkTable(t *testing.T, title string, table page.Table) {
	t.Helper()
	sum := 0.0
	for _, c := range table.Columns {
		sum += c.Share
	}
	if math.Abs(sum-1) > 1e-9 {
		t.Errorf("%s: the columns share %g of the width", title, sum)
	}
	for _, r := range table.Rows {
		want := len(table.Columns)
		if r.Group {
			want = 1
		}
		if len(r.Cells) != want {
			t.Errorf("%s: %d cells in a row, want %d", title, len(r.Cells), want)
		}
	}
}

// Whatever is pointed at stands somewhere, once.
func TestLinksLead(t *testing.T) {
	for name, r := range map[string]*rules.Review{"failing": sample.Failing(), "hard": sample.Hard(), "empty": sample.Empty()} {
		there, wanted := map[string]int{}, map[string]bool{}
		for _, s := range page.New(r).Sections {
			there[s.Anchor]++
			for _, block := range s.Blocks {
				ends(block, there, wanted)
			}
		}
		for to := range wanted {
			if to != "" && there[to] == 0 {
				t.Errorf("%s: %q is nowhere", name, to)
			}
		}
		if name == "hard" && len(wanted) < 60 {
			t.Errorf("%d links", len(wanted))
		}
	}
}

func ends(block page.Block, there map[string]int, wanted map[string]bool) {
	switch block := block.(type) {
	case page.Table:
		there[block.Anchor]++
		for _, r := range block.Rows {
			there[r.Anchor]++
			for _, c := range r.Cells {
				for _, l := range c.Lines {
					wanted[l.Sheet] = true
					for _, link := range l.Links {
						wanted[link.To] = true
					}
				}
			}
		}
	case page.Halves:
		for _, inner := range block.Blocks {
			ends(inner, there, wanted)
		}
	case page.Gallery:
		for _, f := range block.Figures {
			there[f.Anchor]++
			for _, to := range f.Spots {
				wanted[to] = true
			}
		}
	case page.Contents:
		for _, e := range block.Entries {
			wanted[e.Anchor] = true
		}
	}
}

func TestAFindingLeadsToItsSourcesAndFigures(t *testing.T) {
	r := sample.Failing()
	r.Figures = append(r.Figures,
		figure.Figure{ID: "spacing.voltage", Subject: "gun feedthrough, air side", Value: 2e4, Unit: "V", What: "highest", Basis: "rules"},
		figure.Figure{ID: "spacing.creepage_needed", Subject: "gun feedthrough, air side", Value: 0.125, Unit: "m", What: "needed", Basis: "insulation"})
	text := outline(page.New(r))
	for _, want := range []string{
		"judged by [1]; see also [2]; see spacing.creepage_needed, spacing.voltage links [{[1] source 1} {[2] source 2} {spacing.creepage_needed figure spacing.creepage_needed gun feedthrough, air side}",
		`anchor "figure spacing.voltage gun feedthrough, air side"`,
	} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is missing in\n%s", want, text)
		}
	}
}
