package snell

import (
	"math"

	"glassthread/materials/domain"
)

// CleavedEnd returns the powers at the clean end of a fibre of index fibre,
// square to its axis, in a medium of index outside (1 for air):
//
//	Reflectance = ((fibre - outside)/(fibre + outside))^2
//
// (Born and Wolf, section 1.5.2). The index is that of the core, or better the
// effective index of the mode; the wave is taken as plane.
func CleavedEnd(fibre, outside float64) (Powers, error) {
	const function = "snell.CleavedEnd"
	if err := checkIndex(function, "fibre", fibre); err != nil {
		return Powers{}, err
	}
	if err := checkIndex(function, "outside", outside); err != nil {
		return Powers{}, err
	}
	return face(fibre, outside), nil
}

func face(n1, n2 float64) Powers {
	r := (n1 - n2) / (n1 + n2)
	return lossless(r*r, 4*n1/(n1+n2)*(n2/(n1+n2)))
}

// Joint is two square fibre ends that face each other across a gap, by their
// indices: a matching gel, or air, fills the gap. The waves are taken as plane,
// which leaves out the light that spreads sideways in the gap.
type Joint struct{ First, Filling, Second float64 }

// AirGap returns the joint of two fibres with nothing but air between, its index
// taken as 1. A Joint takes any other, such as that of air at its own density.
func AirGap(first, second float64) Joint { return Joint{first, 1, second} }

// Coherent returns the powers of the joint with a gap (m, at least 0) at a vacuum
// wavelength (m), when the reflections of the two faces interfere, as they do
// while the gap is short against the coherence length of the light. With
// phase = 2 pi Filling gap/wavelength,
//
//	R = ((a - b)^2 cos^2 + (a b/f - f)^2 sin^2) / ((a + b)^2 cos^2 + (a b/f + f)^2 sin^2)
//
// for the indices a, f, b in order: the characteristic matrix of one film (Born
// and Wolf, section 1.6.4). A gap of 0 is the contact of the two fibres.
func (j Joint) Coherent(gap, wavelength float64) (Powers, error) {
	const function = "snell.Joint.Coherent"
	if err := j.check(function); err != nil {
		return Powers{}, err
	}
	if err := domain.NonNegative(function, "gap", gap, "m"); err != nil {
		return Powers{}, err
	}
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return Powers{}, err
	}
	phase := 2 * math.Pi * (gap / wavelength) * j.Filling
	if err := domain.Result(function, "phase across the gap", phase); err != nil {
		return Powers{}, err
	}
	return film(j.First, j.Filling, j.Second, phase), nil
}

// film returns the powers of one lossless film at normal incidence.
func film(a, f, b, phase float64) Powers {
	sin, cos := math.Sincos(phase)
	// a b - f^2 in differences, which near indices leave exact.
	odd := ((a-f)*(b/f) + (b - f)) * sin
	even := (a - b) * cos
	oddSum, evenSum := (a*(b/f)+f)*sin, (a+b)*cos
	all := evenSum*evenSum + oddSum*oddSum
	return lossless((even*even+odd*odd)/all, 4*a*b/all)
}

// Incoherent returns the powers of the joint when the light forgets its phase
// across the gap, or the gap is not known to a fraction of a wavelength: the
// powers, not the amplitudes, of all reflections between the two faces add up,
//
//	Transmittance = T1 T2/(1 - R1 R2),  Reflectance = R1 + T1^2 R2/(1 - R1 R2)
//
// with R and T of each face alone, which is also the mean of Coherent over the
// phase across the gap. For equal fibres Reflectance = 2 R1/(1 + R1).
func (j Joint) Incoherent() (Powers, error) {
	if err := j.check("snell.Joint.Incoherent"); err != nil {
		return Powers{}, err
	}
	one, two := face(j.First, j.Filling), face(j.Filling, j.Second)
	rest := one.Transmittance + one.Reflectance*two.Transmittance // 1 - R1 R2
	return lossless(
		one.Reflectance+one.Transmittance*(one.Transmittance/rest)*two.Reflectance,
		one.Transmittance/rest*two.Transmittance), nil
}

func (j Joint) check(function string) error {
	if err := checkIndex(function, "First", j.First); err != nil {
		return err
	}
	if err := checkIndex(function, "Filling", j.Filling); err != nil {
		return err
	}
	return checkIndex(function, "Second", j.Second)
}
