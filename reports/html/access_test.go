package html_test

import (
	"encoding/xml"
	"fmt"
	"io"
	"math"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// element is a start tag of a page with its attributes.
type element struct {
	name       string
	attributes map[string]string
	path       string // names of what it stands in
}

// elements parses a page; every tag that needs one must have its end.
func elements(t testing.TB, name, page string) []element {
	t.Helper()
	d := xml.NewDecoder(strings.NewReader(strings.Replace(scripts.ReplaceAllString(styles.ReplaceAllString(page, ""), ""), "<!DOCTYPE html>", "", 1)))
	d.Strict, d.AutoClose, d.Entity = false, []string{"meta", "input"}, xml.HTMLEntity
	var all []element
	var open []string
	for {
		token, err := d.Token()
		if err == io.EOF {
			break
		}
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		switch token := token.(type) {
		case xml.StartElement:
			e := element{token.Name.Local, map[string]string{}, strings.Join(open, " ")}
			for _, a := range token.Attr {
				e.attributes[a.Name.Local] = a.Value
			}
			all = append(all, e)
			open = append(open, token.Name.Local)
		case xml.EndElement:
			if len(open) == 0 || open[len(open)-1] != token.Name.Local {
				t.Fatalf("%s: </%s> closes %v", name, token.Name.Local, open)
			}
			open = open[:len(open)-1]
		}
	}
	return all
}

// An id stands once, and what is pointed at is there.
func TestReferencesLead(t *testing.T) {
	for name, page := range pages(t) {
		all := elements(t, name, page)
		ids := map[string]bool{}
		for _, e := range all {
			if id := e.attributes["id"]; id != "" {
				if ids[id] {
					t.Errorf("%s: id %s twice", name, id)
				}
				ids[id] = true
			}
		}
		for _, e := range all {
			for _, ref := range append(strings.Fields(e.attributes["aria-labelledby"]), strings.TrimPrefix(e.attributes["href"], "#")) {
				if ref != "" && !ids[ref] {
					t.Errorf("%s: <%s> points at %q, which is not there", name, e.name, ref)
				}
			}
		}
	}
}

// A page has one main part and one first heading; no heading skips a level.
func TestLandmarksAndHeadings(t *testing.T) {
	for name, page := range pages(t) {
		count := map[string]int{}
		level := 0
		for _, e := range elements(t, name, page) {
			count[e.name]++
			if m := regexp.MustCompile(`^h([1-6])$`).FindStringSubmatch(e.name); m != nil {
				n, _ := strconv.Atoi(m[1])
				if n > level+1 {
					t.Errorf("%s: a heading of level %d after %d", name, n, level)
				}
				level = n
			}
			if e.name == "html" && e.attributes["lang"] != "en" {
				t.Errorf("%s: no language", name)
			}
		}
		for tag, want := range map[string]int{"main": 1, "h1": 1, "title": 1 + count["svg"], "header": 1} {
			if count[tag] != want {
				t.Errorf("%s: %d times <%s>, want %d", name, count[tag], tag, want)
			}
		}
	}
}

// Controls have labels, tables have headings with a scope, and what scrolls can be
// reached with the keyboard and says what it is.
func TestControlsTablesAndRegions(t *testing.T) {
	for name, page := range pages(t) {
		for _, e := range elements(t, name, page) {
			labelled := e.attributes["aria-label"] != "" || e.attributes["aria-labelledby"] != ""
			switch {
			case e.name == "input" && !strings.Contains(e.path, "label"):
				t.Errorf("%s: a control without a label", name)
			case e.name == "th" && e.attributes["scope"] == "":
				t.Errorf("%s: a heading of a table without a scope", name)
			case e.attributes["class"] == "wide" && (e.attributes["tabindex"] != "0" || e.attributes["role"] != "region" || !labelled):
				t.Errorf("%s: a part that scrolls cannot be reached or has no name", name)
			case slices.Contains([]string{"nav", "section", "form", "article"}, e.name) && !labelled:
				t.Errorf("%s: <%s> has no name", name, e.name)
			}
		}
	}
}

var variable = regexp.MustCompile(`--([a-z]+):(#[0-9a-f]{6})`)

// palettes are the colours of the light page, of the dark one and of paper.
func palettes(t testing.TB) []map[string]string {
	page := pages(t)["failing"]
	var all []map[string]string
	for _, block := range regexp.MustCompile(`:root\{[^}]*\}`).FindAllString(styles.FindString(page), -1) {
		palette := map[string]string{}
		for _, m := range variable.FindAllStringSubmatch(block, -1) {
			palette[m[1]] = m[2]
		}
		all = append(all, palette)
	}
	return all
}

// luminance is the relative luminance of WCAG 2.1.
func luminance(colour string) float64 {
	var rgb [3]float64
	for i := range rgb {
		n, _ := strconv.ParseUint(colour[1+2*i:3+2*i], 16, 8)
		c := float64(n) / 255
		if rgb[i] = c / 12.92; c > 0.04045 {
			rgb[i] = math.Pow((c+0.055)/1.055, 2.4)
		}
	}
	return 0.2126*rgb[0] + 0.7152*rgb[1] + 0.0722*rgb[2]
}

// contrast is the contrast ratio of WCAG 2.1.
func contrast(a, b string) float64 {
	bright, dark := max(luminance(a), luminance(b)), min(luminance(a), luminance(b))
	return (bright + 0.05) / (dark + 0.05)
}

func Example_contrast() {
	// Black on white is 21 to 1, the grey #767676 just 4.54 (WCAG 2.1, understanding 1.4.3).
	fmt.Printf("%.0f %.2f\n", contrast("#000000", "#ffffff"), contrast("#767676", "#ffffff"))
	// Output: 21 4.54
}

// Text has a contrast of 4.5 to 1 at least, lines that mean something 3 to 1 (WCAG 2.1
// AA, 1.4.3 and 1.4.11), in the light, in the dark and on paper.
func TestContrast(t *testing.T) {
	all := palettes(t)
	if len(all) != 3 {
		t.Fatalf("%d palettes", len(all))
	}
	for i, p := range all {
		if len(p) != 10 {
			t.Fatalf("palette %d: %v", i, p)
		}
		for _, text := range []string{"ink", "soft", "link", "fails", "unassessed", "marginal", "meets"} {
			for _, ground := range []string{"paper", "field"} {
				if c := contrast(p[text], p[ground]); c < 4.5 {
					t.Errorf("palette %d: %s on %s: %.2f", i, text, ground, c)
				}
			}
		}
		for _, ground := range []string{"paper", "field"} {
			if c := contrast(p["rule"], p[ground]); c < 3 {
				t.Errorf("palette %d: lines on %s: %.2f", i, ground, c)
			}
		}
	}
}

// Colour stands only beside words: each verdict is written out.
func TestVerdictsAreWords(t *testing.T) {
	page := pages(t)["failing"]
	for _, m := range regexp.MustCompile(`class="verdict ([a-z]*)">([^<]*)<`).FindAllStringSubmatch(page, -1) {
		if m[1] != m[2] || m[2] == "" {
			t.Errorf("%q is shown as %q", m[1], m[2])
		}
	}
}
