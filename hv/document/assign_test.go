package document_test

import (
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/document"
)

// card has a leaf of every kind.
type card struct {
	Text  document.Given[string]  `key:"text" means:"text" example:"a"`
	Whole document.Given[int]     `key:"whole" means:"whole" example:"2"`
	Pure  document.Given[float64] `key:"pure" means:"pure" example:"1.5"`
	Sure  document.Given[bool]    `key:"sure" means:"sure" example:"true"`
}

func TestAssignIsReadBack(t *testing.T) {
	for _, c := range []struct{ key, text, line string }{
		{"text", `PTFE "white"`, `text = "PTFE \"white\""`},
		{"whole", "2", "whole = 2"},
		{"pure", "1.5e-3", "pure = 1.5e-3"},
		{"sure", "false", "sure = false"},
	} {
		line := assign(c.key, c.text)
		if line != c.line {
			t.Errorf("%s: %s, want %s", c.key, line, c.line)
		}
		if faults := document.Read([]byte(line), &card{}); len(faults) > 0 {
			t.Errorf("%s: %v", line, faults)
		}
	}
}

func TestWhatIsNoNumberIsRefusedAsText(t *testing.T) {
	for key, texts := range map[string][]string{"whole": {"two", "", "1,5", "02", "0x10", "1 # x", "1\n2"}, "pure": {"1,5", "nan", "inf", ".5"}, "sure": {"yes", "True", ""}} {
		for _, text := range texts {
			faults := document.Read([]byte(assign(key, text)), &card{})
			if len(faults) != 1 || faults[0].Code != document.Type {
				t.Errorf("%s = %q: %v", key, text, faults)
			}
		}
	}
}

// Whatever is written stays within its own line and is read back as it was.
func TestAssignKeepsEveryText(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		text := rapid.String().Draw(t, "text")
		line := assign("text", text)
		if strings.Contains(line, "\n") {
			t.Fatalf("%q runs on", line)
		}
		var c card
		faults := document.Read([]byte(line), &c)
		if strings.TrimSpace(text) != "" && strconv.Quote(text) == `"`+text+`"` && len([]rune(text)) <= 500 && (len(faults) > 0 || c.Text.V != text) {
			t.Fatalf("%q read as %q: %v", line, c.Text.V, faults)
		}
		for _, f := range faults {
			if f.Code == document.Syntax {
				t.Fatalf("%q is no TOML: %v", line, f)
			}
		}
	})
}

func assign(key, text string) string {
	for _, d := range document.Describe(&card{}) {
		if d.Key == key {
			return d.Assign(text)
		}
	}
	panic("no such key")
}
