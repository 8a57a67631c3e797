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
	verdict, concern, id := escaped(string(f.Verdict)), escaped(string(f.Concern)), escaped(f.ID)
	rule, subject := escaped(f.Rule), escaped(f.Subject)
	put(b, `<article class="finding" id="`, id, `" data-verdict="`, verdict, `" data-concern="`, concern, `" data-of="`, subject,
		`" aria-labelledby="`, id, "-title\">\n")
	put(b, `<h3 id="`, id, `-title"><strong class="verdict `, verdict, `">`, verdict, `</strong> <a class="own" href="#`, id, `">`, rule)
	if subject != "" {
		put(b, ": ", subject)
	}
	put(b, "</a></h3>\n<p class=\"because\">", escaped(f.Because), "</p>\n<dl>\n")
	for _, fact := range f.Facts {
		put(b, "<div><dt>", escaped(fact.Label), "</dt><dd>", escaped(fact.Text), "</dd></div>\n")
	}
	put(b, "</dl>\n<ul class=\"sources\" aria-label=\"Sources\">\n")
	for _, source := range f.Sources {
		put(b, "<li>", escaped(source), "</li>\n")
	}
	put(b, "</ul>\n</article>\n")
}

// escaped is a text as templates write it, in elements and between quotation marks.
func escaped(text string) string {
	return strings.ReplaceAll(template.HTMLEscapeString(text), "+", "&#43;")
}

func put(b *strings.Builder, pieces ...string) {
	for _, p := range pieces {
		b.WriteString(p)
	}
}
