package pdf

import (
	"errors"
	"image/color"
	"math"
	"slices"
	"strconv"
)

// painter writes what is seen on one sheet, in the operators of ISO 32000-1:2008. Ink,
// width, dashes and type are written where they change.
type painter struct {
	fonts   *fonts
	cuts    [2]string // names of the cuts of the type in the file
	high    float64   // of the sheet
	content []byte
	runes   [2]runes // that the cuts must have
	err     error    // what a picture could not draw

	line, area ink // of what is stroked and what is filled
	width      float64
	dash       []float64
	offset     float64
	cut        face // of the type that is set
	size       float64
}

// newPainter begins an empty sheet.
func newPainter(f *fonts, cuts [2]string, p Paper) *painter {
	_, high := p.size()
	return &painter{fonts: f, cuts: cuts, high: high, width: -1, content: make([]byte, 0, 32<<10)}
}

// ink is a colour of red, green and blue.
type ink [3]uint8

var (
	black = ink{}
	white = grey(255)
)

func grey(v uint8) ink { return ink{v, v, v} }

// inkOf is black where no colour is given.
func inkOf(c color.Color) ink {
	if c == nil {
		return black
	}
	r, g, b, _ := c.RGBA()
	return ink{uint8(r >> 8), uint8(g >> 8), uint8(b >> 8)}
}

// stroke sets the colour of lines.
func (p *painter) stroke(i ink) {
	if p.line != i {
		p.line = i
		p.colour(i, "G\n", "RG\n")
	}
}

// fill sets the colour of areas and of text.
func (p *painter) fill(i ink) {
	if p.area != i {
		p.area = i
		p.colour(i, "g\n", "rg\n")
	}
}

func (p *painter) colour(i ink, alike, full string) {
	how := full
	if i == grey(i[0]) {
		i, how = ink{i[0]}, alike
	}
	for k, v := range i {
		if k == 0 || how == full {
			p.content = append(strconv.AppendFloat(p.content, float64(v)/255, 'f', 3, 64), ' ')
		}
	}
	p.put(how)
}

// wide sets the width of lines.
func (p *painter) wide(width float64) {
	if !(math.Abs(p.width-width) > 0) {
		return
	}
	p.width = width
	p.lengths(width)
	p.put("w\n")
}

// dashed sets the pattern of lines; none draws them through.
func (p *painter) dashed(pattern []float64, offset float64) {
	if slices.Equal(p.dash, pattern) && !(math.Abs(p.offset-offset) > 0) {
		return
	}
	p.dash, p.offset = pattern, offset
	p.put("[")
	p.lengths(pattern...)
	p.put("] ")
	p.lengths(offset)
	p.put("d\n")
}

// letters sets the type.
func (p *painter) letters(c face, size float64) {
	if p.cut == c && !(math.Abs(p.size-size) > 0) {
		return
	}
	p.cut, p.size = c, size
	p.put("/" + p.cuts[c] + " ")
	p.number(size)
	p.put("Tf\n")
}

// text writes a text on a base line, in runes of two bytes.
func (p *painter) text(x, y float64, text string) {
	p.put("BT ")
	p.at(x, y)
	p.put("Td (")
	for _, r := range text {
		p.runes[p.cut].add(r)
		p.content = appendRune(p.content, r)
	}
	p.put(") Tj ET\n")
}

// turned draws what is turned about a place, to the left where the angle is greater than
// nought. What it sets anew holds no longer than it does.
func (p *painter) turned(x, y, angle float64, draw func()) {
	before := *p
	sin, cos := math.Sincos(angle)
	px, py := x/points, (p.high-y)/points
	p.put("q ")
	for _, v := range [4]float64{cos, sin, -sin, cos} {
		p.content = append(strconv.AppendFloat(p.content, v, 'f', 5, 64), ' ')
	}
	p.number(px - cos*px + sin*py)
	p.number(py - sin*px - cos*py)
	p.put("cm\n")
	draw()
	p.put("Q\n")
	before.content, before.runes, before.err = p.content, p.runes, p.err
	*p = before
}

// at writes places on the sheet, x and y in turn.
func (p *painter) at(places ...float64) {
	for i, v := range places {
		if i%2 == 1 {
			v = p.high - v
		}
		p.number(v / points)
	}
}

// lengths writes lengths.
func (p *painter) lengths(all ...float64) {
	for _, v := range all {
		p.number(v / points)
	}
}

// number writes a number to the hundredth, and a space.
func (p *painter) number(v float64) {
	n := int64(math.Round(100 * v))
	if n < 0 {
		p.content, n = append(p.content, '-'), -n
	}
	p.content = strconv.AppendInt(p.content, n/100, 10)
	if tens := n % 100; tens > 0 {
		p.content = append(p.content, '.', byte('0'+tens/10))
		if n%10 > 0 {
			p.content = append(p.content, byte('0'+n%10))
		}
	}
	p.content = append(p.content, ' ')
}

func (p *painter) put(s string) { p.content = append(p.content, s...) }

// refuse keeps what cannot be drawn.
func (p *painter) refuse(err error) { p.err = errors.Join(p.err, err) }

// appendRune adds a rune of two bytes to a string between brackets
// (ISO 32000-1:2008 7.3.4.2).
func appendRune(line []byte, r rune) []byte {
	for _, b := range [2]byte{byte(r >> 8), byte(r)} {
		switch b {
		case '\\', '(', ')':
			line = append(line, '\\', b)
		case '\r':
			line = append(line, '\\', 'r')
		default:
			line = append(line, b)
		}
	}
	return line
}

// runes is a set of those of the first plane.
type runes struct {
	first [256]bool
	more  map[rune]bool
}

func (s *runes) add(r rune) {
	if r < 256 {
		s.first[r] = true
		return
	}
	if s.more == nil {
		s.more = map[rune]bool{}
	}
	s.more[r] = true
}
