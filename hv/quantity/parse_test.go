package quantity

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
)

func TestAccepted(t *testing.T) {
	for _, row := range []struct {
		d    *Dimension
		text string
		want float64
	}{
		{voltage, "1.5 kV", 1500}, {voltage, "1.5kV", 1500}, {voltage, " 1.5  kV ", 1500}, {voltage, "0 V", 0}, {voltage, "-0 V", 0}, {voltage, "0.0mV", 0},
		{voltage, "+20 kV", 20e3}, {voltage, "-1 MV", -1e6}, {voltage, "\u22125 V", -5}, {voltage, "1e3 V", 1e3}, {voltage, "1E-3 V", 1e-3}, {voltage, "5. V", 5}, {voltage, ".5 V", .5},
		{voltage, "5 mV", 5e-3}, {voltage, "5 MV", 5e6}, {voltage, "7\u00a0uV", 7e-6}, {voltage, "7 \u00b5V", 7e-6}, {voltage, "7 \u03bcV", 7e-6}, {voltage, "5\u202fV", 5}, {voltage, "5\u2009V", 5},
		{capacitance, "10 uF", 1e-5}, {capacitance, "2.2 nF", 2.2e-9}, {capacitance, "0.1 pF", 1e-13}, {capacitance, "4.7e2 pF", 4.7e-10}, {capacitance, "3.3 µF", 3.3e-6},
		{resistance, "4.7 Mohm", 4.7e6}, {resistance, "4.7 M\u03a9", 4.7e6}, {resistance, "4.7 M\u2126", 4.7e6}, {resistance, "22\u2126", 22}, {resistance, "900 ohm", 900}, {resistance, "1 Gohm", 1e9}, {resistance, "1 mohm", 1e-3},
		{temperature, "30 degC", 303.15}, {temperature, "30 °C", 303.15}, {temperature, "-40 degC", 233.15}, {temperature, "2700 K", 2700}, {temperature, "0 K", 0}, {temperatureRise, "85 K", 85},
		{fraction, "10 %", 0.1}, {fraction, "0 %", 0}, {fraction, "50 ppm", 50e-6}, {fraction, "0.25 1", 0.25},
		{perKelvin, "50 ppm/K", 50e-6}, {perKelvin, "0.1 %/K", 1e-3}, {perVolt, "-1 ppm/V", -1e-6}, {perVolt, "1 %/kV", 1e-5},
		{area, "0.03 mm2", 3e-8}, {area, "0.03 mm²", 3e-8}, {humidity, "11 g/m³", 0.011},
		{pressure, "4e-5 mbar", 4e-3}, {pressure, "1 bar", 1e5}, {pressure, "760 Torr", 101325}, {pressure, "1 atm", 101325}, {pressure, "1013 hPa", 101300},
		{field, "3 kV/mm", 3e6}, {field, "30 kV/cm", 3e6}, {field, "5 V/µm", 5e6}, {field, "5 GV/m", 5e9},
		{angle, "5 mrad", 5e-3}, {angle, "180 deg", math.Pi}, {duration, "2 min", 120}, {duration, "1 h", 3600}, {duration, "80 ns", 80e-9},
		{linearCapacitance, "110 pF/m", 110e-12}, {electronEnergy, "4.5 eV", 4.5}, {electronEnergy, "1e3 eV", 1000}, {resistivity, "1e12 Ω m", 1e12}, {resistivity, "1e14 ohm cm", 1e12},
		{currentDensity, "1.6 A/cm2", 1.6e4}, {richardson, "60 A/cm2K2", 60e4}, {kermaRate, "3.6 mGy/h", 1e-6}, {pressureLength, "0.76 Torr cm", 1.01325}, {thermalResistance, "85 K/W", 85},
		{energy, "20 J", 20}, {energy, "1 MJ", 1e6}, {length, "60 mm", 0.06}, {length, "1.2 cm", 0.012}, {frequency, "38 kHz", 38e3}, {current, "60 uA", 60e-6}, {inductance, "3 mH", 3e-3}, {charge, "45 uC", 45e-6}, {power, "500 mW", 0.5},
	} {
		got, err := row.d.Parse(row.text)
		if err != nil || !closeTo(got, row.want) {
			t.Errorf("%s %q: %v, %v; want %v", row.d.Name, row.text, got, err, row.want)
		}
		if got == 0 && math.Signbit(got) {
			t.Errorf("%q is a negative zero", row.text)
		}
	}
}

// closeTo allows the last bit where a scale is not a power of ten.
func closeTo(a, b float64) bool { return math.Abs(a-b) <= 4e-16*math.Abs(b) }

// TestDecimalsAreExact: a number with a decimal prefix is the float64 nearest to
// what is written, where multiplying by the prefix would miss it (10 × 1e-6 ≠ 1e-5).
func TestDecimalsAreExact(t *testing.T) {
	for _, row := range []struct {
		d    *Dimension
		text string
		want float64
	}{
		{capacitance, "10 uF", 1e-5}, {capacitance, "3 pF", 3e-12}, {current, "60 uA", 60e-6}, {voltage, "0.3 mV", 3e-4}, {frequency, "4.7e2 kHz", 470e3},
		{fraction, "7 %", 0.07}, {perKelvin, "35 ppm/K", 35e-6}, {pressure, "4e-5 mbar", 4e-3}, {area, "0.03 mm2", 3e-8}, {length, "0.1 mm", 1e-4},
	} {
		if got, err := row.d.Parse(row.text); err != nil || got != row.want {
			t.Errorf("%q: %b, want %b", row.text, got, row.want)
		}
	}
}

func TestRejected(t *testing.T) {
	const (
		volts  = `; write a voltage such as "1.5 kV" (units: V, kV, mV, uV, nV, MV)`
		points = `; write the digits without gaps and one decimal point, as in "1.5 kV"`
		comma  = `a decimal comma; write a decimal point, as in "1.5 kV"`
	)
	for _, row := range []struct {
		d          *Dimension
		text, want string
	}{
		{voltage, "1,5 kV", comma}, {voltage, "1,500 V", comma}, {voltage, "1 ,5 kV", comma},
		{voltage, "0", `a bare zero; write it with its unit, as in "0 V"`}, {voltage, "-0.00", `a bare zero; write it with its unit, as in "0 V"`},
		{fraction, "0", `a bare zero; write it with its unit, as in "0 %"`},
		{voltage, "5", "a number without a unit" + volts}, {voltage, "1e3", "a number without a unit" + volts},
		{fraction, "0.1", `a number without a unit; write a fraction such as "10 %" (units: %, ppm, 1)`},
		{voltage, "nan V", "not a finite number" + volts}, {voltage, "NaN", "not a finite number" + volts}, {voltage, "inf V", "not a finite number" + volts}, {voltage, "-Inf kV", "not a finite number" + volts}, {voltage, "+infinity V", "not a finite number" + volts},
		{voltage, "5 KV", `unknown unit "KV"; upper and lower case matter: write "kV"`}, {voltage, "5 mv", `unknown unit "mv"; upper and lower case matter: write "mV" or "MV"`},
		{frequency, "5 mhz", `unknown unit "mhz"; upper and lower case matter: write "MHz" or "mHz"`}, {resistance, "5 kOhm", `unknown unit "kOhm"; upper and lower case matter: write "kohm"`},
		{voltage, "5 A", `unit "A" is a current, not a voltage` + volts}, {voltage, "5 nF", `unit "nF" is a capacitance, not a voltage` + volts}, {voltage, "5 J", `unit "J" is an energy, not a voltage` + volts},
		{energy, "5 V", `unit "V" is a voltage, not an energy; write an energy such as "1 J" (units: J, mJ, uJ, nJ, kJ, MJ)`},
		{temperatureRise, "5 degC", `unit "degC" is a temperature, not a temperature difference; write a temperature difference such as "20 K" (units: K)`},
		{voltage, "5 volts", `unknown unit "volts"` + volts}, {voltage, "5 V V", `unknown unit "V V"` + volts}, {voltage, "5 kV rms", `unknown unit "kV rms"` + volts},
		{voltage, "5 " + strings.Repeat("x", 99), `unknown unit "` + strings.Repeat("x", 24) + `…"` + volts},
		{voltage, "", "not a number with a unit" + volts}, {voltage, "kV", "not a number with a unit" + volts}, {voltage, "about 5 V", "not a number with a unit" + volts}, {voltage, "± 5 V", "not a number with a unit" + volts}, {voltage, "- 5 V", "not a number with a unit" + volts}, {voltage, ".", "not a number with a unit" + volts}, {voltage, "0x10", `unknown unit "x10"` + volts},
		{voltage, "1 000 V", "a number in groups or with two points" + points}, {voltage, "1_000 V", "a number in groups or with two points" + points}, {voltage, "1'000 V", "a number in groups or with two points" + points}, {voltage, "1.000.000 V", "a number in groups or with two points" + points},
		{voltage, "1e V", `unknown unit "e V"` + volts}, {voltage, "1e999 V", "a number too large to compute with" + volts}, {voltage, "1e99999999999999999999 V", "a number too large to compute with" + volts},
		{voltage, "1e-400 V", "a number too small to compute with" + volts}, {voltage, "1e-99999999999999999999 V", "a number too small to compute with" + volts},
		{temperature, "-300 degC", `a temperature below absolute zero; write a temperature such as "30 degC" (units: degC, °C, K)`}, {temperature, "-1 K", `a temperature below absolute zero; write a temperature such as "30 degC" (units: degC, °C, K)`},
	} {
		got, err := row.d.Parse(row.text)
		if err == nil || err.Error() != row.want {
			t.Errorf("%q: %v\ngot  %v\nwant %s", row.text, got, err, row.want)
		}
		if _, ok := err.(*Refusal); err != nil && !ok {
			t.Errorf("%q: the error is a %T", row.text, err)
		}
	}
}

func TestUnitsTable(t *testing.T) {
	for _, d := range dimensions {
		seen := map[string]bool{}
		for _, u := range d.units {
			if seen[u.symbol] {
				t.Errorf("%s: %q twice", d.Name, u.symbol)
			}
			seen[u.symbol] = true
			if v, err := d.Parse("1 " + u.symbol); err != nil || v <= 0 {
				t.Errorf("%s: 1 %s is %v, %v", d.Name, u.symbol, v, err)
			}
		}
		if v, err := d.Parse(d.Example); err != nil || v == 0 {
			t.Errorf("%s: example %q is %v, %v", d.Name, d.Example, v, err)
		}
		if v, err := d.Parse("1 " + d.SI); d != fraction && (err != nil || v != 1) {
			t.Errorf("%s: 1 %s is %v, %v", d.Name, d.SI, v, err)
		}
		if DimensionOf(d.SI) == nil {
			t.Errorf("no dimension of %q", d.SI)
		}
	}
}

// TestPrefixes holds every prefixed unit against the power of ten of its prefix.
func TestPrefixes(t *testing.T) {
	factor := map[string]float64{"f": 1e-15, "p": 1e-12, "n": 1e-9, "u": 1e-6, "m": 1e-3, "c": 1e-2, "": 1, "k": 1e3, "M": 1e6, "G": 1e9, "T": 1e12}
	for _, d := range []*Dimension{voltage, current, resistance, capacitance, inductance, frequency, length, charge, energy, electronEnergy, power} {
		for _, u := range d.Units() {
			want, ok := factor[strings.TrimSuffix(u, d.SI)]
			if got, err := d.Parse("1 " + u); !ok || err != nil || got != want {
				t.Errorf("1 %s is %v, %v; want %v", u, got, err, want)
			}
		}
	}
}

// TestTextReadsBack: what is written for people can be read, and is the value to
// four significant digits.
func TestTextReadsBack(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		d := rapid.SampledFrom(dimensions).Draw(t, "dimension")
		u := rapid.SampledFrom(d.units).Draw(t, "unit")
		mantissa := rapid.Float64Range(1, 999).Draw(t, "mantissa")
		v := mantissa*math.Pow(10, float64(u.exponent))*u.scale + u.offset
		got, err := d.Parse(d.Text(v))
		slack := 6e-4 * math.Abs(v)
		if d == temperature {
			slack = max(slack, 0.06) // of degrees Celsius near zero kelvin
		}
		if err != nil || math.Abs(got-v) > slack {
			t.Fatalf("%v is written %q and read %v, %v", v, d.Text(v), got, err)
		}
	})
}

// TestSpacesAndSignsDoNotMatter: any way to write one value is the same value.
func TestSpacesAndSignsDoNotMatter(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		d := rapid.SampledFrom(dimensions).Draw(t, "dimension")
		symbol := rapid.SampledFrom(d.Units()).Draw(t, "unit")
		number := rapid.StringMatching(`[0-9]{1,3}(\.[0-9]{1,3})?(e-?[0-9])?`).Draw(t, "number")
		want, err := d.Parse(number + " " + symbol)
		if err != nil {
			t.Fatal(err)
		}
		micro := rapid.SampledFrom([]string{"u", "\u00b5", "\u03bc"}).Draw(t, "micro")
		ohm := rapid.SampledFrom([]string{"ohm", "\u2126", "\u03a9"}).Draw(t, "ohm")
		space := rapid.SampledFrom([]string{"", "  ", "\u00a0", "\t"}).Draw(t, "space")
		switch symbol[0] {
		case 'u':
			symbol = micro + symbol[1:]
		case '1':
			space = " " // else it would belong to the number
		}
		text := " " + number + space + strings.ReplaceAll(symbol, "ohm", ohm)
		if got, err := d.Parse(text); err != nil || got != want {
			t.Fatalf("%q is %v, %v; want %v", text, got, err, want)
		}
	})
}

// FuzzParse reads any text in every dimension: a finite number or a refusal with words.
//
//	go test -fuzz FuzzParse ./hv/quantity
func FuzzParse(f *testing.F) {
	for _, text := range []string{"1.5 kV", "1,5 kV", "0", "nan V", "1e999 V", "30 degC", "\u2212.5e-3\u00a0\u2126", "1e", "+", "1 \xff"} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		for _, d := range dimensions {
			v, err := d.Parse(text)
			refusal, _ := err.(*Refusal)
			switch {
			case err == nil && (math.IsNaN(v) || math.IsInf(v, 0)):
				t.Errorf("%q is %v", text, v)
			case err != nil && (refusal == nil || refusal.What == "" || refusal.Remedy == ""):
				t.Errorf("%q: %#v", text, err)
			}
		}
	})
}
