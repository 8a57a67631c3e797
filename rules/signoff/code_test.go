package signoff_test

import (
	"fmt"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

const alphabet = "0123456789ABCDEFGHJKMNPQRSTVWXYZ"

func subject() signoff.Subject {
	return signoff.Subject{
		Program: "kilovet 0.1.0", Required: []rule.Concern{rule.Life, rule.Equipment},
		Inputs:   []signoff.Input{{"description", strings.Repeat("ab", 32)}, {"local limits", strings.Repeat("cd", 32)}},
		Findings: []rule.Finding{{Rule: "spacing.clearance", Subject: "lid", Concern: rule.Life, Verdict: rule.Meets}, {Rule: "drive.headroom", Subject: "drive", Concern: rule.Equipment, Verdict: rule.Marginal}},
	}
}

func TestACodeIsReadBackAsPeopleTypeIt(t *testing.T) {
	code := subject().Code()
	if len(code) != 20 || strings.Count(code, "-") != 2 {
		t.Fatalf("%q", code)
	}
	for _, typed := range []string{code, strings.ToLower(code), strings.ReplaceAll(code, "-", ""), strings.ReplaceAll(code, "-", "  "), strings.NewReplacer("0", "o", "1", "l").Replace(code)} {
		if got, err := signoff.ReadCode(typed); err != nil || got != code {
			t.Errorf("%q read as %q: %v", typed, got, err)
		}
	}
}

// The first eighty bits of the SHA-256 of nothing, e3b0c44298fc1c149afb (FIPS 180-4, as
// every library gives it), in Crockford's alphabet, worked by hand from the bits.
func TestSymbolsAreTheBitsInOrder(t *testing.T) {
	const bits = "1110001110110000110001000100001010011000111111000001110000010100" + "1001101011111011"
	want := ""
	n := 0
	for i := 0; i < len(bits); i += 5 {
		v := 0
		for _, b := range bits[i : i+5] {
			v = v*2 + int(b-'0')
		}
		want += alphabet[v : v+1]
		n = (n*32 + v) % 1021
	}
	want += alphabet[n/32:n/32+1] + alphabet[n%32:n%32+1]
	if got := strings.ReplaceAll(signoff.Written([]byte{0xe3, 0xb0, 0xc4, 0x42, 0x98, 0xfc, 0x1c, 0x14, 0x9a, 0xfb}), "-", ""); got != want {
		t.Errorf("%s, want %s", got, want)
	}
}

// One sign wrong, two neighbours or next but one exchanged, a sign lost or added: always
// noticed, never read as another code.
func TestSlipsAreNoticed(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s := subject()
		s.Program = rapid.String().Draw(t, "program")
		code := strings.ReplaceAll(s.Code(), "-", "")
		refused := func(what, typed string) {
			if got, err := signoff.ReadCode(typed); err == nil && typed != code {
				t.Fatalf("%s: %s typed as %s was read as %s", what, code, typed, got)
			}
		}
		i := rapid.IntRange(0, len(code)-1).Draw(t, "place")
		for _, r := range alphabet {
			refused("substitution", code[:i]+string(r)+code[i+1:])
		}
		for _, apart := range []int{1, 2} {
			if j := i + apart; j < len(code) {
				b := []byte(code)
				b[i], b[j] = b[j], b[i]
				refused("exchange", string(b))
			}
		}
		refused("loss", code[:i]+code[i+1:])
		refused("addition", code[:i]+"7"+code[i:])
	})
}

func TestEverythingThatACodeIsForEnters(t *testing.T) {
	base := subject().Code()
	seen := map[string]string{base: "base"}
	for name, change := range map[string]func(*signoff.Subject){
		"program":   func(s *signoff.Subject) { s.Program += "+1" },
		"file":      func(s *signoff.Subject) { s.Inputs[0].SHA256 = strings.Repeat("ac", 32) },
		"role":      func(s *signoff.Subject) { s.Inputs[1].Role = "readings" },
		"less read": func(s *signoff.Subject) { s.Inputs = s.Inputs[:1] },
		"concern":   func(s *signoff.Subject) { s.Required = s.Required[:1] },
		"verdict":   func(s *signoff.Subject) { s.Findings[0].Verdict = rule.Marginal },
		"subject":   func(s *signoff.Subject) { s.Findings[0].Subject = "lid\" \"life" },
		"finding":   func(s *signoff.Subject) { s.Findings = s.Findings[:1] },
	} {
		s := subject()
		change(&s)
		if other, twice := seen[s.Code()]; twice {
			t.Errorf("%s does not enter the code, as %s", name, other)
		}
		seen[s.Code()] = name
	}
	s := subject()
	s.Required = []rule.Concern{rule.Equipment, rule.Life}
	if s.Code() != base {
		t.Error("the order in which concerns are named enters the code")
	}
}

func ExampleReadCode() {
	for _, text := range []string{"7Q2M", "7Q2M4K-7Q2M4U-7Q2M4K", "7Q2M4K-7Q2M4K-7Q2M4K", "7Q2M4K-7Q2M4K-7Q2M4K-7"} {
		_, err := signoff.ReadCode(text)
		fmt.Println(err)
	}
	// Output:
	// a code has 18 signs, and this has 4
	// 'U' is no sign of a code; they are digits and letters but U
	// the code was mistyped: its last two signs do not belong to the others
	// a code has 18 signs, and this has more
}

// FuzzReadCode reads any text: a code as it is written, which is read back the same, or
// an error with words.
//
//	go test -fuzz FuzzReadCode ./rules/signoff
func FuzzReadCode(f *testing.F) {
	f.Add(subject().Code())
	f.Add("i l o")
	f.Add("7Q2M4K-7Q2M4K-7Q2M4\xff")
	f.Fuzz(func(t *testing.T, text string) {
		code, err := signoff.ReadCode(text)
		if err != nil {
			if err.Error() == "" || code != "" {
				t.Fatalf("%q: %q, %v", text, code, err)
			}
			return
		}
		if again, err := signoff.ReadCode(code); err != nil || again != code {
			t.Fatalf("%q read as %q, and that as %q: %v", text, code, again, err)
		}
	})
}
