// Package seal puts a stamp behind a finished sheet: what is needed to make the sheet
// anew, and a SHA-256 over all that stands before. The stamp is comment lines after the
// end of the PDF, which readers of PDF pass over. It shows damage: a file cut short, or
// with one byte changed, is never opened. It holds no secret, so whoever changes a sheet
// on purpose can seal it anew; only making the sheet again from its inputs tells that.
package seal

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"
	"time"

	"kilovet/rules"
	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

// Stamp is what a sheet was made from.
type Stamp struct {
	Code     string
	Version  string // of the program
	Date     string // of issue, ISO 8601
	Until    string // last day of validity; may be empty
	Paper    string
	Required []rule.Concern
	Inputs   []rules.Input
}

// The lines of a stamp.
const (
	first  = "%kilovet-sheet 1\n"
	digest = "%sha256 "
	hexed  = sha256.Size * 2
	longer = 64 << 10 // no stamp is longer
)

// What is wrong with a file that cannot be opened.
var (
	ErrNoPDF     = errors.New("it is no PDF")
	ErrUnstamped = errors.New("it is cut short, or no sheet that kilovet signoff wrote: the stamp at its end is missing")
	ErrChanged   = errors.New("it was changed or damaged after it was written: its bytes do not have the SHA-256 in its stamp")
	ErrStamp     = errors.New("its stamp cannot be read: it was written by another version of the program, or changed on purpose")
)

// Seal puts the stamp behind a PDF.
func Seal(pdf []byte, s Stamp) []byte {
	var b bytes.Buffer
	b.Write(pdf)
	if !bytes.HasSuffix(pdf, []byte("\n")) {
		b.WriteByte('\n')
	}
	b.WriteString(s.text())
	sum := sha256.Sum256(b.Bytes())
	b.WriteString(digest + hex.EncodeToString(sum[:]) + "\n")
	return b.Bytes()
}

// text is the stamp without its digest; texts are quoted in ASCII.
func (s Stamp) text() string {
	var b strings.Builder
	b.WriteString(first)
	for _, field := range s.fields() {
		fmt.Fprintf(&b, "%%%s %s\n", field.key, strconv.QuoteToASCII(*field.text))
	}
	for _, c := range s.Required {
		fmt.Fprintf(&b, "%%required %s\n", strconv.QuoteToASCII(string(c)))
	}
	for _, in := range s.Inputs {
		fmt.Fprintf(&b, "%%input %s %s %s\n", strconv.QuoteToASCII(in.Role), strconv.QuoteToASCII(in.Name), strconv.QuoteToASCII(in.SHA256))
	}
	return b.String()
}

type field struct {
	key  string
	text *string
}

func (s *Stamp) fields() []field {
	return []field{{"code", &s.Code}, {"version", &s.Version}, {"date", &s.Date}, {"until", &s.Until}, {"paper", &s.Paper}}
}

// Stamped reports whether a file bears a stamp, changed since or not.
func Stamped(file []byte) bool { return bytes.Contains(file, []byte("\n"+first)) }

// Open gives the stamp of a sheet that is as it was written.
func Open(file []byte) (Stamp, error) {
	var none Stamp
	if !bytes.HasPrefix(file, []byte("%PDF-")) {
		return none, ErrNoPDF
	}
	tail := len(digest) + hexed + 1
	at := len(file) - tail
	if at < 0 || !bytes.HasPrefix(file[at:], []byte(digest)) || file[len(file)-1] != '\n' {
		return none, ErrUnstamped
	}
	sum := sha256.Sum256(file[:at])
	if string(file[at+len(digest):len(file)-1]) != hex.EncodeToString(sum[:]) {
		return none, ErrChanged
	}
	begins := bytes.LastIndex(file[max(0, at-longer):at], []byte("\n"+first))
	if begins < 0 {
		return none, ErrStamp
	}
	s, ok := parse(string(file[max(0, at-longer)+begins+1+len(first) : at]))
	if !ok {
		return none, ErrStamp
	}
	return s, nil
}

// parse reads the lines of a stamp after the first; what is not exactly as Seal writes
// it is no stamp.
func parse(text string) (s Stamp, ok bool) {
	for line := range strings.Lines(text) {
		key, rest, _ := strings.Cut(strings.TrimSuffix(line, "\n"), " ")
		words := unquoted(rest)
		switch {
		case key == "%required" && len(words) == 1:
			s.Required = append(s.Required, rule.Concern(words[0]))
		case key == "%input" && len(words) == 3:
			s.Inputs = append(s.Inputs, rules.Input{Role: words[0], Name: words[1], SHA256: words[2]})
		case len(words) == 1:
			for _, f := range s.fields() {
				if "%"+f.key == key {
					*f.text = words[0]
				}
			}
		}
	}
	return s, s.text() == first+text && s.sound()
}

func unquoted(rest string) []string {
	var words []string
	for rest != "" {
		quoted, err := strconv.QuotedPrefix(rest)
		if err != nil {
			return nil
		}
		word, err := strconv.Unquote(quoted)
		if err != nil {
			return nil
		}
		words = append(words, word)
		rest = strings.TrimPrefix(rest[len(quoted):], " ")
	}
	return words
}

// sound reports whether the fields hold what they must.
func (s *Stamp) sound() bool {
	code, err := signoff.ReadCode(s.Code)
	_, dated := time.Parse(time.DateOnly, s.Date)
	for _, c := range s.Required {
		if !slices.Contains(rule.Concerns, c) {
			return false
		}
	}
	return err == nil && code == s.Code && dated == nil && len(s.Inputs) > 0
}
