package vacuum

import "kilovet/insulation/gap"

// Caution is what to mind, without a figure to judge by.
type Caution struct {
	Subject string
	Text    string
	Source  gap.Source
}

// PumpDownCautions are about pressure, pumping, venting and leak testing.
func PumpDownCautions() []Caution {
	return []Caution{
		{"helium", "No leak test with helium while the high voltage is on: at low pressure helium breaks down at a much lower voltage than air.", gap.Source{Text: "NASA-HDBK-4007 w/change 1, p. 22", Mark: gap.Read}},
		{"glow range", "No high voltage while the vessel passes the glow range, pumping or venting. The longest path breaks down first.", FeedthroughSource},
		{"ion gauge", "At 0.001 mbar and above an ion gauge can put a lethal voltage on metal parts of a chamber that is not earthed: earth every metal part and the controller of the gauge.", gap.Source{Text: "Morrison, Revue Phys. Appl. 20 (1985) 531, abstract", Mark: gap.Read}},
		{"trapped gas", "Inside vented boxes, shields and potting the pressure is higher than at the gauge. Wait after the permit is reached.", gap.Source{Text: "Vacuum discharge margin in thermal test, Chinese J. Vac. Sci. Technol. 2019, abstract", Mark: gap.Read}},
		{"leak", "A current that wanders or a pressure that rises with the voltage can be a leak or outgassing: take the voltage off first, then look.", gap.Source{Text: "common practice", Mark: gap.Practice}},
		{"hidden discharge", hiddenGlow.text(), hiddenGlow.source},
		{"two limits", "The limit for the insulation, near 1e-4 mbar, does not protect the emitter, which asks for 1e-9 to 1e-6 mbar by its kind. While conditioning, a step of 1 kV can raise the pressure a hundredfold for minutes: set a limit of its own.", gap.Source{Text: "Jefferson Lab tech note 08-065 (2008), first page; Stanford Nanofabrication Facility, trip of a field-emission gun", Mark: gap.Read}},
		{"magnets", "In a magnetic field electrons go round long ways: sputter ion pumps glow above 1e-4 mbar. Near magnetic lenses the straight path is not the longest.", gap.Source{Text: "Liao, Practical Electron Microscopy and Database, sputter ion pumps", Mark: gap.Read}},
	}
}

// JunctionCautions are about the place where metal, insulator and vacuum meet.
func JunctionCautions() []Caution {
	return []Caution{
		{"negative end first", "Emission and flashover start at the negative end: shield that junction of metal, insulator and vacuum first. Positive charge on the insulator raises the field there.", gap.Source{Text: "DC electric-field modifications produced by solid insulators bridging a uniform-field vacuum gap, abstract", Mark: gap.Read}},
		{"cone", "The larger base of a conical insulator belongs on the negative electrode, its surface at 45 degrees.", gap.Source{Text: "reviews of surface flashover in vacuum, Miller", Mark: gap.Memory}},
		{"plug", "In an inverted insulator the interface between cable plug and ceramic gave way before the vacuum surface: look at it first.", gap.Source{Text: "Hernandez-Garcia, Poelker, Hansknecht, inverted-geometry insulators for a 350 kV gun, abstract", Mark: gap.Read}},
		{"first flashover", "The first flashovers come at considerably lower voltage than later ones; published means are mostly of conditioned samples.", gap.Source{Text: "Mazurek and Tyman, VII ISDEIV, Novosibirsk 1976, abstract", Mark: gap.Read}},
		{"thin pins", "Ceramic feedthroughs are often sold with a needlessly thin pin: work out the field at the pin on the vacuum side.", gap.Source{Text: "Si, Angelico, Gratta, Electric Field Optimization of High-Voltage Vacuum Feedthroughs, abstract", Mark: gap.Read}},
	}
}
