package pdf

import (
	"bytes"
	"fmt"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
)

func number(s string) (float64, error) { return strconv.ParseFloat(s, 64) }

// Every link of the sheets leads to a sheet that there is, and lies in the frame.
func TestLinksLeadToSheets(t *testing.T) {
	f := testFonts(t)
	for name, r := range samples {
		w := layout(f, a4, testPen(), nil, page.New(r))
		n := 0
		for _, s := range w.sheets {
			for _, i := range s.items {
				j, ok := i.(jump)
				if !ok {
					continue
				}
				n++
				if at, there := w.anchors[j.to]; !there || at.sheet < 1 || at.sheet > len(w.sheets) {
					t.Errorf("%s: %q leads to %v", name, j.to, at)
				}
				if j.x < a4.frameLeft || j.x+j.w > a4.frameRight+0.01 || j.y < a4.frameTop || j.y+j.h > a4.frameBottom {
					t.Errorf("%s: a link to %q lies at %+v", name, j.to, j)
				}
			}
		}
		if name == "failing" && n < 20 {
			t.Errorf("%d links", n)
		}
	}
}

// The first sheet says on which sheet a finding and each section stand.
func TestFirstSheetSaysWhereToReadOn(t *testing.T) {
	w := layout(testFonts(t), a4, testPen(), nil, page.New(sample.Failing()))
	text := words(w.sheets[0])
	for _, entry := range []struct{ title, anchor string }{{"Spacings and vessel", "chapter spacings"}, {"Sources", "sources"}, {"Sign-off", "sign-off"}} {
		at := w.anchors[entry.anchor]
		if at.sheet == 0 || !strings.Contains(strings.Join(text, "|"), entry.title+"|"+fmt.Sprint(at.sheet)) {
			t.Errorf("%s on sheet %d is not in %q", entry.title, at.sheet, text)
		}
	}
}

// A reader finds the sections in the outline of the file, and links in it.
func TestBookmarksAndLinksAreInTheFile(t *testing.T) {
	file := render(t, page.New(sample.Failing()))
	titles := regexp.MustCompile(`(?s)/Title \((.*?)\)\n/Parent`).FindAllSubmatch(file, -1)
	var all []string
	for _, m := range titles {
		all = append(all, decoded(bytes.TrimPrefix(unescaped(m[1]), []byte{0xfe, 0xff})))
	}
	if text := strings.Join(all, "|"); !strings.Contains(text, "Spacings and vessel|Parts and margins") || !strings.Contains(text, "Sign-off") {
		t.Errorf("bookmarks %q", all)
	}
	if n := bytes.Count(file, []byte("/Subtype /Link")); n < 20 {
		t.Errorf("%d links", n)
	}
}

// On Letter the text keeps to its frame as on A4, and the file says its size.
func TestLetter(t *testing.T) {
	f, a := testFonts(t), Letter.area()
	for name, r := range samples {
		for n, s := range layout(f, a, testPen(), nil, page.New(r)).sheets {
			for _, p := range places(f, s) {
				if p.left < a.frameLeft || p.right > a.frameRight || p.top < a.frameTop || p.bottom > a.frameBottom {
					t.Errorf("%s, sheet %d: %q leaves the frame", name, n+1, p.text)
				}
			}
		}
	}
	file, err := RenderOn(Letter, page.New(sample.Failing()))
	if err != nil || !bytes.Contains(file, []byte("/MediaBox [0 0 612.00 792.00]")) {
		t.Errorf("no sheet of 8.5 in by 11 in: %v", err)
	}
	if !bytes.Contains(render(t, page.New(sample.Failing())), []byte("/MediaBox [0 0 595.28 841.89]")) {
		t.Error("no sheet of 210 mm by 297 mm")
	}
}
