package limits

import "kilovet/rules/rule"

// Shown is a limit about touch and stored charge as its standard or code has it.
type Shown struct {
	Standard, Condition string
	// What is "voltage", "current", "charge", "energy" or "time".
	What   string
	Limit  rule.Amount
	Judges bool // this review judges by it
	Mark   rule.Mark
	Note   string
}

func shown(standard, condition, what string, value float64, unit string, judges bool, mark rule.Mark, note string) Shown {
	return Shown{standard, condition, what, rule.Amount{Value: value, Unit: unit}, judges, mark, note}
}

// SideBySide lists the limits that standards and codes set to what may be touched and to
// what may stay charged. They differ in scope: IEC 61010-1 judges, IEC 60204-1 the times.
func SideBySide() []Shown {
	const normal, fault = "normal condition", "single fault"
	return []Shown{
		shown("IEC 61010-1:2010 6.3.1", normal+", DC", "voltage", float64(TouchVoltage), "V", true, rule.Memory, "clause from memory"),
		shown("IEC 61010-1:2001", normal+", DC", "voltage", 70, "V", false, rule.Read, "edition 2, superseded"),
		shown("IEC 61010-1 6.3.1", normal+", DC", "current", float64(TouchCurrent), "A", true, rule.Read, "an analyser's limit table"),
		shown("IEC 61010-1 6.3.1", normal+", up to 15 kV", "charge", float64(TouchCharge), "C", true, rule.Read, "quotation; same in IEC 60335-1 8.1.4"),
		shown("IEC 61010-1 6.3.1", normal+", above 15 kV", "energy", float64(TouchEnergy), "J", true, rule.Read, "read in IEC 60335-1 and EN 50191"),
		shown("IEC 61010-1:2010 6.3.2", fault+", DC", "voltage", float64(FaultVoltage), "V", true, rule.Memory, "clause from memory"),
		shown("IEC 61010-1 6.3.2", fault+", DC", "current", float64(FaultCurrent), "A", true, rule.Read, "an analyser's limit table; its charge line was not found"),
		shown("IEC 62368-1 Table 5", normal, "charge", 4e-6, "C", false, rule.Read, "other scope, stricter"),
		shown("IEC 62368-1 Table 5", fault, "charge", 8e-6, "C", false, rule.Read, "other scope, stricter"),
		shown("EN 50191:2010", "scope begins above, DC", "voltage", 60, "V", false, rule.Read, ""),
		shown("EN 50191:2010", "scope begins above, DC through 2 kohm", "current", 12e-3, "A", false, rule.Read, ""),
		shown("EN 50191:2010", "scope begins above", "energy", 350e-3, "J", false, rule.Read, ""),
		shown("IEC 60204-1 6.2.4", "to 60 V, else a label with the delay", "time", 5, "s", true, rule.Read, "the label is the waiting time"),
		shown("IEC 60204-1 6.2.4", "exempt below", "charge", 60e-6, "C", false, rule.Read, ""),
		shown("California Title 8 s. 2893", "to 50 V, then short and ground", "time", 300, "s", false, rule.Read, ""),
		shown("DOE practice (laboratory manual)", "shock hazard above, DC", "voltage", 100, "V", false, rule.Read, "with the current below"),
		shown("DOE practice (laboratory manual)", "shock hazard above, DC", "current", 40e-3, "A", false, rule.Read, ""),
		shown("DOE practice (laboratory manual)", "capacitor, shock hazard above", "energy", 10, "J", false, rule.Read, "injury, not reflex"),
		shown("NFPA 70E", "capacitor above 400 V", "energy", 0.25, "J", false, rule.Memory, "reflex"),
	}
}
