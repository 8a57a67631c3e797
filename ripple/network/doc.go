// Package network solves the circuit of a chain in time: the periodic state under
// its drive, the start from nothing, arcs, and the decay after switching off.
//
// # Elements
//
// Resistors, capacitors, inductors, constant currents, ideal sources (direct, sine,
// square) and diodes i = leak·v + max(0, v − drop)/on with a junction capacitance.
// Between two switchings the network is linear with constant coefficients; the
// diode law is continuous, so nothing jumps when a diode switches. Spark gaps are
// open. Sources of another frequency than the drive are held at zero. Sources join
// nodes into groups with one free potential each, which makes every matrix
// symmetric; capacitor loops through sources, nodes without capacitance and
// floating parts need nothing special.
//
// # Step
//
// Radau IIA of order five, as its rational function of the matrix in partial
// fractions: one real and one complex solution a step with sparse factors L D Lᵀ in
// the order of least degree, so that a step costs time in proportion to the stages
// (Hairer and Wanner, Solving Ordinary Differential Equations II, 1996). The sine
// is part of the linear system, with its frequency corrected such that amplitude and
// phase are exact. What is carried from step to step is charge and inductor current,
// which go on through every jump: charge is balanced to rounding. The collocation
// polynomial gives the instants at which diodes switch, and the extremes.
//
// # Periodic state
//
// The state at phase zero that a period brings back to itself, by Newton's method
// (Aprille and Trick, Proc. IEEE 60 (1972) 108). The first guess and the
// preconditioner are the charge balance between the two peaks of the drive, a convex
// problem for any circuit; the linear equations are solved by carrying changes
// through the stored factors of the period (Saad and Schultz, SIAM J. Sci. Stat.
// Comput. 7 (1986) 856). Where some diodes do not conduct yet Newton's method cannot be
// believed: the guess is made anew with the diodes pressed harder to conduct, the state is
// led on in leaps of many periods, or by implicit steps in pseudo time (Kelley and Keyes,
// SIAM J. Numer. Anal. 35 (1998) 508), or the search starts anew. Where the drive is to hold
// a voltage both are sought together: after each correction the drive is changed by what
// the voltage lacks, and the state by what that does to the circuit between the peaks. A
// search that starts from a similar circuit expects that loads take the same charges, for
// each volt of the drive. The step control makes the period a continuous function of its
// start, so that the charges come back to 1e-8 of what a diode passes, at worst to 3e-7, and
// to 1e-5 where no more is asked for (Options.Swift): then a last slight correction is carried
// through the period, the instants of switching moved with it, and the period not walked
// again. Work is bounded; what is not reached is a lack. The network is passive and
// monotonic: the state is unique wherever something discharges it. Where nothing does, it
// depends on history, and the state that a vanishing leakage of the diodes would leave is
// given: a ladder that was once higher stays higher.
//
// Errors: two grades of mesh are solved, every bound of the steps tighter in the
// finer; their difference is reported. A swift state near one that is known is solved in
// the finer alone. A state that is not reached is a lack.
package network
