package pdf

// Paper is what the sheets are printed on.
type Paper string

// The papers.
const (
	A4     Paper = "a4"     // ISO 216, 210 mm by 297 mm
	Letter Paper = "letter" // 8.5 in by 11 in
)

// Papers lists them.
var Papers = []Paper{A4, Letter}

// size is in millimetres.
func (p Paper) size() (width, height float64) {
	if p == Letter {
		return 215.9, 279.4
	}
	return 210, 297
}

// blockHeight is that of the title block.
const blockHeight = 17.0

// area is where things stand on a sheet, in millimetres from its top left.
type area struct {
	frameLeft, frameRight, frameTop, frameBottom float64
	left, right, top, bottom, across             float64 // of the body
}

// area has the borders of ISO 5457, 20 mm on the filing side and 10 mm on the others;
// the title block stands at the foot of the frame.
func (p Paper) area() area {
	width, height := p.size()
	a := area{frameLeft: 20, frameRight: width - 10, frameTop: 10, frameBottom: height - 10}
	a.left, a.right = a.frameLeft+3, a.frameRight-3
	a.top, a.bottom = a.frameTop+4, a.frameBottom-blockHeight-2.5
	a.across = a.right - a.left
	return a
}
