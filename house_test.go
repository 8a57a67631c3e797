package kilovet_test

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// floors numbers the rooms from the ground: a room imports only rooms below it.
var floors = map[string]int{"hv": 0, "insulation": 1, "ripple": 1, "rules": 2, "reports": 3, "cmd": 4}

// fences are the libraries that one package alone imports.
var fences = map[string]string{
	"github.com/BurntSushi/toml":  "hv/document",
	"github.com/jung-kurt/gofpdf": "reports/pdf",
	"codeberg.org/go-pdf/fpdf":    "reports/pdf",
	"github.com/spf13/cobra":      "cmd/kilovet",
	"golang.org/x/term":           "cmd/kilovet",
}

// source is one Go file of the project.
type source struct {
	path, folder string // from the root, with slashes
	test         bool
	file         *ast.File
	set          *token.FileSet
}

func (s source) room() string {
	first, _, _ := strings.Cut(s.folder, "/")
	return first
}

func (s source) imports() []string {
	var all []string
	for _, i := range s.file.Imports {
		name, _ := strconv.Unquote(i.Path.Value)
		all = append(all, name)
	}
	return all
}

// sources parses every Go file of the project.
func sources(t *testing.T) []source {
	t.Helper()
	var all []source
	walk(t, func(name string) {
		if path.Ext(name) != ".go" {
			return
		}
		set := token.NewFileSet()
		file, err := parser.ParseFile(set, name, nil, parser.ParseComments|parser.SkipObjectResolution)
		if err != nil {
			t.Fatal(err)
		}
		all = append(all, source{name, path.Dir(name), strings.HasSuffix(name, "_test.go"), file, set})
	})
	if len(all) == 0 {
		t.Fatal("no Go files found")
	}
	return all
}

// walk visits every file but those in hidden folders, which the go tool passes over
// too; the checks in .ci belong to the project.
func walk(t *testing.T, visit func(name string)) {
	t.Helper()
	err := filepath.WalkDir(".", func(name string, d fs.DirEntry, err error) error {
		switch {
		case err != nil:
			return err
		case d.IsDir() && strings.HasPrefix(d.Name(), ".") && d.Name() != "." && d.Name() != ".ci":
			return fs.SkipDir
		case !d.IsDir():
			visit(filepath.ToSlash(name))
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
}

// within is the folder of an import of this project.
func within(name string) (folder string, ours bool) { return strings.CutPrefix(name, "kilovet/") }

func TestRoomsImportOnlyRoomsBelow(t *testing.T) {
	for _, s := range sources(t) {
		for _, name := range s.imports() {
			folder, ours := within(name)
			if !ours || s.folder == "." {
				continue
			}
			room, _, _ := strings.Cut(folder, "/")
			if room != s.room() && floors[room] >= floors[s.room()] {
				t.Errorf("%s, in %s, imports %s", s.path, s.room(), name)
			}
		}
	}
}

func TestRippleAndInsulationStandApart(t *testing.T) {
	for _, s := range sources(t) {
		for _, name := range s.imports() {
			folder, ours := within(name)
			room, _, _ := strings.Cut(folder, "/")
			if ours && room != s.room() && slices.Contains([]string{"ripple", "insulation"}, s.room()) && slices.Contains([]string{"ripple", "insulation"}, room) {
				t.Errorf("%s imports %s", s.path, name)
			}
		}
	}
}

func TestSubRoomsNeverImportTheDoor(t *testing.T) {
	for _, s := range sources(t) {
		if s.folder != s.room() && slices.Contains(s.imports(), "kilovet/"+s.room()) {
			t.Errorf("%s imports the root of its room", s.path)
		}
	}
}

// The root package imports nothing of the project, so that any test may take the
// built-in example from it; beside tests only the command line does.
func TestRootBelongsToTheCommandLine(t *testing.T) {
	for _, s := range sources(t) {
		switch imports := s.imports(); {
		case s.folder == "." && !s.test:
			if !slices.Equal(imports, []string{"embed"}) {
				t.Errorf("%s imports %v", s.path, imports)
			}
		case slices.Contains(imports, "kilovet") && !s.test && s.room() != "cmd":
			t.Errorf("%s imports the root", s.path)
		}
	}
}

func TestFences(t *testing.T) {
	for _, s := range sources(t) {
		for _, name := range s.imports() {
			for library, home := range fences {
				if (name == library || strings.HasPrefix(name, library+"/")) && s.folder != home {
					t.Errorf("%s imports %s, which belongs to %s alone", s.path, name, home)
				}
			}
		}
	}
}

func TestTopLevelFolders(t *testing.T) {
	entries, err := os.ReadDir(".")
	if err != nil {
		t.Fatal(err)
	}
	for _, e := range entries {
		_, room := floors[e.Name()]
		if e.IsDir() && !room && e.Name() != "testdata" && !strings.HasPrefix(e.Name(), ".") {
			t.Errorf("%s is no room of the house", e.Name())
		}
	}
}

func TestNothingHappensByItself(t *testing.T) {
	for _, s := range sources(t) {
		if s.test {
			continue
		}
		for _, name := range s.imports() {
			if name == "math/rand" || name == "math/rand/v2" || name == "crypto/rand" {
				t.Errorf("%s imports %s: randomness is passed in", s.path, name)
			}
		}
		ast.Inspect(s.file, func(n ast.Node) bool {
			switch n := n.(type) {
			case *ast.FuncDecl:
				if n.Recv == nil && n.Name.Name == "init" {
					t.Errorf("%s has an init function", s.path)
				}
			case *ast.SelectorExpr:
				if x, ok := n.X.(*ast.Ident); ok && x.Name == "time" && (n.Sel.Name == "Now" || n.Sel.Name == "Since") {
					t.Errorf("%s reads the clock", s.set.Position(n.Pos()))
				}
			}
			return true
		})
	}
}

func TestDrawsAreTheSameEachTime(t *testing.T) {
	for _, s := range sources(t) {
		if s.folder == "hv/chance" {
			continue
		}
		ast.Inspect(s.file, func(n ast.Node) bool {
			if call, ok := n.(*ast.SelectorExpr); ok {
				if x, ok := call.X.(*ast.Ident); ok && x.Name == "rapid" && (call.Sel.Name == "Check" || call.Sel.Name == "MakeCheck") {
					t.Errorf("%s draws other cases each time: chance.Check does not", s.set.Position(n.Pos()))
				}
			}
			return true
		})
	}
}

func TestEveryPackageSaysWhatItIs(t *testing.T) {
	documented := map[string]bool{}
	for _, s := range sources(t) {
		if !s.test {
			documented[s.folder] = documented[s.folder] || s.file.Doc != nil
		}
	}
	for folder, said := range documented {
		if !said {
			t.Errorf("the package in %s has no doc comment", folder)
		}
	}
}

// strangers are words that belong to a workplace and not to the project; they are
// put together here so that this file does not hold them.
var strangers = []string{"/wo" + "rk/", "../sha" + "red", "shared/ref" + "erence", "/tmp/br" + "ief", "TO" + "DO", "FIX" + "ME", "XX" + "X"}

func TestNoWordsThatDoNotBelong(t *testing.T) {
	walk(t, func(name string) {
		if !texts(name) {
			return
		}
		data, err := os.ReadFile(name)
		if err != nil {
			t.Fatal(err)
		}
		for n, line := range strings.Split(string(data), "\n") {
			for _, word := range strangers {
				if strings.Contains(line, word) {
					t.Errorf("%s:%d: %q", name, n+1, word)
				}
			}
		}
	})
}

// texts reports whether a file is one that people write.
func texts(name string) bool {
	return name == ".ci/run" || name == "NOTICE" || slices.Contains([]string{".go", ".md", ".toml", ".txtar", ".txt", ".mod", ".json"}, path.Ext(name))
}
