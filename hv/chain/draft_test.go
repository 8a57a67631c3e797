package chain

import (
	"bytes"
	"errors"
	"regexp"
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/document"
)

func draft(t *testing.T) string {
	t.Helper()
	var b bytes.Buffer
	if err := Draft(&b); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// Only a value that is longer by itself goes beyond the width of a terminal.
func TestDraftFitsATerminal(t *testing.T) {
	for i, line := range strings.Split(draft(t), "\n") {
		if n := utf8.RuneCountInString(line); n > 80 && (strings.Contains(line, " # ") || !strings.Contains(line, " = ")) {
			t.Errorf("line %d has %d columns: %s", i+1, n, line)
		}
	}
}

func TestDraftReadsWithoutFaults(t *testing.T) {
	c, faults := Read([]byte(draft(t)))
	if faults != nil {
		t.Fatal(faults)
	}
	if c.Multiplier == nil || c.Drive == nil || len(c.Loads) != 1 || len(c.Spacings) != 1 || c.Gun != nil {
		t.Errorf("read %+v", c)
	}
}

var switchedOff = regexp.MustCompile(`(?m)^#([a-z\[])`)

// wholeDraft is the draft with everything switched on but the keys of the other choice.
func wholeDraft(t *testing.T) []string {
	t.Helper()
	var lines []string
	table := ""
	for line := range strings.Lines(draft(t)) {
		bare := strings.TrimPrefix(line, "#")
		key, _, _ := strings.Cut(bare, " ")
		if strings.HasPrefix(key, "[") {
			table = strings.Trim(key, "[]") + "."
		}
		if !slices.Contains(draftOther, table+key) {
			line = switchedOff.ReplaceAllString(line, "$1")
		}
		lines = append(lines, line)
	}
	return lines
}

func TestWholeDraftReadsWithoutFaults(t *testing.T) {
	c, faults := Read([]byte(strings.Join(wholeDraft(t), "")))
	if faults != nil {
		t.Fatal(faults)
	}
	if c.Gun == nil || c.Gun.Geometry == nil || len(c.Fields) != 1 || len(c.Fields[0].Electrodes) != 1 || len(c.Shields[0].Layers) != 1 || len(c.Parts) != 1 {
		t.Errorf("read %+v", c)
	}
}

var keyLine = regexp.MustCompile(`^([a-z_.]+) = (.*?) *#.*`)

// TestOneFaultStaysOne spoils every key of the whole draft in turn: by a value of
// the wrong form, by one that cannot be read, by a slip in the key. Each time there
// is a fault on that line and none that follows from it elsewhere.
func TestOneFaultStaysOne(t *testing.T) {
	lines := wholeDraft(t)
	for i, line := range lines { // without comments, for speed
		lines[i] = keyLine.ReplaceAllString(line, "$1 = $2#")
	}
	for i, line := range lines {
		m := keyLine.FindStringSubmatch(line)
		if m == nil {
			continue
		}
		for _, spoilt := range []string{m[1] + " = [[]]", m[1] + " = a b", m[1] + "x = " + m[2]} {
			changed := slices.Clone(lines)
			changed[i] = spoilt + "\n"
			_, faults := Read([]byte(strings.Join(changed, "")))
			elsewhere := slices.ContainsFunc(faults, func(f document.Fault) bool { return f.Line != i+1 })
			if len(faults) == 0 || elsewhere || len(faults) > 1 && !strings.HasSuffix(spoilt, "[[]]") {
				t.Errorf("line %d: %s\n%v", i+1, spoilt, faults)
			}
		}
	}
}

// TestManyFaultsAtOnce spoils any number of keys together: every one is reported, in
// document order, and nothing else is.
func TestManyFaultsAtOnce(t *testing.T) {
	lines := wholeDraft(t)
	chance.Check(t, func(t *rapid.T) {
		changed := slices.Clone(lines)
		share := rapid.IntRange(1, 40).Draw(t, "one in")
		var want, got []int
		for i, line := range lines {
			if m := keyLine.FindStringSubmatch(line); m != nil && rapid.IntRange(1, share).Draw(t, "spoil") == 1 {
				changed[i] = rapid.SampledFrom([]string{m[1] + " = {}\n", m[1] + " = a b\n", m[1] + " = 'open\n", m[1] + "x = " + m[2] + "\n"}).Draw(t, "how")
				want = append(want, i+1)
			}
		}
		_, faults := Read([]byte(strings.Join(changed, "")))
		for _, f := range faults {
			got = append(got, f.Line)
		}
		if !slices.IsSorted(got) || !slices.Equal(slices.Compact(got), want) {
			t.Fatalf("spoilt lines %v\n%v", want, faults)
		}
	})
}

// brokenComment is where a comment goes on in the next line.
var brokenComment = regexp.MustCompile(`\n *#  +|\n +# `)

// TestDraftHoldsEveryKey looks for the last part of every declared key with its meaning.
func TestDraftHoldsEveryKey(t *testing.T) {
	text := brokenComment.ReplaceAllString(draft(t), " ")
	for _, d := range document.Describe(&Chain{}) {
		if !strings.Contains(text, d.Key) || !strings.Contains(text, d.Means) {
			t.Errorf("%s is not in the draft", d.Path)
		}
	}
}

func TestDraftListsNameKeysThatExist(t *testing.T) {
	known := map[string]bool{}
	for _, d := range document.Describe(&Chain{}) {
		known[d.Path] = true
	}
	for _, path := range slices.Concat(draftOn, draftOther, draftRare) {
		if !known[path] {
			t.Errorf("there is no key %s", path)
		}
	}
}

type full struct{}

func (full) Write([]byte) (int, error) { return 0, errors.New("no space left") }

func TestDraftReportsFailedWrites(t *testing.T) {
	if Draft(full{}) == nil {
		t.Error("a failed write went unnoticed")
	}
}
