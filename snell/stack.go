package snell

import (
	"fmt"
	"math"

	"glassthread/materials/domain"
)

// Film is a plane layer: its index (the imaginary part, at least 0, absorbs) and
// its thickness (m, at least 0).
type Film struct {
	Index     complex128
	Thickness float64
}

// Stack is a pile of films between two half-spaces, listed from the side the
// light comes from. Films may be empty; the slice is only read. An evanescent gap
// is a film like any other.
type Stack struct {
	Entrance float64 // index, lossless
	Films    []Film
	Exit     complex128 // index, lossless or absorbing
}

// At returns the amplitudes and powers of the stack for a plane wave of a vacuum
// wavelength (m) at an incidence (rad, from 0 to pi/2) in the entrance medium.
// All interfaces interfere: the films are flat and the light is coherent across
// them. Reflection is counted at the first interface and Transmission from the
// first interface to the last, in the conventions of Fresnel, which a stack
// without films equals. Transmittance is the power that enters the exit medium,
// Absorptance the power left in the films: 0 exactly where no film absorbs, and
// otherwise what remains of 1, hence good to about 1e-15 absolute.
//
// The method is that of characteristic matrices (F. Abeles, Ann. Phys. (Paris)
// 12, 596 (1950); Born and Wolf, section 1.6), applied from the last film to the
// first to the transverse fields B and C, and to their excess C - B times the
// entrance admittance. Each is freed of its growing exponential, so that no
// thickness overflows, and a film of nearly the entrance index keeps the digits
// of its weak reflection.
func (s Stack) At(wavelength, incidence float64) (Coefficients, error) {
	const function = "snell.Stack.At"
	if err := s.check(function, wavelength, incidence); err != nil {
		return Coefficients{}, err
	}
	r := newRay(s.Entrance, incidence)
	if len(s.Films) == 0 {
		c := r.fresnel(s.Exit)
		if !c.finite() {
			return Coefficients{}, outOfRange(function, incidence)
		}
		return c, nil
	}

	kz := r.normal(s.Exit)
	contrast, inverse := r.contrast(s.Exit), 1/square(s.Exit)
	toS := start(r.kz, kz, contrast)
	toP := start(r.impedance(), kz*inverse, r.contrastP(s.Exit, contrast, inverse))
	absorbs := false
	for i := len(s.Films) - 1; i >= 0; i-- {
		film := s.Films[i]
		if film.Thickness == 0 {
			continue
		}
		absorbs = absorbs || imag(film.Index) > 0
		l, ok := r.layer(film, wavelength)
		if !ok {
			return Coefficients{}, &domain.Error{Func: function,
				Argument: fmt.Sprintf("Films[%d].Thickness", i), Value: film.Thickness,
				Allowed: "such that the phase across the film is within the range of a float64 (m)"}
		}
		contrast, square := r.contrast(film.Index), square(film.Index)
		inverse := 1 / square
		toS.through(l, l.over, l.times, contrast)
		toP.through(l, l.over*square, l.times*inverse, r.contrastP(film.Index, contrast, inverse))
	}

	var c Coefficients
	c.S = toS.finish(real(kz), absorbs)
	// Re(kz/n^2) as in fresnel, free of cancellation.
	a, b := real(s.Exit), imag(s.Exit)
	flux := (real(kz)*(a-b)*(a+b) + 2*a*b*imag(kz)) * norm(inverse)
	c.P = toP.finish(flux, absorbs)
	c.P.Transmission *= complex(s.Entrance, 0) / s.Exit // from the magnetic field to the electric
	if !c.finite() {
		return Coefficients{}, outOfRange(function, incidence)
	}
	return c, nil
}

func (s Stack) check(function string, wavelength, incidence float64) error {
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return err
	}
	if err := checkIncidence(function, incidence); err != nil {
		return err
	}
	if err := checkIndex(function, "Entrance", s.Entrance); err != nil {
		return err
	}
	if err := checkComplexIndex(function, "Exit", s.Exit); err != nil {
		return err
	}
	for i := range s.Films {
		film := &s.Films[i]
		if checkComplexIndex(function, "", film.Index) != nil {
			return checkComplexIndex(function, fmt.Sprintf("Films[%d].Index", i), film.Index)
		}
		if !(film.Thickness >= 0 && film.Thickness <= math.MaxFloat64) {
			return domain.NonNegative(function, fmt.Sprintf("Films[%d].Thickness", i), film.Thickness, "m")
		}
	}
	return nil
}

// square returns n^2.
func square(n complex128) complex128 {
	a, b := real(n), imag(n)
	return complex((a-b)*(a+b), 2*a*b)
}

// impedance is kz/n^2 of the entrance medium, which P waves have for admittance.
func (r *ray) impedance() float64 { return r.cos / r.n }

// contrastP returns (kz/n^2)^2 of a medium less that of the entrance medium,
//
//	(n^2 - n0^2)(n0^2 sin^2 - n^2 cos^2) / (n^4 n0^2).
//
// The arguments are the index, the first factor, and 1/n^2.
func (r *ray) contrastP(n, contrast, inverse complex128) complex128 {
	return scale(-1/(r.n*r.n), (contrast*inverse)*(r.brewster(n)*inverse))
}

// layer is the part of a film's matrix that both polarisations share, times
// exp(i phase) so that nothing in it grows.
type layer struct {
	cosine complex128 // (1 + exp(2 i phase))/2
	over   complex128 // (1 - exp(2 i phase))/2 over kz
	times  complex128 // the same times kz
	decay  complex128 // exp(i phase)
}

// layer reports whether the phase is within the range of a float64.
func (r *ray) layer(film Film, wavelength float64) (l layer, ok bool) {
	kz := r.normal(film.Index)
	turns := 2 * math.Pi * (film.Thickness / wavelength)
	phase := scale(turns, kz)
	a, b := real(phase), imag(phase)
	if !(turns <= math.MaxFloat64 && a <= math.MaxFloat64/4 && b <= math.MaxFloat64/4) {
		return layer{}, false
	}
	sin, cos := math.Sincos(a)
	fade := math.Exp(-b)
	less := math.Expm1(-2 * b)
	// w = exp(2 i phase) - 1, without cancellation for a thin film.
	w := complex(less*(cos-sin)*(cos+sin)-2*sin*sin, 2*(less+1)*sin*cos)
	l = layer{cosine: 1 + w/2, decay: complex(fade*cos, fade*sin)}
	if a+b < 1e-6 {
		// kz may be 0 here: at a film's own critical angle the field in it is linear.
		z := complex(-2*b, 2*a)
		l.over = complex(0, -turns) * (1 + z/2*(1+z/3))
	} else {
		l.over = -w / 2 / kz
	}
	l.times = -w / 2 * kz
	return l, true
}

// field is the wave at a plane of the stack, for one transmitted beyond the
// last: its two transverse fields b and c, and excess = c - admittance b, which
// vanishes where nothing comes back. Their matrices are applied to all three,
// since the difference of the first two would cancel in one limit (weak
// reflection), and the sum of the others in another (near a critical angle).
type field struct {
	b, c, excess complex128
	entrance     float64    // admittance of the entrance medium
	decay        complex128 // factor taken out of the fields
}

// start is the field in the exit medium; contrast is the difference of the
// squares of the two admittances.
func start(entrance float64, exit, contrast complex128) field {
	return field{b: 1, c: exit, excess: contrast / (exit + complex(entrance, 0)), entrance: entrance, decay: 1}
}

// through carries the field back through a layer. over and times are its sine
// divided by and multiplied with its admittance.
func (f *field) through(l layer, over, times, contrast complex128) {
	b := l.cosine*f.b + over*f.c
	c := l.cosine*f.c + times*f.b
	excess := l.cosine*f.excess + over*(contrast*f.b-scale(f.entrance, f.excess))
	// A power of two keeps the fields within range and costs no digit.
	size := math.Max(math.Max(math.Abs(real(b)), math.Abs(imag(b))),
		math.Max(math.Abs(real(c)), math.Abs(imag(c))))
	_, e := math.Frexp(size)
	down := math.Ldexp(1, -e)
	f.b, f.c, f.excess = scale(down, b), scale(down, c), scale(down, excess)
	f.decay *= scale(down, l.decay)
}

// finish splits the field at the first interface into the incident and the
// reflected wave; exit is the real part of the exit medium's admittance.
func (f *field) finish(exit float64, absorbs bool) Polarised {
	b := scale(f.entrance, f.b)
	incident, reflected := b+f.c, b-f.c
	if norm(reflected) < nearly*nearly*norm(incident) {
		reflected = -f.excess
	}
	p := Polarised{
		Reflection:   reflected / incident,
		Transmission: scale(2*f.entrance, f.decay) / incident,
	}
	reflectance := norm(p.Reflection)
	transmittance := norm(p.Transmission) * (exit / f.entrance)
	if absorbs {
		p.Powers = absorbing(reflectance, transmittance)
	} else {
		p.Powers = lossless(reflectance, transmittance)
	}
	return p
}
