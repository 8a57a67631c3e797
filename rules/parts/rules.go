package parts

import (
	"kilovet/hv/circuit"
	"kilovet/rules/rule"
)

// Rules lists the rules of this family.
func Rules() []rule.Rule {
	return []rule.Rule{
		capacitorVoltage, capacitorDielectric, diodeReverse, diodeCurrent, diodeRecovery, diodeSurge, startCurrent, startVoltage,
		resistorVoltage, resistorPower, arcVoltage, arcEnergy, gapStrikes, cableVoltage, feedVoltage, feedTest,
	}
}

// one is a group of a single thing that is no element of the circuit.
func one(name string) []circuit.Element { return []circuit.Element{{Name: name}} }
