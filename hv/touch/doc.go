// Package touch holds what charge and current do through a person or an earthing rod:
// peaks, times and energies; what comes back by dielectric absorption; and the distances
// that keep people away, as far as the tables were read. It judges nothing.
//
// Voltages are magnitudes throughout.
package touch
