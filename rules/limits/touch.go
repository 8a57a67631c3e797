package limits

import (
	"kilovet/hv/quantity"
	"kilovet/rules/rule"
)

// Touch limits of IEC 61010-1 in normal condition, dry: a part is not hazardous at
// or below the voltage; above it, current and charge or energy must both be at or
// below theirs.
const (
	TouchVoltage quantity.Voltage = 60     // DC; edition 3, clause from memory
	TouchPeak    quantity.Voltage = 42.4   // peak of an alternating voltage
	TouchRipple                   = 0.1    // a direct voltage that swings by more counts as alternating
	TouchCurrent quantity.Current = 2e-3   // DC
	TouchCharge  quantity.Charge  = 45e-6  // up to ChargeRuleTo
	TouchEnergy  quantity.Energy  = 350e-3 // above it
	// ChargeRuleTo is where the limit changes from charge to energy.
	ChargeRuleTo quantity.Voltage = 15e3
	// FaultVoltage is the limit in single fault condition, DC; FaultPeak that of the peak of
	// an alternating voltage, FaultCurrent that of a direct current. The charge line of a
	// single fault was not found: that of the normal condition judges.
	FaultVoltage quantity.Voltage = 120
	FaultPeak    quantity.Voltage = 70
	FaultCurrent quantity.Current = 15e-3
)

// The sources of the touch limits.
var (
	TouchVoltageSource = rule.Source{Text: "IEC 61010-1:2010 6.3.1 a): 60 V DC, 42.4 V peak in normal condition", Mark: rule.Memory, Governs: true}
	TouchFaultSource   = rule.Source{Text: "IEC 61010-1:2010 6.3.2 a): 120 V DC in single fault condition", Mark: rule.Memory, Governs: true}
	FaultCurrentSource = rule.Source{Text: "IEC 61010-1 6.3.2 b): 15 mA DC in single fault condition (read in an analyser's limit table, edition 2)", Mark: rule.Read, Governs: true}
	TouchCurrentSource = rule.Source{Text: "IEC 61010-1 6.3.1 b): 2 mA DC (read in an analyser's limit table, edition 2)", Mark: rule.Read, Governs: true}
	TouchChargeSource  = rule.Source{Text: "IEC 61010-1 6.3.1 c): 45 µC up to 15 kV (read in a quotation; same figure in IEC 60335-1 8.1.4)", Mark: rule.Read, Governs: true}
	TouchEnergySource  = rule.Source{Text: "350 mJ above 15 kV (read in IEC 60335-1 8.1.4 and EN 50191; in IEC 61010-1 from memory)", Mark: rule.Read, Governs: true}
	// StricterCharge is shown beside, of another scope.
	StricterCharge = rule.Source{Text: "IEC 62368-1 Table 5: 4 µC touch, 8 µC single fault (other scope, stricter, shown only)", Mark: rule.Read}
)

// Discharge and earthing.
const (
	BondResistance  quantity.Resistance = 0.1
	BondTestCurrent quantity.Current    = 25
	RodCurrent      quantity.Current    = 5
)

// The sources of the rules about discharge, earthing and access.
var (
	DischargeSource  = rule.Source{Text: "IEC 60204-1 6.2.4: 60 V within 5 s, otherwise a label with the delay", Mark: rule.Read, Governs: true}
	InteriorSource   = rule.Source{Text: "IEC 61010-1: interior parts 10 s, otherwise a warning with the waiting time", Mark: rule.Memory}
	RedundancySource = practice("two independent strings, each alone meeting the time: one open element must not leave the charge")
	RodSource        = rule.Source{Text: "NIST EEEL, Safety Rules for Moderate and High Voltages (2008), as repeated by hanoverlabs.com: a resistor stick first, then a solid ground left on; energy rating above the stored energy (pupman.com, 2002)", Mark: rule.Read, Governs: true}
	RodCurrentSource = practice("a rod is sized for a peak of a few amperes, kilo-ohms (pupman.com, 2002, read); 5 A is a decision of this review")
	BondSource       = rule.Source{Text: "IEC 61010-1 6.5: protective bonding at most 0.1 ohm at 25 A", Mark: rule.Read, Governs: true}
	TwoBondsSource   = practice("two separate earth bonds: loss of one must not lift the enclosure to high voltage")
	InterlockSource  = rule.Source{Text: "two interlocks a door, restart by a deliberate act only (radiation control rules, quoting 21 CFR 1020.40)", Mark: rule.Read, Governs: true}
	EnclosureSource  = rule.Source{Text: "EN 50191: parts above 60 V that are not limited in current, charge and energy are kept out of reach", Mark: rule.Read, Governs: true}
	RestartSource    = rule.Source{Text: "EN 50191 as applied by DGUV 203-034: no automatic restart after the mains returns", Mark: rule.Read, Governs: true}
)
