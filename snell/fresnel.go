package snell

import "glassthread/materials/domain"

// Fresnel returns the coefficients of the interface from a lossless medium of
// index n1 to a medium of index n2, lossless or absorbing, for a plane wave at an
// incidence (rad) from 0 to pi/2. With kx = n1 sin and k1 = n1 cos common to both,
// and k2 = sqrt(n2^2 - kx^2),
//
//	S: r = (k1 - k2)/(k1 + k2)                            t = 2 k1/(k1 + k2)
//	P: r = (n2^2 k1 - n1^2 k2)/(n2^2 k1 + n1^2 k2)        t = 2 n1 n2 k1/(n2^2 k1 + n1^2 k2)
//
// (Born and Wolf, section 1.5.2, equations 20 and 21, from memory, and section
// 14.2 for absorbing media), evaluated as products of differences that do not
// cancel. The time factor is exp(-i omega t), so an absorbing index has a
// positive imaginary part; a negative one (gain) is refused. At normal incidence
// P.Reflection is -S.Reflection, as in Born and Wolf, since the reflected P field
// is counted in the direction that turns with the ray.
//
// Beyond the critical angle the reflection has modulus 1 and TotalReflectionPhase
// gives its argument; the transmission is then the evanescent field at the
// interface, and no power goes with it. Transmittance is the power that enters the second medium through
// the interface, also where it is absorbed further on, so that Reflectance +
// Transmittance is 1 and Absorptance 0. The first medium is lossless because in
// an absorbing one the incident and the reflected power do not separate.
//
// Indices go from 1e-40 to 1e40. The real part of n2 may be 0 when its imaginary
// part is not, and the other way round.
func Fresnel(n1 float64, n2 complex128, incidence float64) (Coefficients, error) {
	const function = "snell.Fresnel"
	if err := checkIndex(function, "n1", n1); err != nil {
		return Coefficients{}, err
	}
	if err := checkComplexIndex(function, "n2", n2); err != nil {
		return Coefficients{}, err
	}
	if err := checkIncidence(function, incidence); err != nil {
		return Coefficients{}, err
	}
	r := newRay(n1, incidence)
	c := r.fresnel(n2)
	if !c.finite() {
		return Coefficients{}, outOfRange(function, incidence)
	}
	return c, nil
}

// fresnel uses, besides the difference of squares for S, that
//
//	n2^2 k1 - n1^2 k2 = (k1 - k2)(kx^2 - k1 k2)
//	n2^2 k1 + n1^2 k2 = (k1 + k2)(kx^2 + k1 k2)
//	(k1 k2)^2 - kx^4 = n1^2 (n2^2 cos^2 - n1^2 sin^2)
func (r *ray) fresnel(n2 complex128) Coefficients {
	k1, k2 := complex(r.kz, 0), r.normal(n2)
	sum := k1 + k2
	product := complex(r.kx*r.kx, 0) + scale(r.kz, k2)

	var c Coefficients
	c.S.Reflection = -r.contrast(n2) / (sum * sum)
	c.P.Reflection = -c.S.Reflection * scale(r.n*r.n, r.brewster(n2)) / (product * product)
	c.S.Transmission = scale(2, k1) / sum
	c.P.Transmission = scale(2*r.n*r.kz, n2) / (sum * product)

	power := 4 * r.kz / norm(sum)
	c.S.Powers = lossless(norm(c.S.Reflection), power*real(k2))
	// Re(k2/n2^2) |n2|^4; its two terms never cancel by more than a third.
	a, b := real(n2), imag(n2)
	flux := real(k2)*(a-b)*(a+b) + 2*a*b*imag(k2)
	c.P.Powers = lossless(norm(c.P.Reflection), power*r.n*r.n*flux/norm(product))
	return c
}

func outOfRange(function string, value float64) error {
	return &domain.Error{Func: function, Argument: "incidence", Value: value,
		Allowed: "where the result is within the range of a float64; the arguments are too extreme together"}
}
