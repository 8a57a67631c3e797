package drawing

// Sizes of the key.
const (
	sampleWidth = 8.0
	tagWidth    = 5.0
	keyGap      = 4.0 // between two columns
	mostColumns = 3
)

// entry explains one line, level or mark.
type entry struct {
	sample func(at) // draws it from a place to the right; nil for a mark
	tag    string
	text   string
}

// keyed explains a mark.
func (p *plot) keyed(tag, text string) { p.key = append(p.key, entry{tag: tag, text: text}) }

// explain sets the key under the frame: lines and levels, then marks, each in as many
// columns as its texts leave.
func (p *plot) explain() {
	var drawn, marks []entry
	for _, e := range p.key {
		if e.sample != nil {
			drawn = append(drawn, e)
		} else {
			marks = append(marks, e)
		}
	}
	top := p.y.start - tickLength - 10
	top = p.entries(drawn, top)
	p.entries(marks, top)
}

// entries sets entries of one kind; it returns where the next would stand.
func (p *plot) entries(all []entry, top float64) float64 {
	before, widest := 0.0, 0.0
	for _, e := range all {
		before = max(before, e.before())
		widest = max(widest, p.wide(named, e.text))
	}
	columns := max(1, min(int((p.width+keyGap)/(before+widest+keyGap)), mostColumns, len(all)))
	width := (p.width+keyGap)/float64(columns) - keyGap
	for len(all) > 0 {
		rows := min(len(all), columns)
		low := top
		for i, e := range all[:rows] {
			low = min(low, p.entry(e, at{float64(i) * (width + keyGap), top}, before, width))
		}
		top, all = low, all[rows:]
	}
	return top
}

// before is the room before the text.
func (e entry) before() float64 {
	room := 0.0
	if e.sample != nil {
		room += sampleWidth + 1.5
	}
	if e.tag != "" {
		room += tagWidth
	}
	return room
}

// entry writes an entry of the key; it returns where the next would stand.
func (p *plot) entry(e entry, q at, before, width float64) float64 {
	x := q.x
	if e.sample != nil {
		e.sample(q)
		x += sampleWidth + 1.5
	}
	if e.tag != "" {
		p.write(at{x, q.y}, toRight, tag, e.tag)
	}
	for _, line := range p.filled(e.text, width-before) {
		p.write(at{q.x + before, q.y}, toRight, named, line)
		q.y -= leading
	}
	return q.y - 0.3
}
