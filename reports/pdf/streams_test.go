package pdf

import (
	"bytes"
	"compress/zlib"
	"errors"
	"fmt"
	"io"
	"runtime"
	"slices"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
)

// bound is the file of the library, what is seen on its sheets, and the same compressed.
func bound(t *testing.T) (plain []byte, painted []*painter, sheets [][]byte) {
	t.Helper()
	press := readyPress(t)
	d := page.New(sample.Failing())
	w := press.laidOut(&ahead{}, d)
	painted, err := press.painted(w)
	if err != nil {
		t.Fatal(err)
	}
	plain, err = press.binding.bound(w, d.Block, painted)
	if err != nil {
		t.Fatal(err)
	}
	sheets, _ = deflateAll(painted)
	return plain, painted, sheets
}

// The sheets stand in their places, compressed as other streams are, every object stands
// where the table says, and nothing else has changed.
func TestAssembledKeepsEveryObject(t *testing.T) {
	plain, painted, sheets := bound(t)
	file, err := assembled(plain, sheets, &deflater{})
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
		want := o.stream
		if streams < len(painted) {
			want = painted[streams].content
		}
		streams++
		if got := inflated(t, now.whole); !bytes.Equal(got, want) {
			t.Errorf("object %d: %d bytes became %d", o.number, len(want), len(got))
		}
	}
	if streams < len(painted)+2 {
		t.Errorf("%d streams of %d sheets", streams, len(painted))
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
	_, painted, _ := bound(t)
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(0))
	var first [][]byte
	for _, n := range []int{1, 2, 7} {
		runtime.GOMAXPROCS(n)
		small, _ := deflateAll(painted)
		if first != nil && !slices.EqualFunc(small, first, bytes.Equal) {
			t.Fatalf("%d processors: other bytes", n)
		}
		first = small
	}
}

func TestAFileBuiltOtherwiseIsRefused(t *testing.T) {
	plain, _, sheets := bound(t)
	for name, file := range map[string][]byte{
		"empty":        nil,
		"cut":          plain[:len(plain)/2],
		"no table":     bytes.ReplaceAll(plain, []byte("xref\n0 "), []byte("xxxx\n0 ")),
		"far away":     bytes.Replace(plain, []byte("startxref\n"), []byte("startxref\n9"), 1),
		"no mark":      bytes.Replace(plain, []byte(mark(1)), []byte("% another "), 1),
		"a wild place": bytes.Replace(plain, []byte("65535 f \n0"), []byte("65535 f \nx"), 1),
	} {
		if _, err := assembled(file, sheets, &deflater{}); !errors.Is(err, errStructure) {
			t.Errorf("%s: %v", name, err)
		}
	}
}
