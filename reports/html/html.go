// Package html writes a review as one page that stands by itself: it loads nothing,
// and a content security policy that knows its style and scripts by their digests
// allows nothing else. It is read with eyes, by ear and on paper alike.
package html

import (
	"bytes"
	"crypto/sha256"
	_ "embed"
	"encoding/base64"
	"fmt"
	"html/template"
	"strings"
	"sync"

	"kilovet/hv/document"
	"kilovet/rules"
	"kilovet/rules/diagram"
)

// Options say what a page holds beside the review.
type Options struct {
	Diagram *diagram.Diagram // the schematic, where it is not the review's own
	Note    string           // stands before the title
	// Version marks a page that is served: it reloads itself when the server's
	// "changes" names another. Empty for a page in a file.
	Version string
}

// Render writes a review as a page.
func Render(r *rules.Review) ([]byte, error) { return RenderWith(r, Options{}) }

// RenderWith writes a review as a page with more beside it.
func RenderWith(r *rules.Review, o Options) ([]byte, error) {
	p, err := reviewPage(r, o)
	if err != nil {
		return nil, err
	}
	return render(reviewForm, p)
}

// Faults writes a description with its faults, each at its line.
func Faults(name string, description []byte, faults document.Faults, o Options) ([]byte, error) {
	return render(faultsForm, faultsPage(name, description, faults, o))
}

// The pieces of a page.
var (
	//go:embed page.html
	frame string
	//go:embed review.html
	reviewBody string
	//go:embed faults.html
	faultsBody string
	//go:embed page.css
	style string
	//go:embed filter.js
	filter string
	//go:embed light.js
	light string
	//go:embed live.js
	live string
)

// shell is what every page has.
type shell struct {
	Title, Kind, Heading, Note string
	Version                    string
	Policy                     string
	Style                      template.CSS
	Scripts                    []template.JS
}

// newShell makes the frame of a page with the scripts it needs; one that is served
// may also ask its server for changes.
func newShell(title, kind string, o Options, scripts ...string) shell {
	s := shell{Title: title + " · kilovet", Kind: kind, Heading: title, Note: clean(o.Note), Version: clean(o.Version), Style: template.CSS(style)}
	connect := "'none'"
	if o.Version != "" {
		scripts = append(scripts, live)
		connect = "'self'"
	}
	allowed := "'none'"
	if len(scripts) > 0 {
		allowed = digests(scripts)
	}
	for _, text := range scripts {
		s.Scripts = append(s.Scripts, template.JS(text))
	}
	s.Policy = fmt.Sprintf("default-src 'none'; style-src %s; script-src %s; connect-src %s; base-uri 'none'; form-action 'none'",
		digests([]string{style}), allowed, connect)
	return s
}

// digests names texts by their SHA-256, as a content security policy does.
func digests(texts []string) string {
	all := make([]string, len(texts))
	for i, text := range texts {
		sum := sha256.Sum256([]byte(text))
		all[i] = "'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "'"
	}
	return strings.Join(all, " ")
}

// The forms of the pages, read once.
var (
	reviewForm = sync.OnceValues(func() (*template.Template, error) { return form(reviewBody) })
	faultsForm = sync.OnceValues(func() (*template.Template, error) { return form(faultsBody) })
)

// Prepare reads the form of a review, which else the first page does.
func Prepare() { _, _ = reviewForm() }

func form(body string) (*template.Template, error) {
	t, err := template.New("page").Parse(frame)
	if err == nil {
		t, err = t.Parse(body)
	}
	return t, err
}

func render(form func() (*template.Template, error), page any) ([]byte, error) {
	t, err := form()
	if err != nil {
		return nil, fmt.Errorf("html: %w", err)
	}
	var out bytes.Buffer
	if err := t.ExecuteTemplate(&out, "page", page); err != nil {
		return nil, fmt.Errorf("html: %w", err)
	}
	return out.Bytes(), nil
}
