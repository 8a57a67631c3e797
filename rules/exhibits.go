package rules

import (
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// curves lists every curve of a review in the order of print; a maker gives nothing
// where there is nothing to show.
func curves(e *evidence.Evidence) []exhibit.Curve {
	return gather(e,
		unless("fields", fieldPictures),
		surfaceCurves,
		gapCurves,
		waveforms,
		nodeWaveforms,
		diodeWaveforms,
		emissionCurve,
		cathodeSpectrum,
		spotCurves,
		paschen,
		decayCurve,
	)
}

// tables lists every table of a review in the order of print.
func tables(e *evidence.Evidence) []exhibit.Table {
	return gather(e,
		unless("fields", fieldTables),
		answerTables,
		cutoffTable,
		closedForm,
		dropByCause,
		stageVoltages,
		diodeTable,
		ripples,
		losses,
		operatingPoint,
		answering,
		pathsTable,
		spotTable,
		remedies,
		leftOut,
		distances,
		events,
		powerUp,
		twoWays,
		layersTable,
		sphereGaps,
		pumpDown,
		energyTables,
		radiationTable,
		unless("faults", faultTable),
	)
}

// unless is a maker that gives nothing where its family of rules is left out.
func unless[T any](family string, maker func(*evidence.Evidence) []T) func(*evidence.Evidence) []T {
	return func(e *evidence.Evidence) []T {
		if e.Leaves(family) {
			return nil
		}
		return maker(e)
	}
}

// gather runs the makers; what they give stands in their order.
func gather[T any](e *evidence.Evidence, makers ...func(*evidence.Evidence) []T) []T {
	bound := make([]func() []T, len(makers))
	for i, maker := range makers {
		bound[i] = func() []T { return maker(e) }
	}
	return inTurn(bound...)
}
