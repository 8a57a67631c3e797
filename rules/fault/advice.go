package fault

// What helps against the consequences of a class of faults: practice collected from
// laboratory rules and textbooks, no one source.
const (
	addDiode      = "several diodes in series a position, each with margin; a trip on ripple or on drive against output"
	addPolarity   = "prove the polarity at a few per cent of the drive before anything else is connected"
	addCapacitor  = "capacitors rated for twice the stage and margin; a current limit in the drive; a trip that answers a drop of the output"
	addSeries     = "a trip that compares the drive with what the divider reads; resistors as strings with margin"
	addUpper      = "an over-voltage trip fed by a second divider; a trip that compares the drive with the reading"
	addLower      = "two lower arms in parallel, a gas tube at the divider itself, its earth bolted"
	addMeter      = "a trip that compares the drive with the reading; a second divider"
	addClamp      = "test the clamp at every maintenance; two of them in parallel"
	addBias       = "two bias resistors in series and parallel, a clamp from cathode to control electrode, a trip on emission"
	addBleeder    = "a second permanent string that meets the waiting time alone; a rod before anything is touched"
	addHeater     = "a trip on the heater's current and voltage window"
	addFeed       = "an earthed screen, a gas tube from the primary to earth, a fuse, a trip on leakage"
	addCable      = "a loop through the plug that proves the screen; both ends of the screen bolted to earth"
	addReturn     = "a second return that is bolted, not plugged; a relay in the interlock chain that proves it"
	addEarth      = "a second separate earth bond, bolted; a relay that proves the earth in the interlock chain"
	addRegulation = "an over-voltage trip with a sensor of its own; a drive whose limit the parts bear"
	addArc        = "a series resistor at the gun that limits the current, an arc counter that switches off, tubes on every lead at the wall"
	addPressure   = "a pressure interlock that is faster than the discharge"
	addValue      = "measure every part before it goes in; compare the reading with a second meter at a few per cent"
	addPhase      = "look at both halves with an oscilloscope at a few per cent of the drive"
)
