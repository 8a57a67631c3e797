package rules_test

import (
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// The columns of the built-in chain stand in air, as their spacings say; were the parts
// said to stand in oil, the review would remark it.
func TestAnotherMediumThanThePartsIsRemarked(t *testing.T) {
	data := described(t, "column")
	remarked := func(data []byte) string {
		for _, c := range reviewed(t, data).Cautions {
			if c.Subject == "medium of the multiplier" {
				return c.Text
			}
		}
		return ""
	}
	if text := remarked(data); text != "" {
		t.Errorf("nothing differs: %s", text)
	}
	oil := swapped(t, data, []rule.Swap{{Was: columnMedium(t, string(data)), Becomes: "medium              = \"oil\""}})
	if text := remarked(oil); !strings.Contains(text, "columns to the enclosure") || !strings.Contains(text, "oil") {
		t.Errorf("parts in oil, gaps in air: %q", text)
	}
}

// columnMedium is the line of the multiplier's medium as it stands.
func columnMedium(t *testing.T, text string) string {
	_, after, found := strings.Cut(text, "[multiplier]")
	for line := range strings.Lines(after) {
		if found && strings.HasPrefix(line, "medium") && strings.Contains(line, "air") {
			return strings.TrimSpace(line)
		}
	}
	t.Fatal("the multiplier has no medium")
	return ""
}
