// Package cascade holds the closed forms of the cascade multiplier (Greinacher,
// Cockcroft and Walton) by charge balance: what the ladder gives without load,
// what it loses under a load current, and how its output ripples.
//
// # Circuit
//
// A stage is two capacitors and two diodes. Stage 1 stands at the grounded end.
//
//	coupling.0 = drive, stage.0 = ground
//	coupling capacitor k   between coupling.k-1 and coupling.k
//	smoothing capacitor k  between stage.k-1 and stage.k
//	diode 2k-1             from stage.k-1 to coupling.k
//	diode 2k               from coupling.k to stage.k
//
// The load stands at stage.N. A symmetrical cascade has a second coupling column
// with the same capacitors and an exactly opposite drive on the one smoothing
// column. Voltages are written for positive polarity; for negative polarity every
// voltage changes its sign and time counts from the negative peak of the drive.
//
// # Model
//
// Load I, frequency f, q = I/f. In the steady state every diode passes q in a
// period (q/2 if symmetrical), the even diodes in a pulse at the positive peak of
// the drive, the odd ones in a pulse at the negative peak, half a period later; in
// between the load alone discharges the smoothing column. With m = N-k+1 stages
// above and including stage k, the pulses move m q through coupling capacitor k.
// A pulse ends when the diode just conducts, which ties the columns together and
// gives every voltage by summing up from the grounded end. With a square drive the
// even diodes stay on for half a period, so the coupling capacitors carry part of
// the load meanwhile.
//
// For equal capacitors C the sums are polynomials, in q/C:
//
//	                      drop of the mean               ripple peak to peak
//	half-wave, sine       2n³/3 + n²/2 + n/3             n(n+1)/2
//	half-wave, square     2n³/3 + n²/4 + 7n/48           n(n+1)/2 − n/4
//	symmetrical, sine     n³/6 + n²/4 + n/3              n/2
//	symmetrical, square   n³/6 + n²/8 + n/12             n/4
//
// The usual textbook drop 2n³/3 + n²/2 − n/6 is neither that of the maximum nor of
// the mean: it takes a whole period's charge from every smoothing capacitor before
// the coupling capacitors are refilled (see [Cascade.TextbookDrop]).
//
// # Validity
//
// Stiff source, no strays, pulses short against the period. Real pulses of a sine
// last the angle in which the source makes good the sag, so that the law overstates
// drop and ripple, on the cautious side. By how much, against a quasi-static solution
// in time with ideal diodes (own computation, derived), for equal capacitors:
//
//	q/(C peak)                  0.001   0.01    0.1    0.3
//	half-wave    drop, n = 1    0.5 %   1.4 %   4.6 %  8.3 %
//	             drop, n = 4    0.3 %   1.0 %   3.4 %  −
//	             ripple, n = 1  1.1 %   3.3 %   11 %   21 %
//	             ripple, n = 4  1.3 %   4.3 %   20 %   −
//	symmetrical  drop, n = 1    0.6 %   2.0 %   6.6 %  12 %
//	             drop, n = 3            1.4 %   4.7 %  8.4 %
//	             ripple, n = 1  1.6 %   4.8 %   16 %   31 %
//	             ripple, n = 3  2.4 %   10 %    42 %   112 %
//
// For one stage the excess of the ripple is about √(q/(C peak))/π, of a symmetrical
// one √(2q/(C peak))/π. The second harmonic of a long half-wave cascade, a
// small difference of two large pulses, is the least certain: ten stages that lose
// 42 % have less than half of it. With a square drive source and diode resistance
// do the opposite: at R f C = 0.003 the ripple is 3 to 4 % larger than the law's.
//
// The limits at which the functions refuse are [LargestSwing] and [LargestDrop].
package cascade
