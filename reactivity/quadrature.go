package reactivity

import (
	"math"
	"sync"
)

// rule is a quadrature for ∫ f(y) dy from 0 to ∞, in units of half the gap: f must be
// even and analytic in the plane cut along the imaginary axis from ±i to ±i·ratio, and
// fall off as 1/y². That is what remains of ln|G| on the line through the gap of a
// spectrum with levels between 1 and ratio half gaps away on either side of it.
//
// The nodes are y = sc(v, k′), evenly spaced in v, with k = 1/ratio: the conformal map
// of the cut plane onto a ring makes the trapezoidal rule converge geometrically
// (N. Hale, N. J. Higham, L. N. Trefethen, SIAM J. Numer. Anal. 2008, 46, 2505), so
// that 10 to 20 nodes give twelve digits.
type rule struct {
	node, weight []float64
}

// Rules are made once for each ratio 2^(i/2); a spectrum uses the next larger one.
const rules = 96

var (
	ruleOnce [rules]sync.Once
	ruleMade [rules]rule
)

// ruleFor is the rule for levels between 1 and at least ratio half gaps from the
// middle of the gap.
func ruleFor(ratio float64) *rule {
	i := 1
	if ratio > 1 {
		i = int(math.Ceil(2*math.Log2(ratio))) + 1
	}
	if i >= rules {
		i = rules - 1
	}
	ruleOnce[i].Do(func() { ruleMade[i] = newRule(math.Exp2(float64(i) / 2)) })
	return &ruleMade[i]
}

// quadratureDigits is the exponent of the error aimed at, e^-30 of the integrand's size.
const quadratureDigits = 30

func newRule(ratio float64) rule {
	k := 1 / ratio
	// Complete elliptic integrals K(k) and K(k′) by arithmetic-geometric means.
	kc := math.Sqrt(1 - k*k)
	whole := math.Pi / 2 / mean(1, kc)     // K(k)
	complement := math.Pi / 2 / mean(1, k) // K(k′)
	n := int(math.Ceil(quadratureDigits*complement/(2*math.Pi*whole))) + 1
	r := rule{make([]float64, n), make([]float64, n)}

	// Descending Landau steps for modulus k′, whose complement is k.
	var a, c [40]float64
	steps := 0
	a[0], c[0] = 1, kc
	b := k
	for math.Abs(c[steps]) > 1e-17 && steps < len(a)-1 {
		a[steps+1], c[steps+1] = (a[steps]+b)/2, (a[steps]-b)/2
		b = math.Sqrt(a[steps] * b)
		steps++
	}
	for q := range n {
		v := complement * (float64(q) + 0.5) / float64(n)
		phi := math.Ldexp(a[steps]*v, steps)
		for i := steps; i > 0; i-- {
			phi = (phi + math.Asin(c[i]/a[i]*math.Sin(phi))) / 2
		}
		sn, cn := math.Sincos(phi)
		dn := math.Sqrt(cn*cn + k*k*sn*sn)
		r.node[q] = sn / cn
		r.weight[q] = complement / float64(n) * dn / (cn * cn)
	}
	return r
}

// mean is the arithmetic-geometric mean of two positive numbers.
func mean(a, b float64) float64 {
	for range 60 {
		if math.Abs(a-b) <= 1e-16*a {
			break
		}
		a, b = (a+b)/2, math.Sqrt(a*b)
	}
	return a
}
