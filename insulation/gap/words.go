// Package gap holds the words shared by everything that knows insulation: the
// description of a gap or surface, the voltages across it, and the form of an
// answer with its sources. It computes nothing.
package gap

// Medium is what fills a gap.
type Medium string

// The media, in the words of the description.
const (
	Air          Medium = "air"
	InGas        Medium = "gas"
	Vacuum       Medium = "vacuum"
	Oil          Medium = "oil"
	Solid        Medium = "solid"
	PrintedBoard Medium = "printed board"
)

// Insulation is what a gap or surface must do (IEC 60664-1).
type Insulation string

// The classes of insulation; a gap that names none is basic.
const (
	Functional Insulation = "functional" // needed for operation only
	Basic      Insulation = "basic"      // protects people while nothing has failed
	Reinforced Insulation = "reinforced" // protects them like two basic ones
)

// Gas is the gas of a gap; a gap that names none is in air.
type Gas string

// The gases, in the words of the description.
const (
	AirGas              Gas = "air"
	Nitrogen            Gas = "nitrogen"
	SulphurHexafluoride Gas = "sulphur hexafluoride"
	Helium              Gas = "helium"
	Argon               Gas = "argon"
	Hydrogen            Gas = "hydrogen"
	CarbonDioxide       Gas = "carbon dioxide"
)

// Polarity is the sign of the more highly stressed electrode against the other.
type Polarity string

// The polarities; unknown and changing are judged as the worse of the two.
const (
	Unknown  Polarity = ""
	Positive Polarity = "positive"
	Negative Polarity = "negative"
	Changing Polarity = "changing" // now the one, now the other
)

// Board says where the conductors of a printed board lie (IPC-2221 Table 6-1).
type Board string

// The places on a board; one that names none is external and uncoated.
const (
	ExternalUncoated Board = "external uncoated"  // B2, B3 above 3050 m
	Internal         Board = "internal"           // B1
	PolymerCoated    Board = "polymer coated"     // B4, permanent coating
	ConformalCoated  Board = "conformal coated"   // A5, coating over the assembly
	TerminationBare  Board = "termination bare"   // A6
	TerminationCoat  Board = "termination coated" // A7, conformal coating
)

// Surface is the state of the electrodes' surface (Peek's irregularity factor).
type Surface string

// The states of a surface; one that names none is smooth.
const (
	Smooth    Surface = "smooth"
	Weathered Surface = "weathered" // roughened or dirty
	Stranded  Surface = "stranded"
)
