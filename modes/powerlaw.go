package modes

import (
	"math"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes/radial"
)

// PowerLaw is a fibre with a graded core (D. Gloge and E. A. J. Marcatili, Bell Syst. Tech.
// J. 52, 1563, 1973),
//
//	n^2(r) = n1^2 - (n1^2 - n2^2) (r/Radius)^Alpha   inside Radius,
//
// at each wavelength with the indices n1 of Core, on the axis, and n2 of Cladding there.
// Alpha is from 0.5 to 100: 1 is a triangle, 2 a parabola. For a rectangle use Step. The
// zero PowerLaw gives errors.
type PowerLaw struct {
	Radius         float64 // of the core (m)
	Core, Cladding materials.Medium
	Alpha          float64
}

// LP returns the mode LP(l, m) of the fibre, l from 0, m from 1. It can be asked at any
// wavelength; where it is not guided, or with labels out of range, it answers with an
// error.
func (f PowerLaw) LP(l, m int) RadialLP { return RadialLP{f, l, m} }

// Guided returns all guided LP modes at a vacuum wavelength (m) in falling effective index.
// None is missed: see package radial.
func (f PowerLaw) Guided(wavelength float64) ([]GuidedRadial, error) {
	return guidedRadial(f, wavelength)
}

func (f PowerLaw) section(function string, wavelength float64) (s section, err error) {
	if err = domain.Positive(function, "Radius", f.Radius, "m"); err != nil {
		return
	}
	if err = domain.Within(function, "Alpha", f.Alpha, 0.5, 100, ""); err != nil {
		return
	}
	n1, _, err := indexSquare(f.Core, function, "core", wavelength)
	if err != nil {
		return
	}
	n2, _, err := indexSquare(f.Cladding, function, "cladding", wavelength)
	if err != nil {
		return
	}
	contrast := n1.Sub(n2).Mul(n1.Add(n2))
	alpha := f.Alpha
	c, a, b := contrast[0], n1[0], n2[0]
	return section{
		radius:   f.Radius,
		cladding: n2,
		excess: func(_ int, r float64) (taylor.Series, error) {
			return contrast.Scale(oneLessPower(r, alpha)), nil
		},
		pieces:  []radial.Piece{{From: 0, To: 1, Graded: alpha != math.Trunc(alpha)}},
		highest: c, // on the axis
		radii: []change{{inside: func(_ int, r float64) float64 {
			return c * alpha / f.Radius * (1 - oneLessPower(r, alpha))
		}}},
		indices: []change{
			{inside: func(_ int, r float64) float64 { return 2 * a * oneLessPower(r, alpha) }},
			{inside: func(_ int, r float64) float64 { return 2 * b * (1 - oneLessPower(r, alpha)) }, cladding: 2 * b},
		},
	}, nil
}

// oneLessPower returns 1 - r^alpha, with relative accuracy near r = 1.
func oneLessPower(r, alpha float64) float64 {
	if r == 0 {
		return 1
	}
	return -math.Expm1(alpha * math.Log(r))
}
