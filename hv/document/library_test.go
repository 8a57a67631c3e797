package document

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"github.com/BurntSushi/toml"
)

// plain turns a tree back into what the TOML library makes of a document.
func plain(n *node) any {
	switch n.kind {
	case list:
		values := []any{}
		for _, item := range n.items {
			values = append(values, plain(item))
		}
		return values
	case tables:
		values := []map[string]any{}
		for _, item := range n.items {
			values = append(values, plain(item).(map[string]any))
		}
		return values
	case table:
		values := map[string]any{}
		for name, child := range n.children {
			values[name] = plain(child)
		}
		return values
	}
	return n.value
}

// wholly decodes a whole document with the TOML library; its panics are errors.
func wholly(text string) (values map[string]any, err error) {
	defer func() {
		if p := recover(); p != nil {
			err = fmt.Errorf("%v", p)
		}
	}()
	_, err = toml.Decode(text, &values)
	return values, err
}

// agree fails where the tree of a document and the TOML library differ. The reader
// may refuse more than the library, which drops some repeated keys in silence and
// knows no bound on nesting, but never less.
func agree(t *testing.T, text string) {
	t.Helper()
	inner, bad := decodeText([]byte(text))
	if bad != nil {
		return
	}
	clean, faults := withoutControls(inner)
	root, unread := grow(clean)
	faults = append(faults, unread...)
	for _, f := range faults {
		if f.Line < 1 || f.Column < 1 || strings.Contains(f.What, "cannot be followed") {
			t.Errorf("%q: %v", text, f)
		}
	}
	if slices.ContainsFunc(faults, func(f Fault) bool { return f.Code == Nesting }) {
		return // too deep for the library
	}
	values, err := wholly(text)
	stricter := slices.ContainsFunc(faults, func(f Fault) bool { return f.Code == Twice || f.Code == Form })
	switch {
	case err == nil && len(faults) > 0 && !stricter:
		t.Errorf("%q: refused, but the library reads it: %v", text, faults)
	case err != nil && len(faults) == 0:
		t.Errorf("%q: read, but the library refuses it: %v", text, err)
	case err == nil && len(faults) == 0 && fmt.Sprint(plain(root)) != fmt.Sprint(values):
		t.Errorf("%q:\nread    %v\nlibrary %v", text, plain(root), values)
	}
}

// documents are texts on which a scanner can lose its way.
var documents = []string{
	"", "\ufeffa = 1", "\ufeff\ufeffa = 1", "a = 1\n\ufeffb = 2", "a = 1\r\n[b]\r\nc = 2 # d\r\n", "a = 1\r", "\r", "[a]\nb = 1\n[a.c]\nd = 2\n[e]\n",
	"a.b.c = 1\na.b.d = 2", "a.b = 1\na = 2", "a = {x = 1}\na.c = 2", "a = {x = 1}\n[a.c]", "[a.b]\n[a]\nc = 1", "[a]\nb.c = 1\n[a.b]",
	"[[a]]\nb = 1\n[[a]]\nb = 2\n[a.c]\nd = 3\n[[a.e]]\nf = 4", "[a]\n[[a]]", "[[a]]\n[a]", "a = [1]\n[[a]]",
	"a = [{x = 1, y = [1, [2, 3]]}, {x = 2}]\nb = {c.d = 1, c.e = {f = 2}}", "a = {b.c = 1, b = 2}", "a = {b = 1, b = 2}",
	"a = [\n  1, # one ]\n  2,\n]\nb = '#'", "a = [ # }\n{ b = \"]\" }, ]", "a = { b = 1,\n c = 2 }", "a = [[[]]]",
	"\"a.b\".'c d' = 1\n[\"x]y\"]\nz = 1", `"\u00e9" = "\"#"`, "a = \"\"\"x\n\"\" \\\"\"\" y\"\"\"\"\nb = 1", "a = '''x\n''y'''''", "a = \"\"\"\nnever closed\nb = 1",
	"a = \"open\nb = 1", "a = [1, 2\nb = 1", "a = { b = 1\nc = 2", "[a\nb = 1", "[[a]\nb = 1", "a = 1 2", "a = 1,5", "a", "= 1", "a = ", "a = # b", "]", "}", "a = ]", "a = {]}",
	"a = 2025-01-01 10:00:00\nb = 10:30:00", "a = 0x1F\nb = 1_000\nc = 1e-3\nd = inf\ne = nan", "a = 0x", "a = 1e400", "a = 99999999999999999999", "a = .5", "a = 05", "a = tru",
	"d,=uuuzuuuuuuuutuuuuuuuuuuuu    uz\u1234\U0002d2cb", strings.Repeat("[", 3000), "a = " + "d,=uuuzuuuuuuuutuuuuuuuuuuuu    uz\u1234\U0002d2cb", strings.Repeat("[", 3000), "a = " + strings.Repeat("{a=", 3000), strings.Repeat("a.", 3000) + "a = 1", "[" + strings.Repeat("a.", 3000) + "a]", "a = 1 " + strings.Repeat("[", 3000),
}

func TestTreeAgreesWithLibrary(t *testing.T) {
	for _, text := range documents {
		agree(t, text)
	}
}

// FuzzTree holds the tree of any text against the TOML library:
//
//	go test -fuzz FuzzTree ./hv/document
func FuzzTree(f *testing.F) {
	for _, text := range documents {
		f.Add(text)
	}
	f.Fuzz(agree)
}
