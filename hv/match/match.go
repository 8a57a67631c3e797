// Package match says how well readings agree with what a hypothesis predicts, when
// every reading has an error of its own and some errors are common to many: the drive
// that all rest on, the gain of the instrument that took several of them.
package match

import (
	"fmt"

	"gonum.org/v1/gonum/mat"
)

// Common is a relative error that several readings share.
type Common struct {
	Share float64 // standard error, relative to the predicted value
	Of    []bool  // by reading
}

// Misfit is the generalised sum of squares dᵀ C⁻¹ d of the deviations d of readings
// from their predictions, with the covariance C = diag(σ²) + Σ s² p pᵀ of own and
// common errors (Aitken, Proc. R. Soc. Edinburgh 55 (1935) 42; memory). For a true
// hypothesis it is about the number of readings. Own standard errors are above zero.
func Misfit(read, predicted, own []float64, common []Common) float64 {
	n := len(read)
	if n == 0 {
		return 0
	}
	c, d := mat.NewSymDense(n, nil), mat.NewVecDense(n, nil)
	for i := range n {
		d.SetVec(i, read[i]-predicted[i])
		for j := i; j < n; j++ {
			c.SetSym(i, j, covariance(i, j, predicted, own, common))
		}
	}
	var factors mat.Cholesky
	if !factors.Factorize(c) {
		panic(fmt.Sprintf("match: standard errors %v are not all above zero", own))
	}
	var x mat.VecDense
	if err := factors.SolveVecTo(&x, d); err != nil && x.Len() == 0 {
		panic("match: " + err.Error())
	}
	return mat.Dot(d, &x)
}

func covariance(i, j int, predicted, own []float64, common []Common) float64 {
	v := 0.0
	if i == j {
		v = own[i] * own[i]
	}
	for _, c := range common {
		if c.Of[i] && c.Of[j] {
			v += c.Share * c.Share * predicted[i] * predicted[j]
		}
	}
	return v
}
