package signoff

import (
	"crypto/sha256"
	"errors"
	"fmt"
	"strings"

	"kilovet/rules/rule"
)

// A code is short enough to be read out: eighty bits of a SHA-256 over what a sheet is
// for, and ten to check what was typed. It shows damage and mix-up; it holds no secret,
// so that whoever can run the program can make it.
const (
	dataSymbols  = 16
	checkSymbols = 2
	symbols      = dataSymbols + checkSymbols
	group        = 6 // symbols written together
)

// alphabet is that of Douglas Crockford's Base 32: digits and capital letters without I,
// L, O and U; I and L are read as 1, O as 0 (memory).
const alphabet = "0123456789ABCDEFGHJKMNPQRSTVWXYZ"

// checkPrime is the largest prime that two symbols hold. The check is the number modulo
// a prime, as Crockford's is modulo 37, in two symbols of the same alphabet in place of
// one that needs signs a shell would take for itself. As the prime divides neither the
// difference of two symbols nor 31 nor 32² − 1, one symbol wrong, and two neighbours or
// next but one exchanged, are always noticed.
const checkPrime = 1021

// Subject is what a code belongs to: program, files read, what was required, verdicts.
type Subject struct {
	Program  string
	Inputs   []Input
	Required []rule.Concern
	Findings []rule.Finding
}

// Input is a file that was read.
type Input struct{ Role, SHA256 string }

// Code is the short code of a subject: the same for the same bytes read, program,
// concerns and verdicts; names of files and dates do not enter.
func (s Subject) Code() string {
	sum := sha256.Sum256([]byte(s.canonical()))
	return written(sum[:dataSymbols*5/8])
}

// canonical lists the subject one line an item; texts are quoted, so that no text can
// stand for two lines.
func (s Subject) canonical() string {
	var b strings.Builder
	fmt.Fprintf(&b, "sign-off 1\nprogram %q\n", s.Program)
	for _, in := range s.Inputs {
		fmt.Fprintf(&b, "input %q %q\n", in.Role, in.SHA256)
	}
	for _, c := range rule.Concerns {
		for _, r := range s.Required {
			if r == c {
				fmt.Fprintf(&b, "required %q\n", c)
				break
			}
		}
	}
	for _, f := range s.Findings {
		fmt.Fprintf(&b, "finding %q %q %q %q\n", f.Rule, f.Subject, f.Concern, f.Verdict)
	}
	return b.String()
}

// written writes ten bytes as groups of symbols with their check.
func written(data []byte) string {
	var values [symbols]int
	for i := range dataSymbols {
		bit := i * 5
		two := int(data[bit/8]) << 8
		if bit/8+1 < len(data) {
			two |= int(data[bit/8+1])
		}
		values[i] = two >> (11 - bit%8) & 31
	}
	check := checkOf(values[:dataSymbols])
	values[dataSymbols], values[dataSymbols+1] = check/32, check%32
	var b strings.Builder
	for i, v := range values {
		if i > 0 && i%group == 0 {
			b.WriteByte('-')
		}
		b.WriteByte(alphabet[v])
	}
	return b.String()
}

// checkOf is the number that the symbols make, modulo the prime.
func checkOf(values []int) int {
	n := 0
	for _, v := range values {
		n = (n*32 + v) % checkPrime
	}
	return n
}

// ReadCode reads a code as people type it, in small letters too, with spaces or without
// hyphens, and gives it as it is written. What was mistyped is an error.
func ReadCode(text string) (string, error) {
	var values []int
	for _, r := range strings.ToUpper(text) {
		switch r {
		case '-', ' ':
			continue
		case 'I', 'L':
			r = '1'
		case 'O':
			r = '0'
		}
		v := strings.IndexRune(alphabet, r)
		if v < 0 {
			return "", fmt.Errorf("%q is no sign of a code; they are digits and letters but U", r)
		}
		if values = append(values, v); len(values) > symbols {
			break
		}
	}
	switch {
	case len(values) < symbols:
		return "", fmt.Errorf("a code has %d signs, and this has %d", symbols, len(values))
	case len(values) > symbols:
		return "", fmt.Errorf("a code has %d signs, and this has more", symbols)
	}
	if checkOf(values[:dataSymbols]) != values[dataSymbols]*32+values[dataSymbols+1] {
		return "", errors.New("the code was mistyped: its last two signs do not belong to the others")
	}
	var b strings.Builder
	for i, v := range values {
		if i > 0 && i%group == 0 {
			b.WriteByte('-')
		}
		b.WriteByte(alphabet[v])
	}
	return b.String(), nil
}
