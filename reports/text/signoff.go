package text

import (
	"bytes"

	"kilovet/rules"
	"kilovet/rules/signoff"
)

// SignOff says whether a sheet is issued: its code and what to do with it, or why none
// is. File and description are named as they were given.
func SignOff(r *rules.Review, s rules.SignOff, file, description string, o Options) []byte {
	w := newWriter(o)
	heading(w, r.Heading)
	w.blank()
	if s.Issued() {
		issued(w, s, file, description)
	} else {
		refused(w, s)
	}
	if len(s.Idle) > 0 {
		w.head("Dispositions without effect")
		for _, i := range s.Idle {
			w.hang("-", 2, i.Rule+" "+i.Subject+": "+i.Because)
		}
	}
	return bytes.Clone(w.out.Bytes())
}

func issued(w *writer, s rules.SignOff, file, description string) {
	w.hang("issued", gutter, file)
	w.hang("code", gutter, s.Code)
	w.hang("open points", gutter, decimal(len(s.Points))+", listed on the sheet with what is to become of them")
	w.blank()
	w.wrap("Whether a sheet or a code belongs to a description: kilovet verify " + s.Code + " " + description + ". It shows damage and mix-up, not forgery: there is no key.")
}

func refused(w *writer, s rules.SignOff) {
	var standing []signoff.Point
	for _, p := range s.Points {
		if p.Against != "" {
			standing = append(standing, p)
		}
	}
	n := len(standing) + len(s.Against)
	w.hang("NOT ISSUED", gutter, plural(n, "reason")+"; nothing was written")
	w.blank()
	for _, text := range s.Against {
		w.hang("", gutter, text)
	}
	for _, p := range standing {
		f := p.Finding
		title := f.Rule
		if f.Subject != "" {
			title += ": " + f.Subject
		}
		w.verdict(string(f.Verdict), f.Verdict, string(f.Concern)+": "+title)
		w.hang("", gutter, f.Because)
		w.hang("", gutter, p.Against)
	}
	w.blank()
	w.wrap("An open point is mended, or described further, or given an [[accepted]] in the description: rule, subject, disposition (accepted, restricted, measured), name, reason, and record and measurement where it was measured: value with its unit, instrument and day.")
}

func plural(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return decimal(n) + " " + thing + "s"
}

// Belongs is what a check of a sheet or code found.
type Belongs struct {
	What     string   // the sheet or code, as given
	To       string   // the description, as given
	Against  []string // why it does not belong to it; empty where it does
	Code     string
	Required string
	Date     string // of the sheet; empty for a code
	Until    string
}

// Verify says whether a sheet or code belongs to a description.
func Verify(b Belongs, o Options) []byte {
	w := newWriter(o)
	if len(b.Against) > 0 {
		w.hang("DOES NOT BELONG", gutter+4, b.What+" to "+b.To)
		w.blank()
		for _, text := range b.Against {
			w.hang("-", 2, text)
		}
		return bytes.Clone(w.out.Bytes())
	}
	w.hang("belongs", gutter, b.What+" to "+b.To+": the same files, program and verdicts")
	w.hang("code", gutter, b.Code)
	w.hang("required", gutter, b.Required)
	if b.Date != "" {
		w.hang("issued", gutter, b.Date)
	}
	if b.Until != "" {
		w.hang("valid until", gutter, b.Until)
	}
	w.blank()
	w.wrap("This shows damage and mix-up, not forgery: there is no key. Whether it is still valid, and who signed it, the sheet itself says.")
	return bytes.Clone(w.out.Bytes())
}
