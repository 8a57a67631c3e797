package html_test

import (
	"crypto/sha256"
	"encoding/base64"
	"regexp"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/document"
	"kilovet/reports/digest"
	"kilovet/reports/html"
	"kilovet/reports/internal/sample"
	"kilovet/rules"
	"kilovet/rules/diagram"
	"kilovet/rules/rule"
)

var samples = map[string]*rules.Review{"failing": sample.Failing(), "sound": sample.Sound(), "empty": sample.Empty(), "hard": sample.Hard(), "nothing": {}}

// small is a diagram with two marks, one of a finding that the sample holds.
func small() *diagram.Diagram {
	part := func(name string, kind diagram.Kind, from, to string) diagram.Part {
		return diagram.Part{Name: name, Kind: kind, Value: "1 nF", From: from, To: to}
	}
	return &diagram.Diagram{
		Ladder: diagram.Ladder{
			Columns: []diagram.Column{{
				Source: part("drive.source", diagram.Alternating, "drive.source", "foot"), Drive: diagram.Node{Name: "drive"},
				Coupling: []diagram.Part{part("multiplier.coupling_capacitor.1", diagram.Capacitor, "coupling.1", "drive")},
				Nodes:    []diagram.Node{{Name: "coupling.1", Potential: "1 kV"}},
				Lower:    []diagram.Part{part("multiplier.diode.1", diagram.Diode, "foot", "coupling.1")},
				Upper:    []diagram.Part{part("multiplier.diode.2", diagram.Diode, "coupling.1", "stage.1")},
			}},
			Smoothing: []diagram.Part{part("multiplier.smoothing_capacitor.1", diagram.Capacitor, "stage.1", "foot")},
			Stages:    []diagram.Node{{Name: "stage.1", Potential: "2 kV"}}, Foot: diagram.Node{Name: "foot"},
		},
		Rail:  []diagram.Span{{Node: diagram.Node{Name: "output", Mark: 1}}},
		Marks: []diagram.Mark{{Number: 1, Verdict: rule.Unassessed, Subject: "cable", Rules: []string{"rating.cable", "rating.other"}}},
	}
}

func render(t testing.TB, r *rules.Review, o html.Options) string {
	t.Helper()
	out, err := html.RenderWith(r, o)
	if err != nil {
		t.Fatal(err)
	}
	return string(out)
}

// pages are all kinds of page.
func pages(t testing.TB) map[string]string {
	all := map[string]string{}
	for name, r := range samples {
		all[name] = render(t, r, html.Options{})
		all[name+" served"] = render(t, r, html.Options{Diagram: small(), Version: "7", Note: sample.Foreign})
	}
	const bad = "format = 1\n[drive]\npeak = 3 # <b>\n\x1b[31m\n"
	out, err := html.Faults("chain & co.toml", []byte(bad), document.Read([]byte(bad), &struct {
		Format document.Given[int] `key:"format" means:"f" example:"1"`
	}{}), html.Options{Version: "8"})
	if err != nil {
		t.Fatal(err)
	}
	all["faults"] = string(out)
	return all
}

func TestRenderIsThePageAlone(t *testing.T) {
	out, err := html.Render(sample.Failing())
	if err != nil || string(out) != render(t, sample.Failing(), html.Options{}) || string(out) != render(t, sample.Failing(), html.Options{}) {
		t.Errorf("the same review gives another page: %v", err)
	}
}

var (
	policy  = regexp.MustCompile(`http-equiv="Content-Security-Policy" content="([^"]*)"`)
	styles  = regexp.MustCompile(`(?s)<style>(.*?)</style>`)
	scripts = regexp.MustCompile(`(?s)<script>(.*?)</script>`)
)

func digestOf(text string) string {
	sum := sha256.Sum256([]byte(text))
	return "'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "'"
}

// The policy allows what is in the page by its digest, and nothing else: no other
// style or script, no load from anywhere, no form to anywhere.
func TestPolicyKnowsWhatIsThere(t *testing.T) {
	for name, page := range pages(t) {
		m := policy.FindStringSubmatch(page)
		if m == nil {
			t.Fatalf("%s: no policy", name)
		}
		got := strings.NewReplacer("&#39;", "'", "&#43;", "+").Replace(m[1])
		var style, script []string
		for _, s := range styles.FindAllStringSubmatch(page, -1) {
			style = append(style, digestOf(s[1]))
		}
		for _, s := range scripts.FindAllStringSubmatch(page, -1) {
			script = append(script, digestOf(s[1]))
		}
		connect := "'none'"
		if strings.Contains(page, `name="version"`) {
			connect = "'self'"
		}
		want := "default-src 'none'; style-src " + strings.Join(style, " ") + "; script-src " + strings.Join(script, " ") + "; connect-src " + connect + "; base-uri 'none'; form-action 'none'"
		if got != want {
			t.Errorf("%s: %s\nwant %s", name, got, want)
		}
	}
}

// What a policy without 'unsafe-inline' refuses, and what would load something, is
// not there.
func TestNothingIsLoadedOrInline(t *testing.T) {
	for name, page := range pages(t) {
		markup := scripts.ReplaceAllString(styles.ReplaceAllString(page, ""), "")
		for _, pattern := range []string{`<[^>]*\sstyle=`, `<[^>]*\son[a-z]+=`, `<[^>]*\ssrc=`, `<link`, `<img`, `<iframe`, `<object`, `javascript:`, `url\(`, `@import`, `href="[^#]`} {
			if m := regexp.MustCompile(pattern).FindString(markup); m != "" {
				t.Errorf("%s: %q", name, m)
			}
		}
		if style := styles.FindString(page); strings.Contains(style, "url(") || strings.Contains(style, "@import") {
			t.Errorf("%s: the style loads something", name)
		}
	}
}

func TestEverythingIsThere(t *testing.T) {
	for name, r := range samples {
		got := plain(render(t, r, html.Options{}))
		for _, want := range contents(r) {
			if !strings.Contains(got, squeezed(digest.Clean(want))) {
				t.Errorf("%s: %q is missing", name, want)
			}
		}
	}
}

var tags = regexp.MustCompile(`<[^>]*>`)

// plain is the text of a page without its tags.
func plain(page string) string {
	text := tags.ReplaceAllString(scripts.ReplaceAllString(styles.ReplaceAllString(page, ""), ""), " ")
	return squeezed(strings.NewReplacer("&lt;", "<", "&gt;", ">", "&amp;", "&", "&#39;", "'", "&#34;", `"`, "&#43;", "+").Replace(text))
}

func squeezed(s string) string { return strings.Join(strings.Fields(s), " ") }

// contents is every text a review holds.
func contents(r *rules.Review) []string {
	all := []string{r.Deference, r.Program.Version, digest.Sentence(r), r.Heading.Title, r.Heading.Document, r.Heading.Revision, r.Heading.Creator}
	for _, f := range r.Figures {
		all = append(all, f.ID, f.Subject, f.State, f.What, f.Basis, digest.Amount(rule.Amount{Value: f.Value, Unit: f.Unit}))
	}
	for _, f := range r.Findings {
		all = append(all, f.Rule, f.Subject, string(f.Verdict), string(f.Concern), f.Because, f.Remedy, f.Under,
			digest.Needed(f), digest.Provided(f), digest.Margin(f), digest.Place(r, f))
		all = slices.Concat(all, f.Missing, f.Assumptions)
		for _, s := range f.Sources {
			all = append(all, digest.Source(s))
		}
	}
	for _, l := range r.Summary {
		all = append(all, l.Label, l.Text)
	}
	for _, c := range r.Cautions {
		all = append(all, c.Subject, c.Text)
	}
	for _, p := range r.PassedOver {
		all = append(all, p.Rule, p.Because)
	}
	for _, c := range r.Curves {
		all = append(all, c.Title, c.Subject, c.Note, c.Basis, digest.CurveWords(c))
	}
	for _, t := range r.Tables {
		all = append(all, t.Title, t.Subject, t.Note, t.Basis)
		for _, row := range t.Rows {
			for i, cell := range row {
				all = append(all, t.Columns[i].Head, digest.Cell(t.Columns[i].Unit, cell.Value, cell.Text))
			}
		}
	}
	for _, in := range r.Inputs {
		all = append(all, in.Role, in.Name, in.SHA256)
	}
	return append(all, r.Assumptions...)
}

func TestForeignTextIsText(t *testing.T) {
	r := sample.Failing()
	const evil = `</title></style><script>alert("x")</script><img src=x onerror=alert(1)>&`
	r.Heading.Title, r.Summary[0].Text, r.Findings[0].Subject, r.Assumptions = evil, evil, evil, []string{evil}
	d := small()
	d.Marks[0].Subject, d.Ladder.Stages[0].Name = evil, evil
	page := render(t, r, html.Options{Diagram: d, Note: evil})
	if strings.Contains(page, "<img") || strings.Count(page, "<script>") != 2 {
		t.Error("foreign text became markup")
	}
	if got := plain(page); strings.Count(got, `<script>alert("x")</script>`) < 4 {
		t.Error("foreign text is lost")
	}
}

func TestSchematicHasWordsAndLinks(t *testing.T) {
	page := render(t, sample.Failing(), html.Options{Diagram: small()})
	for _, want := range []string{`role="img" aria-labelledby="drawing-title drawing-description"`, "A multiplier of 1 stage", "Marked: cable unassessed.", "multiplier.diode.2", "rating.other"} {
		if !strings.Contains(page, want) {
			t.Errorf("%q is missing", want)
		}
	}
	link := regexp.MustCompile(`<a href="#(finding-\d+)">rating\.cable</a>`).FindStringSubmatch(page[strings.Index(page, `class="marks"`):])
	if link == nil || !strings.Contains(page, `id="`+link[1]+`" data-verdict="unassessed"`) {
		t.Errorf("the mark leads to %v", link)
	}
}

// What a finding speaks of can be found in the schematic by the same name.
func TestFindingsNameTheirPartsInTheSchematic(t *testing.T) {
	page := render(t, sample.Failing(), html.Options{Diagram: sample.Diagram(3)})
	for _, want := range []string{`data-of="cable" aria-labelledby=`, `<g data-of="cable">`, `<a class="own" href="#finding-`, `<li data-of="` + sample.LongName + `">`} {
		if !strings.Contains(page, want) {
			t.Errorf("%q is missing", want)
		}
	}
}

// Curves and tables stand in their chapters, each drawing with words of its own.
func TestChapters(t *testing.T) {
	r := sample.Failing()
	r.Curves, r.Tables = sample.Curves(), sample.Tables()
	page := render(t, r, html.Options{})
	for _, want := range []string{`<a href="#chapter-multiplier">Multiplier and supply</a>`, `<section id="chapter-multiplier"`, `<figure class="curve" id="curve-multiplier-1">`,
		`aria-labelledby="curve-spacings-2-drawing-title curve-spacings-2-drawing-description"`, `<th scope="col" class="number">mean power</th>`, `<td class="number">1.234 mW</td>`, `<td>in the part</td>`} {
		if !strings.Contains(page, want) {
			t.Errorf("%q is missing", want)
		}
	}
}

// A table for whoever looks closely, and a long one, is folded and says what it holds; its
// place on paper says the same, and opened it is printed.
func TestLongTablesAreFolded(t *testing.T) {
	r := sample.Sound()
	r.Tables = sample.Tables()[:1]
	if got := render(t, r, html.Options{}); strings.Contains(got, `<details class="rows">`) {
		t.Error("a short table is folded")
	}
	r.Tables[0].Detail = true
	got := render(t, r, html.Options{})
	if want := "<details class=\"rows\">\n<summary>24 rows, to be opened to be read or printed</summary>\n<div class=\"wide\""; !strings.Contains(got, want) {
		t.Errorf("%q is missing", want)
	}
	r.Tables[0].Detail = false
	for len(r.Tables[0].Rows) <= 60 {
		r.Tables[0].Rows = append(r.Tables[0].Rows, r.Tables[0].Rows...)
	}
	if got := render(t, r, html.Options{}); !strings.Contains(got, "<summary>96 rows, ") || strings.Count(got, "multiplier.diode.7<") != 4 {
		t.Error("a long table is not folded, or not whole")
	}
}

func TestServedPageWatchesForChanges(t *testing.T) {
	file, served := render(t, sample.Failing(), html.Options{}), render(t, sample.Failing(), html.Options{Version: "abc"})
	if strings.Contains(file, "EventSource") || !strings.Contains(served, "EventSource") || !strings.Contains(served, `<meta name="version" content="abc">`) {
		t.Error("only a page that is served asks for changes")
	}
}

func TestFaultsStandAtTheirLines(t *testing.T) {
	page := pages(t)["faults"]
	for _, want := range []string{"faults in chain &amp; co.toml", `<li id="line-2" class="bad"><pre>[drive]</pre><p class="fault">`, `<li id="line-1"><pre>format = 1</pre></li>`, `<a href="#line-2">line 2, column 1</a>`, "# &lt;b&gt;"} {
		if !strings.Contains(page, want) {
			t.Errorf("%q is missing", want)
		}
	}
	if strings.Contains(page, "\x1b") {
		t.Error("control characters in the page")
	}
}
