// Package field works out the electric field of figures of revolution: electrodes
// at fixed potentials, bodies of uniform permittivity, open space, planes of
// symmetry, natural boundaries and earthed enclosures.
//
// Method. Outlines are cut where they meet, and the faces they enclose are found
// (hv/profile). A face in which there is a field is a region with one permittivity;
// what is between two regions, or at the rim of one, is a wall. In every region
// Green's identity holds on the rim,
//
//	u/2 + ∫ u ∂G/∂n dS = ∫ (∂u/∂n) G dS,   G = 1/4πR,
//
// with the integral over the angle done in closed form: G of a ring is a complete
// elliptic integral. The unknowns are ∂u/∂n on conductors, u on natural boundaries,
// both on interfaces, where ε ∂u/∂n passes through; they are what is asked for, so
// that peaks are read off the surface itself. Each wall, a true line or arc, is
// divided into panels; on a panel the unknowns are polynomials through eight Gauss
// nodes, where the identity is fulfilled. Integrals over a panel are done by its own
// nodes from afar, by halving it towards the point close by, and by a rule with
// t = v⁵ on the panel itself. The dense system is factorised once a division, for
// one volt on each electrode in turn; every condition is a superposition of these.
//
// Panels are graded towards places where the field is not smooth, and cut where the
// last terms of the Legendre series of the unknowns are too large, until these are
// small and the peaks stay. What the last cut has changed is the error reported.
//
// Where a sharp edge, or the junction of a dielectric with a conductor, makes the
// field go to infinity there is no peak. The exponent comes from the angles and
// permittivities (wedge.go, cone.go), and the field is read at stated distances.
//
// Accuracy, against the exact solutions in testdata: peaks 2e-4, capacitances 2e-6;
// against the finite elements there, within their uncertainty: single points 5e-3,
// 0.05 mm from a junction 1e-2; exponents 1e-6.
//
// Sources: Jaswon, Symm, Integral Equation Methods in Potential Theory and
// Elastostatics (1977), ch. 3, 12, from memory; Durand, Électrostatique I (1964),
// from memory; Meixner, IEEE Trans. Antennas Propag. 20, 442 (1972), from memory.
// All formulas were rederived, and are held against quadrature in the tests.
package field
