package seal_test

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/reports/seal"
	"kilovet/rules"
	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

var sheet = []byte("%PDF-1.4\n1 0 obj\nendobj\n%%EOF\n")

func stamp() seal.Stamp {
	return seal.Stamp{
		Code: signoff.Subject{Program: "kilovet"}.Code(), Version: "0.1.0", Date: "2025-03-04", Paper: "A4",
		Required: []rule.Concern{rule.Life, rule.Equipment},
		Inputs:   []rules.Input{{Role: "description", Name: "Säule \"1\"\n.toml", SHA256: strings.Repeat("ab", 32)}},
	}
}

func TestAStampIsReadBack(t *testing.T) {
	for _, pdf := range [][]byte{sheet, bytes.TrimSuffix(sheet, []byte("\n"))} {
		sealed := seal.Seal(pdf, stamp())
		got, err := seal.Open(sealed)
		if diff := cmp.Diff(stamp(), got); err != nil || diff != "" {
			t.Error(err, diff)
		}
		if !bytes.HasPrefix(sealed, pdf) || bytes.ContainsFunc(sealed, func(r rune) bool { return r > 126 }) {
			t.Error("the stamp is no comment behind the sheet")
		}
	}
}

func TestEveryCutAndEveryChangedByteIsNoticed(t *testing.T) {
	sealed := seal.Seal(sheet, stamp())
	for n := range sealed {
		if _, err := seal.Open(sealed[:n]); err == nil {
			t.Fatalf("cut after %d of %d bytes, and opened", n, len(sealed))
		}
		for _, flip := range []byte{1, 0x20, 0x80} {
			changed := bytes.Clone(sealed)
			changed[n] ^= flip
			if _, err := seal.Open(changed); err == nil {
				t.Fatalf("byte %d changed, and opened", n)
			}
		}
	}
	if _, err := seal.Open(append(bytes.Clone(sealed), '\n')); !errors.Is(err, seal.ErrUnstamped) {
		t.Errorf("a line more: %v", err)
	}
	if _, err := seal.Open(sheet); !errors.Is(err, seal.ErrUnstamped) {
		t.Errorf("a PDF without stamp: %v", err)
	}
	if _, err := seal.Open([]byte("format = 1\n")); !errors.Is(err, seal.ErrNoPDF) {
		t.Errorf("no PDF: %v", err)
	}
}

// sealed puts any lines behind the sheet with a true digest, as one who changes it on
// purpose would.
func sealed(lines string) []byte {
	text := string(sheet) + lines
	sum := sha256.Sum256([]byte(text))
	return []byte(text + "%sha256 " + hex.EncodeToString(sum[:]) + "\n")
}

func TestAStampIsAsItIsWrittenOrNone(t *testing.T) {
	good := strings.TrimPrefix(string(seal.Seal(sheet, stamp())), string(sheet))
	good = good[:strings.LastIndex(good, "%sha256")]
	if _, err := seal.Open(sealed(good)); err != nil {
		t.Fatal(err)
	}
	for name, text := range map[string]string{
		"nothing":        "",
		"no lines":       "%kilovet-sheet 1\n",
		"another number": strings.Replace(good, "sheet 1", "sheet 2", 1),
		"a line more":    good + "%more \"x\"\n",
		"a line twice":   good + "%date \"2025-03-05\"\n",
		"no date":        strings.Replace(good, "2025-03-04", "soon", 1),
		"a wrong code":   strings.Replace(good, "%code \"", "%code \"7", 1),
		"a concern":      strings.Replace(good, "equipment", "money", 1),
		"no input":       good[:strings.Index(good, "%input")],
		"bare words":     strings.Replace(good, `"0.1.0"`, "0.1.0", 1),
	} {
		if s, err := seal.Open(sealed(text)); !errors.Is(err, seal.ErrStamp) {
			t.Errorf("%s: %+v, %v", name, s, err)
		}
	}
}

func TestAnyTextsAreReadBack(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s := stamp()
		s.Version, s.Inputs[0].Name, s.Until = rapid.String().Draw(t, "version"), rapid.String().Draw(t, "name"), rapid.String().Draw(t, "until")
		got, err := seal.Open(seal.Seal(sheet, s))
		if diff := cmp.Diff(s, got); err != nil || diff != "" {
			t.Fatal(err, diff)
		}
	})
}

// FuzzOpen opens any bytes: an error with words, or a stamp that seals the same.
//
//	go test -fuzz FuzzOpen ./reports/seal
func FuzzOpen(f *testing.F) {
	f.Add(seal.Seal(sheet, stamp()))
	f.Add(sheet)
	f.Add(sealed("%kilovet-sheet 1\n%input \"\"\n"))
	f.Fuzz(func(t *testing.T, file []byte) {
		if len(file) > 5 && bytes.HasPrefix(file, []byte("%PDF-")) {
			file = sealed(string(file[5:])) // past the digest, into the stamp
		}
		s, err := seal.Open(file)
		if err != nil {
			if err.Error() == "" {
				t.Fatal("an error without words")
			}
			return
		}
		if again, err := seal.Open(seal.Seal(sheet, s)); err != nil || !cmp.Equal(again, s) {
			t.Fatalf("%+v sealed is %+v: %v", s, again, err)
		}
	})
}

// A stamp is seen in a sheet that was changed too, and in nothing else.
func TestStamped(t *testing.T) {
	plain := []byte("%PDF-1.4\na sheet\n")
	sheet := seal.Seal(plain, seal.Stamp{Date: "2025-03-04"})
	if seal.Stamped(plain) || !seal.Stamped(sheet) {
		t.Errorf("plain %v, sealed %v", seal.Stamped(plain), seal.Stamped(sheet))
	}
	sheet[10]++
	if _, err := seal.Open(sheet); err == nil || !seal.Stamped(sheet) {
		t.Errorf("a changed sheet: %v, stamped %v", err, seal.Stamped(sheet))
	}
}
