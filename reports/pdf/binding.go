package pdf

import (
	"bytes"
	"fmt"
	"regexp"
	"slices"
	"time"

	"github.com/jung-kurt/gofpdf"

	"kilovet/reports/page"
)

// binding is the file that holds the sheets: the library keeps its fonts, links and
// outline, and knows what is seen on a sheet by a mark only.
type binding struct {
	*gofpdf.Fpdf
	cuts  [2]string // names of the cuts of the type
	links map[string]int
}

// undated is a moment for the library, which knows no file without one and else asks
// the clock; the sheets hold none, their date of issue is an input.
var undated = time.Date(2000, time.January, 1, 0, 0, 0, 0, time.UTC)

// newBinding is a file without sheets, set in the two cuts of the type. The library writes
// into what it is given.
func newBinding(p Paper, regular, bold []byte) (*binding, error) {
	width, height := p.size()
	b := &binding{Fpdf: gofpdf.NewCustom(&gofpdf.InitType{OrientationStr: "P", UnitStr: "mm", Size: gofpdf.SizeType{Wd: width, Ht: height}}), links: map[string]int{}}
	b.SetCompression(false) // see streams.go
	b.SetCatalogSort(true)
	b.SetModificationDate(undated)
	b.SetAutoPageBreak(false, 0)
	b.AddUTF8FontFromBytes(family, "", regular)
	b.AddUTF8FontFromBytes(family, "B", bold)
	return b, b.name()
}

// named is how the library sets type.
var named = regexp.MustCompile(`/(F\S+) [0-9.]+ Tf`)

// name finds the names that the library gave the cuts of the type.
func (b *binding) name() error {
	set := b.CreateTemplate(func(t *gofpdf.Tpl) {
		t.SetFont(family, "", 1)
		t.SetFont(family, "B", 1)
	})
	found := named.FindAllSubmatch(set.Bytes(), -1)
	if b.Err() || len(found) != len(b.cuts) {
		return fmt.Errorf("pdf: the type has no names: %v", b.Error())
	}
	for i, f := range found {
		b.cuts[i] = string(f[1])
	}
	return nil
}

// bound is the file with the sheets of a layout, whose content is marked.
func (b *binding) bound(w *flow, block page.TitleBlock, painted []*painter) ([]byte, error) {
	b.SetTitle(w.guard(regular, block.Title), true)
	b.SetCreator(w.guard(regular, block.Program), true)
	b.SetCreationDate(issued(block))
	b.announce(w)
	for i, s := range w.sheets {
		b.AddPage()
		if i == 0 {
			b.embed(painted)
		}
		b.RawWriteStr(mark(i))
		for _, it := range s.items {
			if n, is := it.(noted); is {
				n.note(b)
			}
		}
	}
	var whole taken
	if err := b.Output(&whole); err != nil {
		return nil, fmt.Errorf("pdf: %w", err)
	}
	return whole.file, nil
}

// embed has the library keep the glyphs of all runes: it keeps those of what it writes.
func (b *binding) embed(painted []*painter) {
	for c, cut := range [2]string{"", "B"} {
		all := runesOf(painted, face(c))
		b.SetFont(family, cut, 1)
		b.Text(0, 0, string(all.list()))
	}
	b.SetFont(family, "", 1) // in whose code the outline is written
}

// runesOf are those that the sheets need of a cut.
func runesOf(painted []*painter, c face) *runes {
	var all runes
	for _, p := range painted {
		all.join(&p.runes[c])
	}
	return &all
}

// announce gives every anchor that is led to a number in the file.
func (b *binding) announce(w *flow) {
	for _, s := range w.sheets {
		for _, i := range s.items {
			j, ok := i.(jump)
			at, there := w.anchors[j.to]
			if _, known := b.links[j.to]; !ok || !there || known {
				continue
			}
			b.links[j.to] = b.AddLink()
			b.SetLink(b.links[j.to], max(0, at.y-2), at.sheet)
		}
	}
}

// mark stands in the place of what is seen on a sheet.
func mark(sheet int) string { return fmt.Sprintf("%% sheet %d ", sheet) }

// taken takes a file that comes in one piece, without a copy of it.
type taken struct{ file []byte }

func (t *taken) Write(whole []byte) (int, error) {
	if t.file != nil {
		return 0, errStructure
	}
	t.file = whole
	return len(whole), nil
}

// issued is the date of issue where it is written as ISO 8601 has it; else undated.
func issued(b page.TitleBlock) time.Time {
	if day, err := time.Parse(time.DateOnly, b.Date); err == nil {
		return day
	}
	return undated
}

// withoutMoment puts spaces in the place of a moment that is undated, so that the file
// claims none and every offset in it stays true.
func withoutMoment(file []byte, key string, moment time.Time) []byte {
	entry := []byte("/" + key + " (D:" + undated.Format("20060102150405") + ")")
	at := bytes.LastIndex(file, entry)
	if !moment.Equal(undated) || at < 0 {
		return file
	}
	copy(file[at:], bytes.Repeat([]byte{' '}, len(entry)))
	return file
}

// join adds those of another set.
func (s *runes) join(other *runes) {
	for r, there := range other.first {
		s.first[r] = s.first[r] || there
	}
	for r := range other.more {
		s.add(r)
	}
}

// list is the runes in order.
func (s *runes) list() []rune {
	var all []rune
	for r, there := range s.first {
		if there {
			all = append(all, rune(r))
		}
	}
	for r := range s.more {
		all = append(all, r)
	}
	slices.Sort(all)
	return all
}
