package document

import (
	"bytes"
	"encoding/json"
)

// object is a JSON object whose members keep their order.
type object []member

type member struct {
	name  string
	value any
}

// MarshalJSON writes the members one after the other.
func (o object) MarshalJSON() ([]byte, error) {
	var out bytes.Buffer
	opening := byte('{')
	for _, m := range o {
		value, err := json.Marshal(map[string]any{m.name: m.value})
		if err != nil {
			return nil, err
		}
		out.WriteByte(opening)
		out.Write(value[1 : len(value)-1]) // the one member without its braces
		opening = ','
	}
	if len(o) == 0 {
		out.WriteByte('{')
	}
	out.WriteByte('}')
	return out.Bytes(), nil
}
