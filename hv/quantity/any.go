package quantity

// ReadAny reads a text into SI units of whatever dimension knows its unit, for where
// the dimension shows only later. The refusal is that of a voltage where none does.
func ReadAny(text string) (float64, error) {
	_, first := voltage.Parse(text)
	for _, d := range dimensions {
		if v, err := d.Parse(text); err == nil {
			return v, nil
		}
	}
	return 0, first
}
