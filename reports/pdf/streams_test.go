package pdf

import (
	"bytes"
	"compress/zlib"
	"errors"
	"fmt"
	"io"
	"runtime"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
)

// plainFile is the file of the library before its streams are compressed.
func plainFile(t *testing.T) []byte {
	t.Helper()
	f := testFonts(t)
	w := layout(f, a4, testPen(), nil, page.New(sample.Failing()))
	out := &painter{Fpdf: blank(A4, page.TitleBlock{}, names{}), fonts: f, links: map[string]int{}}
	w.announce(out)
	for _, s := range w.sheets {
		out.AddPage()
		if err := paint(out, s); err != nil {
			t.Fatal(err)
		}
	}
	var file bytes.Buffer
	if err := out.Output(&file); err != nil {
		t.Fatal(err)
	}
	return file.Bytes()
}

// Compressed streams inflate to what they were, every object stands where the table
// says, and nothing else has changed.
func TestDeflatedKeepsEveryObject(t *testing.T) {
	plain := plainFile(t)
	file, err := deflated(plain)
	if err != nil {
		t.Fatal(err)
	}
	before, _, err := objectsOf(plain)
	if err != nil {
		t.Fatal(err)
	}
	after, _, err := objectsOf(file)
	if err != nil || len(after) != len(before) {
		t.Fatalf("%d objects became %d: %v", len(before), len(after), err)
	}
	streams := 0
	for i, o := range before {
		now := after[i]
		if !bytes.HasPrefix(now.whole, fmt.Appendf(nil, "%d 0 obj\n", now.number)) || now.number != o.number {
			t.Errorf("object %d stands in the place of %d", now.number, o.number)
		}
		if o.stream == nil {
			if !bytes.Equal(o.whole, now.whole) {
				t.Errorf("object %d has changed", o.number)
			}
			continue
		}
		streams++
		if got := inflated(t, now.whole); !bytes.Equal(got, o.stream) {
			t.Errorf("object %d: %d bytes became %d", o.number, len(o.stream), len(got))
		}
	}
	if streams < 4 || len(file) >= len(plain) {
		t.Errorf("%d streams, %d bytes of %d", streams, len(file), len(plain))
	}
}

func inflated(t *testing.T, object []byte) []byte {
	t.Helper()
	_, rest, _ := bytes.Cut(object, []byte("stream\n"))
	reader, err := zlib.NewReader(bytes.NewReader(rest))
	if err != nil {
		t.Fatal(err)
	}
	got, err := io.ReadAll(reader)
	if err != nil {
		t.Fatal(err)
	}
	return got
}

// How many compress at once does not show.
func TestDeflatedAlikeOnAnyNumberOfProcessors(t *testing.T) {
	plain := plainFile(t)
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(0))
	var first []byte
	for _, n := range []int{1, 2, 7} {
		runtime.GOMAXPROCS(n)
		file, err := deflated(plain)
		if err != nil || first != nil && !bytes.Equal(file, first) {
			t.Fatalf("%d processors: other bytes, %v", n, err)
		}
		first = file
	}
}

func TestAFileBuiltOtherwiseIsRefused(t *testing.T) {
	plain := plainFile(t)
	for name, file := range map[string][]byte{
		"empty":        nil,
		"cut":          plain[:len(plain)/2],
		"no table":     bytes.ReplaceAll(plain, []byte("xref\n0 "), []byte("xxxx\n0 ")),
		"far away":     bytes.Replace(plain, []byte("startxref\n"), []byte("startxref\n9"), 1),
		"a wild place": bytes.Replace(plain, []byte("65535 f \n0"), []byte("65535 f \nx"), 1),
	} {
		if _, err := deflated(file); !errors.Is(err, errStructure) {
			t.Errorf("%s: %v", name, err)
		}
	}
}
