package pdf

import "strconv"

// operators writes text and paths as the library does, which formats every number for
// itself and takes several times as long.
type operators struct {
	line  []byte
	noted [2]map[rune]bool // runes whose glyphs the library keeps, of both cuts
	ascii [2][128]bool     // the same of the first
}

// Text writes a text on a base line. The library is asked where it has a rune for the
// first time, since it keeps the glyphs of what it wrote.
func (p *painter) Text(x, y float64, text string) {
	if !p.note(text) {
		p.Fpdf.Text(x, y, text)
		return
	}
	line := p.line[:0]
	coloured := p.inked()
	if coloured {
		line = p.ofText(append(line, "q "...))
	}
	line = append(line, "BT "...)
	line = p.places(line, 2, x, y)
	line = append(line, "Td ("...)
	for _, r := range text {
		line = appendRune(line, r)
	}
	line = append(line, ") Tj ET"...)
	if coloured {
		line = append(line, " Q"...)
	}
	p.put(line)
}

// inked reports whether text has another colour than what is filled, which the operators
// of a file do not tell apart.
func (p *painter) inked() bool {
	r, g, b := p.GetTextColor()
	fr, fg, fb := p.GetFillColor()
	return r != fr || g != fg || b != fb
}

// ofText adds the operator of the colour of text, and a space.
func (p *painter) ofText(line []byte) []byte {
	r, g, b := p.GetTextColor()
	if r == g && g == b {
		return append(strconv.AppendFloat(line, float64(r)/255, 'f', 3, 64), " g "...)
	}
	for _, v := range [3]int{r, g, b} {
		line = append(strconv.AppendFloat(line, float64(v)/255, 'f', 3, 64), ' ')
	}
	return append(line, "rg "...)
}

// note reports whether the library had all runes of a text in the present cut; now it
// has.
func (p *painter) note(text string) bool {
	cut := regular
	if p.cut != "" {
		cut = bold
	}
	if p.noted[cut] == nil {
		p.noted[cut] = map[rune]bool{}
	}
	all := true
	for _, r := range text {
		if r < 128 {
			all = all && p.ascii[cut][r]
			p.ascii[cut][r] = true
		} else if !p.noted[cut][r] {
			all, p.noted[cut][r] = false, true
		}
	}
	return all
}

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

// places adds points of the sheet, x and y in turn, each with a space after it.
func (p *painter) places(line []byte, digits int, at ...float64) []byte {
	_, high := p.GetPageSize()
	k := p.GetConversionRatio()
	for i, v := range at {
		if i%2 == 1 {
			v = high - v
		}
		line = append(strconv.AppendFloat(line, v*k, 'f', digits, 64), ' ')
	}
	return line
}

// put writes a line, which is used again.
func (p *painter) put(line []byte) {
	p.line = line
	p.RawWriteStr(string(line))
}
