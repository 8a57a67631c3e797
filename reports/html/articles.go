package html

import (
	"html/template"
	"strings"
)

// articles is the findings, each with an anchor of its own: much of a page, for which a
// template takes several times as long.
func articles(findings []finding) template.HTML {
	var b strings.Builder
	for _, f := range findings {
		f.article(&b)
	}
	return template.HTML(b.String())
}

func (f finding) article(b *strings.Builder) {
	text := template.HTMLEscapeString
	verdict, concern, id := text(string(f.Verdict)), text(string(f.Concern)), text(f.ID)
	rule, subject := text(f.Rule), text(f.Subject)
	put(b, `<article class="finding" id="`, id, `" data-verdict="`, verdict, `" data-concern="`, concern, `" data-of="`, subject,
		`" aria-labelledby="`, id, "-title\">\n")
	put(b, `<h3 id="`, id, `-title"><strong class="verdict `, verdict, `">`, verdict, `</strong> <a class="own" href="#`, id, `">`, rule)
	if subject != "" {
		put(b, ": ", subject)
	}
	element(b, "</a></h3>\n<p class=\"because\">", f.Because, "</p>\n<dl>\n")
	for _, fact := range f.Facts {
		element(b, "<div><dt>", fact.Label, "</dt>")
		element(b, "<dd>", fact.Text, "</dd></div>\n")
	}
	put(b, "</dl>\n<ul class=\"sources\" aria-label=\"Sources\">\n")
	for _, source := range f.Sources {
		element(b, "<li>", source, "</li>\n")
	}
	put(b, "</ul>\n</article>\n")
}

func put(b *strings.Builder, pieces ...string) {
	for _, p := range pieces {
		b.WriteString(p)
	}
}
