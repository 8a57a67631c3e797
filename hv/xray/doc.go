// Package xray estimates the air kerma rate beyond a wall from a place where
// electrons stop.
//
// The model: a thick target gives Kramers's continuum, evenly into 4π and without
// absorbing any of it; the wall attenuates it as a narrow beam with published mass
// attenuation coefficients; air at the point turns it into kerma. Characteristic
// lines, scatter from light walls and the doubt of the continuum's level stand in
// the upper figure. It is an estimate for judging a design, within a factor of two
// or so for filtered beams, and replaces no survey.
package xray
