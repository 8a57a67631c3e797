package pdf

import (
	"bytes"
	"compress/zlib"
	"fmt"
	"io"
	"math"
	"regexp"
	"slices"
	"strings"
	"sync"
	"testing"
	"unicode/utf16"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/reports/drawing"
	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
	"kilovet/rules"
	"kilovet/rules/rule"
)

var samples = map[string]*rules.Review{"failing": sample.Failing(), "sound": sample.Sound(), "empty": sample.Empty(), "hard": sample.Hard(), "nothing": {}}

func testFonts(t testing.TB) *fonts {
	t.Helper()
	f, err := newFonts()
	if err != nil {
		t.Fatal(err)
	}
	return f
}

var a4 = A4.area()

// testPen draws for all tests, one after the other.
var testPen = sync.OnceValue(func() *drawing.Pen {
	pen, err := drawing.NewPen()
	if err != nil {
		panic(err)
	}
	return pen
})

func sheetsOf(f *fonts, d *page.Document) []*sheet { return layout(f, a4, testPen(), nil, d).sheets }

func render(t testing.TB, d *page.Document) []byte {
	t.Helper()
	out, err := Render(d)
	if err != nil {
		t.Fatal(err)
	}
	return out
}

func TestSameDocumentSameBytes(t *testing.T) {
	first := render(t, page.New(sample.Failing()))
	for range 4 {
		if !bytes.Equal(first, render(t, page.New(sample.Failing()))) {
			t.Fatal("the bytes differ")
		}
	}
}

// place is the rectangle a line of text takes.
type place struct {
	left, top, right, bottom float64
	text                     string
}

func places(f *fonts, s *sheet) []place {
	var all []place
	for _, i := range s.items {
		if w, ok := i.(written); ok {
			size := w.style.size * points
			all = append(all, place{w.x, w.y - 0.76*size, w.x + f.width(w.style, w.text), w.y + 0.22*size, w.text})
		}
	}
	return all
}

func TestTextNeitherLeavesTheFrameNorCollides(t *testing.T) {
	f := testFonts(t)
	for name, r := range samples {
		for n, s := range sheetsOf(f, page.New(r)) {
			checkPlaces(t, fmt.Sprintf("%s, sheet %d", name, n+1), a4, places(f, s))
		}
	}
}

func checkPlaces(t *testing.T, where string, a area, all []place) {
	t.Helper()
	for i, p := range all {
		if p.left < a.frameLeft || p.right > a.frameRight || p.top < a.frameTop || p.bottom > a.frameBottom {
			t.Errorf("%s: %q leaves the frame", where, p.text)
		}
		for _, q := range all[:i] {
			if p.left < q.right && q.left < p.right && p.top < q.bottom && q.top < p.bottom {
				t.Errorf("%s: %q collides with %q", where, p.text, q.text)
			}
		}
	}
}

func TestBodyStaysClearOfTheTitleBlock(t *testing.T) {
	f := testFonts(t)
	w := newFlow(f, a4, testPen())
	w.turn()
	for _, s := range page.New(sample.Hard()).Sections {
		w.section(s)
	}
	for n, s := range w.sheets {
		for _, p := range places(f, s) {
			if p.bottom > a4.bottom || p.left < a4.left || p.right > a4.right+0.01 {
				t.Errorf("sheet %d: %q leaves the body", n+1, p.text)
			}
		}
	}
}

func TestTablesOfAnyHeightStayInTheBody(t *testing.T) {
	f := testFonts(t)
	chance.Check(t, func(t *rapid.T) {
		table := page.Table{Columns: []page.Column{{Title: "one", Share: 0.3}, {Title: "two", Share: 0.7, Right: true}}}
		tall := func(label string) []page.Line {
			return slices.Repeat([]page.Line{{Text: "line"}}, rapid.IntRange(0, 120).Draw(t, label))
		}
		for range rapid.IntRange(1, 12).Draw(t, "rows") {
			if rapid.Bool().Draw(t, "group") {
				table.Rows = append(table.Rows, page.Row{Group: true, Cells: []page.Cell{{Lines: tall("group")}}})
				continue
			}
			table.Rows = append(table.Rows, page.Row{Under: rapid.Bool().Draw(t, "under"), Cells: []page.Cell{{Verdict: "fails"}, {Lines: tall("cell")}}})
		}
		w := newFlow(f, a4, testPen())
		w.turn()
		w.table(table)
		for n, s := range w.sheets {
			for _, p := range places(f, s) {
				if p.bottom > a4.bottom+0.01 {
					t.Fatalf("sheet %d: %q ends at %g of %g", n+1, p.text, p.bottom, a4.bottom)
				}
			}
		}
	})
}

func TestEverySheetBearsItsNumberAndTheTitleBlock(t *testing.T) {
	f := testFonts(t)
	for name, r := range samples {
		sheets := sheetsOf(f, page.New(r))
		for i, s := range sheets {
			text := strings.Join(words(s), "\n")
			for _, want := range []string{fmt.Sprintf("%d of %d", i+1, len(sheets)), "Legal owner", "Identification number", "Revision index", "Date of issue", "Title", "Creator", "Approval person", "Document type"} {
				if !strings.Contains(text, want) {
					t.Errorf("%s, sheet %d lacks %q", name, i+1, want)
				}
			}
		}
	}
}

func TestSignaturesStandWithWhatTheySign(t *testing.T) {
	f := testFonts(t)
	for name, r := range samples {
		const code = "7Q2M4K-9XB3TD-W0ZA5E"
		sheets := sheetsOf(f, page.SignOff(r, rules.SignOff{Code: code}, page.Issue{Date: "2025-03-04"}))
		last := strings.Join(words(sheets[len(sheets)-1]), " ")
		for _, want := range []string{"Signatures", "Prepared", "Checked", "Approved"} {
			if !strings.Contains(last, want) {
				t.Errorf("%s: %q is not on the last sheet", name, want)
			}
		}
		all := ""
		for i, s := range sheets {
			text := strings.Join(words(s), " ")
			if !strings.Contains(text, code) {
				t.Errorf("%s: the code is not on sheet %d", name, i+1)
			}
			all += text
		}
		for _, in := range r.Inputs {
			if !strings.Contains(all, in.SHA256) {
				t.Errorf("%s: the digest of %s is on no sheet", name, in.Name)
			}
		}
	}
}

func words(s *sheet) []string {
	var all []string
	for _, i := range s.items {
		if w, ok := i.(written); ok {
			all = append(all, w.text)
		}
	}
	return all
}

func TestFirstSheetAnswers(t *testing.T) {
	text := strings.Join(words(sheetsOf(testFonts(t), page.New(sample.Failing()))[0]), " ")
	for _, want := range []string{"FAILS", "Do not switch on", "spacing.creepage", "rating.cable", "drive.peak_limit", "Local electrical codes"} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is not on the first sheet: %s", want, text)
		}
	}
}

// The first section ends on its sheet, and fills it where there is more to list.
func TestFirstSectionFillsOneSheet(t *testing.T) {
	f := testFonts(t)
	for name, r := range samples {
		for _, p := range Papers {
			w := newFlow(f, p.area(), testPen())
			w.turn()
			w.section(page.New(r).Noted("Built-in example: no file was named").Sections[0])
			if len(w.sheets) != 1 {
				t.Errorf("%s on %s: the first section takes %d sheets", name, p, len(w.sheets))
			}
			if got := words(w.sheets[0])[0]; got != "Built-in example: no file was named" {
				t.Errorf("%s: the sheet begins with %q", name, got)
			}
		}
	}
	r := sample.Failing()
	for i := range 40 {
		r.Findings = append(r.Findings, rule.Finding{Rule: fmt.Sprintf("rating.%d", i), Verdict: rule.Fails, Concern: rule.Equipment, Because: "Too little."})
	}
	w := newFlow(f, a4, testPen())
	w.turn()
	w.section(page.New(r).Sections[0])
	text := strings.Join(words(w.sheets[0]), " ")
	shown := strings.Count(text, "rating.")
	if want := fmt.Sprintf("And %d rules more", 43-shown-1); len(w.sheets) != 1 || a4.bottom-w.y > 15 || !strings.Contains(text, want) {
		t.Errorf("%d sheets, %g mm left, want %q in: %s", len(w.sheets), a4.bottom-w.y, want, text)
	}
}

func TestTheFileClaimsNoDateButThatOfIssue(t *testing.T) {
	const day, made = "2026-03-14", "/CreationDate (D:20260314000000)"
	d := page.New(sample.Failing())
	if file := render(t, d); bytes.Contains(file, []byte("Date (D:")) {
		t.Error("an undated review bears a date")
	}
	d.Block.Date = "spring"
	if file := render(t, d); bytes.Contains(file, []byte("Date (D:")) {
		t.Error("a date that is none was taken for one")
	}
	d.Block.Date = day
	if file := render(t, d); bytes.Count(file, []byte("Date (D:")) != 1 || !bytes.Contains(file, []byte(made)) {
		t.Errorf("the date of issue is not %q", made)
	}
}

func TestNothingIsLostOnTheWayToTheSheets(t *testing.T) {
	f := testFonts(t)
	for name, r := range samples {
		var all strings.Builder
		for _, s := range sheetsOf(f, page.New(r)) {
			all.WriteString(squeezed(strings.Join(words(s), "")))
		}
		for _, finding := range r.Findings {
			for _, want := range []string{finding.Rule, finding.Subject, finding.Because, finding.Remedy} {
				if !strings.Contains(all.String(), squeezed(f.guard(regular, want))) {
					t.Errorf("%s: %q is missing", name, want)
				}
			}
		}
	}
}

// squeezed takes the spaces out, since lines break at them.
func squeezed(s string) string { return strings.ReplaceAll(s, " ", "") }

func TestTextIsSearchable(t *testing.T) {
	got := readBack(t, render(t, page.New(sample.Failing())))
	for _, want := range []string{"spacing.creepage", "60 µA", "-12.0 %", sample.SHA, "1 of "} {
		if !strings.Contains(got, want) {
			t.Errorf("%q cannot be read back", want)
		}
	}
}

var (
	streams = regexp.MustCompile(`(?s)stream\n(.*?)\nendstream`)
	shown   = regexp.MustCompile(`(?s)\(((?:\\.|[^\\)])*)\) Tj`)
)

// readBack inflates the streams of a file and collects the text they show, whose
// codes are UTF-16.
func readBack(t *testing.T, file []byte) string {
	t.Helper()
	var all strings.Builder
	for _, s := range streams.FindAllSubmatch(file, -1) {
		reader, err := zlib.NewReader(bytes.NewReader(s[1]))
		if err != nil {
			continue
		}
		content, err := io.ReadAll(reader)
		if err != nil {
			t.Fatal(err)
		}
		for _, m := range shown.FindAllSubmatch(content, -1) {
			all.WriteString(decoded(unescaped(m[1])) + "\n")
		}
	}
	return all.String()
}

func unescaped(b []byte) []byte {
	return []byte(strings.NewReplacer(`\\`, `\`, `\(`, `(`, `\)`, `)`, `\r`, "\r").Replace(string(b)))
}

func decoded(b []byte) string {
	var codes []uint16
	for i := 0; i+1 < len(b); i += 2 {
		codes = append(codes, uint16(b[i])<<8|uint16(b[i+1]))
	}
	return string(utf16.Decode(codes))
}

func TestGuard(t *testing.T) {
	f := testFonts(t)
	for _, c := range []struct{ text, want string }{
		{"µ Ω ≤ ² −", "µ Ω ≤ ² −"},
		{"\U0001F600", "\ufffd"},
		{"高压", "\ufffd\ufffd"},
		{"a\xffb", "a\ufffdb"},
		{"a\nb", "a b"},
	} {
		if got := f.guard(regular, c.text); got != c.want {
			t.Errorf("%q became %q, want %q", c.text, got, c.want)
		}
	}
}

func TestWrappedLinesFitAndKeepTheText(t *testing.T) {
	f := testFonts(t)
	chance.Check(t, func(t *rapid.T) {
		s := rapid.StringOf(rapid.RuneFrom([]rune("ab iW._-/高"))).Draw(t, "text")
		width := rapid.Float64Range(4, 60).Draw(t, "width")
		var all strings.Builder
		for _, l := range f.wrap(body, s, width) {
			if f.width(l.style, l.text) > width+1e-9 {
				t.Fatalf("%q is wider than %g mm", l.text, width)
			}
			all.WriteString(l.text)
		}
		if got, want := squeezed(all.String()), squeezed(f.guard(regular, s)); got != want {
			t.Fatalf("%q became %q", want, got)
		}
	})
}

func TestCutTextShowsIt(t *testing.T) {
	f := testFonts(t)
	lines := f.fit(body, strings.Repeat("word ", 50), 30, 2)
	if len(lines) != 2 || !strings.HasSuffix(lines[1].text, "…") || f.width(body, lines[1].text) > 30 {
		t.Errorf("got %v", lines)
	}
}

func TestACoordinateThatIsNoNumberIsRefused(t *testing.T) {
	for _, v := range []float64{math.NaN(), math.Inf(1)} {
		s := &sheet{}
		s.add(stroke{0, 0, v, 1, 0.1, 0})
		if err := testPainter(t).paint(s); err == nil {
			t.Errorf("%g was drawn", v)
		}
	}
}

func TestVerdictsAreToldApartWithoutColour(t *testing.T) {
	seen := map[string]string{}
	for _, v := range []string{"meets", "marginal", "unassessed", "fails"} {
		s := &sheet{}
		s.mark(verdictOf(v), 0, 0, 20, 5)
		how := fmt.Sprintf("%+v", s.items)
		if seen[how] != "" {
			t.Errorf("%s looks like %s", v, seen[how])
		}
		seen[how] = v
	}
}

// Whatever text a review holds, it is set inside the frame, without collision, in
// glyphs that there are.
//
//	go test -fuzz FuzzSheets ./reports/pdf
func FuzzSheets(f *testing.F) {
	f.Add(sample.Foreign, 3)
	f.Add(sample.LongName, 40)
	f.Add("\x00\u202e\ud7ff", -1)
	f.Fuzz(func(t *testing.T, text string, n int) {
		r := sample.Failing()
		r.Heading.Title, r.Heading.Approver, r.Deference = text, text, strings.Repeat(text, min(max(n, 0), 50))
		r.Findings[0].Subject, r.Findings[0].Because, r.Findings[0].Under = text, text, text
		fonts := testFonts(t)
		for n, s := range sheetsOf(fonts, page.New(r)) {
			checkPlaces(t, fmt.Sprintf("sheet %d", n+1), a4, places(fonts, s))
			for _, i := range s.items {
				if w, ok := i.(written); ok && fonts.guard(w.style.face, w.text) != w.text {
					t.Errorf("%q was not guarded", w.text)
				}
			}
		}
	})
}
