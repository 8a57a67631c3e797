package page

// sized is a table, and whether half the width is enough for it.
type sized struct {
	Table
	narrow bool
}

// paired sets narrow tables that follow each other in two columns.
func paired(all []Block) []Block {
	var out []Block
	var run []Block
	end := func() {
		if len(run) == 1 && len(run[0].(Table).Rows) <= fewRows {
			out = append(out, run...)
		} else {
			out = append(out, halved(run)...)
		}
		run = nil
	}
	for _, b := range all {
		s, ok := b.(sized)
		switch {
		case ok && s.narrow:
			run = append(run, s.Table)
			continue
		case ok:
			b = s.Table
		}
		end()
		out = append(out, b)
	}
	end()
	return out
}

// fewRows are not worth two columns.
const fewRows = 8

// halved sets pieces in two columns; none stay none.
func halved(blocks []Block) []Block {
	if len(blocks) == 0 {
		return nil
	}
	return []Block{Halves{blocks}}
}
